package endurance

import (
	"errors"
	"math"
	"testing"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// TestColdAndAgeScaleTheCapacity uses the slow end of the table, where the capacity does
// not depend on the current: what is taken is capacity × share left ÷ size factor.
func TestColdAndAgeScaleTheCapacity(t *testing.T) {
	for _, tc := range []struct {
		room quantity.Celsius
		left quantity.Ratio
		want float64 // Ah of 33
		why  string
	}{
		{25, 1, 33, "reference"},
		{25, 0.8, 26.4, "four fifths left: IEEE 450 end of life"},
		{4.4, 1, 33 / 1.30, "IEEE 485 table 1, 40 °F"},
		{-1.1, 0.8, 33 * 0.8 / 1.43, "IEEE 485 table 1, 30 °F"},
	} {
		b := agm()
		b.Room, b.Left = tc.room, tc.left
		// A thirtieth of an hour's rate of what is left: slower than 20 h.
		i := quantity.Ampere(tc.want / 30)
		r := discharge(t, b, Outage{Load: constant(i), For: quantity.Hours(40)})
		if got := float64(i) * r.Empty.At.Hours(); !r.Empty.Happens || math.Abs(got/tc.want-1) > 1e-6 {
			t.Errorf("%v, %v left: gave %.4f Ah until empty, want %.4f (%s)", tc.room, tc.left, got, tc.want, tc.why)
		}
	}
}

// TestUsedUpInParts runs half the battery down at the 10 h rate and the rest at the 1 h
// rate: the parts add up, 5 h and half an hour.
func TestUsedUpInParts(t *testing.T) {
	b := agm()
	slow, fast := quantity.Ampere(33*0.93/10), quantity.Ampere(33*0.60/1)
	m, err := newModel(b)
	if err != nil {
		t.Fatal(err)
	}
	r, st := m.discharge(state{}, Outage{Load: constant(slow), For: quantity.Hours(5)})
	if r.Empty.Happens || math.Abs(st.used-0.5) > 1e-9 {
		t.Fatalf("half used: %g", st.used)
	}
	r, _ = m.discharge(st, Outage{Load: constant(fast), For: quantity.Hours(2)})
	if !r.Empty.Happens || math.Abs(r.Empty.At.Hours()-0.5) > 1e-6 {
		t.Errorf("the other half lasted %v, want 30 min", r.Empty.At)
	}
}

// TestConstantPowerBetweenItsBounds: a load of constant power draws least at the full
// battery's voltage and most at the end, so it lasts between the times of these two
// constant currents, and its charge is the integral of its current.
func TestConstantPowerBetweenItsBounds(t *testing.T) {
	const watt, end = 100.0, 21.0
	r := discharge(t, agm(), Outage{
		Load:   func(v quantity.Volt) quantity.Ampere { return quantity.Ampere(watt / float64(v)) },
		CutOff: end, For: quantity.Hours(20),
	})
	if !r.CutOff.Happens {
		t.Fatal("the cut-off stays closed")
	}
	least := discharge(t, agm(), Outage{Load: constant(watt / end), CutOff: end, For: quantity.Hours(20)}).CutOff.At
	most := discharge(t, agm(), Outage{Load: constant(quantity.Ampere(watt / float64(r.Samples[0].Volt))), CutOff: end, For: quantity.Hours(20)}).CutOff.At
	if !(least < r.CutOff.At && r.CutOff.At < most) {
		t.Errorf("lasts %v, want between %v and %v", r.CutOff.At, least, most)
	}
	integral := 0.0
	for i := 1; i < len(r.Samples); i++ {
		a, b := r.Samples[i-1], r.Samples[i]
		integral -= float64(a.Current+b.Current) / 2 * (b.Hours - a.Hours)
		if p := -float64(b.Current) * float64(b.Volt); math.Abs(p/watt-1) > 1e-5 { // the last point lies between two solved ones
			t.Errorf("%.2f h: %g W taken, want %g", b.Hours, p, watt)
		}
		if b.Volt > a.Volt || b.SoC > a.SoC {
			t.Errorf("%.2f h: voltage or charge rises", b.Hours)
		}
	}
	if math.Abs(integral/float64(r.Taken)-1) > 1e-3 {
		t.Errorf("integral of the current %.3f Ah, taken %.3f Ah", integral, float64(r.Taken))
	}
	if n := len(r.Samples); n < curvePoints/2 || n > 2*curvePoints {
		t.Errorf("%d points on the curve, want about %d", n, curvePoints)
	}
}

func TestWhatGoesOutWhen(t *testing.T) {
	watches := []Watch{{"needs most", 23}, {"needs less", 22}, {"needs least", 19}}
	o := Outage{Load: constant(4), CutOff: 21.5, Watches: watches, For: quantity.Hours(20)}
	r := discharge(t, agm(), o)
	if !r.Out[0].Happens || !r.Out[1].Happens || !(r.Out[0].At < r.Out[1].At && r.Out[1].At < r.CutOff.At) {
		t.Errorf("order of going out: %v, cut-off %v", r.Out, r.CutOff)
	}
	if r.Out[2] != r.CutOff {
		t.Errorf("what needs least goes out at %v, with the cut-off at %v", r.Out[2], r.CutOff)
	}
	if last := r.Samples[len(r.Samples)-1]; math.Abs(last.Hours-r.CutOff.At.Hours()) > 1e-9 || math.Abs(float64(last.Volt)-21.5) > 1e-9 {
		t.Errorf("the curve ends at %g h and %v, the cut-off opens at %g h and 21.5 V", last.Hours, last.Volt, r.CutOff.At.Hours())
	}
	if math.Abs(float64(r.Taken)-4*r.CutOff.At.Hours()) > 1e-6 {
		t.Errorf("%v taken by 4 A in %v", r.Taken, r.CutOff.At)
	}
	// Followed too briefly nothing happens.
	o.For = quantity.Hours(1)
	r = discharge(t, agm(), o)
	for i, m := range append(r.Out, r.CutOff, r.Empty, r.Flat) {
		if m.Happens {
			t.Errorf("within an hour: event %d at %v", i, m.At)
		}
	}
	if end := r.Samples[len(r.Samples)-1].Hours; end != 1 {
		t.Errorf("the curve ends at %g h", end)
	}
	// A watch above the first voltage is out from the start.
	r = discharge(t, agm(), Outage{Load: constant(4), Watches: []Watch{{"x", 30}}, For: quantity.Hours(1)})
	if !r.Out[0].Happens || r.Out[0].At != 0 {
		t.Errorf("out from the start: %v", r.Out[0])
	}
}

func TestFlatWithoutCutOff(t *testing.T) {
	r := discharge(t, agm(), Outage{Load: constant(4), Watches: []Watch{{"x", 1}}, For: quantity.Hours(20)})
	if !r.Empty.Happens || !r.Flat.Happens || r.Flat.At < r.Empty.At || r.Out[0] != r.Flat {
		t.Errorf("empty %v, flat %v, out %v", r.Empty, r.Flat, r.Out[0])
	}
}

func TestLoadThatTheBatteryCannotFeed(t *testing.T) {
	for name, load := range map[string]Load{
		"far too much power":   func(v quantity.Volt) quantity.Ampere { return quantity.Ampere(1e6 / max(float64(v), 0.1)) },
		"far too much current": constant(1e5),
	} {
		r := discharge(t, agm(), Outage{Load: load, Watches: []Watch{{"x", 20}}, For: quantity.Hours(4)})
		if !r.Flat.Happens && !r.Out[0].Happens {
			t.Errorf("%s: still lit", name)
		}
		for _, s := range r.Samples {
			if math.IsNaN(float64(s.Volt)) || math.IsInf(float64(s.Volt), 0) {
				t.Errorf("%s: voltage %v", name, s.Volt)
			}
		}
	}
}

// TestLoadThatJumps: drivers that stop at 21 V take nothing below. The run goes on and
// every point is finite.
func TestLoadThatJumps(t *testing.T) {
	r := discharge(t, agm(), Outage{Load: func(v quantity.Volt) quantity.Ampere {
		if v < 21 {
			return 0
		}
		return quantity.Ampere(200 / float64(v))
	}, For: quantity.Hours(12)})
	for _, s := range r.Samples {
		if math.IsNaN(float64(s.Volt)) || s.Volt < 15 || s.Volt > 26 {
			t.Errorf("%.2f h: %v", s.Hours, s.Volt)
		}
	}
}

func TestBeyondTheTable(t *testing.T) {
	if r := discharge(t, agm(), Outage{Load: constant(33 * 0.36 / 0.25), For: quantity.Hours(1)}); r.Beyond {
		t.Error("the current of the shortest time counts as beyond the table")
	}
	if r := discharge(t, agm(), Outage{Load: constant(33 * 0.37 / 0.25), For: quantity.Hours(1)}); !r.Beyond {
		t.Error("a higher current does not")
	}
}

func TestNothingDrawnNothingUsed(t *testing.T) {
	r := discharge(t, agm(), Outage{Load: constant(0), For: quantity.Hours(4)})
	if r.Taken != 0 || r.Left != 1 || r.Empty.Happens || r.Samples[0].Volt != 25.6 {
		t.Errorf("taken %v, left %v, first sample %+v", r.Taken, r.Left, r.Samples[0])
	}
}

// TestStepsAreFineEnough compares a run in the usual steps with the same in its halves
// of the time asked for, which halves the longest step.
func TestStepsAreFineEnough(t *testing.T) {
	load := func(v quantity.Volt) quantity.Ampere { return quantity.Ampere(150 / float64(v)) }
	long := discharge(t, agm(), Outage{Load: load, CutOff: 21, For: quantity.Hours(100)}).CutOff.At
	short := discharge(t, agm(), Outage{Load: load, CutOff: 21, For: quantity.Hours(5)}).CutOff.At
	if math.Abs(float64(long/short)-1) > 1e-4 {
		t.Errorf("cut-off at %v or %v by the length of the steps", long, short)
	}
}

func TestRefusals(t *testing.T) {
	o := Outage{Load: constant(1), For: 3600}
	for name, change := range map[string]func(*Battery){
		"colder than the table": func(b *Battery) { b.Room = -40 },
		"no class":              func(b *Battery) { b.Class = nil },
		"no cells":              func(b *Battery) { b.Cells = 0 },
		"no capacity":           func(b *Battery) { b.Capacity = 0 },
		"nothing left":          func(b *Battery) { b.Left = 0 },
		"no number":             func(b *Battery) { b.Capacity = quantity.AmpereHour(math.NaN()) },
	} {
		b := agm()
		change(&b)
		_, err := Discharge(b, o)
		var unknown *UnknownError
		if !errors.As(err, &unknown) {
			t.Errorf("%s: error %v", name, err)
		}
	}
}

func BenchmarkDischarge(b *testing.B) {
	o := Outage{
		Load:   func(v quantity.Volt) quantity.Ampere { return quantity.Ampere(100 / float64(v)) },
		CutOff: 21, For: quantity.Hours(8), Watches: []Watch{{"a", 22}, {"b", 21.5}},
	}
	for b.Loop() {
		if _, err := Discharge(Battery{Class: catalogue.VRLAAGM, Cells: 12, Capacity: 33, Left: 0.8, Room: 5}, o); err != nil {
			b.Fatal(err)
		}
	}
}
