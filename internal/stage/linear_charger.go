package stage

import (
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
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
			b.number(up, 42, 5)
			b.number(down, 26, 48.5)
		},
		Steps: []Step{{Charging, sizeLinearCharger}},
	}
}

// Figures of a linear charger (common practice, no source): how far the float voltage
// may follow the load that comes and goes, the accuracy with which a technician sets
// it, the mounting of the regulator, and the rating of a diode over its current. At a
// float voltage the last part of a charge goes slowly: the resistor is chosen as if the
// battery had to be full in a part of the time.
const (
	bulkShare      = 0.5
	floatSteady    = 0.01
	setAccuracy    = 0.005
	regulatorMount = catalogue.CaseToSinkMica
	diodeReserve   = 1.25
	sinkDigits     = 2
)

// sizeLinearCharger chooses the set resistors so that the trimmer reaches the float
// voltage over the battery's temperatures, the output-impedance resistor between what
// the limits and the recharge ask for, and the heat sink.
func sizeLinearCharger(p *Plan, s *describe.Stage) {
	u := p.part(s, "regulator")
	b := &p.F.Battery
	device := catalogue.Regulator1A5
	standing, held := p.Standing, p.Held
	// The battery rests on the float voltage with the standing load and half of what
	// comes by day: by night it is a little higher, by day a little lower.
	load := standing + held/2
	low, high, left := p.feeding(s)
	limit := quantity.Ampere(float64(p.Class.MaxCharge) * float64(b.Capacity))
	most := min(device.Current, limit, max(left, leastCharge))
	diode := catalogue.Diode1N5819
	if most*diodeReserve > diode.Current {
		diode = catalogue.Diode1N5822
	}
	drop := diode.Drop(load)
	need, ws, _ := sizing.ChargerCurrent(sizing.ChargerInput{Class: p.Class, Capacity: b.Capacity, Removed: b.Removed, In: p.Site.Duty.Recharge.Val * bulkShare, Standing: standing + held})
	for _, w := range ws[:2] {
		p.work(u.Designation, "", w, b.Part.Designation+": capacity fitted")
	}
	pinned, given := describe.Get[quantity.Ohm](s.Fields, "impedance")
	set0 := p.Float + drop
	imp := sizing.ImpedanceInput{
		Set: set0, Ratio: float64(set0 / device.Reference), Diode: diode.Drop(need.Needed), Empty: p.Empty, Full: p.Full,
		Most: most, Need: need.Needed, Changing: held, Steady: p.Float * floatSteady, Pinned: pinned.Val,
	}
	if k := p.stageOf(must[describe.Ref](s, "from").Stage).Kind.Val; k != "transformer-supply" && k != "regulated-supply" {
		p.block(u.Designation, u.At, "", &sizing.UnknownError{What: "a source of mains power for the charger", Ask: "feed it from a transformer-supply or a regulated-supply"})
	}
	rs, wi, err := sizing.ChargeImpedance(imp)
	if err != nil {
		p.block(p.part(s, "impedance").Designation, u.At, "", err)
	}
	for _, w := range wi {
		p.work(p.part(s, "impedance").Designation, "", w, u.Designation+": charger current needed")
	}
	z, wz := sizing.OutputImpedance(rs, 1, quantity.Ohm(imp.Ratio-1))
	wz.Formula, wz.Substituted = "Z = R_s × U_set ÷ U_ref", sizing.Digits(float64(rs))+" Ω × "+sizing.Digits(float64(set0))+" V ÷ "+sizing.Digits(float64(device.Reference))+" V"
	p.work(u.Designation, "", wz, p.part(s, "impedance").Designation+": output-impedance resistor fitted")

	setting := set0 + quantity.Volt(float64(z)*float64(load))
	p.work(u.Designation, "setting before the diode", sizing.Working{
		Formula: "U_set = U_float + U_D + Z × (I_standing + I_day ÷ 2)", Value: float64(setting), Unit: "V", Source: catalogue.CommonPractice.String(),
		Substituted: sizing.Digits(float64(p.Float)) + " V + " + sizing.Digits(float64(drop)) + " V + " + sizing.Digits(float64(z)) + " Ω × (" +
			sizing.Digits(float64(standing)) + " A + " + sizing.Digits(float64(held)) + " A ÷ 2)",
	})
	p.setResistors(s, u, device, setting)
	start := p.chargerLimits(s, u, device, sizing.LinearInput{
		Device: device, Set: setting, Battery: p.Empty, Impedance: z, Ambient: p.Site.Duty.CableAmbient.Val, CaseSink: regulatorMount,
	}, diode, low, high)

	r1 := p.part(s, "impedance")
	set(r1, "resistance", rs.String(), float64(rs), "Ω", true, given)
	params(r1, "", circuit.Param{Name: "ohm", Value: float64(rs), Tol: carbonTol})
	p.watts(r1, quantity.Watt(float64(start)*float64(start)*float64(rs)))
	d := p.part(s, "blocking")
	set(d, "type", diode.Type, 0, "", true, false)
	d.Note = "Schottky diode " + diode.Type + ": " + diode.Reverse.String() + ", " + diode.Current.String()
	params(d, "", circuit.Param{Name: "is", Value: float64(diode.Saturation)}, circuit.Param{Name: "n", Value: diode.Ideality}, circuit.Param{Name: "rs", Value: float64(diode.Series)})

	p.F.Charger = facts.Charger{
		Part: u, Current: start, Required: need.Needed, Limit: limit, Float: p.Float, Boost: p.Boost, Pinned: given, Impedance: z,
		PerKelvin: quantity.Volt(p.Cells) * p.Class.Slope, Mains: p.mainsOf(s),
	}
	from := must[describe.Ref](s, "from")
	p.aux[from.Stage] += start
	_, wf := sizing.ChargeVoltage(sizing.ChargeInput{Class: p.Class, Cells: p.Cells, At: p.Class.ChargeAt})
	p.work(u.Designation, "", wf)
	fuseGiven, _ := describe.Get[quantity.Ampere](s.Fields, "fuse")
	f := p.systemFuse(p.part(s, "fuse"), "charger", start, fuseGiven)
	p.ChargeSize, f.CableAmpacity = p.leastFor(f.Part.Designation, f.Class, f.Rating, catalogue.LeastFixed, 1)
	f.CableSize = p.ChargeSize
}

