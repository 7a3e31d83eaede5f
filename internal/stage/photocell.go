package stage

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
)

// photocell holds a relay while it is light. It is built as a comparator card with
// a light-dependent resistor, or as a packaged module.
func photocell() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "photocell",
			Doc:  "Holds the relay in while it is light. Built as a comparator card with a light-dependent resistor, or as a packaged module.",
			Ports: []describe.Port{
				{Name: "out", Doc: "plus while it is light", Signal: true},
			},
			Fields: fields(
				describe.Field{Name: "built", Type: describe.Choice, Default: "module", Choices: []string{"comparator", "module"}, Doc: "How it is built."},
				describe.Field{Name: "from", Type: describe.StageRef, Required: true, Doc: "The stage that it takes the plus from."},
				describe.Field{Name: "holds", Type: describe.StageRef, Required: true, Feeds: true, Port: "coil", Doc: "The relay that it holds in while it is light."},
				describe.Field{Name: "dark_below", Type: describe.Illuminance, Default: "10 lx", Min: "0.1 lx", Max: "2000 lx", Doc: "Illuminance below which it is dark."},
				describe.Field{Name: "light_above", Type: describe.Illuminance, Min: "0.1 lx", Max: "5000 lx", Doc: "Illuminance above which it is light again; without it 1.4 times dark_below."},
				describe.Field{Name: "along", Type: describe.Length, Default: "6 m", Min: "0.1 m", Max: "200 m", Doc: "Length of the sensor cable of a comparator."},
				describe.Field{Name: "own", Type: describe.Current, Default: "10 mA", Min: "0 mA", Max: "1 A", Doc: "Current that a module takes itself."},
			),
		},
		Class: ControlClass, Rank: 3, Heading: "Photocell",
		Expand: func(b *Build, s *describe.Stage) {
			if must[string](s, "built") == "comparator" {
				expandComparator(b, s)
			} else {
				expandModule(b, s)
			}
		},
		Steps: []Step{{Control, sizePhotocell}},
	}
}

// photocellFuse adds the fuse that both forms begin with.
func (b *Build) photocellFuse() *circuit.Part {
	f := b.Part("fuse", circuit.Fuse, "Photocell fuse and holder", "1", "2")
	b.Element(f, "", "fuse", "1", "1", "2", "2")
	return f
}

func expandModule(b *Build, s *describe.Stage) {
	from, _ := b.ref(s, "from")
	f := b.photocellFuse()
	m := b.Part("module", circuit.PhotoSwitch, "Twilight switch module, contact closed while it is light", "+", "-", "13", "14")
	b.Element(m, "", "photoswitch", "+", "+", "-", "-", "13", "13", "14", "14")
	b.Join(m.Pin("+"), m.Pin("13"))
	b.sketch(38, "tells the relay", "that it is light")
	up := b.lead(circuit.OpUp, "plus", f.Pin("1"), from, 14, 7, 14, upEnd)
	b.symbol("fuse", f, 14, 9, "V", "L")
	w := b.Wire(f.Pin("2"), m.Pin("+"), true, leadLength)
	b.line(w, 14, 11, 14, 32, 18, 32)
	b.symbol("photoswitch", m, 22, 33, "B", "B")
	down := b.lead(circuit.OpDown, "minus", m.Pin("-"), Minus, 18, 34, 14, 34, 14, downEnd)
	b.line(nil, 14, 27, 29, 27, 29, 32, 26, 32)
	b.add(circuit.SketchItem{Op: circuit.OpWire, Name: "out", Pts: points([]int{26, 34, 38, 34})})
	b.add(circuit.SketchItem{Op: circuit.OpRight, Name: "out", Y: coilLevel2})
	b.outs[s.Name.Val+".out"] = m.Pin("14")
	b.point(b.TestPoint("output", b.cur.Heading+" output", m.Pin("14")), 32, 34, "S")
	b.number(up, 14, 5)
	b.number(down, 14, 42)
}

