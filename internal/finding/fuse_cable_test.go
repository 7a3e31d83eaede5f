package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestFuseCable(t *testing.T) {
	run(t, fuseCable, []limitCase{
		{"exactly protected", func(f *facts.Facts) { f.Fuses[1].CableAmpacity = 2 }, nil},
		{"just not", func(f *facts.Facts) { f.Fuses[1].Rating, f.Fuses[1].CableAmpacity = 20, 16.5 }, []string{
			"stop -F101: -F101, Workshop: rating 20 A, its 1.5 mm² cable carries 16.5 A | 2.5 mm² carries 23 A; or a fuse of at most 16.5 A for the load of 500 mA.",
		}},
		{"no cable behind it", func(f *facts.Facts) { f.Fuses[1].Rating, f.Fuses[1].CableAmpacity = 20, 0 }, nil},
	})
}
