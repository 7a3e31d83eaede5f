package catalogue

import (
	"math"
	"testing"

	"gloamwright/internal/quantity"
)

// TestBatteryClassesAreSound: each class is complete and in order.
func TestBatteryClassesAreSound(t *testing.T) {
	for _, c := range BatteryClasses() {
		if BatteryClassOf(c.Name) != c {
			t.Errorf("%s is not found by name", c.Name)
		}
		for i := 1; i < len(c.Rates); i++ {
			a, b := c.Rates[i-1], c.Rates[i]
			if b.Time <= a.Time || b.Fraction < a.Fraction {
				t.Errorf("%s: rate %v after %v", c.Name, b, a)
			}
			if float64(b.Fraction)/b.Time.Hours() > float64(a.Fraction)/a.Time.Hours() {
				t.Errorf("%s: the current rises from %v to %v", c.Name, a.Time, b.Time)
			}
		}
		if f, listed := c.Fraction(c.RatedTime); !listed || f != 1 {
			t.Errorf("%s gives %v of its capacity at its rated time", c.Name, f)
		}
		for i := 1; i < len(c.Size); i++ {
			if c.Size[i].At <= c.Size[i-1].At || c.Size[i].Factor > c.Size[i-1].Factor {
				t.Errorf("%s: size factor %v after %v", c.Name, c.Size[i], c.Size[i-1])
			}
		}
		for i := 1; i < len(c.Rest); i++ {
			if c.Rest[i].Volt <= c.Rest[i-1].Volt {
				t.Errorf("%s: rest voltage %v after %v", c.Name, c.Rest[i], c.Rest[i-1])
			}
		}
		for i := 1; i < len(c.Blocks); i++ {
			if c.Blocks[i].Capacity <= c.Blocks[i-1].Capacity {
				t.Errorf("%s: block %v after %v", c.Name, c.Blocks[i], c.Blocks[i-1])
			}
		}
		if !(c.LowestEnd <= c.EndVolt && c.EndVolt < c.Rest[len(c.Rest)-1].Volt && c.Rest[len(c.Rest)-1].Volt < c.Float && c.Float < c.Boost) {
			t.Errorf("%s: end %v, rest %v, float %v, boost %v", c.Name, c.EndVolt, c.Rest[len(c.Rest)-1].Volt, c.Float, c.Boost)
		}
		if !c.FloatBand.Contains(c.Float) || !(c.Opens < c.Recloses && c.Recloses < c.Float) {
			t.Errorf("%s: float or cut-off settings are out of order", c.Name)
		}
		if !(c.OhmAh.Low < c.OhmAh.Typical && c.OhmAh.Typical < c.OhmAh.High) {
			t.Errorf("%s: resistance %v", c.Name, c.OhmAh)
		}
	}
}

// TestGlassMatDatasheet: a 12 V 40 Ah glass-mat datasheet (read): 37.2 Ah at 10 h,
// 34 Ah at 5 h, 24 Ah at 1 h; below 8 mΩ; float 13.7 V to 13.9 V, charge 14.7 V or less.
func TestGlassMatDatasheet(t *testing.T) {
	for h, want := range map[float64]float64{20: 40, 10: 37.2, 5: 34, 1: 24} {
		f, listed := VRLAAGM.Fraction(quantity.Hours(h))
		if got := 40 * float64(f); !listed || math.Abs(got-want) > 0.05 {
			t.Errorf("%g h: %.2f Ah, datasheet %.1f", h, got, want)
		}
	}
	if r := 6 * VRLAAGM.OhmAh.Low / 40; r > 0.008 {
		t.Errorf("%.4f Ω, the datasheet says below 8 mΩ", r)
	}
	if f := 6 * float64(VRLAAGM.ChargeVolt(VRLAAGM.Float, 25)); f < 13.7 || f > 13.9 {
		t.Errorf("float %.2f V", f)
	}
	if b := 6 * float64(VRLAAGM.Boost); b > 14.7 {
		t.Errorf("boost %.2f V above the sheet's cyclic charge", b)
	}
}

