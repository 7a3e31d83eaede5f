package stage

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
)

// transformerSupply returns the kind: an unregulated supply: safety transformer, bridge, reservoir.
// The solver sees it as a source with the resistance that its rated and open-circuit
// voltages state.
func transformerSupply() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "transformer-supply",
			Doc:  "Unregulated supply: safety transformer, bridge and reservoir capacitor. Its voltage falls from the open-circuit to the rated figure as the current rises, and follows the mains.",
			Ports: []describe.Port{
				{Name: "raw", Doc: "unregulated plus", Signal: true},
			},
			Fields: fields(
				describe.Field{Name: "rated", Type: describe.VoltAmp, Required: true, Min: "1 V 1 mA", Max: "50 V 50 A", Doc: "Direct voltage at the rated current, and that current, at nominal mains."},
				describe.Field{Name: "open", Type: describe.Voltage, Required: true, Min: "1 V", Max: "60 V", Doc: "Direct voltage without load, at nominal mains."},
				describe.Field{Name: "mains", Type: describe.Mains, Required: true, Doc: "Mains voltage and its tolerance."},
				describe.Field{Name: "fuse", Type: describe.Current, Min: "0.1 A", Max: "100 A", Doc: "Output fuse; without it sized."},
			),
		},
		Class: SupplyClass, Rank: 0, Heading: "Raw supply",
		Expand: func(b *Build, s *describe.Stage) {
			t := b.Part("transformer", circuit.Transformer, "Safety transformer", "L", "N", "3", "4")
			r := b.Part("bridge", circuit.Bridge, "Bridge rectifier", "~1", "~2", "+", "-")
			b.Element(r, "", "transformer-supply", "+", "+", "-", "-")
			c := b.Part("reservoir", circuit.Electrolytic, "Reservoir capacitor", "1", "2")
			b.Element(c, "", "capacitor", "1", "1", "2", "2")
			bl := b.Part("bleeder", circuit.Resistor, "Discharge resistor", "1", "2")
			b.Element(bl, "", "resistor", "1", "1", "2", "2")
			f := b.Part("fuse", circuit.Fuse, "Fuse and holder", "1", "2")
			b.Element(f, "", "fuse", "1", "1", "2", "2")
			b.Join(t.Pin("3"), r.Pin("~1"))
			b.Join(t.Pin("4"), r.Pin("~2"))
			b.Join(r.Pin("+"), c.Pin("1"), bl.Pin("1"), f.Pin("1"))
			b.Join(r.Pin("-"), c.Pin("2"), bl.Pin("2"))

			b.sketch(48, "makes raw direct", "voltage from mains")
			b.mains(t, []string{"L", "N"}, 7, 27, 31)
			b.symbol("transformer", t, 9, 29, "B", "A", "1", "L", "2", "N")
			b.converter(r, 19, 29, 3, []string{"~1", "~2"}, []string{"+", "-"}, []int{-2, 2}, []int{-2, 2}, false)
			b.line(nil, 11, 27, 15, 27)
			b.line(nil, 11, 31, 15, 31)
			b.line(nil, 23, 27, 36, 27, 36, rawLevel, 38, rawLevel)
			b.symbol("capacitor_pol", c, 28, 35, "V", "R")
			b.line(nil, 28, 27, 28, 33)
			b.line(nil, 28, 37, 28, 43)
			b.symbol("resistor", bl, 36, 35, "V", "R")
			b.line(nil, 36, 27, 36, 33)
			b.line(nil, 36, 37, 36, 43, 24, 43)
			b.line(nil, 23, 31, 24, 31)
			down := b.lead(circuit.OpDown, "minus", r.Pin("-"), Minus, 24, 31, 24, downEnd)
			b.symbol("fuse", f, 40, rawLevel, "H", "A")
			b.add(circuit.SketchItem{Op: circuit.OpWire, Name: "raw", Pts: points([]int{42, rawLevel, 48, rawLevel})})
			b.add(circuit.SketchItem{Op: circuit.OpRight, Name: "raw", Y: rawLevel})
			b.outs[s.Name.Val+".raw"] = f.Pin("2")
			b.point(b.TestPoint("raw", "Raw voltage", r.Pin("+")), 30, 27, "N")
			b.number(down, 24, 48.5)
		},
	}
}
