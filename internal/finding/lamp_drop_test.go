package finding

import (
	"testing"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

func TestLampDrop(t *testing.T) {
	run(t, lampDrop, []limitCase{
		{"on the limit", func(f *facts.Facts) {
			for _, l := range f.Luminaires {
				l.Drop = 0.05
			}
		}, nil},
		{"just over it", func(f *facts.Facts) { f.Luminaires[1].Drop = 0.052 }, []string{
			"stop -E12: -E12, Workshop: drop 5.2 %, limit 5 % | 2.5 mm² drops 4.76 %.",
		}},
		{"so little over that three digits hide it", func(f *facts.Facts) { f.Luminaires[3].Drop = 0.050001 }, []string{
			"stop -E14: -E14, Shed: drop 5.0001 %, limit 5 %",
		}},
		{"two lamps of one circuit", func(f *facts.Facts) { f.Luminaires[0].Drop, f.Luminaires[1].Drop = 0.051, 0.053 }, []string{
			"stop -E12: -E12, Workshop: drop 5.3 %, limit 5 %; 1 lamp more over it",
		}},
		{"its own cable cannot mend it", func(f *facts.Facts) { f.Luminaires[2].Drop = 0.09 }, []string{
			"stop -E13: -E13, Stair: drop 9 %, limit 5 % | Its own cable loses 0.554 %, the way before it 8.45 %: a thicker feeder or battery cable, or a board nearer to the lamps.",
		}},
		{"only the sizes in stock count", func(f *facts.Facts) {
			f.Site.Practice.Sizes.Val = []quantity.WireSize{{Area: 4}, {Area: 1.5}}
			f.Luminaires[1].Drop = 0.052
		}, []string{
			"stop -E12: -E12, Workshop: drop 5.2 %, limit 5 % | 4 mm² drops 4.5 %.",
		}},
	})
}