// TestChargeSlope: a charging note prints 2.27 V at 35 °C and 2.33 V at 15 °C for
// 2.30 V at 25 °C: 3 mV per cell and kelvin (read).
func TestChargeSlope(t *testing.T) {
	for at, want := range map[quantity.Celsius]quantity.Volt{35: 2.27, 25: 2.30, 15: 2.33} {
		if got := VRLAAGM.ChargeVolt(2.30, at); math.Abs(float64(got-want)) > 1e-9 {
			t.Errorf("%v: %v, want %v", at, got, want)
		}
	}
}

// TestSizeFactors: IEEE 485 table 1 lines that were seen, a step between lines, and
// the end of the table.
func TestSizeFactors(t *testing.T) {
	for at, want := range map[quantity.Celsius]quantity.Ratio{4.4: 1.30, 10: 1.19, 15.6: 1.11, 21.1: 1.04, 25: 1} {
		if got, ok := Flooded.SizeFactor(at); !ok || math.Abs(float64(got-want)) > 1e-9 {
			t.Errorf("%v: %v, want %v", at, got, want)
		}
	}
	if got, _ := Flooded.SizeFactor(7.2 + 1.4); math.Abs(float64(got)-1.22) > 1e-9 {
		t.Errorf("half way between 1.25 and 1.19: %v", got)
	}
	if _, ok := Flooded.SizeFactor(-20); ok {
		t.Error("-20 °C is not in the table")
	}
	if got, ok := Flooded.SizeFactor(60); !ok || got != 0.85 {
		t.Errorf("60 °C: %v, want the last line", got)
	}
}

// TestFraction: between lines in the logarithm of time, no credit beyond the ends.
func TestFraction(t *testing.T) {
	f, listed := VRLAAGM.Fraction(quantity.Hours(math.Sqrt(5 * 10)))
	if !listed || math.Abs(float64(f)-(0.85+0.93)/2) > 0.02 {
		t.Errorf("between 5 h and 10 h: %v", f)
	}
	if f, listed := VRLAAGM.Fraction(quantity.Hours(100)); listed || f != 1 {
		t.Errorf("100 h: %v %v", f, listed)
	}
	// six minutes: the current of the quarter-hour line
	if f, listed := VRLAAGM.Fraction(quantity.Hours(0.1)); listed || math.Abs(float64(f)/0.1-0.36/0.25) > 1e-9 {
		t.Errorf("0.1 h: %v %v", f, listed)
	}
}

// TestEndPart: stopping higher costs capacity, stopping lower gives none, above the
// table nothing is known.
func TestEndPart(t *testing.T) {
	five := quantity.Hours(5)
	if p, ok := VRLAAGM.EndPart(five, 1.60); !ok || p != 1 {
		t.Errorf("1.60 V: %v", p)
	}
	if p, ok := VRLAAGM.EndPart(five, 1.85); !ok || p != 0.92 {
		t.Errorf("1.85 V: %v", p)
	}
	if _, ok := VRLAAGM.EndPart(five, 1.95); ok {
		t.Error("1.95 V is beyond the table")
	}
	if p, ok := VRLAAGM.EndPart(quantity.Hours(3), 1.80); !ok || p <= 0.86 || p >= 0.96 {
		t.Errorf("3 h to 1.80 V: %v, want between the 1 h and 5 h lines", p)
	}
}

// TestCells: the trade's cell counts.
func TestCells(t *testing.T) {
	for _, c := range []struct {
		class *BatteryClass
		volts quantity.Volt
		want  int
	}{{VRLAAGM, 12, 6}, {Flooded, 24, 12}, {VRLAGel, 48, 24}, {NiCd, 24, 20}, {NiMH, 12, 10}, {LiFePO4, 12, 4}, {LiFePO4, 48, 16}} {
		if got := c.class.CellsFor(c.volts); got != c.want {
			t.Errorf("%s at %v: %d cells, want %d", c.class.Name, c.volts, got, c.want)
		}
	}
}

// TestRestVolts: rest voltages of a flooded 12 V battery (read).
func TestRestVolts(t *testing.T) {
	for charge, want := range map[quantity.Ratio]float64{1: 12.6, 0.75: 12.4, 0.5: 12.2, 0.25: 12.0, 0: 11.6, 0.625: 12.3} {
		if got := 6 * float64(Flooded.RestVolt(charge)); math.Abs(got-want) > 1e-9 {
			t.Errorf("charge %v: %.3f V, want %.1f", charge, got, want)
		}
	}
}