func expandComparator(b *Build, s *describe.Stage) {
	from, _ := b.ref(s, "from")
	f := b.photocellFuse()
	card := b.cur.Place
	b.cur.Place = b.Place(s.Name.Val, "S", Text(s, "place", "Sensor"))
	ldr := b.Part("sensor", circuit.LDR, "Light-dependent resistor, weatherproof", "1", "2")
	b.Element(ldr, "", "ldr", "1", "1", "2", "2")
	spot := b.cur.Place
	b.cur.Place = card
	res := func(local, desc string) *circuit.Part {
		r := b.Part(local, circuit.Resistor, desc, "1", "2")
		b.Element(r, "", "resistor", "1", "1", "2", "2")
		return r
	}
	strip := s.Name.Val
	t1, t2 := b.Terminal(strip, "1"), b.Terminal(strip, "2")
	r1 := res("light", "Resistor of the light divider")
	c1 := b.Part("slow", circuit.Capacitor, "Capacitor, slows the light signal", "1", "2")
	b.Element(c1, "", "capacitor", "1", "1", "2", "2")
	r2 := res("upper", "Resistor of the reference, upper")
	r3 := b.Part("set", circuit.Potentiometer, "Preset, sets the twilight", "1", "2", "3")
	b.Element(r3, "upper", "resistor", "1", "1", "2", "3")
	b.Element(r3, "lower", "resistor", "1", "3", "2", "2")
	r4 := res("lower", "Resistor of the reference, lower")
	r5 := res("input", "Resistor to the input")
	r6 := res("hysteresis", "Resistor of the hysteresis")
	k := b.Part("comparator", circuit.Comparator, "Comparator, open collector", "+", "-", "OUT", "V+", "V-")
	b.Element(k, "", "comparator", "+", "+", "-", "-", "OUT", "OUT", "V+", "V+", "V-", "V-")
	r7 := res("base", "Resistor to the base")
	r8 := res("off", "Resistor base to emitter")
	q := b.Part("driver", circuit.PNP, "Transistor, drives the relay", "B", "C", "E")
	b.Element(q, "", "pnp", "B", "B", "C", "C", "E", "E")
	t3 := b.Terminal(strip, "3")

	b.Join(f.Pin("2"), t1.Pin("in"), r2.Pin("1"), k.Pin("V+"), r8.Pin("1"), q.Pin("E"))
	b.Join(t2.Pin("in"), r1.Pin("1"), c1.Pin("1"), k.Pin("-"))
	b.Join(r1.Pin("2"), c1.Pin("2"), r4.Pin("2"), k.Pin("V-"))
	b.Join(r2.Pin("2"), r3.Pin("1"))
	b.Join(r3.Pin("2"), r4.Pin("1"))
	b.Join(r3.Pin("3"), r5.Pin("1"))
	b.Join(r5.Pin("2"), r6.Pin("1"), k.Pin("+"))
	b.Join(k.Pin("OUT"), r6.Pin("2"), r7.Pin("1"))
	b.Join(r7.Pin("2"), r8.Pin("2"), q.Pin("B"))
	b.Join(q.Pin("C"), t3.Pin("in"))
	w := b.Cable("sensor-cable", spot, card, must[quantity.Metre](s, "along"))
	w.Size = quantity.WireSize{Area: 0.5}
	core1 := b.Core(w, ldr.Pin("1"), t1.Pin("out"), true)
	core2 := b.Core(w, ldr.Pin("2"), t2.Pin("out"), false)

	b.sketch(94, "tells the relay", "that it is light")
	up := b.lead(circuit.OpUp, "plus", f.Pin("1"), from, 20, 7, 20, upEnd)
	b.symbol("fuse", f, 20, 9, "V", "L")
	b.line(nil, 20, 11, 20, 22)
	b.line(nil, 20, 13, 82, 13)
	b.add(circuit.SketchItem{Op: circuit.OpPlace, Place: spot, X: 1, Y: 17, X2: 11, Y2: 32})
	b.symbol("ldr", ldr, 6, 24, "V", "L")
	b.line(core1, 6, 22, 15, 22)
	b.add(circuit.SketchItem{Op: circuit.OpTerminal, Part: t1, X: 16, Y: 22})
	b.line(nil, 17, 22, 20, 22)
	b.line(core2, 6, 26, 15, 26)
	b.add(circuit.SketchItem{Op: circuit.OpTerminal, Part: t2, X: 16, Y: 26})
	b.line(nil, 17, 26, 20, 26, 20, 35)
	b.add(circuit.SketchItem{Op: circuit.OpPair, Cable: w, X: 12.8, Y: 24, Y2: 2.7})
	b.symbol("resistor", r1, 20, 37, "V", "L")
	b.line(nil, 20, 39, 20, 45)
	b.symbol("capacitor", c1, 26, 37, "V", "R")
	b.line(nil, 26, 32, 26, 35)
	b.line(nil, 26, 39, 26, 45)
	b.line(nil, 20, 32, 53, 32, 53, 27, 55, 27)
	b.line(nil, 20, 45, 59, 45)
	b.symbol("resistor", r2, 38, 18, "V", "L")
	b.line(nil, 38, 13, 38, 16)
	b.line(nil, 38, 20, 38, 23)
	b.symbol("potentiometer_preset", r3, 38, 25, "V", "L")
	b.line(nil, 38, 27, 38, 36)
	b.symbol("resistor", r4, 38, 38, "V", "L")
	b.line(nil, 38, 40, 38, 45)
	b.line(nil, 40, 25, 44, 25)
	b.symbol("resistor", r5, 46, 25, "H", "A")
	b.line(nil, 48, 25, 55, 25)
	b.symbol("comparator", k, 59, 26, "B", "A")
	b.line(nil, 59, 22, 59, 13)
	b.line(nil, 59, 30, 59, 45)
	b.line(nil, 63, 26, 69, 26)
	b.line(nil, 65, 26, 65, 18, 56, 18)
	b.symbol("resistor", r6, 54, 18, "H", "A")
	b.line(nil, 52, 18, 50, 18, 50, 25)
	b.symbol("resistor", r7, 71, 26, "H", "A")
	b.line(nil, 73, 26, 79, 26)
	b.line(nil, 75, 26, 75, 21)
	b.symbol("resistor", r8, 75, 19, "V", "L")
	b.line(nil, 75, 17, 75, 13)
	b.symbol("pnp", q, 81, 26, "B", "R")
	b.line(nil, 82, 24, 82, 13)
	b.line(nil, 82, 28, 82, 34, 87, 34)
	b.add(circuit.SketchItem{Op: circuit.OpTerminal, Part: t3, X: 88, Y: 34})
	b.add(circuit.SketchItem{Op: circuit.OpWire, Name: "out", Pts: points([]int{89, 34, 94, 34})})
	b.add(circuit.SketchItem{Op: circuit.OpRight, Name: "out", Y: coilLevel2})
	b.outs[s.Name.Val+".out"] = t3.Pin("out")
	down := b.lead(circuit.OpDown, "minus", k.Pin("V-"), Minus, 32, 45, 32, downEnd)
	b.point(b.TestPoint("light", "Light signal", k.Pin("-")), 30, 32, "N")
	b.point(b.TestPoint("reference", "Twilight setting", r3.Pin("3")), 42, 25, "S")
	b.point(b.TestPoint("output", b.cur.Heading+" output", q.Pin("C")), 84, 34, "S")
	b.number(up, 20, 5)
	b.number(down, 32, 48.5)
}

