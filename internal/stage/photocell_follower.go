package stage

import (
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// expandFollower builds the emitter follower: light divider, capacitor, base resistor
// and a transistor that carries the coil's current.
func expandFollower(b *Build, s *describe.Stage) {
	from, _ := b.ref(s, "from")
	f := b.photocellFuse()
	x := b.sensor(s)
	r1 := x.resistor("light", "Resistor of the light divider")
	c1 := b.Part("slow", circuit.Capacitor, "Capacitor, slows the light signal", "1", "2")
	b.Element(c1, "", "capacitor", "1", "1", "2", "2")
	r2 := x.resistor("base", "Resistor to the base")
	q := b.Part("driver", circuit.NPN, "Transistor, drives the relay", "B", "C", "E")
	b.Element(q, "", "npn", "B", "B", "C", "C", "E", "E")
	t3 := b.Terminal(x.strip, "3")

	b.Join(f.Pin("2"), x.plus.Pin("in"), q.Pin("C"))
	b.Join(x.signal.Pin("in"), r1.Pin("1"), c1.Pin("1"), r2.Pin("1"))
	b.Join(r1.Pin("2"), c1.Pin("2"))
	b.Join(r2.Pin("2"), q.Pin("B"))
	b.Join(q.Pin("E"), t3.Pin("in"))

	b.sketch(61, "tells the relay", "that it is light")
	up := b.lead(circuit.OpUp, "plus", f.Pin("1"), from, 20, 7, 20, upEnd)
	b.symbol("fuse", f, 20, 9, "V", "L")
	b.line(nil, 20, 11, 20, 22)
	b.line(nil, 20, 13, 48, 13)
	x.sketch(b, 33)
	b.symbol("resistor", r1, 20, 35, "V", "L")
	b.symbol("capacitor", c1, 27, 35, "V", "R")
	b.line(nil, 20, 29, 36, 29)
	b.line(nil, 27, 29, 27, 33)
	b.line(nil, 27, 37, 27, 41, 20, 41)
	b.symbol("resistor", r2, 38, 29, "H", "A")
	b.line(nil, 40, 29, 45, 29)
	b.symbol("npn", q, 47, 29, "B", "R")
	b.line(nil, 48, 27, 48, 13)
	b.line(nil, 48, 31, 48, 34, 53, 34)
	b.add(circuit.SketchItem{Op: circuit.OpTerminal, Part: t3, X: 54, Y: 34})
	b.output(s, "out", t3.Pin("out"), coilLevel2, 55, 58)
	down := b.lead(circuit.OpDown, "minus", r1.Pin("2"), Minus, 20, 37, 20, downEnd)
	b.point(b.TestPoint("light", "Light signal", r1.Pin("1")), 30, 29, "N")
	b.point(b.TestPoint("output", b.cur.Heading+" output", q.Pin("E")), 50, 34, "S")
	b.number(up, 20, 5)
	b.number(down, 20, 48.5)
}

// feedDiode is the Schottky diode in a coil's feed, by the class values of the
// network's model.
var feedDiode = catalogue.Diode{Saturation: 30e-6, Ideality: 1.05, Series: 0.1}

// follower sizes a follower on a relay of a class with the first transistor and cell
// that bear it.
func (p *Plan) follower(s, relay *describe.Stage, class catalogue.RelayClass) (in sizing.EmitterFollowerInput, f sizing.EmitterFollower, ws []sizing.Working, err error) {
	nominal := p.Site.Duty.Nominal.Val
	in.Cell, in.Transistor = catalogue.CadmiumSulphide5, catalogue.NPNSmall
	warm, err := p.warmPickUp(class)
	if err != nil {
		return in, f, nil, err
	}
	in = sizing.EmitterFollowerInput{
		Cell: in.Cell, Transistor: in.Transistor, Dark: must[quantity.Lux](s, "dark_below"), Supply: p.Full, High: p.Highest, Coil: p.coilOhm(relay, class),
		PickUp: nominal * quantity.Volt(class.PickUp), DropOut: nominal * quantity.Volt(class.DropOut),
		Low: p.End, Warm: warm, Ambient: p.Site.Duty.CableAmbient.Val,
	}
	if p.coilFeeds(relay) > 1 {
		in.Feed = feedDiode
	}
	for _, in.Cell = range []catalogue.LightResistor{catalogue.CadmiumSulphide5, catalogue.CadmiumSulphideHigh} {
		for _, in.Transistor = range []catalogue.Transistor{catalogue.NPNSmall, catalogue.NPNMedium} {
			if f, ws, err = sizing.FollowerPhotocell(in); err == nil {
				return in, f, ws, nil
			}
		}
	}
	// Nothing fits: what the usual parts break is told.
	in.Cell, in.Transistor = catalogue.CadmiumSulphide5, catalogue.NPNSmall
	f, ws, err = sizing.FollowerPhotocell(in)
	return in, f, ws, err
}

// sizeFollower chooses the load resistor so that the relay lets go at the dark
// threshold. Where it picks up again follows from the relay.
func sizeFollower(p *Plan, s *describe.Stage, dark, light quantity.Lux, given bool) {
	q := p.part(s, "driver")
	coil, class := p.coilOf(s)
	nominal := float64(p.Site.Duty.Nominal.Val)
	in, f, ws, err := p.follower(s, p.stageOf(must[describe.Ref](s, "holds").Stage), class)
	cell, npn := in.Cell, in.Transistor
	if err != nil {
		p.block(q.Designation, q.At, "", err)
	} else if given && f.Bright > light*(1+followerSlack) {
		p.block(q.Designation, q.At, "", &sizing.BlockedError{
			Limit: sizing.LimitRange, Subject: "the illuminance at which the relay picks up again", Value: float64(f.Bright), Bound: float64(light), Unit: "lx",
			Frees: "a comparator switches off at any illuminance above dark_below (built: comparator)",
		})
	}
	for _, w := range ws {
		p.work(q.Designation, "", w)
	}
	if f.Load == 0 { // nothing fits: a value that lets the circuit be solved
		f.Load = cell.At10
		f.Slow = quantity.Farad(catalogue.E6.AtLeast(0.1 / float64(f.Load)))
	}
	p.sizeCell(p.part(s, "sensor"), cell)
	p.cardResistor(p.part(s, "light"), f.Load, quantity.Watt(float64(p.Highest)*float64(p.Highest)/float64(f.Load)))
	p.cardResistor(p.part(s, "base"), f.Base, quantity.Watt(math.Pow(float64(p.Highest)/float64(coil)/npn.GainLow, 2)*float64(f.Base)))
	c := p.part(s, "slow")
	set(c, "capacitance", f.Slow.String(), float64(f.Slow), "F", true, false)
	c.Note = p.capacitorFor(p.Highest)
	p.transistor(q, npn)
	p.Held += quantity.Ampere(nominal / float64(f.Load))
}

// followerSlack is how far the light threshold of a follower may pass what is asked:
// its load resistor comes in steps of a tenth (E24).
const followerSlack = 0.1
