package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestConductorAmpacity(t *testing.T) {
	run(t, conductorAmpacity, []limitCase{
		{"exactly", func(f *facts.Facts) { f.Conductors[1].Current = f.Conductors[1].Ampacity }, nil},
		{"just over", func(f *facts.Facts) { f.Conductors[1].Ampacity, f.Conductors[1].Current = 12, 12.1 }, []string{
			"stop 11+: Wire 11+, -F101:1 to -E11:+: carries 12.1 A, 1.5 mm² is good for 12 A | 2.5 mm² carries 16.7 A.",
		}},
	})
}
