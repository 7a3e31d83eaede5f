package results

import (
	"gloamwright/internal/design"
)

type wireEntry struct {
	Number     string   `json:"number"`
	Run        string   `json:"run"`
	Circuit    string   `json:"circuit"`
	From       string   `json:"from"`
	To         string   `json:"to"`
	Size       string   `json:"size"`
	AreaMM2    *float64 `json:"area_mm2"`
	Colour     string   `json:"colour"`
	LengthM    *float64 `json:"length_m"`
	Resistance *float64 `json:"resistance_ohm"`
	CurrentA   *float64 `json:"current_a"`
	AmpacityA  *float64 `json:"ampacity_a"`
	Fuse       string   `json:"fuse"`
	Pinned     bool     `json:"pinned"`
}

func conductors(d *design.Design) []wireEntry {
	out := []wireEntry{}
	for _, o := range d.Conductors {
		c := o.Conductor
		e := wireEntry{
			Number: c.Number, Circuit: c.Circuit, From: c.From.String(), To: c.To.String(), Size: c.Size.String(),
			AreaMM2: figure(c.Size.Area), Colour: c.Colour, LengthM: figure(c.Length), Resistance: to(c.Ohm, networkDigits),
			CurrentA: figure(o.Current), AmpacityA: positive(o.Ampacity), Fuse: o.Fuse,
		}
		if c.Cable != nil {
			e.Run, e.Pinned = c.Cable.Designation, c.Cable.Pinned
		}
		out = append(out, e)
	}
	return out
}
