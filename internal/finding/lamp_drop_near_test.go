package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestLampDropNear(t *testing.T) {
	run(t, lampDropNear, []limitCase{
		{"half a point below the limit", func(f *facts.Facts) { f.Luminaires[1].Drop = 0.045 }, []string{
			"caution -E12: -E12, Workshop: drop 4.5 %, limit 5 %",
		}},
		{"just farther from it", func(f *facts.Facts) { f.Luminaires[1].Drop = 0.0449 }, nil},
		{"close to it", func(f *facts.Facts) { f.Luminaires[1].Drop = 0.0495 }, []string{
			"caution -E12: -E12, Workshop: drop 4.95 %, limit 5 % | 1.5 mm² leaves 0.05 % in hand; 2.5 mm² would drop 4.51 %.",
		}},
		{"on the limit", func(f *facts.Facts) { f.Luminaires[1].Drop = 0.05 }, []string{
			"caution -E12: -E12, Workshop: drop 5 %, limit 5 %",
		}},
		{"over the limit is another check", func(f *facts.Facts) { f.Luminaires[1].Drop = 0.051 }, nil},
	})
}
