package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestLampBoost(t *testing.T) {
	run(t, lampBoost, []limitCase{
		{"the range ends at boost in the cold", func(f *facts.Facts) {
			for _, l := range f.Luminaires {
				l.Works.High = 29.76
			}
		}, nil},
		{"the range ends just below it, but the lamps are dark while mains is on", func(f *facts.Facts) {
			for _, l := range f.Luminaires {
				l.Works.High = 29.7
			}
		}, nil},
		{"the range ends just below it: once for each type", func(f *facts.Facts) {
			for _, r := range f.Function {
				r.Asked = "always"
			}
			for _, l := range f.Luminaires {
				l.Works.High = 29.7
			}
		}, []string{
			"caution corridor: corridor, first at -E11: boost at 5 °C is 29.8 V, the lamp works to 29.7 V | A lamp that works to 29.8 V, or a boost setting lower by 60 mV.",
		}},
		{"no charger", func(f *facts.Facts) { f.Charger = facts.Charger{}; f.Luminaires[0].Works.High = 20 }, nil},
	})
}
