package results

import (
	"gloamwright/internal/design"
)

type pointEntry struct {
	Label    string               `json:"label"`
	Shows    string               `json:"shows"`
	Terminal string               `json:"terminal"`
	Black    string               `json:"black"`
	Net      string               `json:"net"`
	Readings map[string]bandEntry `json:"readings"`
}

// bandEntry is the reading to expect.
type bandEntry struct {
	LowV     *float64 `json:"low_v"`
	TypicalV *float64 `json:"typical_v"`
	HighV    *float64 `json:"high_v"`
	RootV    *float64 `json:"root_v"`
	// Or is what it shows instead while the condition stands otherwise.
	Or []orEntry `json:"or,omitempty"`
}

// orEntry is the reading in another state of the condition.
type orEntry struct {
	With     string   `json:"with"`
	LowV     *float64 `json:"low_v"`
	TypicalV *float64 `json:"typical_v"`
	HighV    *float64 `json:"high_v"`
}

func testPoints(d *design.Design, nets, conds []string) []pointEntry {
	out := []pointEntry{}
	for _, r := range d.Readings {
		p := r.Point
		e := pointEntry{Label: p.Label, Shows: p.Shows, Terminal: p.Red.String(), Readings: map[string]bandEntry{}}
		if p.Black != nil {
			e.Black = p.Black.String()
		}
		if n := p.Red.Net; n >= 0 && n < len(nets) {
			e.Net = nets[n]
		}
		for i, b := range r.Bands {
			x := bandEntry{
				LowV: to(b.Low, readingDigits), TypicalV: to(b.Typical, readingDigits), HighV: to(b.High, readingDigits), RootV: figure(b.Root),
			}
			for _, o := range r.OrAt(i) {
				x.Or = append(x.Or, orEntry{With: o.With, LowV: to(o.Low, readingDigits), TypicalV: to(o.Typical, readingDigits), HighV: to(o.High, readingDigits)})
			}
			e.Readings[conds[i]] = x
		}
		out = append(out, e)
	}
	return out
}