// controlFuse is the rating of fuses of cards and meters; their draw is far below it
// (common practice, no source).
const controlFuse quantity.Ampere = 1

// sizePhotocell sizes the fuse and the card or module.
func sizePhotocell(p *Plan, s *describe.Stage) {
	p.controlFuse(p.part(s, "fuse"), "photocell")
	dark := must[quantity.Lux](s, "dark_below")
	light, given := describe.Get[quantity.Lux](s.Fields, "light_above")
	if !given {
		light.Val = dark * twilightRatio
	}
	if must[string](s, "built") == "module" {
		m := p.part(s, "module")
		set(m, "dark", "dark "+dark.String(), float64(dark), "lx", true, true)
		set(m, "light", "light "+quantity.Format(light.Val, 3), float64(light.Val), "lx", true, given)
		params(m, "",
			circuit.Param{Name: "dark_below_lx", Value: float64(dark)},
			circuit.Param{Name: "light_above_lx", Value: float64(light.Val)},
			circuit.Param{Name: "own_ampere", Value: float64(must[quantity.Ampere](s, "own")), Tol: ownTol},
		)
		return
	}
	sizeComparator(p, s, dark, light.Val)
}

// twilightRatio is the illuminance at which it is light again, as a multiple of that
// at which it gets dark, unless the user gives one (common practice, no source).
const twilightRatio = 1.4

// controlFuse sizes the fuse of a card or a meter.
func (p *Plan) controlFuse(f *circuit.Part, feeds string) {
	x := p.fit(f, p.fuseClass(), controlFuse, feeds, controlFuse*controlShare, false)
	x.CableSize = controlWire[p.System]
	x.CableAmpacity = p.ampacity(x.CableSize, 1)
}

// controlShare is the part of its rating that a control fuse carries at most.
const controlShare = 0.1
