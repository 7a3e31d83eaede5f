package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestChargerFloat(t *testing.T) {
	run(t, chargerFloat, []limitCase{
		{"on the low end, 12 × 2.25 V", func(f *facts.Facts) { f.Charger.Float = 27 }, nil},
		{"just below", func(f *facts.Facts) { f.Charger.Float = 26.9 }, []string{
			"stop -T1: -T1, charger: float 26.9 V at 25 °C, the class takes 27.00 V to 27.84 V | Set 27.48 V.",
		}},
		{"on the high end, 12 × 2.32 V", func(f *facts.Facts) { f.Charger.Float = 27.84 }, nil},
		{"just above", func(f *facts.Facts) { f.Charger.Float = 27.9 }, []string{
			"stop -T1: -T1, charger: float 27.9 V at 25 °C, the class takes 27.00 V to 27.84 V",
		}},
	})
}
