package stage

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
)

// meter shows the volts of a rail, or the amperes through a shunt in it.
func meter() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "meter",
			Doc:  "Panel meter: volts across a rail through a fuse, or amperes through a shunt in the plus line.",
			Ports: []describe.Port{
				{Name: "out", Doc: "plus behind the shunt of an ammeter"},
			},
			Fields: fields(
				describe.Field{Name: "from", Type: describe.StageRef, Required: true, Doc: "The stage whose plus it measures."},
				describe.Field{Name: "reads", Type: describe.Choice, Default: "volts", Choices: []string{"volts", "amps"}, Doc: "What it measures."},
				describe.Field{Name: "range", Type: describe.Current, Min: "0.1 A", Max: "500 A", Doc: "Full scale of an ammeter; without it the next one above the load."},
				describe.Field{Name: "own", Type: describe.Current, Default: "1 mA", Min: "0 mA", Max: "200 mA", Doc: "Current that a voltmeter takes itself at nominal voltage."},
			),
		},
		Class: SupplyClass, Rank: 3, Heading: "Meter",
		Expand: func(b *Build, s *describe.Stage) {
			from, _ := b.ref(s, "from")
			if must[string](s, "reads") == "amps" {
				sh := b.Part("shunt", circuit.Shunt, "Shunt", "1", "2", "3", "4")
				b.Element(sh, "", "resistor", "1", "1", "2", "2")
				p := b.Part("meter", circuit.Ammeter, "Ammeter", "1", "2")
				b.Element(p, "", "meter", "1", "1", "2", "2")
				b.Join(sh.Pin("1"), sh.Pin("3"))
				b.Join(sh.Pin("2"), sh.Pin("4"))
				b.Join(sh.Pin("3"), p.Pin("1"))
				b.Join(sh.Pin("4"), p.Pin("2"))
				b.sketch(16, "shows the", "load")
				in := b.lead(circuit.OpIn, "in", sh.Pin("1"), from, 4, upEnd, 4, 17, 6, 17)
				b.symbol("shunt", sh, 8, 17, "H", "A")
				out := b.lead(circuit.OpUp, "out", sh.Pin("2"), b.outRail(s, "out"), 10, 17, 12, 17, 12, upEnd)
				b.line(nil, 7, 19, 7, 21, 4, 21, 4, 25, 6, 25)
				b.line(nil, 9, 19, 9, 21, 12, 21, 12, 25, 10, 25)
				b.symbol("ammeter", p, 8, 25, "H", "B")
				b.number(in, 4, 11)
				b.number(out, 12, 11)
				return
			}
			f := b.Part("fuse", circuit.Fuse, "Meter fuse and holder", "1", "2")
			b.Element(f, "", "fuse", "1", "1", "2", "2")
			p := b.Part("meter", circuit.Voltmeter, "Voltmeter", "1", "2")
			b.Element(p, "", "meter", "1", "1", "2", "2")
			b.sketch(12, "shows the", "volts")
			up := b.lead(circuit.OpUp, "plus", f.Pin("1"), from, 6, 12, 6, upEnd)
			b.symbol("fuse", f, 6, 14, "V", "L")
			b.line(b.Wire(f.Pin("2"), p.Pin("1"), true, bridgeLength), 6, 16, 6, 24)
			b.symbol("voltmeter", p, 6, 26, "V", "L")
			down := b.lead(circuit.OpDown, "minus", p.Pin("2"), Minus, 6, 28, 6, downEnd)
			b.number(up, 6, 9)
			b.number(down, 6, 42)
		},
	}
}
