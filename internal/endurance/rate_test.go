package endurance

import (
	"errors"
	"math"
	"testing"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// TestPeukertExponentsOfAHandbook holds times between two points of a table against
// Peukert's law with the exponents that a battery-monitor handbook prints for batteries
// rated at 20 h and at 25 A (reserve minutes). The law and the table's straight line over
// the logarithm of time differ a little between the points.
func TestPeukertExponentsOfAHandbook(t *testing.T) {
	for _, h := range []struct {
		ah, minutes, n float64
	}{
		{70, 130, 1.13}, {86, 167, 1.12}, {95, 188, 1.12}, {180, 388, 1.11}, {225, 500, 1.10}, {225, 447, 1.24}, {235, 488, 1.19}, {244, 530, 1.14},
	} {
		reserve := h.minutes / 60
		table, err := newRateTable([]catalogue.RatePoint{
			{Time: quantity.Hours(reserve), Fraction: quantity.Ratio(25 * reserve / h.ah)}, {Time: quantity.Hours(20), Fraction: 1},
		}, 1.75)
		if err != nil {
			t.Fatal(err)
		}
		// The exponent of the two points, to the digits that the handbook prints.
		if n := math.Log(20/reserve) / math.Log(25*20/h.ah); math.Abs(n-h.n) > 0.0051 {
			t.Errorf("%g Ah: exponent %.3f, handbook %.2f", h.ah, n, h.n)
		}
		i := math.Sqrt(25 * h.ah / 20) // between the two currents
		want := 20 * math.Pow(h.ah/20/i, h.n)
		got, beyond := table.timeAt(i / h.ah)
		if beyond || math.Abs(got/want-1) > 0.02 {
			t.Errorf("%g Ah at %.2f A: %.3f h, Peukert %.3f h", h.ah, i, got, want)
		}
		// Twice the highest current: the law goes on with the points' own exponent.
		n := math.Log(20/reserve) / math.Log(25*20/h.ah)
		got, beyond = table.timeAt(50 / h.ah)
		if want := reserve * math.Pow(0.5, n); !beyond || math.Abs(got/want-1) > 1e-9 {
			t.Errorf("%g Ah at 50 A: %.4f h, want %.4f h beyond the table", h.ah, got, want)
		}
	}
}

// TestTimeAgreesWithTheCatalogue holds the inverse against catalogue.FractionAt: at the
// time found, the current times the time is the capacity.
func TestTimeAgreesWithTheCatalogue(t *testing.T) {
	for _, c := range catalogue.BatteryClasses() {
		table, err := newRateTable(c.Rates, c.EndVolt)
		if err != nil {
			t.Fatal(err)
		}
		for rate := table.rate[0]; rate > table.rate[len(table.rate)-1]; rate *= 0.93 {
			h, _ := table.timeAt(rate)
			f, listed := c.Fraction(quantity.Hours(h))
			if !listed || math.Abs(rate*h-float64(f)) > 1e-9 {
				t.Errorf("%s at %.4f C: %.4f h, capacity %.6f, table %.6f", c.Name, rate, h, rate*h, float64(f))
			}
		}
	}
}

func TestTablesThatCannotBe(t *testing.T) {
	hour := quantity.Hours(1)
	for name, points := range map[string][]catalogue.RatePoint{
		"one time":          {{Time: hour, Fraction: 1}},
		"times fall":        {{Time: 2 * hour, Fraction: 0.9}, {Time: hour, Fraction: 1}},
		"current rises":     {{Time: hour, Fraction: 0.4}, {Time: 2 * hour, Fraction: 0.9}},
		"no capacity":       {{Time: hour, Fraction: 0}, {Time: 2 * hour, Fraction: 1}},
		"capacity unknown":  {{Time: hour, Fraction: quantity.Ratio(math.NaN())}, {Time: 2 * hour, Fraction: 1}},
		"no time":           {{Time: 0, Fraction: 0.5}, {Time: 2 * hour, Fraction: 1}},
		"time without mark": {{Time: quantity.Second(math.NaN()), Fraction: 0.5}, {Time: 2 * hour, Fraction: 1}},
	} {
		b := agm()
		b.Rates = points
		_, err := Discharge(b, Outage{Load: constant(1), For: hour})
		var unknown *UnknownError
		if !errors.As(err, &unknown) {
			t.Errorf("%s: error %v", name, err)
		}
	}
}
