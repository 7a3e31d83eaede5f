package audit

import (
	"fmt"
	"math"
)

// Target is one number of a sheet's quality with its target and its weight in the
// score. The weights put crossings first: they hurt reading most (Purchase 1997).
type Target struct {
	Symbol  string
	Meaning string
	Limit   string
	Weight  float64

	// Distance is how far the number is from its target, as a share of the limit; 0
	// within.
	Distance func(q Quality) float64
	Value    func(q Quality) float64
	Print    func(q Quality) string
}

// Limits of the targets (common practice, no source).
const (
	mostCrossings  = 3
	mostBends      = 0.3
	mostLength     = 1.25
	leastAligned   = 0.9
	leastFlow      = 0.95
	leastUsed      = 0.45
	mostUsed       = 0.85
	aspectWithin   = 0.25
	mostReferences = 8
	mostMoved      = 0.05
	mostTurned     = 0.05
)

// Targets are all numbers in the order in which they are printed.
var Targets = []Target{
	{"X", "crossings", "0 on a board's sheet, 3 on others", 10,
		func(q Quality) float64 {
			if q.Board { // in the measure of the other sheets' limit, as there is none to divide by
				return float64(q.Crossings) / mostCrossings
			}
			return over(float64(q.Crossings), mostCrossings)
		},
		func(q Quality) float64 { return float64(q.Crossings) },
		func(q Quality) string { return fmt.Sprint(q.Crossings) }},
	{"B", "bends a line", "0.3; none in branches", 4,
		func(q Quality) float64 {
			return over(q.Bends, mostBends) + float64(q.InBranches)/float64(max(q.Lines, 1))
		},
		func(q Quality) float64 { return q.Bends },
		func(q Quality) string { return fmt.Sprintf("%.2f", q.Bends) }},
	{"Lr", "length of lines over half the perimeter of their pins' boxes", "1.25", 3,
		func(q Quality) float64 { return over(q.Length, mostLength) },
		func(q Quality) float64 { return q.Length },
		func(q Quality) string { return fmt.Sprintf("%.2f", q.Length) }},
	{"A", "symbols in line", "at least 90 %", 3,
		func(q Quality) float64 { return under(q.Aligned, leastAligned) },
		func(q Quality) float64 { return q.Aligned },
		func(q Quality) string { return percent(q.Aligned) }},
	{"F", "ways of energy from left to right", "at least 95 %", 3,
		func(q Quality) float64 { return under(q.Flow, leastFlow) },
		func(q Quality) float64 { return q.Flow },
		func(q Quality) string { return percent(q.Flow) }},
	{"U", "used part of the field; its shape against the field's", "45 to 85 %; within 25 %", 2,
		func(q Quality) float64 {
			return under(q.Used, leastUsed) + over(q.Used, mostUsed) + over(math.Abs(q.Aspect-1), aspectWithin)
		},
		func(q Quality) float64 { return q.Used },
		func(q Quality) string { return percent(q.Used) }},
	{"R", "references, without rails", "8", 2,
		func(q Quality) float64 { return over(float64(q.References), mostReferences) },
		func(q Quality) float64 { return float64(q.References) },
		func(q Quality) string { return fmt.Sprint(q.References) }},
	{"K", "labels not in their first place", "5 %", 1,
		func(q Quality) float64 { return over(q.Moved, mostMoved) },
		func(q Quality) float64 { return q.Moved },
		func(q Quality) string { return percent(q.Moved) }},
	{"T", "turned texts", "5 %", 1,
		func(q Quality) float64 { return over(q.Turned, mostTurned) },
		func(q Quality) float64 { return q.Turned },
		func(q Quality) string { return percent(q.Turned) }},
	{"Y", "equal things drawn equal", "100 %", 2,
		func(q Quality) float64 { return under(q.Equal, 1) },
		func(q Quality) float64 { return q.Equal },
		func(q Quality) string { return percent(q.Equal) }},
}

// Score is the weighted sum of the distances from the targets: 0 where all are met.
func (q Quality) Score() float64 {
	sum := 0.0
	for _, t := range Targets {
		sum += t.Weight * t.Distance(q)
	}
	return sum
}

// over is the share by which v is above its limit, under that by which it is below.
func over(v, limit float64) float64 { return math.Max(0, v-limit) / limit }

func under(v, limit float64) float64 { return math.Max(0, limit-v) / limit }

func percent(v float64) string { return fmt.Sprintf("%.0f %%", 100*v) }
