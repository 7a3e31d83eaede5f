package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestChargerFloat(t *testing.T) {
	run(t, chargerFloat, []limitCase{
		{"on the low end", func(f *facts.Facts) { f.Charger.Float = 27.18 }, nil},
		{"just below", func(f *facts.Facts) { f.Charger.Float = 27.17 }, []string{
			"stop -T1: -T1, charger: float 27.17 V at 20 °C, the class takes 27.18 V to 28.02 V | Set 27.66 V.",
		}},
		{"on the high end", func(f *facts.Facts) { f.Charger.Float = 28.02 }, nil},
		{"just above", func(f *facts.Facts) { f.Charger.Float = 28.1 }, []string{
			"stop -T1: -T1, charger: float 28.1 V at 20 °C, the class takes 27.18 V to 28.02 V",
		}},
	})
}
