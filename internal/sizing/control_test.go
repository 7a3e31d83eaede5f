package sizing

import (
	"math"
	"testing"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// TestPickUp: a coil at 65 °C needs (234.5 + 65)/254.5 of its cold pick-up; just
// inside and outside.
func TestPickUp(t *testing.T) {
	in := CoilInput{Class: catalogue.RelayGeneral, Rated: 24, Low: 23, High: 24, Ambient: 30}
	p, _, err := CoilPickUp(in)
	if err != nil {
		t.Fatal(err)
	}
	near(t, "hot pick-up", float64(p.Needs), 0.8*24*(234.5+65)/254.5, 1e-12)
	in.Low = p.Needs - 0.01
	_, _, err = CoilPickUp(in)
	blocked(t, err, LimitPickUp)
	in.Low, in.High = 24, 26.4
	if _, _, err := CoilPickUp(in); err != nil {
		t.Errorf("110 %%: %v", err)
	}
	in.High = 26.5
	_, _, err = CoilPickUp(in)
	blocked(t, err, LimitCoilHeat)
}

// TestContact: ratings at 30 V and 48 V, and the derating rule beyond.
func TestContact(t *testing.T) {
	load := func(c catalogue.RelayClass, v quantity.Volt, i quantity.Ampere, lamps bool) error {
		_, _, err := ContactLoad(ContactInput{Class: c, Volt: v, Current: i, Lamps: lamps})
		return err
	}
	for _, c := range []struct {
		v     quantity.Volt
		i     quantity.Ampere
		lamps bool
		fits  bool
	}{{28, 10, false, true}, {28, 10.1, false, false}, {28, 3, true, true}, {28, 3.1, true, false}, {31, 1.5, false, true}, {31, 1.6, false, false}} {
		if err := load(catalogue.RelayGeneral, c.v, c.i, c.lamps); (err == nil) != c.fits {
			t.Errorf("%v at %v: %v", c.i, c.v, err)
		}
	}
	blocked(t, load(catalogue.RelayGeneral, 28, 11, false), LimitContact)
	// 30 A at 16 V: two thirds of the power at 24 V
	if err := load(catalogue.RelayAutomotive, 24, 13.3, false); err != nil {
		t.Error(err)
	}
	blocked(t, load(catalogue.RelayAutomotive, 24, 13.4, false), LimitContact)
	// Two poles in series share the voltage: never more than one gap at half of it.
	series := func(c catalogue.RelayClass, v quantity.Volt, i quantity.Ampere) error {
		_, _, err := ContactLoad(ContactInput{Class: c, Volt: v, Current: i, Series: true})
		return err
	}
	if err := series(catalogue.RelayGeneral, 58, 3); err != nil {
		t.Error(err)
	}
	blocked(t, series(catalogue.RelayGeneral, 58, 3.1), LimitContact)
	if err := series(catalogue.Contactor40, 59.9, 32); err != nil {
		t.Error(err)
	}
	blocked(t, series(catalogue.Contactor40, 59.9, 32.1), LimitContact)
	for _, r := range catalogue.RelayGeneral.SeriesRows {
		half, _, _ := ContactLoad(ContactInput{Class: catalogue.RelayGeneral, Volt: r.Volt / 2})
		if r.Current > half {
			t.Errorf("two poles at %v: %v, one gap at half of it: %v", r.Volt, r.Current, half)
		}
	}
	unknown(t, load(catalogue.RelayClass{}, 24, 1, false))
}

// TestSuppressionDelays: a Zener behind the diode shortens the release and raises the
// switch's voltage.
func TestSuppressionDelays(t *testing.T) {
	v1, t1, _ := Suppression(SuppressionInput{Supply: 24, Coil: 640, Forward: 0.8}, 0.1)
	v2, t2, _ := Suppression(SuppressionInput{Supply: 24, Coil: 640, Forward: 0.8, Zener: 24}, 0.1)
	if !(v2 > v1 && t2 < t1) {
		t.Errorf("diode %v %v, with Zener %v %v", v1, t1, v2, t2)
	}
	near(t, "ideal diode", func() float64 { _, x, _ := Suppression(SuppressionInput{Supply: 24, Coil: 640}, 0.1); return x }(), math.Log(10), 1e-9)
}

// TestString: the resistor never lets the rated current be exceeded, and refusals.
func TestString(t *testing.T) {
	in := StringInput{High: 27.6, Low: 21, Forward: 3.1, Series: 5, Current: 0.02}
	s, _, err := StringResistor(in)
	if err != nil {
		t.Fatal(err)
	}
	if s.Most > in.Current || s.Resistor != 620 {
		t.Errorf("%+v, want 620 Ω for 605", s)
	}
	near(t, "at the end", float64(s.AtLow), (21-15.5)/620, 1e-9)
	in.Series = 9
	_, _, err = StringResistor(in)
	blocked(t, err, LimitVoltage)
	in.Series = 7
	_, _, err = StringResistor(in)
	blocked(t, err, LimitLoad)
	in.Series, in.Pinned = 5, 560
	_, _, err = StringResistor(in)
	blocked(t, err, LimitLoad)
	in.Pinned, in.Current = 0, 5
	_, _, err = StringResistor(in)
	blocked(t, err, LimitDissipation)
}

// TestSetResistors: with every combination of worst parts the trimmer reaches both
// ends of the wanted range, and the nominal set ratio is near ten (common practice
// for a 12 V charger).
func TestSetResistors(t *testing.T) {
	d := catalogue.Regulator1A5
	in := SetInput{Device: d, Lowest: 13.4, Highest: 14.2}
	s, _, err := SetResistors(in)
	if err != nil {
		t.Fatal(err)
	}
	for bits := range 32 {
		sign := func(k int) quantity.Ohm { return quantity.Ohm(1 - 2*float64(bits>>k&1)) }
		ref, adj := d.ReferenceLow, quantity.Ampere(0)
		if bits&1 > 0 {
			ref = d.ReferenceHigh
		}
		if bits&2 > 0 {
			adj = d.AdjustHigh
		}
		r1, fixed := s.R1*(1+0.01*sign(2)), s.Fixed*(1+0.01*sign(3))
		trim := s.Trimmer * (1 + 0.20*sign(4))
		low, _ := RegulatorOutput(ref, r1, fixed, adj)
		high, _ := RegulatorOutput(ref, r1, fixed+trim, adj)
		if low > in.Lowest+1e-9 || high < in.Highest-1e-9 || high > s.Extreme+1e-9 {
			t.Errorf("parts %05b: %v to %v does not cover %v to %v (extreme %v)", bits, low, high, in.Lowest, in.Highest, s.Extreme)
		}
	}
	set, _ := RegulatorSet(d.Reference, 13.75, s.R1, d.Adjust)
	if ratio := float64(set / s.R1); ratio < 9 || ratio > 11 {
		t.Errorf("set ratio %.2f", ratio)
	}
	in.Most = 14.5
	_, _, err = SetResistors(in)
	blocked(t, err, LimitRange)
	_, _, err = SetResistors(SetInput{Device: d, Lowest: 13, Highest: 15, Tol: 0.2, Trimmers: []quantity.Ohm{50}})
	blocked(t, err, LimitRange)
}

// TestLinearCharger: 0.33 Ω in the output-impedance place and a set ratio near ten
// give a quarter to a third of an ampere into 12.5 V, 0.2 Ω about 0.4 A to 0.5 A
// (common practice); headroom, difference and heat just outside.
func TestLinearCharger(t *testing.T) {
	start := func(rs quantity.Ohm) float64 {
		z, _ := OutputImpedance(rs, 120, 1200)
		l, _, err := LinearCharger(LinearInput{
			Device: catalogue.Regulator1A5, SupplyLow: 17, SupplyTop: 20, SupplyOff: 24, Set: 13.75, Battery: 12.5, Diode: 0.2, Impedance: z, Ambient: 30, CaseSink: catalogue.CaseToSinkBare,
		})
		if err != nil {
			t.Fatal(err)
		}
		return float64(l.Start)
	}
	if i := start(0.33); i < 0.25 || i > 0.34 {
		t.Errorf("0.33 Ω: %.3f A", i)
	}
	if i := start(0.2); i < 0.38 || i > 0.5 {
		t.Errorf("0.2 Ω: %.3f A", i)
	}
	in := LinearInput{Device: catalogue.Regulator1A5, SupplyLow: 16.2, SupplyTop: 20, SupplyOff: 24, Set: 13.75, Battery: 10.5, Diode: 0.2, Impedance: 3.63, Ambient: 30, CaseSink: 0.5}
	_, _, err := LinearCharger(in)
	blocked(t, err, LimitHeadroom)
	in.SupplyLow, in.SupplyOff = 16.25, 51
	_, _, err = LinearCharger(in)
	blocked(t, err, LimitVoltage)
	in.SupplyOff, in.SupplyTop, in.Impedance = 50, 45, 2
	_, _, err = LinearCharger(in)
	blocked(t, err, LimitDissipation)
}

// TestCoilDropper: the dropper lies between its bounds and spares the Zener.
func TestCoilDropper(t *testing.T) {
	z, _ := catalogue.ZenerOf(12)
	in := CoilFeedInput{Low: 16, High: 20, Zener: z, Coil: 720, CoilTol: 0.15, Ambient: 40}
	f, _, err := CoilDropper(in)
	if err != nil {
		t.Fatal(err)
	}
	if f.Dropper < f.Least || f.Dropper > f.Most || f.Heat > f.Derated {
		t.Errorf("%+v", f)
	}
	s := ShuntState(in.Low, z.Volt*1.05, f.Dropper, in.Coil*0.85)
	if s.Zener < z.Knee {
		t.Errorf("starved at lowest supply: %v", s.Zener)
	}
	in.Coil = 300
	_, _, err = CoilDropper(in)
	blocked(t, err, LimitDissipation)
	in.Coil, in.Pinned = 720, 47
	_, _, err = CoilDropper(in)
	blocked(t, err, LimitDissipation)
}

// TestHeatSinkNeed: with and without.
func TestHeatSinkNeed(t *testing.T) {
	in := HeatInput{Power: 1, Junction: 125, Ambient: 40, JunctionCase: 5, CaseSink: 0.5, Free: 65}
	if s, _, err := HeatSink(in); err != nil || s.Needed {
		t.Errorf("1 W: %+v %v", s, err)
	}
	in.Power = 1.4
	if s, _, err := HeatSink(in); err != nil || !s.Needed {
		t.Errorf("1.4 W: %+v %v", s, err)
	}
	in.Power = 16
	_, _, err := HeatSink(in)
	blocked(t, err, LimitDissipation)
}
