package packet

import (
	"math"
	"strconv"
	"strings"
)

// axis is one axis of a plot.
type axis struct {
	min, max float64
	log      bool
	ticks    []float64
}

// at is the share of the axis at which v stands.
func (a axis) at(v float64) float64 {
	if a.log {
		return math.Log(v/a.min) / math.Log(a.max/a.min)
	}
	return (v - a.min) / (a.max - a.min)
}

// Round steps of a decade for logarithmic and for linear axes.
var (
	decade = []float64{1, 2, 5}
	steps  = []float64{1, 2, 2.5, 5}
)

// crowded is the number of decades from which only whole ones have a tick.
const crowded = 4.5

// logAxis is a logarithmic axis from the round value at or below low to that at or
// above high.
func logAxis(low, high float64) axis {
	a := axis{min: roundLog(low, false), max: roundLog(high, true), log: true}
	of := decade
	if math.Log10(a.max/a.min) > crowded {
		of = decade[:1]
	}
	for e := math.Floor(math.Log10(a.min)); e <= math.Ceil(math.Log10(a.max)); e++ {
		for _, s := range of {
			if v := s * math.Pow(10, e); v >= a.min*(1-tiny) && v <= a.max*(1+tiny) {
				a.ticks = append(a.ticks, v)
			}
		}
	}
	return a
}

// roundLog is the round value next to v, below or above it.
func roundLog(v float64, up bool) float64 {
	e := math.Floor(math.Log10(v))
	best := 0.0
	for _, s := range []float64{0.5, 1, 2, 5, 10} {
		x := s * math.Pow(10, e)
		if up && x >= v*(1-tiny) {
			return x
		}
		if x <= v*(1+tiny) {
			best = x
		}
	}
	return best
}

// linearAxis is a linear axis with about n steps between round values that hold low
// and high.
func linearAxis(low, high float64, n int) axis {
	raw := (high - low) / float64(n)
	unit := math.Pow(10, math.Floor(math.Log10(raw)))
	step := 10 * unit
	for i := len(steps) - 1; i >= 0; i-- {
		if steps[i]*unit >= raw*(1-tiny) {
			step = steps[i] * unit
		}
	}
	a := axis{min: math.Floor(low/step+tiny) * step, max: math.Ceil(high/step-tiny) * step}
	for i := 0; a.min+float64(i)*step < a.max+step/2; i++ {
		a.ticks = append(a.ticks, a.min+float64(i)*step)
	}
	return a
}

// hourAxis is an axis of hours from 0, with steps that divide a day.
func hourAxis(most float64) axis {
	step := 24.0
	for _, s := range []float64{24, 12, 8, 6, 4, 2, 1, 0.5} {
		if most/s <= 8 {
			step = s
		}
	}
	a := axis{max: math.Ceil(most/step-tiny) * step}
	for i := 0; float64(i)*step <= a.max+tiny; i++ {
		a.ticks = append(a.ticks, float64(i)*step)
	}
	return a
}

// tickText prints the figure of a tick.
func tickText(v float64) string {
	if math.Abs(v) >= 1000 {
		return thousands(v)
	}
	s := strconv.FormatFloat(math.Round(v*1e6)/1e6, 'f', -1, 64)
	return strings.Replace(s, "-", "−", 1)
}
