package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestOneCircuit(t *testing.T) {
	run(t, oneCircuit, []limitCase{
		{"two circuits", nil, nil},
		{"one circuit", func(f *facts.Facts) { f.Luminaires = f.Luminaires[:2] }, []string{
			"note Workshop: Workshop: all 2 lamps on one circuit | 2 circuits of 1 lamps, alternating.",
		}},
		{"one lamp", func(f *facts.Facts) { f.Luminaires = f.Luminaires[:1] }, nil},
	})
}
