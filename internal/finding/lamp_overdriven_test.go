package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestLampOverdriven(t *testing.T) {
	run(t, lampOverdriven, []limitCase{
		{"on its greatest current", func(f *facts.Facts) { f.Luminaires[0].Rated, f.Luminaires[0].Amps[floating] = 0.3, 0.3 }, nil},
		{"just over it", func(f *facts.Facts) { f.Luminaires[0].Rated, f.Luminaires[0].Amps[floating] = 0.3, 0.301 }, []string{
			"stop -E11: -E11, Workshop: takes 301 mA in “mains on, floating”; limit 300 mA",
		}},
		{"none stated", func(f *facts.Facts) { f.Luminaires[0].Amps[floating] = 3 }, nil},
	})
}
