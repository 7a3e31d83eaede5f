package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestChargerBoost(t *testing.T) {
	run(t, chargerBoost, []limitCase{
		{"within two in a hundred", func(f *facts.Facts) { f.Charger.Boost = 29.8 }, nil},
		{"just beyond", func(f *facts.Facts) { f.Charger.Boost = 29.81 }, []string{
			"stop -T1: -T1, charger: boost 29.81 V at 20 °C, limit 29.8 V | Set 29.22 V.",
		}},
	})
}