// leastCharge keeps the sums lawful when a supply has nothing left for the charger;
// the supply's own rating then stands in the way.
const leastCharge quantity.Ampere = 0.01

// feeding returns the voltage of a charger's supply at lowest mains with the whole
// rated current and at highest mains over the current, and the current that is left
// for the charger.
func (p *Plan) feeding(s *describe.Stage) (low, high func(quantity.Ampere) quantity.Volt, left quantity.Ampere) {
	from := must[describe.Ref](s, "from")
	taken := p.drawn(from.Stage)
	if r, ok := p.rawOf(from.Stage); ok {
		return func(i quantity.Ampere) quantity.Volt { return r.low(i + taken) }, func(i quantity.Ampere) quantity.Volt { return r.high(i + taken) }, r.rated.Ampere - taken
	}
	lowest, highest, left := p.supplyRange(from.Stage)
	at := func(v quantity.Volt) func(quantity.Ampere) quantity.Volt {
		return func(quantity.Ampere) quantity.Volt { return v }
	}
	return at(lowest), at(highest), left - taken
}

// supplyRange returns the lowest and highest voltage of what feeds a stage, the one at
// lowest mains with its whole rated current, the other at highest mains without load,
// and that rated current. A rail of the battery ranges from the end of discharge to the
// highest charge voltage.
func (p *Plan) supplyRange(name string) (low, high quantity.Volt, rated quantity.Ampere) {
	if r, ok := p.rawOf(name); ok {
		return r.low(r.rated.Ampere), r.high(0), r.rated.Ampere
	}
	s := p.stageOf(name)
	if s.Kind.Val == "regulated-supply" {
		v, ok := describe.Get[quantity.Rating](s.Fields, "rated")
		if !ok {
			v.Val = quantity.Rating{Volt: p.Site.Duty.Nominal.Val, Ampere: catalogue.SupplyCurrents[len(catalogue.SupplyCurrents)-1]}
		}
		acc := quantity.Volt(must[quantity.Ratio](s, "accuracy"))
		return v.Val.Volt * (1 - acc), v.Val.Volt * (1 + acc), v.Val.Ampere
	}
	return p.End, p.Highest, p.F.Battery.Prospective
}

// mainsOf returns the mains of the supply that feeds a charger.
func (p *Plan) mainsOf(s *describe.Stage) quantity.Toleranced[quantity.Volt] {
	m, _ := describe.Get[quantity.Toleranced[quantity.Volt]](p.stageOf(must[describe.Ref](s, "from").Stage).Fields, "mains")
	return m.Val
}

