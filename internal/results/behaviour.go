package results

import (
	"gloamwright/internal/design"
	"gloamwright/internal/facts"
)

// functionRow compares what a circuit asks for with what was found. Wanted is null
// where a condition asks nothing of it.
type functionRow struct {
	Circuit string           `json:"circuit"`
	Asked   string           `json:"asked"`
	Wanted  map[string]*bool `json:"wanted"`
	Found   map[string]bool  `json:"found"`
}

func function(d *design.Design, conds []string) []functionRow {
	out := []functionRow{}
	for _, r := range d.Function {
		e := functionRow{Circuit: r.Circuit, Asked: r.Asked, Wanted: map[string]*bool{}, Found: map[string]bool{}}
		for i, c := range conds {
			e.Found[c] = r.Found[i]
			e.Wanted[c] = nil
			if r.Known[i] {
				e.Wanted[c] = &r.Wanted[i]
			}
		}
		out = append(out, e)
	}
	return out
}

// threshold is a value at which something changes over.
type threshold struct {
	Key   string   `json:"key"`
	Name  string   `json:"name"`
	Value *float64 `json:"value"`
	Low   *float64 `json:"low"`
	High  *float64 `json:"high"`
	Unit  string   `json:"unit"`
	Text  string   `json:"text"`
}

func thresholds(d *design.Design) []threshold {
	out := []threshold{}
	for _, t := range d.Thresholds {
		out = append(out, threshold{Key: t.Key, Name: t.Name, Value: figure(t.Value), Low: figure(t.Low), High: figure(t.High), Unit: t.Unit, Text: t.Text})
	}
	return out
}

type faultEntry struct {
	Key       string       `json:"key"`
	Part      string       `json:"part"`
	What      string       `json:"what"`
	Sign      string       `json:"sign"`
	Dark      []seenEntry  `json:"dark"`
	Lit       []seenEntry  `json:"lit"`
	Opens     string       `json:"opens"`
	WithinS   *float64     `json:"within_s"`
	Moved     []movedEntry `json:"moved"`
	Best      *movedEntry  `json:"best"`
	TellApart string       `json:"tell_apart"`
	Unsettled []string     `json:"unsettled"`
	Group     int          `json:"group"`
}

// seenEntry is a circuit seen dark or lit though it should not be.
type seenEntry struct {
	Circuit   string `json:"circuit"`
	Condition string `json:"condition"`
}

// movedEntry is a reading that leaves its band.
type movedEntry struct {
	Point     string   `json:"point"`
	Condition string   `json:"condition"`
	VoltV     *float64 `json:"volt_v"`
}

func faults(d *design.Design) []faultEntry {
	out := []faultEntry{}
	for _, f := range d.Faults {
		e := faultEntry{
			Key: f.Key, Part: f.Part, What: f.What, Sign: f.Sign, Dark: seen(f.Dark), Lit: seen(f.Lit), Opens: f.Opens,
			Moved: []movedEntry{}, TellApart: f.NextBest, Unsettled: list(f.Unsettled), Group: f.Group,
		}
		if f.Opens != "" {
			e.WithinS = figure(f.Within)
		}
		for _, m := range f.Moved {
			e.Moved = append(e.Moved, moved(m))
		}
		if f.Best.Point != "" {
			best := moved(f.Best)
			e.Best = &best
		}
		out = append(out, e)
	}
	return out
}

func seen(list []facts.Seen) []seenEntry {
	out := []seenEntry{}
	for _, s := range list {
		out = append(out, seenEntry(s))
	}
	return out
}

func moved(m facts.Moved) movedEntry {
	return movedEntry{Point: m.Point, Condition: m.Condition, VoltV: figure(m.Volt)}
}

type workingEntry struct {
	For         string   `json:"for"`
	Name        string   `json:"name"`
	Formula     string   `json:"formula"`
	Substituted string   `json:"substituted"`
	Value       *float64 `json:"value"`
	Unit        string   `json:"unit"`
	Source      string   `json:"source"`
	Pinned      bool     `json:"pinned"`
	Uses        []string `json:"uses"`
}

func workings(d *design.Design) []workingEntry {
	out := []workingEntry{}
	for _, w := range d.Workings {
		out = append(out, workingEntry{
			For: w.For, Name: w.Name, Formula: w.Formula, Substituted: w.Substituted, Value: figure(w.Value), Unit: w.Unit,
			Source: w.Source, Pinned: w.Pinned, Uses: list(w.Uses),
		})
	}
	return out
}
