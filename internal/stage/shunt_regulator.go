package stage

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
)

// shuntRegulator returns the kind: a Zener feed for a relay coil.
func shuntRegulator() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "shunt-regulator",
			Doc:  "Zener feed for a relay coil: a dropping resistor and a Zener diode across the coil.",
			Ports: []describe.Port{
				{Name: "out", Doc: "steadied plus", Signal: true},
			},
			Fields: fields(
				describe.Field{Name: "from", Type: describe.StageRef, Required: true, Doc: "The supply that feeds it."},
				describe.Field{Name: "volts", Type: describe.Voltage, Min: "2 V", Max: "48 V", Doc: "Zener voltage; without it the nominal voltage."},
				describe.Field{Name: "dropper", Type: describe.Resistance, Min: "1 Ω", Max: "100 kΩ", Doc: "Dropping resistor; without it sized between its two bounds."},
			),
		},
		Class: ControlClass, Rank: 0, Heading: "Shunt regulator",
		Expand: func(b *Build, s *describe.Stage) {
			r := b.Part("dropper", circuit.Resistor, "Dropping resistor", "1", "2")
			b.Element(r, "", "resistor", "1", "1", "2", "2")
			z := b.Part("zener", circuit.Zener, "Zener diode", "A", "K")
			b.Element(z, "", "zener", "A", "A", "K", "K")
			b.Join(r.Pin("2"), z.Pin("K"))
			from, _ := b.ref(s, "from")
			b.sketch(22, "steadies the", "coil's feed")
			f := b.feedOf(from)
			if f.rail != "" {
				up := b.lead(circuit.OpUp, "plus", r.Pin("1"), f.rail, 8, 14, 8, upEnd)
				b.number(up, 8, 11)
			} else {
				b.coilFeed(f, r.Pin("1"), "raw", 10, 0, 10, 8, 10, 8, 14)
			}
			b.symbol("resistor", r, 8, 16, "V", "L")
			b.line(nil, 8, 18, 8, 30)
			b.add(circuit.SketchItem{Op: circuit.OpWire, Name: "out", Pts: points([]int{8, coilLevel1, 22, coilLevel1})})
			b.add(circuit.SketchItem{Op: circuit.OpRight, Name: "out", Y: coilLevel1})
			b.outs[s.Name.Val+".out"] = z.Pin("K")
			b.symbol("zener", z, 8, 32, "U", "L")
			down := b.lead(circuit.OpDown, "minus", z.Pin("A"), Minus, 8, 34, 8, downEnd)
			b.point(b.TestPoint("out", "Steadied coil feed", z.Pin("K")), 11, coilLevel1, "N")
			b.number(down, 8, 42)
		},
	}
}
