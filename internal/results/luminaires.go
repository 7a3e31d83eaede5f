package results

import (
	"gloamwright/internal/design"
)

type lampEntry struct {
	Designation string              `json:"designation"`
	Circuit     string              `json:"circuit"`
	Kind        string              `json:"kind"`
	Type        string              `json:"type"`
	Place       string              `json:"place"`
	Volts       map[string]*float64 `json:"volts"`
	Amps        map[string]*float64 `json:"amps"`
	PowerW      *float64            `json:"power_w"`
	Drop        *float64            `json:"drop"`
	WorstV      *float64            `json:"worst_v"`
	LowV        *float64            `json:"low_v"`
	HighV       *float64            `json:"high_v"`
}

func luminaires(d *design.Design, conds []string) []lampEntry {
	out := []lampEntry{}
	for _, l := range d.Luminaires {
		e := lampEntry{
			Designation: l.Part.Designation, Circuit: l.Circuit, Kind: l.Kind, Type: l.Type,
			Volts: byCondition(conds, l.Volts, readingDigits), Amps: byCondition(conds, l.Amps, readingDigits),
			PowerW: figure(l.Watt), Drop: figure(l.Drop), WorstV: to(l.WorstV, readingDigits), LowV: positive(l.Works.Low), HighV: positive(l.Works.High),
		}
		if l.Point != nil {
			e.Place = l.Point.Place
		}
		out = append(out, e)
	}
	return out
}
