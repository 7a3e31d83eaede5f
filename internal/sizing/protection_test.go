package sizing

import (
	"math"
	"testing"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
	"pgregory.net/rapid"
)

func near(t *testing.T, what string, got, want, rel float64) {
	t.Helper()
	if math.IsNaN(got) || math.Abs(got-want) > rel*math.Abs(want) {
		t.Errorf("%s: %v, want %v", what, got, want)
	}
}

// TestAmpacityByHand: 2.5 mm² by B2 at 35 °C in a group of three, IEC 60364-5-52:
// 23 × 0.94 × 0.70 A.
func TestAmpacityByHand(t *testing.T) {
	size := quantity.WireSize{Area: 2.5}
	iz, _, err := Ampacity(AmpacityInput{Table: catalogue.AmpacityB2, Size: size, Ambient: 35, Grouped: 3})
	if err != nil {
		t.Fatal(err)
	}
	near(t, "2.5 mm²", float64(iz), 23*0.94*0.70, 1e-12)
	for _, in := range []AmpacityInput{
		{Table: catalogue.AmpacityB2, Size: quantity.WireSize{Area: 3}},
		{Table: catalogue.AmpacityB2, Size: size, Ambient: 65},
		{Table: catalogue.AmpacityB2, Size: size, Ambient: 30, Grouped: 30},
	} {
		_, _, err := Ampacity(in)
		unknown(t, err)
	}
}

// TestChooseFuse: next rating over the load factor, and what the cable allows.
func TestChooseFuse(t *testing.T) {
	choose := func(load, cable quantity.Ampere, c *catalogue.FuseClass, stock ...quantity.Ampere) (quantity.Ampere, error) {
		r, _, err := ChooseFuse(FuseInput{Class: c, Load: load, LoadFactor: 0.8, Cable: cable, Stock: stock})
		return r, err
	}
	if r, err := choose(1.6, 11, catalogue.FuseBlade); err != nil || r != 2 {
		t.Errorf("1.6 A at 80 %%: %v %v, want 2 A", r, err)
	}
	if r, err := choose(1.61, 11, catalogue.FuseBlade); err != nil || r != 3 {
		t.Errorf("1.61 A at 80 %%: %v %v, want 3 A", r, err)
	}
	if r, err := choose(1.6, 11, catalogue.FuseBlade, 5, 10); err != nil || r != 5 {
		t.Errorf("from a stock of 5 and 10 A: %v %v", r, err)
	}
	_, err := choose(33, 50, catalogue.FuseBlade)
	blocked(t, err, LimitLoad)
	_, err = choose(7, 9.9, catalogue.FuseBlade)
	blocked(t, err, LimitOverload)
	// a 5 × 20 mm link opens surely at 2.1 I_n: 2.1 × 5 ≤ 1.45 × 7.25 A
	if _, err := choose(4, 7.25, catalogue.FuseCartridgeT); err != nil {
		t.Error(err)
	}
	_, err = choose(4, 7.2, catalogue.FuseCartridgeT)
	blocked(t, err, LimitOverload)
	_, err = Coordinate(CoordinateInput{Class: catalogue.FuseBlade, Load: 6, Rating: 5, Cable: 20})
	blocked(t, err, LimitLoad)
	if got := CableFor(catalogue.FuseCartridgeT, 5); math.Abs(float64(CableAllows(catalogue.FuseCartridgeT, got))-5) > 1e-9 {
		t.Errorf("CableFor and CableAllows disagree at %v", got)
	}
}

