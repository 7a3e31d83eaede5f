package stage

import (
	"strings"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
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
			b.sketch(27, "steadies the", "coil's feed")
			f := b.feedOf(from)
			if f.rail != "" {
				up := b.lead(circuit.OpUp, "plus", r.Pin("1"), f.rail, 17, 14, 17, upEnd)
				b.number(up, 17, 11)
			} else {
				b.coilFeed(f, r.Pin("1"), "raw", 10, 0, 10, 17, 10, 17, 14)
			}
			b.symbol("resistor", r, 17, 16, "V", "L")
			b.line(nil, 17, 18, 17, 30)
			b.output(s, "out", z.Pin("K"), coilLevel1, 17, 24)
			b.symbol("zener", z, 17, 32, "U", "L")
			down := b.lead(circuit.OpDown, "minus", z.Pin("A"), Minus, 17, 34, 17, downEnd)
			b.point(b.TestPoint("out", "Steadied coil feed", z.Pin("K")), 20, coilLevel1, "N")
			b.number(down, 17, 42)
		},
		Steps: []Step{{Storage, sizeShunt}},
	}
}

// sizeShunt chooses the Zener and the dropper between its two bounds: enough current
// at the lowest supply for the coil that draws most, no more heat in the Zener than it
// bears with the coil unplugged at the highest.
func sizeShunt(p *Plan, s *describe.Stage) {
	r, z := p.part(s, "dropper"), p.part(s, "zener")
	volts, given := describe.Get[quantity.Volt](s.Fields, "volts")
	if !given {
		volts.Val = p.Site.Duty.Nominal.Val
	}
	from := must[describe.Ref](s, "from")
	low, high, _ := p.supplyRange(from.Stage)
	nominal := p.Site.Duty.Nominal.Val
	load := p.drawn(s.Name.Val)
	coil := openCoil
	if load > 0 {
		coil = quantity.Ohm(float64(nominal) / float64(load))
	}
	pinned, fixed := describe.Get[quantity.Ohm](s.Fields, "dropper")
	in := sizing.CoilFeedInput{
		Low: low, High: high, Coil: coil, CoilTol: p.coilClasses(nominal)[0].CoilTol, Ambient: p.Site.Duty.CableAmbient.Val, Pinned: pinned.Val,
	}
	f, zener, ws, err := coilFeedWith(in, volts.Val)
	if err != nil {
		p.block(r.Designation, r.At, "", err)
	}
	for _, w := range ws {
		p.work(r.Designation, "", w)
	}
	if f.Dropper <= 0 { // nothing fits: the smaller bound lets the circuit be solved
		f.Dropper = quantity.Ohm(catalogue.E24.AtLeast(max(1, float64(f.Least))))
		f.SupplyAt = quantity.Ampere(float64(high-zener.Volt) / float64(f.Dropper))
	}
	set(r, "resistance", f.Dropper.String(), float64(f.Dropper), "Ω", true, fixed)
	params(r, "", circuit.Param{Name: "ohm", Value: float64(f.Dropper), Tol: carbonTol})
	p.watts(r, quantity.Watt(float64(f.SupplyAt)*float64(f.SupplyAt)*float64(f.Dropper)))
	set(z, "voltage", zener.Volt.String(), float64(zener.Volt), "V", true, given)
	set(z, "power", zener.Power.String(), float64(zener.Power), "W", true, false)
	set(z, "heat", quantity.Format(f.Heat, 2)+" at most", float64(f.Heat), "W", false, false)
	z.Note = zener.Type + " or like it: " + zener.Volt.String() + ", " + zener.Power.String()
	params(z, "",
		circuit.Param{Name: "vz", Value: float64(zener.Volt), Tol: float64(zener.Tol)}, circuit.Param{Name: "iz", Value: float64(zener.Test)},
		circuit.Param{Name: "rz", Value: float64(zener.Impedance)},
	)
	switch p.stageOf(from.Stage).Kind.Val {
	case "transformer-supply", "regulated-supply":
		p.aux[from.Stage] += f.SupplyAt
	default: // it hangs on the battery's rail and draws all the time
		p.Standing += quantity.Ampere(max(0, float64(nominal-zener.Volt)/float64(f.Dropper)))
	}
}

// openCoil stands for no coil at all.
const openCoil quantity.Ohm = 1e9

// coilFeedWith tries the 1 W Zener of that voltage and, where it gets too hot, the 5 W
// one.
func coilFeedWith(in sizing.CoilFeedInput, v quantity.Volt) (f sizing.CoilFeed, z catalogue.Zener, ws []sizing.Working, err error) {
	small, ok := catalogue.ZenerOf(v)
	large, okLarge := catalogue.Zener5WOf(v)
	if !ok || !okLarge {
		var have []string
		near := catalogue.Zeners1W[0]
		for _, x := range catalogue.Zeners1W {
			have = append(have, x.Volt.String())
			if x.Volt <= v {
				near = x
			}
		}
		in.Zener = near
		f, ws, _ = sizing.CoilDropper(in)
		return f, near, ws, &sizing.UnknownError{What: "a Zener diode of " + v.String(), Source: "the list has " + strings.Join(have, ", "), Ask: "give volts: one of these"}
	}
	for _, z = range []catalogue.Zener{small, large} {
		in.Zener = z
		if f, ws, err = sizing.CoilDropper(in); err == nil {
			return f, z, ws, nil
		}
	}
	return f, z, ws, err
}