// setResistors chooses set resistors and trimmer and puts the trimmer where the typical
// regulator gives the setting.
func (p *Plan) setResistors(s *describe.Stage, u *circuit.Part, device catalogue.AdjustableRegulator, setting quantity.Volt) {
	room := p.Site.Duty.BatteryRoom.Val
	shift := func(t quantity.Celsius) quantity.Volt {
		return quantity.Volt(p.Cells) * p.Class.Slope * quantity.Volt(t-p.Class.ChargeAt)
	}
	r, ws, err := sizing.SetResistors(sizing.SetInput{
		Device: device, Lowest: setting + min(0, shift(room.High)), Highest: setting + max(0, shift(room.Low)),
	})
	if err != nil {
		p.block(u.Designation, u.At, "", err)
		r = sizing.Set{R1: device.ProgrammingLow, Fixed: 1, Trimmer: catalogue.PresetValues[len(catalogue.PresetValues)-1]}
	}
	trim := p.part(s, "trimmer")
	for _, w := range ws {
		p.work(trim.Designation, "", w)
	}
	r2, w := sizing.RegulatorSet(device.Reference, setting, r.R1, device.Adjust)
	p.work(trim.Designation, "", w, u.Designation+": setting before the diode")
	// The trimmer takes out what the parts' tolerances do; what is left is how exactly
	// it is set.
	for _, x := range []struct {
		local string
		ohm   quantity.Ohm
	}{{"set-upper", r.R1}, {"set-lower", r.Fixed}} {
		part := p.part(s, x.local)
		set(part, "resistance", x.ohm.String(), float64(x.ohm), "Ω", true, false)
		params(part, "", circuit.Param{Name: "ohm", Value: float64(x.ohm)})
		i := float64(device.Reference) / float64(r.R1)
		p.watts(part, quantity.Watt(i*i*float64(x.ohm)))
	}
	ohm := min(max(r2-r.Fixed, 0), r.Trimmer)
	set(trim, "resistance", r.Trimmer.String(), float64(r.Trimmer), "Ω", true, false)
	set(trim, "setting", "sets near "+quantity.Format(ohm, 2), float64(ohm), "Ω", false, false)
	trim.Note = "set " + quantity.Fixed(p.Float, 2) + " at the battery, fully charged, at " + p.Class.ChargeAt.String()
	if r.Extreme > 0 {
		trim.Note += "; at its end it may give " + quantity.Format(r.Extreme, 3) + ": set it before the battery is connected"
	}
	params(trim, "", circuit.Param{Name: "ohm", Value: float64(ohm)})
	set(u, "reference", device.Reference.String()+" ref", float64(device.Reference), "V", true, false)
	set(u, "float", "float "+quantity.Fixed(p.Float, 2), float64(p.Float), "V", false, false)
	params(u, "",
		circuit.Param{Name: "vref", Value: float64(device.Reference), Tol: setAccuracy},
		circuit.Param{Name: "iadj", Value: float64(device.Adjust)},
		circuit.Param{Name: "limit_ampere", Value: float64(device.Current)},
	)
}

// chargerLimits records the current into an empty battery, the headroom and the heat,
// and returns that current.
func (p *Plan) chargerLimits(s *describe.Stage, u *circuit.Part, device catalogue.AdjustableRegulator, in sizing.LinearInput, diode catalogue.Diode, low, high func(quantity.Ampere) quantity.Volt) quantity.Ampere {
	start := device.Current
	for range 5 { // the diode's drop follows the current a little
		in.Diode = diode.Drop(start)
		start = quantity.Ampere(max(0, min(float64(device.Current), float64(in.Set-in.Diode-in.Battery)/float64(in.Impedance))))
	}
	in.SupplyLow, in.SupplyTop, in.SupplyOff = low(start), high(start), high(0)
	l, ws, err := sizing.LinearCharger(in)
	if err != nil {
		p.block(u.Designation, u.At, "", err)
	}
	for _, w := range ws {
		p.work(u.Designation, "", w, u.Designation+": setting before the diode", u.Designation+": output impedance")
	}
	set(u, "heat", quantity.Format(l.Heat, 2)+" at most", float64(l.Heat), "W", false, false)
	if l.Sink.Needed && l.Sink.Most > 0 {
		most := quantity.KelvinPerWatt(floorDigits(float64(l.Sink.Most), sinkDigits))
		set(u, "sink", "heat sink "+most.String(), float64(most), "K/W", true, false)
		u.Note = "TO-220, on a heat sink of " + most.String() + " or less, with mica washer; gives off " + quantity.Format(l.Heat, 2)
	}
	return l.Start
}

// floorDigits rounds a positive number down to so many digits.
func floorDigits(v float64, digits int) float64 {
	k := math.Pow(10, float64(digits)-1-math.Floor(math.Log10(v)))
	return math.Floor(v*k+stepSlack) / k
}