// TestOpeningAtGates: at the gates the times are those of the standard; between them
// straight on logarithmic axes; outside nothing is made up.
func TestOpeningAtGates(t *testing.T) {
	open := func(c *catalogue.FuseClass, r, i quantity.Ampere) Opening {
		o, _, err := OpeningTime(OpeningInput{Class: c, Rating: r, Current: i})
		if err != nil {
			t.Fatal(err)
		}
		return o
	}
	for i, want := range map[quantity.Ampere][2]float64{13.5: {0.75, 1800}, 16: {0.25, 50}, 20: {0.15, 5}, 35: {0.04, 0.5}, 60: {0.02, 0.1}} {
		o := open(catalogue.FuseBlade, 10, i)
		near(t, "earliest", float64(o.Earliest), want[0], 1e-9)
		near(t, "latest", float64(o.Latest), want[1], 1e-9)
	}
	mid := open(catalogue.FuseBlade, 10, quantity.Ampere(10*math.Sqrt(2*3.5)))
	near(t, "half way", float64(mid.Latest), math.Sqrt(5*0.5), 1e-9)
	if o := open(catalogue.FuseBlade, 10, 13.4); o.Latest != catalogue.Never {
		t.Errorf("below the first gate it need not open, got %v", o.Latest)
	}
	if o := open(catalogue.FuseBlade, 10, 10.9); o.Earliest != 360000 {
		t.Errorf("at 109 %% it holds 100 h, got %v", o.Earliest)
	}
	if o := open(catalogue.FuseBlade, 10, 400); !o.Beyond || o.Latest != 0.1 || o.Earliest != 0 {
		t.Errorf("far above the gates: %+v", o)
	}
	// IEC 60127-2 sheet 3 (read): 2.1 I_n within 2 min, 10 I_n 20 to 300 ms
	ten := open(catalogue.FuseCartridgeT, 1, 10)
	near(t, "5 × 20 mm at ten times, earliest", float64(ten.Earliest), 0.02, 1e-9)
	near(t, "5 × 20 mm at ten times, latest", float64(ten.Latest), 0.3, 1e-9)
	_, _, err := OpeningTime(OpeningInput{Class: catalogue.FuseStrip, Rating: 100, Current: 1000})
	unknown(t, err)
}

// TestCurrentToOpenInverts: the current found opens the fuse just in time.
func TestCurrentToOpenInverts(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := rapid.SampledFrom([]*catalogue.FuseClass{catalogue.FuseBlade, catalogue.FuseBladeHigh, catalogue.FuseKnife, catalogue.FuseCartridgeT, catalogue.FuseCartridgeF}).Draw(t, "class")
		r := rapid.SampledFrom(c.Ratings).Draw(t, "rating")
		within := quantity.Second(math.Exp(rapid.Float64Range(math.Log(0.01), math.Log(5000)).Draw(t, "log t")))
		i, _, err := CurrentToOpen(c, r, within)
		if err != nil {
			g, _ := c.Gates(r)
			if last := g.Slowest[len(g.Slowest)-1].Time; within >= last {
				t.Fatalf("%s %v within %v: %v", c.Name, r, within, err)
			}
			return
		}
		o, _, err := OpeningTime(OpeningInput{Class: c, Rating: r, Current: i})
		if err != nil || o.Latest > within*1.000001 {
			t.Fatalf("%s %v: %v opens within %v, wanted %v (%v)", c.Name, r, i, o.Latest, within, err)
		}
		less, _, _ := OpeningTime(OpeningInput{Class: c, Rating: r, Current: i * 0.999})
		if less.Latest <= within && within < 1e3 {
			t.Fatalf("%s %v: %v would do for %v too", c.Name, r, i*0.999, within)
		}
	})
	if i, _, err := CurrentToOpen(catalogue.FuseBlade, 5, 5); err != nil || math.Abs(float64(i)-10) > 1e-9 {
		t.Errorf("5 A within 5 s: %v %v, want 10 A (ISO 8820-3)", i, err)
	}
}

