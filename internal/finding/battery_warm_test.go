package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestBatteryWarm(t *testing.T) {
	run(t, batteryWarm, []limitCase{
		{"thirty degrees", nil, nil},
		{"just above", func(f *facts.Facts) { f.Site.Duty.BatteryRoom.Val.High = 31 }, []string{
			"caution -G1: -G1, VRLA-AGM: battery room up to 31 °C, limit 30 °C",
		}},
		{"forty: two halvings from twenty", func(f *facts.Facts) { f.Site.Duty.BatteryRoom.Val.High = 40 }, []string{
			"caution -G1: -G1, VRLA-AGM: battery room up to 40 °C, limit 30 °C | Air the room; a battery that always stands at 40 °C keeps 25 % of its life at 20 °C.",
		}},
		{"the rule is for lead-acid", func(f *facts.Facts) { f.Battery.Class = "lifepo4"; f.Site.Duty.BatteryRoom.Val.High = 40 }, nil},
	})
}
