package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestExtraLowVoltage(t *testing.T) {
	run(t, extraLowVoltage, []limitCase{
		{"on the limit", func(f *facts.Facts) { f.Charger.Boost, f.Battery.Series = 59.28, 24 }, nil},
		{"just above, at boost in the cold", func(f *facts.Facts) { f.Charger.Boost, f.Battery.Series = 59.42, 24 }, []string{
			"stop -G1: -G1: 60.1 V in boost at 5 °C, limit 60 V | At most 23 cells in series.",
		}},
		{"in a solved condition", func(f *facts.Facts) { f.Conditions[floating].BatteryV, f.Battery.Series = 61, 24 }, []string{
			"stop -G1: -G1: 61 V in Mains on, floating, limit 60 V",
		}},
		{"no battery", func(f *facts.Facts) {
			f.Conditions[floating].BatteryV, f.Battery.Part, f.Charger.Part = 61, nil, nil
			f.Battery.Series = 0
		}, []string{
			"stop duty.nominal: System: 61 V in Mains on, floating, limit 60 V | A nominal voltage of at most 23.6 V.",
		}},
	})
}
