package results

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
)

type partEntry struct {
	Designation string                `json:"designation"`
	Kind        string                `json:"kind"`
	Stage       string                `json:"stage"`
	Circuit     string                `json:"circuit"`
	Place       string                `json:"place"`
	Description string                `json:"description"`
	Values      map[string]valueEntry `json:"values"`
	Requirement string                `json:"requirement"`
	Pinned      []string              `json:"pinned"`
	At          string                `json:"at"`
}

// valueEntry is one rating: as it is printed, and as a number in its unit.
type valueEntry struct {
	Text   string   `json:"text"`
	Number *float64 `json:"number"`
	Unit   string   `json:"unit"`
}

func parts(d *design.Design) []partEntry {
	out := []partEntry{}
	for _, p := range d.Circuit.Parts {
		e := partEntry{
			Designation: p.Designation, Kind: string(p.Kind), Stage: p.Stage, Circuit: p.Circuit, Place: placeText(p.Place),
			Description: p.Description, Values: map[string]valueEntry{}, Requirement: p.Note, Pinned: list(p.Pinned), At: p.At.String(),
		}
		for _, v := range p.Values {
			e.Values[v.Name] = valueEntry{Text: v.Text, Number: figure(v.Num), Unit: v.Unit}
		}
		out = append(out, e)
	}
	return out
}

// placeText returns "+A1 Main cabinet"; empty for no place.
func placeText(p *circuit.Place) string {
	switch {
	case p == nil:
		return ""
	case p.Designation == "":
		return p.Name
	case p.Name == "":
		return p.Designation
	}
	return p.Designation + " " + p.Name
}
