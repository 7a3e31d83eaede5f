package stage

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// expandComparator builds the comparator card: light divider, reference with preset,
// hysteresis, high-side driver of the coil.
func expandComparator(b *Build, s *describe.Stage) {
	from, _ := b.ref(s, "from")
	f := b.photocellFuse()
	x := b.sensor(s)
	r1 := x.resistor("light", "Resistor of the light divider")
	c1 := b.Part("slow", circuit.Capacitor, "Capacitor, slows the light signal", "1", "2")
	b.Element(c1, "", "capacitor", "1", "1", "2", "2")
	r2 := x.resistor("upper", "Resistor of the reference, upper")
	r3 := b.Part("set", circuit.Potentiometer, "Preset, sets the twilight", "1", "2", "3")
	b.Element(r3, "upper", "resistor", "1", "1", "2", "3")
	b.Element(r3, "lower", "resistor", "1", "3", "2", "2")
	r4 := x.resistor("lower", "Resistor of the reference, lower")
	r5 := x.resistor("input", "Resistor to the input")
	r6 := x.resistor("hysteresis", "Resistor of the hysteresis")
	k := b.Part("comparator", circuit.Comparator, "Comparator, open collector", "+", "-", "OUT", "V+", "V-")
	b.Element(k, "", "comparator", "+", "+", "-", "-", "OUT", "OUT", "V+", "V+", "V-", "V-")
	r7 := x.resistor("base", "Resistor to the base")
	r8 := x.resistor("off", "Resistor base to emitter")
	q := b.Part("driver", circuit.PNP, "Transistor, drives the relay", "B", "C", "E")
	b.Element(q, "", "pnp", "B", "B", "C", "C", "E", "E")
	t3 := b.Terminal(x.strip, "3")

	b.Join(f.Pin("2"), x.plus.Pin("in"), r2.Pin("1"), k.Pin("V+"), r8.Pin("1"), q.Pin("E"))
	b.Join(x.signal.Pin("in"), r1.Pin("1"), c1.Pin("1"), k.Pin("-"))
	b.Join(r1.Pin("2"), c1.Pin("2"), r4.Pin("2"), k.Pin("V-"))
	b.Join(r2.Pin("2"), r3.Pin("1"))
	b.Join(r3.Pin("2"), r4.Pin("1"))
	b.Join(r3.Pin("3"), r5.Pin("1"))
	b.Join(r5.Pin("2"), r6.Pin("1"), k.Pin("+"))
	b.Join(k.Pin("OUT"), r6.Pin("2"), r7.Pin("1"))
	b.Join(r7.Pin("2"), r8.Pin("2"), q.Pin("B"))
	b.Join(q.Pin("C"), t3.Pin("in"))

	b.sketch(94, "tells the relay", "that it is light")
	up := b.lead(circuit.OpUp, "plus", f.Pin("1"), from, 20, 7, 20, upEnd)
	b.symbol("fuse", f, 20, 9, "V", "L")
	b.line(nil, 20, 11, 20, 22)
	b.line(nil, 20, 13, 82, 13)
	// Rows: dividers at 17 and 38, sensor and preset at 24, signal at 25, feedback at 17.
	x.sketch(b, 36)
	b.symbol("resistor", r1, 20, 38, "V", "L")
	b.line(nil, 20, 40, 20, 45)
	b.symbol("capacitor", c1, 26, 38, "V", "R")
	b.line(nil, 26, 32, 26, 36)
	b.line(nil, 26, 40, 26, 45)
	b.line(nil, 20, 32, 53, 32, 53, 26, 55, 26)
	b.line(nil, 20, 45, 59, 45)
	b.symbol("resistor", r2, 38, 17, "V", "L")
	b.line(nil, 38, 13, 38, 15)
	b.line(nil, 38, 19, 38, 22)
	b.symbol("potentiometer_preset", r3, 38, 24, "V", "L")
	b.line(nil, 38, 26, 38, 36)
	b.symbol("resistor", r4, 38, 38, "V", "L")
	b.line(nil, 38, 40, 38, 45)
	b.line(nil, 40, 24, 44, 24)
	b.symbol("resistor", r5, 46, 24, "H", "A")
	b.line(nil, 48, 24, 55, 24)
	b.symbol("comparator", k, 59, 25, "B", "A")
	b.line(nil, 59, 21, 59, 13)
	b.line(nil, 59, 29, 59, 45)
	b.line(nil, 63, 25, 69, 25)
	b.line(nil, 65, 25, 65, 17, 56, 17)
	b.symbol("resistor", r6, 54, 17, "H", "A")
	b.line(nil, 52, 17, 50, 17, 50, 24)
	b.symbol("resistor", r7, 71, 25, "H", "B")
	b.line(nil, 73, 25, 79, 25)
	b.line(nil, 75, 25, 75, 19)
	b.symbol("resistor", r8, 75, 17, "V", "L")
	b.line(nil, 75, 15, 75, 13)
	b.symbol("pnp", q, 81, 25, "B", "R")
	b.line(nil, 82, 23, 82, 13)
	b.line(nil, 82, 27, 82, 34, 87, 34)
	b.add(circuit.SketchItem{Op: circuit.OpTerminal, Part: t3, X: 88, Y: 34})
	b.output(s, "out", t3.Pin("out"), coilLevel2, 89, 91)
	down := b.lead(circuit.OpDown, "minus", k.Pin("V-"), Minus, 32, 45, 32, downEnd)
	b.point(b.TestPoint("light", "Light signal", k.Pin("-")), 30, 32, "N")
	b.point(b.TestPoint("reference", "Twilight setting", r3.Pin("3")), 42, 24, "S")
	b.point(b.TestPoint("output", b.cur.Heading+" output", q.Pin("C")), 84, 34, "S")
	b.number(up, 20, 5)
	b.number(down, 32, 48.5)
}

