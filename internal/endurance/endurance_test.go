package endurance

import (
	"math"
	"testing"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// reference is the temperature at which size factors are 1: IEEE 485 table 1.
const reference quantity.Celsius = 25

func constant(a quantity.Ampere) Load { return func(quantity.Volt) quantity.Ampere { return a } }

// agm returns a new 24 V glass-mat battery of 33 Ah at 25 °C.
func agm() Battery {
	return Battery{Class: catalogue.VRLAAGM, Cells: 12, Capacity: 33, Left: 1, Room: reference}
}

func discharge(t *testing.T, b Battery, o Outage) Result {
	t.Helper()
	r, err := Discharge(b, o)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

// TestConstantCurrentReproducesTheTable discharges every class at the current of every
// line of its capacity table. The battery must be empty at the line's time, within 2 %,
// and show the line's end voltage then.
func TestConstantCurrentReproducesTheTable(t *testing.T) {
	worst := 0.0
	for _, c := range catalogue.BatteryClasses() {
		for _, p := range c.Rates {
			b := Battery{Class: c, Cells: 10, Capacity: 100, Left: 1, Room: reference}
			i := quantity.Ampere(100 * float64(p.Fraction) / p.Time.Hours())
			r := discharge(t, b, Outage{Load: constant(i), For: 2 * p.Time, Watches: []Watch{{"end", 10 * p.End}}})
			if !r.Empty.Happens {
				t.Errorf("%s at %v: not empty within twice the time", c.Name, p.Time)
				continue
			}
			off := float64(r.Empty.At/p.Time) - 1
			worst = max(worst, math.Abs(off))
			if math.Abs(off) > 0.02 {
				t.Errorf("%s at %v (%v): empty after %v, %.2f %% off", c.Name, p.Time, i, r.Empty.At, 100*off)
			}
			// The end voltage is reached when the table says so too.
			if off := float64(r.Out[0].At/p.Time) - 1; !r.Out[0].Happens || math.Abs(off) > 0.02 {
				t.Errorf("%s at %v: end voltage %v reached at %v, %.2f %% off", c.Name, p.Time, p.End, r.Out[0].At, 100*off)
			}
		}
	}
	t.Logf("largest deviation of a time to empty: %.4f %%", 100*worst)
}

// TestUsersTableReproduced does the same with a table of one's own: the capacities by
// rate printed on a 12 V 40 Ah glass-mat datasheet (40 Ah at 20 h to 1.80 V, 37.2 Ah at
// 10 h to 1.75 V, 34 Ah at 5 h to 1.70 V, 24 Ah at 1 h to 1.60 V).
func TestUsersTableReproduced(t *testing.T) {
	sheet := []struct {
		hours, ah, end float64
	}{{1, 24, 1.60}, {5, 34, 1.70}, {10, 37.2, 1.75}, {20, 40, 1.80}}
	var rates []catalogue.RatePoint
	for _, s := range sheet {
		rates = append(rates, catalogue.RatePoint{Time: quantity.Hours(s.hours), Fraction: quantity.Ratio(s.ah / 40), End: quantity.Volt(s.end)})
	}
	for _, s := range sheet {
		b := Battery{Class: catalogue.VRLAAGM, Rates: rates, Cells: 6, Capacity: 40, Left: 1, Room: reference}
		i := quantity.Ampere(s.ah / s.hours)
		r := discharge(t, b, Outage{Load: constant(i), For: quantity.Hours(40), CutOff: quantity.Volt(6 * s.end)})
		if off := float64(r.CutOff.At)/(3600*s.hours) - 1; !r.CutOff.Happens || math.Abs(off) > 0.02 {
			t.Errorf("%g h: cut-off at %v, %.2f %% off", s.hours, r.CutOff.At, 100*off)
		}
		if off := float64(r.Taken)/s.ah - 1; math.Abs(off) > 0.02 {
			t.Errorf("%g h: gave %v, the sheet says %g Ah", s.hours, r.Taken, s.ah)
		}
	}
}

// TestHigherEndVoltageLosesWhatTheTableSays stops each discharge at the voltages of the
// class's table of end voltages. The curve has one knee for each time, so it follows the
// table within six points of the capacity.
func TestHigherEndVoltageLosesWhatTheTableSays(t *testing.T) {
	for _, c := range catalogue.BatteryClasses() {
		worst := 0.0
		for _, row := range c.Ends {
			frac, _ := c.Fraction(row.Time)
			i := quantity.Ampere(100 * float64(frac) / row.Time.Hours())
			for _, p := range row.Parts {
				b := Battery{Class: c, Cells: 1, Capacity: 100, Left: 1, Room: reference}
				r := discharge(t, b, Outage{Load: constant(i), For: 2 * row.Time, CutOff: p.End})
				got := float64(r.CutOff.At / row.Time)
				worst = max(worst, math.Abs(got-float64(p.Part)))
				if !r.CutOff.Happens || math.Abs(got-float64(p.Part)) > 0.06 {
					t.Errorf("%s, %v to %v: %.3f of the capacity, table %.3f", c.Name, row.Time, p.End, got, float64(p.Part))
				}
			}
		}
		t.Logf("%s: within %.3f of the capacity", c.Name, worst)
	}
}
