package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestChargerBoost(t *testing.T) {
	run(t, chargerBoost, []limitCase{
		{"within two in a hundred of 12 × 2.42 V", func(f *facts.Facts) { f.Charger.Boost = 29.62 }, nil},
		{"just beyond", func(f *facts.Facts) { f.Charger.Boost = 29.63 }, []string{
			"stop -T1: -T1, charger: boost 29.63 V at 25 °C, limit 29.62 V | Set 29.04 V.",
		}},
	})
}
