package results

import (
	"gloamwright/internal/design"
)

type elementEntry struct {
	Element   string              `json:"element"`
	Part      string              `json:"part"`
	Model     string              `json:"model"`
	Pins      map[string]string   `json:"pins"`
	Values    map[string]*float64 `json:"values"`
	Tolerance map[string]*float64 `json:"tolerance"`
	Control   string              `json:"control"`
}

func network(d *design.Design, nets []string) []elementEntry {
	out := []elementEntry{}
	if d.Netlist == nil {
		return out
	}
	label := map[string]string{} // of parts and conductors, by key
	for _, p := range d.Circuit.Parts {
		label[p.Key] = p.Designation
	}
	for _, c := range d.Circuit.Conductors {
		label[c.Key] = c.Number
	}
	for i, x := range d.Netlist.Elements {
		e := elementEntry{
			Element: x.ID, Part: label[x.Part], Model: x.Model, Pins: map[string]string{},
			Values: map[string]*float64{}, Tolerance: map[string]*float64{}, Control: x.Control,
		}
		for _, p := range x.Pins {
			e.Pins[p.Name] = nets[p.Net]
		}
		for _, p := range d.Elements[i].Params {
			e.Values[p.Name] = to(p.Value, networkDigits)
			if p.Tol != 0 {
				e.Tolerance[p.Name] = figure(p.Tol)
			}
		}
		out = append(out, e)
	}
	return out
}