// TestDiscriminationHolds: inside the range it finds, the lower fuse's latest time is
// below the upper's earliest at every current tried; just beyond its end it is not.
func TestDiscriminationHolds(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		classes := []*catalogue.FuseClass{catalogue.FuseBlade, catalogue.FuseBladeHigh, catalogue.FuseKnife, catalogue.FuseCylinder10, catalogue.FuseCartridgeT}
		up := rapid.SampledFrom(classes).Draw(t, "upper")
		lo := rapid.SampledFrom(classes).Draw(t, "lower")
		in := DiscriminationInput{
			Upper: Link{up, rapid.SampledFrom(up.Ratings).Draw(t, "upper rating")},
			Lower: Link{lo, rapid.SampledFrom(lo.Ratings).Draw(t, "lower rating")},
			Fault: quantity.Ampere(rapid.Float64Range(5, 3000).Draw(t, "fault")),
		}
		d, _, err := Discriminate(in)
		if err != nil {
			t.Fatal(err)
		}
		holds := func(i quantity.Ampere) bool {
			a, _, _ := OpeningTime(OpeningInput{in.Lower.Class, in.Lower.Rating, i})
			b, _, _ := OpeningTime(OpeningInput{in.Upper.Class, in.Upper.Rating, i})
			return a.Latest < b.Earliest
		}
		if d.To == 0 {
			start := in.Fault
			if g, _ := lo.Gates(in.Lower.Rating); quantity.Ampere(g.Slowest[0].Multiple)*in.Lower.Rating < start {
				start = quantity.Ampere(g.Slowest[0].Multiple) * in.Lower.Rating
			}
			if holds(start) {
				t.Fatalf("holds at %v, but none is found", start)
			}
			return
		}
		for f := 0.0; f <= 1; f += 0.02 {
			i := d.From * quantity.Ampere(math.Pow(float64(d.To/d.From), f))
			if i > d.From && i < d.To*0.9999 && !holds(i) {
				t.Fatalf("fails at %v in %v..%v", i, d.From, d.To)
			}
		}
		if !d.Full && holds(d.To*1.0001) {
			t.Fatalf("still holds at %v beyond %v", d.To*1.0001, d.To)
		}
	})
	// IEC 60269-1 table 3 (from memory): 16 A gG holds 85 A for 0.1 s, and 2 A has opened
	// within 0.1 s from 23 A on; below 20 A the larger never opens within its hour.
	d, _, err := Discriminate(DiscriminationInput{Upper: Link{catalogue.FuseKnife, 16}, Lower: Link{catalogue.FuseCylinder10, 2}, Fault: 500})
	if err != nil || math.Abs(float64(d.From)-4.2) > 1e-9 || math.Abs(float64(d.To)-85) > 1e-6 || d.Full {
		t.Errorf("2 A gG below 16 A gG: %+v, %v; want 4.2 A to 85 A", d, err)
	}
	_, _, err = Discriminate(DiscriminationInput{Upper: Link{catalogue.FuseStrip, 100}, Lower: Link{catalogue.FuseBlade, 5}, Fault: 500})
	unknown(t, err)
}

// TestFaultCurrents: IEC 61660-1 by hand, and MostLoop as the inverse of LeastFault.
func TestFaultCurrents(t *testing.T) {
	in := FaultInput{Source: 25.6, Internal: 0.02, Loop: []Series{{"cable", 0.1}, {"fuse", 0.01}}}
	p, _ := Prospective(in)
	near(t, "peak", float64(p), 25.6/(0.9*0.02+0.11), 1e-12)
	least, _ := LeastFault(in)
	near(t, "least", float64(least), 0.95*25.6/0.13, 1e-12)
	near(t, "loop", float64(MostLoop(25.6, least)), 0.13, 1e-12)
}

// TestBreaking: voltage and current just inside and outside.
func TestBreaking(t *testing.T) {
	b := func(v quantity.Volt, i quantity.Ampere) error {
		_, err := Breaking(BreakingInput{Class: catalogue.FuseBlade, Rating: 10, System: v, Prospective: i})
		return err
	}
	if err := b(32, 1000); err != nil {
		t.Error(err)
	}
	blocked(t, b(32.1, 900), LimitVoltage)
	blocked(t, b(30, 1001), LimitBreaking)
}

// TestAdiabaticLimit: it holds up to five seconds.
func TestAdiabaticLimit(t *testing.T) {
	s, _, err := Adiabatic(AdiabaticInput{Fault: 100, For: 5, K: 115})
	if err != nil {
		t.Error(err)
	}
	near(t, "withstand time", float64(Withstand(s, 100, 115)), 5, 1e-9)
	_, _, err = Adiabatic(AdiabaticInput{Fault: 100, For: 5.01, K: 115})
	unknown(t, err)
}
