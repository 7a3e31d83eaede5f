package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestLampHigh(t *testing.T) {
	run(t, lampHigh, []limitCase{
		{"on its highest voltage", func(f *facts.Facts) { f.Luminaires[0].Volts[recharging] = 32 }, nil},
		{"just above it, though it need not be lit", func(f *facts.Facts) { f.Luminaires[0].Volts[recharging] = 32.1 }, []string{
			"stop -E11: -E11, Workshop: 32.1 V at the lamp in “mains back, recharging”; it works to 32 V | A lamp that works to 32.1 V, or a charging voltage lower by 0.1 V.",
		}},
	})
}
