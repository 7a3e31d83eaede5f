package endurance

import (
	"math"
	"testing"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// boosted returns a charger for agm() at 25 °C: 2.42 V and 2.29 V a cell.
func boosted(a quantity.Ampere) Charger { return Charger{Current: a, Boost: 29.04, Float: 27.48} }

func refill(t *testing.T, b Battery, from quantity.Ratio, c Charger, limit float64) Refill {
	t.Helper()
	r, err := Recharge(b, from, c, quantity.Hours(limit))
	if err != nil {
		t.Fatal(err)
	}
	return r
}

// TestRechargeTimeByHand: 33 Ah half empty owes 16.5 × 1.18 = 19.47 Ah. At 3 A of 3.5 A
// (0.5 A stand) the charger's current lasts until the ampere-hour law lets no more in; the
// cell's full rest voltage being reached only at the end, that is a little before 3 Ah are
// owed. The rest falls with a time constant of about 1 h until 1 % of 33 Ah, 0.389 Ah with
// the charge factor, is owed: about 16.47 ÷ 3 + ln(3 ÷ 0.389) = 7.5 h.
func TestRechargeTimeByHand(t *testing.T) {
	c := boosted(3.5)
	c.Standing = 0.5
	r := refill(t, agm(), 0.5, c, 48)
	if !r.Full.Happens || math.Abs(r.Full.At.Hours()-7.5) > 0.5 {
		t.Errorf("full after %.2f h, by hand about 7.5 h", r.Full.At.Hours())
	}
	if r.Samples[0].Current != 3 {
		t.Errorf("begins with %v, want 3 A", r.Samples[0].Current)
	}
	if r.Left < fullFrom || math.Abs(float64(r.Returned)-1.18*33*(float64(r.Left)-0.5)) > 1e-6 {
		t.Errorf("left %v, returned %v", r.Left, r.Returned)
	}
}

// TestNeverOverItsSettings: the current stays within the charger's, the voltage within
// boost, both without a jump upwards in the current.
func TestNeverOverItsSettings(t *testing.T) {
	for _, class := range catalogue.BatteryClasses() {
		b := Battery{Class: class, Cells: 10, Capacity: 50, Left: 0.8, Room: 20}
		c := Charger{Current: 5, Boost: 10 * class.Boost, Float: 10 * class.Float, Standing: 0.2}
		r := refill(t, b, 0.1, c, 72)
		if !r.Full.Happens {
			t.Errorf("%s: not full within three days", class.Name)
		}
		for i, s := range r.Samples {
			if s.Current > 4.8+1e-9 || s.Current < 0 || s.Volt > c.Boost+1e-9 || s.SoC > 1+1e-9 {
				t.Errorf("%s at %.2f h: %v, %v, charge %v", class.Name, s.Hours, s.Volt, s.Current, s.SoC)
			}
			if i > 0 && (s.Current > r.Samples[i-1].Current+1e-9 || s.SoC < r.Samples[i-1].SoC) {
				t.Errorf("%s at %.2f h: the current rises or the charge falls", class.Name, s.Hours)
			}
		}
	}
}

func TestFloatAloneTakesLonger(t *testing.T) {
	with, without := boosted(4), boosted(4)
	without.Boost = 0
	a, b := refill(t, agm(), 0.2, with, 72), refill(t, agm(), 0.2, without, 72)
	if !(a.Full.At < b.Full.At) {
		t.Errorf("full after %v with boost, %v without", a.Full.At, b.Full.At)
	}
	// Lead-acid on float alone: within two days, common practice (no source).
	if !b.Full.Happens || b.Full.At.Hours() > 48 {
		t.Errorf("on float alone full after %v", b.Full.At)
	}
}

func TestStandingLoadTakesItAll(t *testing.T) {
	c := boosted(0.5)
	c.Standing = 0.5
	r := refill(t, agm(), 0.5, c, 24)
	if r.Full.Happens || r.Returned != 0 || math.Abs(float64(r.Left)-0.5) > 1e-12 {
		t.Errorf("full %v, returned %v, left %v", r.Full, r.Returned, r.Left)
	}
}

func TestFullBatteryIsFullAtOnce(t *testing.T) {
	if r := refill(t, agm(), 1, boosted(3), 24); !r.Full.Happens || r.Full.At != 0 {
		t.Errorf("full %v", r.Full)
	}
}

func TestWeekWithAStrongCharger(t *testing.T) {
	o := Outage{Load: constant(4), CutOff: 21, For: quantity.Hours(4), Watches: []Watch{{"a", 22}}}
	w, err := Week(agm(), o, boosted(3))
	if err != nil {
		t.Fatal(err)
	}
	if len(w.Days) != 7 {
		t.Fatalf("%d days", len(w.Days))
	}
	for i, d := range w.Days {
		if !d.Held || !d.Full.Happens || d.Started < fullFrom {
			t.Errorf("day %d: %+v", i+1, d)
		}
	}
	if end := w.Samples[len(w.Samples)-1].Hours; end != 7*24 {
		t.Errorf("the curve ends at %g h", end)
	}
	for i := 1; i < len(w.Samples); i++ {
		if w.Samples[i].Hours < w.Samples[i-1].Hours {
			t.Fatalf("time runs back at %g h", w.Samples[i].Hours)
		}
	}
}

// TestWeekWithAWeakCharger: 16 Ah out each day and at most 20 h × 0.5 A ÷ 1.18 = 8.5 Ah
// back; the battery sinks and one day does not hold.
func TestWeekWithAWeakCharger(t *testing.T) {
	o := Outage{Load: constant(4), CutOff: 21, For: quantity.Hours(4)}
	w, err := Week(agm(), o, boosted(0.5))
	if err != nil {
		t.Fatal(err)
	}
	if !w.Days[0].Held || w.Days[6].Held {
		t.Errorf("first day held %v, last day held %v", w.Days[0].Held, w.Days[6].Held)
	}
	for i := 1; i < 3; i++ {
		back := float64(w.Days[i].Started-w.Days[i-1].Lowest) * 33
		if math.Abs(back-20*0.5/1.18) > 0.01 {
			t.Errorf("day %d: %.3f Ah returned, want %.3f", i, back, 20*0.5/1.18)
		}
	}
}

// TestStandingByHand: 33 Ah with 40 mA and a self-discharge of 5 % in 30 days (2.29 mA)
// stand 33 ÷ 0.04229 = 780 h.
func TestStandingByHand(t *testing.T) {
	got, err := Standing(agm(), 0.04)
	if err != nil {
		t.Fatal(err)
	}
	want := 33 / (0.04 + 33*0.05/720)
	if math.Abs(got.Hours()/want-1) > 1e-9 {
		t.Errorf("stands %.1f h, want %.1f h", got.Hours(), want)
	}
}

func BenchmarkRecharge(b *testing.B) {
	for b.Loop() {
		if _, err := Recharge(agm(), 0.2, boosted(3), quantity.Hours(48)); err != nil {
			b.Fatal(err)
		}
	}
}
