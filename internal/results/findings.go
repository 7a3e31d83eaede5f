package results

import "gloamwright/internal/design"

type findingEntry struct {
	Severity  string   `json:"severity"`
	Check     string   `json:"check"`
	Subject   string   `json:"subject"`
	At        string   `json:"at"`
	Message   string   `json:"message"`
	Value     *float64 `json:"value"`
	Limit     *float64 `json:"limit"`
	LimitKind string   `json:"limit_kind"`
	Unit      string   `json:"unit"`
	Source    string   `json:"source"`
	Remedy    string   `json:"remedy"`
}

func findings(d *design.Design) []findingEntry {
	out := []findingEntry{}
	for _, f := range d.Findings {
		e := findingEntry{
			Severity: f.Severity.String(), Check: f.Check, Subject: f.Subject, At: f.At.String(), Message: f.Message,
			Value: figure(f.Value), Limit: figure(f.Limit), LimitKind: "most", Unit: f.Unit, Source: f.Source, Remedy: f.Remedy,
		}
		if f.Over {
			e.LimitKind = "least"
		}
		out = append(out, e)
	}
	return out
}
