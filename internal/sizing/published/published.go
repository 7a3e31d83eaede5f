// Package published holds worked examples and tables that other people have
// printed, each next to the function of this program that must reproduce it. The
// tests run every one; docs/ lists them.
//
// An example brings its own constants (a textbook's resistivity, a datasheet's
// reference): they are passed in. The printed answer is kept as it was printed, and
// ours must agree to its last digit.
package published

import (
	"math"
	"strconv"
	"strings"
)

// How a printed answer reached this list.
const (
	Read    = "read"                        // on the page, or one that reproduces it
	Archive = "read in a companion archive" // solved examples of the book, not the printed page
	Memory  = "from memory"
)

// Check is one printed figure and the program's own.
type Check struct {
	ID       string // of the example; several figures of one share it
	Topic    string
	Source   string // publication with chapter, example or table
	Seen     string // Read, Archive or Memory
	Quantity string // what was asked
	Unit     string
	Printed  string // the answer as printed
	Ours     func() float64
}

// Theirs returns the printed answer.
func (c Check) Theirs() float64 {
	v, err := strconv.ParseFloat(c.Printed, 64)
	if err != nil {
		return math.NaN()
	}
	return v
}

// Decimals returns how many decimals were printed.
func (c Check) Decimals() int {
	_, frac, _ := strings.Cut(c.Printed, ".")
	return len(frac)
}

// Agrees reports whether ours rounds to the printed answer: at most half a unit of its
// last digit away.
func (c Check) Agrees() bool {
	half := 0.5 * math.Pow(10, -float64(c.Decimals()))
	const roundOff = 1e-9
	return math.Abs(c.Ours()-c.Theirs()) <= half*(1+roundOff)+roundOff*math.Abs(c.Theirs())
}

// All returns every check, by topic.
func All() []Check {
	var out []Check
	for _, topic := range [][]Check{
		conductors(), resistances(), gauges(), temperatures(), ampacities(), faults(), gates(), sources(), batteries(), cells(), peukert(),
		regulators(), zeners(), diodes(), rectifiers(), heat(), relays(), preferred(),
	} {
		out = append(out, topic...)
	}
	return out
}

// figures builds the checks of one example.
type figures struct{ id, topic, source, seen string }

func (f figures) is(quantity, unit, printed string, ours func() float64) Check {
	return Check{ID: f.id, Topic: f.topic, Source: f.source, Seen: f.seen, Quantity: quantity, Unit: unit, Printed: printed, Ours: ours}
}
