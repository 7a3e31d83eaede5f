package stage

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
)

// isolator returns the kind: a switch in the plus line, lockable, DC rated.
func isolator() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "isolator",
			Doc:  "Switch in the plus line for safe working, lockable, rated for direct current.",
			Ports: []describe.Port{
				{Name: "out", Doc: "plus behind the isolator"},
			},
			Fields: fields(
				describe.Field{Name: "from", Type: describe.StageRef, Required: true, Doc: "The stage that it takes the plus from."},
				describe.Field{Name: "rated", Type: describe.Current, Min: "0.1 A", Max: "1000 A", Doc: "Rated current; without it the next standard rating."},
			),
		},
		Class: SupplyClass, Rank: 4, Heading: "Isolator",
		Expand: func(b *Build, s *describe.Stage) {
			q := b.Part("isolator", circuit.SwitchIsolator, "Isolator, DC rated", "1", "2")
			b.Element(q, "", "switch", "1", "1", "2", "2")
			from, _ := b.ref(s, "from")
			b.sketch(21, "opens by hand")
			in := b.lead(circuit.OpIn, "in", q.Pin("1"), from, 10, upEnd, 10, 17, 12, 17)
			b.symbol("switch_disc", q, 14, 17, "H", "B")
			out := b.lead(circuit.OpUp, "out", q.Pin("2"), b.outRail(s, "out"), 16, 17, 18, 17, 18, upEnd)
			b.number(in, 10, 11)
			b.number(out, 18, 11)
		},
		Steps: []Step{{Trunk, sizeIsolator}},
	}
}

// sizeIsolator chooses or checks the isolator's rating.
func sizeIsolator(p *Plan, s *describe.Stage) {
	q := p.part(s, "isolator")
	rated, given := describe.Get[quantity.Ampere](s.Fields, "rated")
	if !given {
		rated.Val = p.pricedRating(q, "isolator", catalogue.IsolatorCurrents, p.Light+p.Standing)
	}
	p.isolator(q, rated.Val, given)
}

// isolator records an isolator in the energy's way.
func (p *Plan) isolator(q *circuit.Part, rated quantity.Ampere, pinned bool) {
	set(q, "rating", rated.String(), float64(rated), "A", true, pinned)
	params(q, "", circuit.Param{Name: "ohm", Value: isolatorOhm, Tol: contactTol}, circuit.Param{Name: "closed", Value: 1})
	p.TrunkOhm += isolatorOhm
}

// isolatorOhm is the resistance of a closed isolator (common practice, no source).
const isolatorOhm = 0.002
