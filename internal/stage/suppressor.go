package stage

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
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
			b.sketch(12, "clips surges")
			up := b.lead(circuit.OpUp, "plus", f.Pin("1"), from, 6, 24, 6, upEnd)
			b.symbol("tvs_bi", f, 6, 26, "V", "L")
			down := b.lead(circuit.OpDown, "minus", f.Pin("2"), Minus, 6, 28, 6, downEnd)
			b.number(up, 6, 11)
			b.number(down, 6, 42)
		},
	}
}
