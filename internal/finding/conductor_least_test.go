package finding

import (
	"testing"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

func TestConductorLeast(t *testing.T) {
	run(t, conductorLeast, []limitCase{
		{"lighting cable on the least size", func(f *facts.Facts) { size(f, 1, 1) }, nil},
		{"lighting cable just below, once for both cores", func(f *facts.Facts) { size(f, 1, 0.75); size(f, 2, 0.75) }, []string{
			"stop 11+: -W11, Workshop: 0.75 mm², least 1 mm² for a fixed cable of a lighting circuit | 1 mm² or thicker.",
		}},
		{"control wire on the least size", func(f *facts.Facts) { size(f, 0, 0.5) }, nil},
	})
}

// size gives one conductor another metric size.
func size(f *facts.Facts, i int, mm2 quantity.SquareMM) {
	f.Conductors[i].Conductor.Size = quantity.WireSize{Area: mm2}
}
