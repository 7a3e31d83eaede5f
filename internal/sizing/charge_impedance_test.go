package sizing

import (
	"errors"
	"math"
	"testing"
)

// TestChargeImpedance works a 12 V battery by hand: 13.9 V set, 0.2 V diode, 11.7 V
// empty and 12.7 V full, a set ratio of 11.12. The charging voltage falls from 2.0 V to
// 1.0 V, its logarithmic mean is 1/ln 2 = 1.4427 V.
func TestChargeImpedance(t *testing.T) {
	in := ImpedanceInput{Set: 13.9, Ratio: 11.12, Diode: 0.2, Empty: 11.7, Full: 12.7, Most: 1, Need: 0.4}
	rs, ws, err := ChargeImpedance(in)
	if err != nil {
		t.Fatal(err)
	}
	for i, want := range []float64{2.0 / 11.12, 1 / math.Ln2, 1 / math.Ln2 / 0.4 / 11.12} {
		if math.Abs(ws[i].Value-want) > 1e-6 {
			t.Errorf("%s is %g, want %g", ws[i].Name, ws[i].Value, want)
		}
	}
	if rs != 0.3 { // the E24 value next below 0.324 Ω
		t.Errorf("fits %v", rs)
	}
	in.Changing, in.Steady = 0.05, 0.14
	if rs, _, _ = ChargeImpedance(in); rs != 0.24 { // 0.14 V ÷ 0.05 A ÷ 11.12 = 0.252 Ω
		t.Errorf("with a steady float fits %v", rs)
	}
	in.Changing, in.Steady = 0.05, 0.05
	if rs, _, _ = ChargeImpedance(in); rs != 0.18 { // not below 2 V ÷ 1 A ÷ 11.12 = 0.1799 Ω
		t.Errorf("at the least fits %v", rs)
	}
}

// TestChargeImpedanceLimits goes to both sides of each limit.
func TestChargeImpedanceLimits(t *testing.T) {
	in := ImpedanceInput{Set: 13.9, Ratio: 11.12, Diode: 0.2, Empty: 11.7, Full: 12.7, Most: 1, Need: 0.4}
	for _, x := range []struct {
		name string
		set  func(*ImpedanceInput)
		ok   bool
	}{
		{"pinned just above the least", func(i *ImpedanceInput) { i.Pinned = 0.18 }, true},
		{"pinned just below the least", func(i *ImpedanceInput) { i.Pinned = 0.179 }, false},
		{"pinned just below the most", func(i *ImpedanceInput) { i.Pinned = 0.324 }, true},
		{"pinned just above the most", func(i *ImpedanceInput) { i.Pinned = 0.325 }, false},
		{"need that the least still meets", func(i *ImpedanceInput) { i.Need = 0.72 }, true},
		{"need beyond it", func(i *ImpedanceInput) { i.Need = 0.73 }, false},
		{"set below the battery", func(i *ImpedanceInput) { i.Set = 12.8 }, false},
	} {
		try := in
		x.set(&try)
		rs, _, err := ChargeImpedance(try)
		var b *BlockedError
		if x.ok != (err == nil) || err != nil && (!errors.As(err, &b) || b.Frees == "") || rs <= 0 {
			t.Errorf("%s: %v, %v", x.name, rs, err)
		}
	}
}
