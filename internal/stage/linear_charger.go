package stage

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
)

// linearCharger floats a battery from an adjustable three-terminal regulator. A
// resistor before the set divider gives it an output impedance that limits the
// current into an empty battery.
func linearCharger() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "linear-charger",
			Doc:  "Charger of discrete parts: adjustable regulator with a 1.25 V reference, set resistors with a trimmer, a resistor that gives it an output impedance, and a blocking Schottky diode.",
			Fields: fields(
				describe.Field{Name: "from", Type: describe.StageRef, Required: true, Doc: "The transformer supply that feeds it."},
				describe.Field{Name: "to", Type: describe.StageRef, Required: true, Feeds: true, Port: "charge", Doc: "The battery that it charges."},
				describe.Field{Name: "float", Type: describe.Voltage, Min: "1 V", Max: "40 V", Doc: "Float setting at the battery; without it from the battery's class."},
				describe.Field{Name: "impedance", Type: describe.Resistance, Min: "0.05 Ω", Max: "10 Ω", Doc: "Resistor that sets the output impedance; without it sized."},
				describe.Field{Name: "fuse", Type: describe.Current, Min: "0.1 A", Max: "50 A", Doc: "Output fuse; without it sized."},
			),
		},
		Class: SupplyClass, Rank: 1, Heading: "Charger",
		Expand: func(b *Build, s *describe.Stage) {
			u := b.Part("regulator", circuit.Regulator, "Adjustable regulator, 1.25 V reference", "IN", "OUT", "COM")
			b.Element(u, "", "regulator", "IN", "IN", "OUT", "OUT", "ADJ", "COM")
			two := func(local, desc string, k circuit.Kind) *circuit.Part {
				p := b.Part(local, k, desc, "1", "2")
				b.Element(p, "", "resistor", "1", "1", "2", "2")
				return p
			}
			r1 := two("impedance", "Resistor, output impedance", circuit.Resistor)
			r2 := two("set-upper", "Set resistor, upper", circuit.Resistor)
			r3 := two("set-lower", "Set resistor, lower", circuit.Resistor)
			r4 := two("trimmer", "Trimmer, sets the float voltage", circuit.Preset)
			d := b.Part("blocking", circuit.Schottky, "Schottky diode, blocks the way back", "A", "K")
			b.Element(d, "", "schottky", "A", "A", "K", "K")
			f := b.Part("fuse", circuit.Fuse, "Charger fuse and holder", "1", "2")
			b.Element(f, "", "fuse", "1", "1", "2", "2")
			b.Join(u.Pin("OUT"), r1.Pin("1"))
			b.Join(r1.Pin("2"), r2.Pin("1"), d.Pin("A"))
			b.Join(u.Pin("COM"), r2.Pin("2"), r3.Pin("1"))
			b.Join(r3.Pin("2"), r4.Pin("1"))
			b.Join(d.Pin("K"), f.Pin("2"))
			store, _ := describe.Get[describe.Ref](s.Fields, "to")
			from, _ := b.ref(s, "from")

			b.sketch(48, "fills the battery", "and keeps it full")
			b.coilFeed(b.feedOf(from), u.Pin("IN"), "raw", rawLevel, 0, rawLevel, 9, rawLevel)
			b.symbol("regulator3", u, 13, 17, "B", "A")
			b.line(nil, 17, 16, 19, 16)
			b.symbol("resistor", r1, 21, 16, "H", "A")
			b.line(nil, 23, 16, 34, 16)
			b.symbol("resistor", r2, 26, 21, "V", "L")
			b.line(nil, 26, 16, 26, 19)
			b.line(nil, 26, 23, 26, 29)
			b.line(nil, 13, 21, 13, 26, 26, 26)
			b.symbol("resistor", r3, 26, 31, "V", "L")
			b.symbol("resistor_preset", r4, 26, 38, "V", "L")
			b.line(nil, 26, 33, 26, 36)
			down := b.lead(circuit.OpDown, "minus", r4.Pin("2"), Minus, 26, 40, 26, downEnd)
			b.symbol("schottky", d, 36, 16, "H", "A")
			b.line(nil, 38, 16, 42, 16, 42, 13)
			b.symbol("fuse", f, 42, 11, "V", "L")
			up := b.lead(circuit.OpUp, "plus", f.Pin("1"), store.Val.Stage+".plus", 42, 9, 42, upEnd)
			b.point(b.TestPoint("in", "Raw voltage at the regulator", u.Pin("IN")), 2, 16, "N")
			b.point(b.TestPoint("set", "Regulated, before the diode", d.Pin("A")), 29, 16, "N")
			b.point(b.TestPoint("output", b.cur.Heading+" output", d.Pin("K")), 42, 14, "E")
			b.number(up, 42, 6)
			b.number(down, 26, 48.5)
		},
	}
}
