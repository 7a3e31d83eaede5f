package stage

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// photocell holds a relay while it is light. It is built with a light-dependent
// resistor and a transistor that follows it or a comparator, or as a packaged module.
func photocell() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "photocell",
			Doc:  "Holds the relay in while it is light. Built with a light-dependent resistor and an emitter follower or a comparator, or as a packaged module.",
			Ports: []describe.Port{
				{Name: "out", Doc: "plus while it is light", Signal: true},
			},
			Fields: fields(
				describe.Field{Name: "built", Type: describe.Choice, Default: "module", Choices: []string{"follower", "comparator", "module"}, Doc: "How it is built. A follower has only the relay's own hysteresis: the lights go off at a far higher illuminance than they come on at."},
				describe.Field{Name: "from", Type: describe.StageRef, Required: true, Doc: "The stage that it takes the plus from."},
				describe.Field{Name: "holds", Type: describe.StageRef, Required: true, Feeds: true, Port: "coil", Doc: "The relay that it holds in while it is light."},
				describe.Field{Name: "dark_below", Type: describe.Illuminance, Default: "10 lx", Min: "0.1 lx", Max: "2000 lx", Doc: "Illuminance below which it is dark."},
				describe.Field{Name: "light_above", Type: describe.Illuminance, Min: "0.1 lx", Max: "5000 lx", Doc: "Illuminance above which it is light again; without it 1.4 times dark_below. A follower takes what its relay gives."},
				describe.Field{Name: "along", Type: describe.Length, Default: "6 m", Min: "0.1 m", Max: "200 m", Doc: "Length of the sensor cable of a follower or comparator."},
				describe.Field{Name: "own", Type: describe.Current, Default: "10 mA", Min: "0 mA", Max: "1 A", Doc: "Current that a module takes itself."},
			),
		},
		Class: ControlClass, Rank: 3, Heading: "Photocell",
		Expand: func(b *Build, s *describe.Stage) {
			switch must[string](s, "built") {
			case "follower":
				expandFollower(b, s)
			case "comparator":
				expandComparator(b, s)
			default:
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
	b.output(s, "out", m.Pin("14"), coilLevel2, 26, 36)
	b.point(b.TestPoint("output", b.cur.Heading+" output", m.Pin("14")), 32, 34, "S")
	b.number(up, 14, 5)
	b.number(down, 14, 42)
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
	switch must[string](s, "built") {
	case "follower":
		sizeFollower(p, s, dark, light.Val, given)
	case "comparator":
		sizeComparator(p, s, dark, light.Val)
	default:
		sizeModule(p, s, dark, light.Val, given)
	}
}

func sizeModule(p *Plan, s *describe.Stage, dark, light quantity.Lux, given bool) {
	m := p.part(s, "module")
	set(m, "dark", "dark "+dark.String(), float64(dark), "lx", true, true)
	set(m, "light", "light "+quantity.Format(light, 3), float64(light), "lx", true, given)
	params(m, "",
		circuit.Param{Name: "dark_below_lx", Value: float64(dark)},
		circuit.Param{Name: "light_above_lx", Value: float64(max(light, dark))},
		circuit.Param{Name: "own_ampere", Value: float64(must[quantity.Ampere](s, "own")), Tol: ownTol},
	)
	if light < dark {
		p.block(m.Designation, m.At, "", &sizing.BlockedError{
			Limit: sizing.LimitRange, Subject: "the illuminance above which it is light", Value: float64(light), Bound: float64(dark), Unit: "lx",
			Frees: "set light_above higher than dark_below",
		})
	}
}

// sensor is the light-dependent resistor with its cable and the two terminals where it
// arrives, as every card has it.
type sensor struct {
	place    *circuit.Place
	cell     *circuit.Part
	plus     *circuit.Part // terminal of the core to plus
	signal   *circuit.Part // terminal of the core that brings the signal
	cable    *circuit.Cable
	cores    [2]*circuit.Conductor
	strip    string
	resistor func(local, desc string) *circuit.Part
}

// sensor adds the light-dependent resistor at its place and its cable to the card.
func (b *Build) sensor(s *describe.Stage) *sensor {
	card := b.cur.Place
	x := &sensor{strip: s.Name.Val}
	x.place = b.Place(s.Name.Val, "S", Text(s, "place", "Sensor"))
	b.cur.Place = x.place
	x.cell = b.Part("sensor", circuit.LDR, "Light-dependent resistor, weatherproof", "1", "2")
	x.cell.Note = "where no lamp of this system shines on it"
	b.Element(x.cell, "", "ldr", "1", "1", "2", "2")
	b.cur.Place = card
	x.plus, x.signal = b.Terminal(x.strip, "1"), b.Terminal(x.strip, "2")
	x.cable = b.Cable("sensor-cable", x.place, card, must[quantity.Metre](s, "along"))
	x.cable.Size = sensorWire
	x.cores[0] = b.Core(x.cable, x.cell.Pin("1"), x.plus.Pin("out"), true)
	x.cores[1] = b.Core(x.cable, x.cell.Pin("2"), x.signal.Pin("out"), false)
	x.resistor = func(local, desc string) *circuit.Part {
		r := b.Part(local, circuit.Resistor, desc, "1", "2")
		b.Element(r, "", "resistor", "1", "1", "2", "2")
		return r
	}
	return x
}

// sensorWire is the size of the cores of sensors, whose currents are some
// milliamperes (common practice, no source).
var sensorWire = quantity.WireSize{Area: 0.5}

// sketch draws the sensor in its place frame, with its cable; down is the level where
// the signal's track ends.
func (x *sensor) sketch(b *Build, down int) {
	b.add(circuit.SketchItem{Op: circuit.OpPlace, Place: x.place, X: 1, Y: 17, X2: 11, Y2: 32})
	b.symbol("ldr", x.cell, 6, 24, "V", "L")
	b.line(x.cores[0], 6, 22, 15, 22)
	b.add(circuit.SketchItem{Op: circuit.OpTerminal, Part: x.plus, X: 16, Y: 22})
	b.line(nil, 17, 22, 20, 22)
	b.line(x.cores[1], 6, 26, 15, 26)
	b.add(circuit.SketchItem{Op: circuit.OpTerminal, Part: x.signal, X: 16, Y: 26})
	b.line(nil, 17, 26, 20, 26, 20, down)
	b.add(circuit.SketchItem{Op: circuit.OpPair, Cable: x.cable, X: 12.8, Y: 24, Y2: 2.7})
}

// sizeCell records the light-dependent resistor's class.
func (p *Plan) sizeCell(cell *circuit.Part, c catalogue.LightResistor) {
	set(cell, "resistance", quantity.Format(c.At10, 2)+" at 10 lx", float64(c.At10), "Ω", false, false)
	params(cell, "",
		circuit.Param{Name: "r10", Value: float64(c.At10), Tol: float64((c.At10Hi-c.At10Low)/2) / float64(c.At10)},
		circuit.Param{Name: "gamma", Value: c.Gamma, Tol: (c.GammaHigh - c.GammaLow) / 2 / c.Gamma},
	)
	if c.Dark != catalogue.CadmiumSulphide5.Dark { // the model's own dark resistance is the usual cell's
		params(cell, "", circuit.Param{Name: "rdark", Value: float64(c.Dark)})
	}
}

// coilOf returns the resistance of the coil that a photocell holds and its limits.
func (p *Plan) coilOf(s *describe.Stage) (quantity.Ohm, catalogue.RelayClass) {
	relay := p.stageOf(must[describe.Ref](s, "holds").Stage)
	class := p.relayFor(relay)
	return p.coilOhm(relay, class), class
}

// twilightRatio is the illuminance at which it is light again, as a multiple of that
// at which it gets dark, unless the user gives one (common practice, no source).
const twilightRatio = 1.4

// controlFuse sizes the fuse of a card or a meter.
func (p *Plan) controlFuse(f *circuit.Part, feeds string) {
	class, rating, ok := p.nextFuse(controlFuse, 0)
	if !ok {
		rating = class.Ratings[len(class.Ratings)-1]
	}
	x := p.fit(f, class, rating, feeds, controlFuse*controlShare, false)
	x.CableSize = p.controlSize()
	x.CableAmpacity = p.ampacity(x.CableSize, 1)
}

// controlShare is the part of its rating that a control fuse carries at most.
const controlShare = 0.1
