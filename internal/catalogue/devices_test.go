package catalogue

import (
	"math"
	"testing"

	"gloamwright/internal/quantity"
)

// drop is the forward voltage of a diode model.
func drop(d Diode, i quantity.Ampere) float64 {
	return d.Ideality*float64(ThermalVolt)*math.Log(float64(i/d.Saturation)+1) + float64(i)*float64(d.Series)
}

// TestDiodesBelowLimits: the models drop less than the registered limits, and a
// Schottky near the end of charge 0.15 V to 0.2 V (common practice).
func TestDiodesBelowLimits(t *testing.T) {
	for _, d := range []Diode{Diode1N4004, Diode1N5819, Diode1N5822} {
		if v := drop(d, d.Current); v > float64(d.Forward) || v < 0.6*float64(d.Forward) {
			t.Errorf("%s drops %.3f V at %v, limit %v", d.Type, v, d.Current, d.Forward)
		}
	}
	for _, i := range []quantity.Ampere{0.01, 0.03} {
		if v := drop(Diode1N5822, i); v < 0.14 || v > 0.2 {
			t.Errorf("%s drops %.3f V at %v", Diode1N5822.Type, v, i)
		}
	}
	// the graph of 1N4004 in an open textbook: 0.925 V at 1 A (read)
	if v := drop(Diode1N4004, 1); math.Abs(v-0.925) > 0.03 {
		t.Errorf("1N4004 drops %.3f V at 1 A, graph 0.925 V", v)
	}
}

// TestLightResistor: within the class limits at 10 lx, and from hundreds of ohms in
// bright light to about a megohm in the dark (common practice).
func TestLightResistor(t *testing.T) {
	c := CadmiumSulphide5
	if r := c.At(10); r < 8e3 || r > 20e3 {
		t.Errorf("%v at 10 lx", r)
	}
	low, high := c.Bounds(10)
	if low > 8e3 || high < 19e3 {
		t.Errorf("bounds at 10 lx: %v to %v", low, high)
	}
	if r := c.At(1000); r < 200 || r > 1000 {
		t.Errorf("%v at 1000 lx", r)
	}
	if r := c.At(0); r != 1e6 {
		t.Errorf("%v in the dark", r)
	}
}

// TestRelays: coil figures of an automotive relay (read).
func TestRelays(t *testing.T) {
	r, ok := RelayClassOf("automotive")
	if !ok || math.Abs(float64(r.CoilResistance(12))-300) > 0.5 {
		t.Errorf("coil %v, datasheet 300 Ω", r.CoilResistance(12))
	}
	if _, ok := RelayClassOf("none"); ok {
		t.Error("finds a class that is not there")
	}
}

// TestColours: codes, joined codes and unknown ones.
func TestColours(t *testing.T) {
	for code, want := range map[string]string{"RD": "red", "BK": "black", "GNYE": "green-and-yellow", "RDBU": "red and blue"} {
		if got, ok := ColourWord(code); !ok || got != want {
			t.Errorf("%s is %q, want %q", code, got, want)
		}
	}
	for _, bad := range []string{"", "rd", "XX", "RDXX", "RDRD", "RED"} {
		if w, ok := ColourWord(bad); ok {
			t.Errorf("%q is %q", bad, w)
		}
	}
}

// TestRatingsAscend: the lists that NextRating reads.
func TestRatingsAscend(t *testing.T) {
	for _, list := range [][]quantity.Ampere{ChargerCurrents, SupplyCurrents, CutOffCurrents, IsolatorCurrents} {
		for i := 1; i < len(list); i++ {
			if list[i] <= list[i-1] {
				t.Errorf("%v after %v", list[i], list[i-1])
			}
		}
	}
	if r, ok := NextRating(ChargerCurrents, 2.0000000001); !ok || r != 2 {
		t.Errorf("2 A and a rounding error: %v", r)
	}
	if _, ok := NextRating(ChargerCurrents, 1000); ok {
		t.Error("finds a charger of 1000 A")
	}
}
