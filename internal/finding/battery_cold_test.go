package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestBatteryCold(t *testing.T) {
	run(t, batteryCold, []limitCase{
		{"glass mat on its limit", func(f *facts.Facts) { f.Site.Duty.BatteryRoom.Val.Low = -15 }, nil},
		{"glass mat below it", func(f *facts.Facts) { f.Site.Duty.BatteryRoom.Val.Low = -16 }, []string{
			"stop -G1: -G1, VRLA-AGM: battery room down to -16 °C, charging allowed from -15 °C | A room kept at -15 °C or above, or another class.",
		}},
		{"lithium at freezing", func(f *facts.Facts) { f.Battery.Class = "lifepo4"; f.Site.Duty.BatteryRoom.Val.Low = 0 }, nil},
		{"lithium just below", func(f *facts.Facts) { f.Battery.Class = "lifepo4"; f.Site.Duty.BatteryRoom.Val.Low = -0.5 }, []string{
			"stop -G1: -G1, VRLA-AGM: battery room down to -0.5 °C, charging allowed from 0 °C",
		}},
	})
}