// sizeComparator chooses the card's resistors, the preset's setting and the driver of
// the coil.
func sizeComparator(p *Plan, s *describe.Stage, dark, light quantity.Lux) {
	k, q, pot := p.part(s, "comparator"), p.part(s, "driver"), p.part(s, "set")
	cell, comp, pnp := catalogue.CadmiumSulphide5, catalogue.ComparatorDual, catalogue.PNPSmall
	coil, class := p.coilOf(s)
	nominal := p.Site.Duty.Nominal.Val
	in := sizing.TwilightInput{Cell: cell, Dark: dark, Bright: light, Most: p.Highest}
	drive := sizing.CoilDriverInput{Transistor: pnp, Comparator: comp, Low: p.End, High: p.Highest, Coil: coil, CoilTol: class.CoilTol}
	t, d, ws, wd, err := comparatorCard(in, drive, nominal)
	if err != nil {
		p.block(k.Designation, k.At, "", err)
		if t.Hysteresis == 0 || d.Base == 0 { // values with which the circuit can be solved
			in.Dark, in.Bright, drive.Low, drive.Coil = 10, 10*twilightRatio, nominal, class.CoilResistance(nominal)
			t, d, _, _, _ = comparatorCard(in, drive, nominal)
		}
	}
	for _, w := range ws {
		p.work(k.Designation, "", w)
	}
	for _, w := range wd {
		p.work(q.Designation, "", w)
	}
	p.sizeCell(p.part(s, "sensor"), cell)
	for _, r := range []struct {
		local string
		ohm   quantity.Ohm
	}{
		{"light", t.Load}, {"upper", t.Upper}, {"lower", t.Lower}, {"input", t.Input}, {"hysteresis", t.Hysteresis}, {"off", d.Off},
	} {
		p.cardResistor(p.part(s, r.local), r.ohm, quantity.Watt(float64(p.Highest)*float64(p.Highest)/float64(r.ohm)))
	}
	p.cardResistor(p.part(s, "base"), d.Base, d.Heat)
	c := p.part(s, "slow")
	set(c, "capacitance", t.Slow.String(), float64(t.Slow), "F", true, false)
	c.Note = p.capacitorFor(p.Highest)
	set(pot, "resistance", t.Preset.String(), float64(t.Preset), "Ω", true, false)
	set(pot, "setting", "set to "+quantity.Format(t.Wiper, 2), float64(t.Wiper), "", false, false)
	pot.Note = "set to " + quantity.Format(t.Wiper, 2) + " of its track from the lower end, then at dusk until the lights come on"
	params(pot, "upper", circuit.Param{Name: "ohm", Value: float64(t.Preset) * float64(1-t.Wiper), Tol: float64(catalogue.PresetTol)})
	params(pot, "lower", circuit.Param{Name: "ohm", Value: float64(t.Preset) * float64(t.Wiper), Tol: float64(catalogue.PresetTol)})
	set(k, "type", comp.Name, 0, "", false, false)
	k.Note = "comparator with open collector, " + comp.Volt.String() + ", sinks " + comp.Sink.String()
	params(k, "",
		circuit.Param{Name: "vos", Value: 0}, circuit.Param{Name: "sat_volt", Value: float64(comp.Saturation)},
		circuit.Param{Name: "sat_ohm", Value: float64(comp.Series)}, circuit.Param{Name: "own_ampere", Value: float64(comp.Own), Tol: ownTol},
		circuit.Param{Name: "bias_ampere", Value: float64(comp.Bias)},
	)
	p.transistor(q, pnp)
	// What the card takes: its divider and comparator always, base and light divider by day.
	p.Standing += comp.Own + quantity.Ampere(float64(nominal)/float64(t.Upper+t.Preset+t.Lower))
	p.Held += d.Drive + quantity.Ampere(float64(nominal)/float64(t.Load))
}

