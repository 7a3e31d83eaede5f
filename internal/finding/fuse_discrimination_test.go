package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestFuseDiscrimination(t *testing.T) {
	run(t, fuseDiscrimination, []limitCase{
		{"up to all that can flow", func(f *facts.Facts) { f.Fuses[1].DiscriminatesTo = 300 }, nil},
		{"just not", func(f *facts.Facts) { f.Fuses[1].DiscriminatesTo = 299 }, []string{
			"caution -F1: -F1, battery: a short behind -F101 may open both above 299 A, 300 A can flow | A larger step between the ratings than 2 A to 20 A; after such a fault look at both fuses.",
		}},
		{"two behind the same", func(f *facts.Facts) { f.Fuses[1].DiscriminatesTo, f.Fuses[2].DiscriminatesTo = 120, 80 }, []string{
			"caution -F1: -F1, battery: a short behind -F102 may open both above 80 A, 300 A can flow; 1 fuse more likewise",
		}},
		{"nowhere", func(f *facts.Facts) { f.Fuses[1].DiscriminatesTo = 0 }, []string{
			"caution -F1: -F1, battery: a short behind -F101 may open both at any current, 300 A can flow",
		}},
		{"behind a spare way", func(f *facts.Facts) { f.Fuses[1].DiscriminatesTo, f.Fuses[1].Way.Lighting = 10, nil }, nil},
		{"behind the feeder", func(f *facts.Facts) { f.Fuses[4].DiscriminatesTo = 10 }, []string{
			"caution -F103: -F103, Annex board: a short behind -F201 may open both above 10 A, 300 A can flow",
		}},
	})
}
