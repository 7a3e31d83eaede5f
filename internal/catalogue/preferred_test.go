package catalogue

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// The E48 series as printed in a list after IEC 60063 (read).
var printedE48 = []float64{
	1.00, 1.05, 1.10, 1.15, 1.21, 1.27, 1.33, 1.40, 1.47, 1.54, 1.62, 1.69, 1.78, 1.87, 1.96, 2.05,
	2.15, 2.26, 2.37, 2.49, 2.61, 2.74, 2.87, 3.01, 3.16, 3.32, 3.48, 3.65, 3.83, 4.02, 4.22, 4.42,
	4.64, 4.87, 5.11, 5.36, 5.62, 5.90, 6.19, 6.49, 6.81, 7.15, 7.50, 7.87, 8.25, 8.66, 9.09, 9.53,
}

// TestSeries holds the series against IEC 60063.
func TestSeries(t *testing.T) {
	same := func(name string, got, want []float64) {
		t.Helper()
		if len(got) != len(want) {
			t.Fatalf("%s has %d values, want %d", name, len(got), len(want))
		}
		for i := range got {
			if math.Abs(got[i]-want[i]) > 1e-9 {
				t.Errorf("%s value %d is %v, want %v", name, i, got[i], want[i])
			}
		}
	}
	same("E6", E6.Decade(), []float64{1.0, 1.5, 2.2, 3.3, 4.7, 6.8})
	same("E12", E12.Decade(), []float64{1.0, 1.2, 1.5, 1.8, 2.2, 2.7, 3.3, 3.9, 4.7, 5.6, 6.8, 8.2})
	same("E24", E24.Decade(), []float64{1.0, 1.1, 1.2, 1.3, 1.5, 1.6, 1.8, 2.0, 2.2, 2.4, 2.7, 3.0, 3.3, 3.6, 3.9, 4.3, 4.7, 5.1, 5.6, 6.2, 6.8, 7.5, 8.2, 9.1})
	same("E48", E48.Decade(), printedE48)
	e96 := E96.Decade()
	if len(e96) != 96 {
		t.Fatalf("E96 has %d values", len(e96))
	}
	for i := range printedE48 {
		if math.Abs(e96[2*i]-printedE48[i]) > 1e-9 {
			t.Errorf("E96 value %d is %v, want the E48 value %v", 2*i, e96[2*i], printedE48[i])
		}
	}
	for i, want := range map[int]float64{1: 1.02, 3: 1.07, 31: 2.10, 63: 4.53, 95: 9.76} {
		if math.Abs(e96[i]-want) > 1e-9 {
			t.Errorf("E96 value %d is %v, want %v", i, e96[i], want)
		}
	}
}

// TestSeriesRounding: AtLeast and AtMost are neighbours round the value, members map
// to themselves.
func TestSeriesRounding(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := rapid.SampledFrom([]Series{E6, E12, E24, E48, E96}).Draw(t, "series")
		v := math.Exp(rapid.Float64Range(math.Log(0.01), math.Log(1e7)).Draw(t, "log"))
		up, down := s.AtLeast(v), s.AtMost(v)
		if up < v*(1-1e-9) || down > v*(1+1e-9) {
			t.Fatalf("%v: %v..%v does not enclose it", v, down, up)
		}
		if step := up / down; step > 1.7 {
			t.Fatalf("%v: %v..%v is more than one step", v, down, up)
		}
		if n := s.Nearest(v); n != up && n != down {
			t.Fatalf("%v: nearest %v is neither %v nor %v", v, n, down, up)
		}
		if got := s.AtLeast(up); math.Abs(got/up-1) > 1e-9 {
			t.Fatalf("%v becomes %v", up, got)
		}
		if got := s.AtMost(up); math.Abs(got/up-1) > 1e-9 {
			t.Fatalf("%v becomes %v going down", up, got)
		}
	})
	if got := E24.Between(95, 135); len(got) != 4 || got[0] != 100 || got[3] != 130 {
		t.Errorf("E24 from 95 to 135: %v", got)
	}
}

// TestResistorCodeRefuses: wrong bands are refused.
func TestResistorCodeRefuses(t *testing.T) {
	for _, bands := range [][]string{{}, {"red", "red"}, {"mauve", "red", "red"}, {"red", "red", "mauve"}, {"red", "red", "red", "pink"}, {"gold", "red", "red"}} {
		if _, _, err := ReadResistor(bands...); err == nil {
			t.Errorf("%v passes", bands)
		}
	}
	if ohm, tol, err := ReadResistor("white", "violet", "black"); err != nil || ohm != 97 || tol != 0.20 {
		t.Errorf("three bands: %v %v %v, want 97 Ω 20 %%", ohm, tol, err)
	}
}
