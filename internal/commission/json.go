package commission

import (
	"encoding/json"
	"fmt"
)

// JSON writes the record for machines: gloamwright_record 1.
func (r *Record) JSON() ([]byte, error) {
	type line struct {
		Condition string   `json:"condition"`
		Point     string   `json:"point"`
		Low       float64  `json:"low_v"`
		Typical   float64  `json:"typical_v"`
		High      float64  `json:"high_v"`
		Measured  *float64 `json:"measured_v"`
		Verdict   Verdict  `json:"verdict"`
		Says      string   `json:"says,omitempty"`
	}
	type fault struct {
		What      string `json:"fault"`
		Sign      string `json:"sign"`
		Explains  int    `json:"explains"`
		Conflicts int    `json:"conflicts"`
	}
	out := struct {
		Version  int     `json:"gloamwright_record"`
		Job      string  `json:"job"`
		Revision string  `json:"revision"`
		Tester   string  `json:"tester"`
		Meter    string  `json:"meter"`
		Date     string  `json:"date"`
		Passed   bool    `json:"passed"`
		Open     int     `json:"open"`
		Readings []line  `json:"readings"`
		Likely   []fault `json:"likely"`
		Next     string  `json:"next,omitempty"`
	}{Version: 1, Job: r.Job, Revision: r.Revision, Tester: r.Tester, Meter: r.Meter, Date: r.Date, Passed: r.Passed, Open: r.Open, Likely: []fault{}}
	for _, j := range r.Judged {
		l := line{Condition: j.Condition, Point: j.Point, Low: j.Low, Typical: j.Typical, High: j.High, Verdict: j.Verdict, Says: j.Says}
		if j.Verdict != Missing && j.Verdict != Unreadable {
			v := j.Measured
			l.Measured = &v
		}
		out.Readings = append(out.Readings, l)
	}
	for _, f := range r.Likely {
		out.Likely = append(out.Likely, fault{f.What, f.Sign, f.Points, f.Misses})
	}
	if r.Next != nil {
		out.Next = r.Next.Says
	}
	b, err := json.MarshalIndent(out, "", "  ")
	if err != nil {
		return nil, fmt.Errorf("commissioning record: %w", err)
	}
	return append(b, '\n'), nil
}
