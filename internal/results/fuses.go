package results

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/design"
	"gloamwright/internal/facts"
)

type fuseEntry struct {
	Designation       string      `json:"designation"`
	Board             string      `json:"board"`
	Way               *int        `json:"way"`
	RatingA           *float64    `json:"rating_a"`
	Feeds             string      `json:"feeds"`
	DesignCurrentA    *float64    `json:"design_current_a"`
	CableAmpacityA    *float64    `json:"cable_ampacity_a"`
	ProspectiveA      *float64    `json:"prospective_a"`
	FarEndA           *float64    `json:"far_end_a"`
	OpensWithinS      *float64    `json:"opens_within_s"`
	DiscriminatesToA  *float64    `json:"discriminates_to_a"`
	DiscriminatesFrom *float64    `json:"discriminates_from_a"`
	Before            string      `json:"before"`
	Style             string      `json:"style"`
	Colour            string      `json:"colour"`
	Pinned            bool        `json:"pinned"`
	CableSize         string      `json:"cable_size"`
	BreakingA         *float64    `json:"breaking_a"`
	BreakingV         *float64    `json:"breaking_v"`
	WithstandS        *float64    `json:"withstand_s"`
	Fastest           []gateEntry `json:"fastest"`
	Slowest           []gateEntry `json:"slowest"`
}

// gateEntry is one point of a fuse's time-current limits.
type gateEntry struct {
	CurrentA *float64 `json:"current_a"`
	TimeS    *float64 `json:"time_s"`
}

func fuses(d *design.Design) []fuseEntry {
	out := []fuseEntry{}
	for _, f := range d.Fuses {
		e := fuseEntry{
			Designation: f.Part.Designation, RatingA: figure(f.Rating), Feeds: f.Feeds, DesignCurrentA: figure(f.Design),
			CableAmpacityA: positive(f.CableAmpacity), ProspectiveA: positive(f.Prospective), FarEndA: positive(f.FarEnd),
			Style: f.Style, Colour: f.Colour, Pinned: f.Pinned, BreakingA: positive(f.Breaking), BreakingV: positive(f.BreakingVolt),
			WithstandS: positive(f.Withstand), Fastest: gates(f, f.Fastest), Slowest: gates(f, f.Slowest),
		}
		if f.CableSize.Area > 0 {
			e.CableSize = f.CableSize.String()
		}
		if f.Board != nil {
			e.Board = f.Board.Name
		}
		if f.Way != nil {
			e.Way = &f.Way.Number
		}
		if f.Opens {
			e.OpensWithinS = figure(f.OpensWithin)
		}
		if f.Before != nil {
			e.Before = f.Before.Part.Designation
			e.DiscriminatesToA, e.DiscriminatesFrom = figure(f.DiscriminatesTo), figure(f.DiscriminatesFrom)
		}
		out = append(out, e)
	}
	return out
}

func gates(f *facts.Fuse, points []catalogue.GatePoint) []gateEntry {
	out := []gateEntry{}
	for _, p := range points {
		out = append(out, gateEntry{CurrentA: figure(p.Multiple * float64(f.Rating)), TimeS: figure(p.Time)})
	}
	return out
}
