package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestLampLow(t *testing.T) {
	run(t, lampLow, []limitCase{
		{"on its lowest voltage", func(f *facts.Facts) { f.Luminaires[0].Volts[outageNight] = 18 }, nil},
		{"just below it", func(f *facts.Facts) { f.Luminaires[0].Volts[outageNight] = 17.9 }, []string{
			"stop -E11: -E11, Workshop: 17.9 V at the lamp in “mains off, dark”; it works from 18 V | The way from the battery must lose 0.1 V less, or the lamp must work from 17.9 V.",
		}},
		{"low when it need not be lit", func(f *facts.Facts) { f.Luminaires[0].Volts[floating] = 3 }, nil},
		{"low when the battery is cut off", func(f *facts.Facts) { f.Luminaires[0].Volts[outageNight] = 0; f.Function[0].Known[outageNight] = false }, nil},
		{"no range stated", func(f *facts.Facts) { f.Luminaires[0].Works.Low = 0; f.Luminaires[0].Volts[outageNight] = 1 }, nil},
	})
}
