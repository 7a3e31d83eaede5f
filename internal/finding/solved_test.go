package finding

import (
	"math"
	"testing"

	"gloamwright/internal/facts"
)

func TestSolved(t *testing.T) {
	run(t, solved, []limitCase{
		{"on the limit", func(f *facts.Facts) { f.Conditions[2].Residual = 1e-9 }, nil},
		{"just over it", func(f *facts.Facts) { f.Conditions[2].Residual = 1.1e-9 }, []string{
			"stop c3: Condition 3, Mains off, daylight: 1.1 nA left over at a node, limit 1 nA",
		}},
		{"not a number", func(f *facts.Facts) { f.Conditions[2].Residual = math.NaN() }, []string{
			"stop c3: Condition 3, Mains off, daylight: NaN A left over at a node, limit 1 nA",
		}},
	})
}
