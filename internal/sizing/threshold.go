package sizing

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// ThresholdInput states when a comparator photocell must switch. The light resistor
// stands between plus and the sensing node, Load between node and minus; a divider of
// Top and Bottom sets the reference, and Feedback leads from the comparator's output
// to it. The output is high in the dark.
type ThresholdInput struct {
	Cell   catalogue.LightResistor
	Dark   quantity.Lux // lights on below
	Bright quantity.Lux // lights off above; greater than Dark
	Series catalogue.Series
	Scale  quantity.Ohm // order of the divider's resistors; 0 means 47 kΩ
}

// Thresholds are chosen resistors and the illuminances at which they switch.
type Thresholds struct {
	Load                  quantity.Ohm // typical cell; Fixed and Trimmer reach it for any cell of the class
	Fixed, Trimmer        quantity.Ohm
	Top, Bottom, Feedback quantity.Ohm
	On, Off               quantity.Lux // with a typical cell and exact resistors
}

const (
	thresholdScale = 47e3
	decades        = 10 // the divider's resistors are searched within one decade
)

// LightThresholds chooses the resistors of a comparator photocell. With G the sum of
// the conductances at the reference node, the reference is (1/Top)/G of the supply
// with the output low and (1/Top + 1/Feedback)/G with it high; the node stands at
// Load ÷ (Load + R_cell). All are ratios of the supply, so that its voltage does not
// matter (comparator with hysteresis, electronics textbooks). Preferred values are
// searched for the pair of thresholds nearest to what is wanted.
func LightThresholds(in ThresholdInput) (Thresholds, []Working, error) {
	if in.Bright <= in.Dark || in.Dark <= 0 {
		return Thresholds{}, nil, &BlockedError{
			Limit: LimitRange, Subject: "the illuminance that puts the lights out", Value: float64(in.Bright), Bound: float64(in.Dark), Unit: "lx",
			Frees: fmt.Sprintf("set it above %v, such as %v", in.Dark, 2*in.Dark),
		}
	}
	series := in.Series
	if series == 0 {
		series = catalogue.E24
	}
	scale := in.Scale
	if scale == 0 {
		scale = thresholdScale
	}
	rd, rb := in.Cell.At(in.Dark), in.Cell.At(in.Bright)
	t := Thresholds{Load: quantity.Ohm(series.Nearest(math.Sqrt(float64(rd) * float64(rb))))}
	lo, hi := DividerRatio(rd, t.Load), DividerRatio(rb, t.Load)
	best := math.Inf(1)
	for _, top := range series.Between(float64(scale)/math.Sqrt(decades), float64(scale)*math.Sqrt(decades)) {
		g := 1 / (top * lo) // sum of conductances at which the low reference is lo
		bottom, feedback := series.Nearest(1/(g*(1-hi))), series.Nearest(1/(g*(hi-lo)))
		try := t
		try.Top, try.Bottom, try.Feedback = quantity.Ohm(top), quantity.Ohm(bottom), quantity.Ohm(feedback)
		try.On, try.Off = try.switches(in.Cell)
		if e := math.Abs(math.Log(float64(try.On/in.Dark))) + math.Abs(math.Log(float64(try.Off/in.Bright))); e < best {
			best = e
			t = try
		}
	}
	t.cover(in.Cell, in.Dark, series)
	return t, t.workings(rd), nil
}

// DividerRatio is the part of the supply at the node below upper and above lower.
func DividerRatio(upper, lower quantity.Ohm) float64 { return float64(lower / (lower + upper)) }

// References returns the reference, as a part of the supply, with the output low and
// high.
func (t *Thresholds) References() (low, high float64) {
	top, bottom, fb := 1/float64(t.Top), 1/float64(t.Bottom), 1/float64(t.Feedback)
	g := top + bottom + fb
	return top / g, (top + fb) / g
}

// switches returns the illuminances at which a typical cell makes node and
// reference equal.
func (t *Thresholds) switches(c catalogue.LightResistor) (on, off quantity.Lux) {
	low, high := t.References()
	return lightFor(c, t.Load, low), lightFor(c, t.Load, high)
}

// lightFor turns the cell's law round: the illuminance at which the node stands at a
// ratio. The dark resistance is in parallel.
func lightFor(c catalogue.LightResistor, load quantity.Ohm, ratio float64) quantity.Lux {
	r := float64(load) * (1 - ratio) / ratio
	if r >= float64(c.Dark) {
		return 0
	}
	alone := r * float64(c.Dark) / (float64(c.Dark) - r)
	return quantity.Lux(cellReference * math.Pow(alone/float64(c.At10), -1/c.Gamma))
}

// cellReference is the illuminance that cells are listed at, in lx.
const cellReference = 10

// cover chooses a fixed resistor and a trimmer in series that reach the same switching
// point with any cell of the class.
func (t *Thresholds) cover(c catalogue.LightResistor, dark quantity.Lux, series catalogue.Series) {
	low, _ := t.References()
	least, most := c.Bounds(dark)
	k := low / (1 - low)
	t.Fixed = quantity.Ohm(series.AtMost(float64(least) * k))
	for _, v := range trimmerValues {
		if t.Trimmer = v; float64(v)*(1-trimTolerance) >= float64(most)*k-float64(t.Fixed) {
			return
		}
	}
	t.Trimmer = quantity.Ohm(catalogue.E6.AtLeast((float64(most)*k - float64(t.Fixed)) / (1 - trimTolerance)))
}

func (t *Thresholds) workings(cell quantity.Ohm) []Working {
	const source = "comparator with hysteresis (electronics textbooks)"
	low, high := t.References()
	g := fmt.Sprintf("(1 ÷ %s + 1 ÷ %s + 1 ÷ %s)", num(float64(t.Top), "Ω"), num(float64(t.Bottom), "Ω"), num(float64(t.Feedback), "Ω"))
	return []Working{{
		Name: "node at the dark threshold", Formula: "x = R ÷ (R + R_cell)",
		Substituted: fmt.Sprintf("%s ÷ (%s + %s)", num(float64(t.Load), "Ω"), num(float64(t.Load), "Ω"), num(float64(cell), "Ω")),
		Value:       DividerRatio(cell, t.Load), Source: source,
	}, {
		Name: "reference in the light", Formula: "k = (1 ÷ R_top) ÷ (1 ÷ R_top + 1 ÷ R_bottom + 1 ÷ R_feedback)",
		Substituted: fmt.Sprintf("(1 ÷ %s) ÷ %s", num(float64(t.Top), "Ω"), g), Value: low, Source: source,
	}, {
		Name: "reference in the dark", Formula: "k = (1 ÷ R_top + 1 ÷ R_feedback) ÷ (1 ÷ R_top + 1 ÷ R_bottom + 1 ÷ R_feedback)",
		Substituted: fmt.Sprintf("(1 ÷ %s + 1 ÷ %s) ÷ %s", num(float64(t.Top), "Ω"), num(float64(t.Feedback), "Ω"), g), Value: high, Source: source,
	}}
}
