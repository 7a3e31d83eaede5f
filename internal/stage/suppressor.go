package stage

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// suppressor clips surges across a rail at the end of a long cable.
func suppressor() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "suppressor",
			Doc:  "Surge suppressor diode across a rail, where a long cable ends.",
			Fields: fields(
				describe.Field{Name: "from", Type: describe.StageRef, Required: true, Doc: "The stage whose plus it protects."},
				describe.Field{Name: "standoff", Type: describe.Voltage, Min: "3 V", Max: "60 V", Doc: "Stand-off voltage; without it the next one above the highest voltage of the rail."},
			),
		},
		Class: ControlClass, Rank: 2, Heading: "Suppressor",
		Expand: func(b *Build, s *describe.Stage) {
			f := b.Part("suppressor", circuit.Suppressor, "Suppressor diode, bidirectional", "1", "2")
			b.Element(f, "", "suppressor", "1", "1", "2", "2")
			from, _ := b.ref(s, "from")
			b.sketch(15, "clips surges")
			up := b.lead(circuit.OpUp, "plus", f.Pin("1"), from, 12, 24, 12, upEnd)
			b.symbol("tvs_bi", f, 12, 26, "V", "L")
			down := b.lead(circuit.OpDown, "minus", f.Pin("2"), Minus, 12, 28, 12, downEnd)
			b.number(up, 12, 11)
			b.number(down, 12, 42)
		},
		Steps: []Step{{Trunk, sizeSuppressor}},
	}
}

// sizeSuppressor chooses the stand-off voltage: the next standard one above the highest
// voltage of the rail, so that it never conducts in service.
func sizeSuppressor(p *Plan, s *describe.Stage) {
	f := p.part(s, "suppressor")
	high := p.Highest
	if k := p.stageOf(must[describe.Ref](s, "from").Stage).Kind.Val; k == "transformer-supply" || k == "regulated-supply" {
		_, high, _ = p.supplyRange(must[describe.Ref](s, "from").Stage)
	}
	v, given := describe.Get[quantity.Volt](s.Fields, "standoff")
	if !given {
		var ok bool
		if v.Val, ok = catalogue.NextRating(catalogue.StandOffs, high); !ok {
			v.Val = catalogue.StandOffs[len(catalogue.StandOffs)-1]
		}
		p.work(f.Designation, "stand-off voltage", sizing.Working{
			Formula: "U_standoff ≥ U_highest, next standard value", Value: float64(v.Val), Unit: "V", Source: "typical of suppressor diodes, from memory",
			Substituted: sizing.Digits(float64(high)) + " V → " + sizing.Digits(float64(v.Val)) + " V",
		})
	}
	if v.Val < high {
		p.block(f.Designation, f.At, "", &sizing.BlockedError{
			Limit: sizing.LimitVoltage, Subject: "the stand-off voltage", Value: float64(v.Val), Bound: float64(high), Unit: "V", Frees: "take at least " + quantity.Format(high, 3),
		})
	}
	clamp := v.Val * quantity.Volt(catalogue.Clamp)
	set(f, "standoff", v.Val.String(), float64(v.Val), "V", true, given)
	set(f, "power", catalogue.PulsePower.String(), float64(catalogue.PulsePower), "W", true, false)
	f.Note = "both ways, clamps at about " + quantity.Format(clamp, 2) + ", pulse 10/1000 µs"
	params(f, "",
		circuit.Param{Name: "vz", Value: float64(v.Val) * float64(catalogue.Breakdown) * (1 + float64(catalogue.SuppressorTol)), Tol: float64(catalogue.SuppressorTol)},
		circuit.Param{Name: "iz", Value: float64(catalogue.BreakdownTest)},
	)
}