// comparatorCard sizes card and driver, which depend on each other a little: the
// driver's resistors hold the output up, and the current of the hysteresis flows
// through them.
func comparatorCard(in sizing.TwilightInput, drive sizing.CoilDriverInput, nominal quantity.Volt) (t sizing.Twilight, d sizing.CoilDriver, ws, wd []sizing.Working, err error) {
	for range 3 {
		in.PullUp = d.Base + d.Off
		in.Low = (float64(drive.Comparator.Saturation) + float64(drive.Comparator.Series)*float64(d.Drive)) / float64(nominal)
		var hot error
		if t, ws, hot = sizing.TwilightCard(in); t.Hysteresis == 0 {
			return t, d, nil, nil, hot
		}
		drive.Feedback = t.Source + t.Hysteresis
		if d, wd, err = sizing.CoilDriverResistors(drive); err == nil {
			err = hot
		}
		if d.Base == 0 {
			return t, d, ws, wd, err
		}
	}
	return t, d, ws, wd, err
}

// transistor records a small transistor of a registration.
func (p *Plan) transistor(q *circuit.Part, t catalogue.Transistor) {
	set(q, "type", t.Type, 0, "", true, false)
	q.Note = t.Type + " or like it: " + t.Volt.String() + ", " + t.Current.String()
	params(q, "", circuit.Param{Name: "bf", Value: t.Gain, Tol: (t.GainHigh - t.GainLow) / 2 / t.Gain})
}

// cardResistor records a resistor of a card with the power rating for its greatest
// heat.
func (p *Plan) cardResistor(r *circuit.Part, v quantity.Ohm, heat quantity.Watt) {
	p.resistor(r, "", v, resistorTol)
	p.watts(r, heat)
}

// watts records the power rating of a resistor: the next standard one from twice its
// greatest heat up (common practice, no source).
func (p *Plan) watts(r *circuit.Part, heat quantity.Watt) {
	rating, ok := catalogue.NextRating(catalogue.ResistorWatts, heat*resistorReserve)
	if !ok {
		most := catalogue.ResistorWatts[len(catalogue.ResistorWatts)-1]
		p.block(r.Designation, r.At, catalogue.CommonPractice.String(), &sizing.BlockedError{
			Limit: sizing.LimitDissipation, Subject: "the heat of the resistor", Value: float64(heat), Bound: float64(most) / resistorReserve, Unit: "W",
			Frees: "take a higher resistance, or share the heat over several resistors",
		})
		rating = most
	}
	set(r, "power", sizing.Digits(float64(rating))+" W", float64(rating), "W", rating > smallResistor, false)
}

// resistorReserve is how many times its heat a resistor is rated for, smallResistor
// the rating that needs no word on the drawing (common practice, no source).
const (
	resistorReserve               = 2
	smallResistor   quantity.Watt = 0.25
)

// capacitorFor says what a capacitor must stand.
func (p *Plan) capacitorFor(v quantity.Volt) string {
	r, ok := catalogue.NextRating(catalogue.CapacitorVolts, v)
	if !ok {
		r = v
	}
	return "rated " + r.String() + " or more"
}
