package quantity

import (
	"math"
	"testing"
)

// One foot is 0.3048 m and one inch 0.0254 m exactly (ISO 80000-3, annex); the
// figures are worked by hand from these.
func TestLengthUnit(t *testing.T) {
	for _, c := range []struct {
		unit         LengthUnit
		length       Metre
		want, column string
	}{
		{InMetres, 9, "9 m", "9.0"},
		{InMetres, 9.25, "9.25 m", "9.25"},
		{InMetres, 0.3, "0.3 m", "0.3"},
		{InMetres, 28.5, "28.5 m", "28.5"},
		{InMetres, 100, "100 m", "100.0"},
		{InFeet, 4.2672, "14 ft", "14.0"},  // 14 × 0.3048
		{InFeet, 6.858, "22.5 ft", "22.5"}, // 22.5 × 0.3048
		{InFeet, 2, "6.6 ft", "6.6"},       // 2 ÷ 0.3048 = 6.562
		{InFeet, 0.25, "10 in", "10 in"},   // 0.25 ÷ 0.0254 = 9.84
		{InFeet, 0.5, "20 in", "20 in"},    // 19.69
		{InFeet, 0.9144, "3 ft", "3.0"},
		{InFeet, 0.001, "1 in", "1 in"},
	} {
		if got := c.unit.Format(c.length); got != c.want {
			t.Errorf("%v in %s: %q, want %q", float64(c.length), c.unit.Symbol(), got, c.want)
		}
		if got := c.unit.Column(c.length); got != c.column {
			t.Errorf("%v in a column of %s: %q, want %q", float64(c.length), c.unit.Symbol(), got, c.column)
		}
	}
	// A limit is rounded down: 6.857 m are 22.497 ft, 0.25 m are 9.84 in.
	for _, c := range []struct {
		unit      LengthUnit
		from, out Metre
	}{{InMetres, 9.259, 9.25}, {InFeet, 6.857, InFeet.Metres(22.4)}, {InFeet, 0.25, 9 * 0.0254}} {
		if got := c.unit.Down(c.from); math.Abs(float64(got-c.out)) > 1e-12 {
			t.Errorf("%v down in %s: %v, want %v", float64(c.from), c.unit.Symbol(), float64(got), float64(c.out))
		}
	}
	if got := InFeet.Metres(22.5); got != 6.858 {
		t.Errorf("22.5 ft are %v", got)
	}
}
