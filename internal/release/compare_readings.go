package release

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
)

// readings finds the bands that moved, as far as they are printed, and of test points
// that moved themselves all.
func (c *comparison) readings() {
	numbers := map[string]int{} // of the conditions in which readings are taken
	for _, k := range c.now.Conditions {
		if k.Number > 0 {
			numbers[k.Name] = k.Number
		}
	}
	type group struct {
		in     string
		labels []string
	}
	var groups []group
	pairs(c.old.TestPoints, c.now.TestPoints, func(t *recordPoint) string { return t.Label }, func(o, n *recordPoint) {
		if n == nil {
			return
		}
		var in []int
		for _, k := range circuit.SortedKeys(n.Readings) {
			if numbers[k] == 0 {
				continue
			}
			was, is := "", n.Readings[k].String()
			if o != nil {
				if b, ok := o.Readings[k]; ok {
					was = b.String()
				}
			}
			if was != is || o.Terminal != n.Terminal || o.Black != n.Black {
				c.out.Readings = append(c.out.Readings, design.ReadingChange{Point: n.Label, Condition: k, Was: was, Is: is})
				in = append(in, numbers[k])
			}
		}
		if len(in) == 0 {
			return
		}
		slices.Sort(in)
		text := conditionsText(in)
		i := slices.IndexFunc(groups, func(g group) bool { return g.in == text })
		if i < 0 {
			i = len(groups)
			groups = append(groups, group{in: text})
		}
		groups[i].labels = append(groups[i].labels, n.Label)
	})
	for _, g := range groups {
		for _, l := range g.labels {
			c.do(design.WorkItem{Tool: design.TestAgain, Test: design.TestReadings, Do: g.in + ": take the readings", Is: "new bands"}, l)
		}
	}
}

// conditionsText lists conditions: "Conditions 1, 3 and 4".
func conditionsText(numbers []int) string {
	if len(numbers) == 1 {
		return fmt.Sprintf("Condition %d", numbers[0])
	}
	var s []string
	for _, n := range numbers {
		s = append(s, fmt.Sprint(n))
	}
	return "Conditions " + strings.Join(s[:len(s)-1], ", ") + " and " + s[len(s)-1]
}

// bandStep is the step to which bands are printed, in volts: the lowest value rounded
// down, the highest up, so that no true reading falls outside. bandSlack keeps a value
// that is a whole number of steps, but for the last digits of a float64, where it is.
const (
	bandStep  = 0.1
	bandSlack = 1e-6
)

// String prints a band: "23.9 to 24.6 V, typical 24.2 V", and what may stand beside it.
func (b recordBand) String() string {
	s := bandText(b.Low, b.Typical, b.High)
	for _, o := range b.Or {
		s += "; or with " + o.With + " " + bandText(o.Low, o.Typical, o.High)
	}
	return s
}

func bandText(low, typical, high float64) string {
	low = math.Floor(low/bandStep+bandSlack) * bandStep
	high = math.Ceil(high/bandStep-bandSlack) * bandStep
	return fmt.Sprintf("%s to %s V, typical %s V", volts(low), volts(high), volts(typical))
}

// volts prints a voltage with one decimal, never as a negative zero.
func volts(v float64) string {
	s := fmt.Sprintf("%.1f", v)
	if s == "-0.0" {
		return "0.0"
	}
	return strings.Replace(s, "-", "−", 1)
}
