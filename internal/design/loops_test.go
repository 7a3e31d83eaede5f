package design_test

import (
	"math"
	"testing"

	"gloamwright/internal/design"
)

// The loop of a run is the resistance of both cores: 19.5 mΩ/m is the greatest of
// 1 mm² flexible at 20 °C (IEC 60228 table 3, class 5), 1/58 Ω that of a metre of copper of a full square
// millimetre (IEC 60028).
func TestLoops(t *testing.T) {
	d, err := design.Make(load(t, "bracken-reach"), nil)
	if err != nil {
		t.Fatal(err)
	}
	if len(d.Loops) != len(d.Site.Circuits)+1 {
		t.Fatalf("%d loops, want one for each circuit and one for the feeder", len(d.Loops))
	}
	for _, l := range d.Loops {
		if !(l.Low > 0 && l.Low < l.High) {
			t.Errorf("%s: %v to %v", l.Name, l.Low, l.High)
		}
		if l.Name != "Slip path" { // 33 m of 1 mm²
			continue
		}
		hot := 2 * 33 * 0.0195 * (234.5 + 35) / (234.5 + 20)
		cold := 2 * 33 / 58.0 * (234.5 + 5) / (234.5 + 20)
		if math.Abs(float64(l.High)-hot) > 0.001*hot {
			t.Errorf("Slip path: at most %v, want %.3f Ω", l.High, hot)
		}
		if math.Abs(float64(l.Low)-cold) > 0.001*cold {
			t.Errorf("Slip path: at least %v, want %.3f Ω", l.Low, cold)
		}
	}
}
