package finding

import (
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
)

func TestLampCount(t *testing.T) {
	run(t, lampCount, []limitCase{
		{"twenty", func(f *facts.Facts) { lamps(f, 20) }, nil},
		{"twenty-one", func(f *facts.Facts) { lamps(f, 21) }, []string{
			"caution Stair: Stair: 21 lamps on one circuit, limit 20 | 2 circuits with 11 lamps at most each.",
		}},
	})
}

// lamps puts n lamps on the circuit Stair.
func lamps(f *facts.Facts, n int) {
	l := lightingOf(f, "Stair")
	for len(l.Points) < n {
		l.Points = append(l.Points, &circuit.Point{})
	}
}
