package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestFuseStandard(t *testing.T) {
	run(t, fuseStandard, []limitCase{
		{"made", func(f *facts.Facts) { f.Fuses[1].Rating = 7.5 }, nil},
		{"not made", func(f *facts.Facts) { f.Fuses[1].Rating = 5.5 }, []string{
			"stop -F101: -F101, Workshop: rating 5.5 A is not made | 5 A or 7.5 A for the load of 500 mA.",
		}},
		{"a spare way", func(f *facts.Facts) { f.Fuses[1].Rating, f.Fuses[1].Way.Lighting = 0, nil }, nil},
		{"smaller than all", func(f *facts.Facts) { f.Fuses[1].Rating = 0.001 }, []string{
			"stop -F101: -F101, Workshop: rating 1 mA is not made",
		}},
		{"larger than all", func(f *facts.Facts) { f.Fuses[1].Rating = 9000 }, []string{
			"stop -F101: -F101, Workshop: rating 9000 A is not made",
		}},
	})
}
