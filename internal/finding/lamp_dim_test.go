package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestLampDim(t *testing.T) {
	run(t, lampDim, []limitCase{
		{"on the dimmest share", func(f *facts.Facts) {
			f.Luminaires[0].Rated, f.Luminaires[0].Dimmest, f.Luminaires[0].Amps[outageNight] = 0.08, 0.25, 0.02
		}, nil},
		{"just below it", func(f *facts.Facts) {
			f.Luminaires[0].Rated, f.Luminaires[0].Dimmest, f.Luminaires[0].Amps[outageNight] = 0.08, 0.25, 0.019
		}, []string{
			"stop -E11: -E11, Workshop: 23.7 % of its greatest current in “mains off, dark”; least 25 % | It takes 19 mA at 22.6 V and must take 20 mA: fewer LEDs in series, or a lamp with a driver.",
		}},
		{"dark when it may be", func(f *facts.Facts) { f.Luminaires[0].Rated, f.Luminaires[0].Dimmest = 0.08, 0.25 }, nil},
		{"a lamp that states no share", func(f *facts.Facts) { f.Luminaires[0].Rated, f.Luminaires[0].Amps[outageNight] = 0.08, 0.001 }, nil},
	})
}
