package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestBatteryOverheated(t *testing.T) {
	run(t, batteryOverheated, []limitCase{
		{"on the limit", func(f *facts.Facts) { f.Site.Duty.BatteryRoom.Val.High = 40 }, nil},
		{"just above", func(f *facts.Facts) { f.Site.Duty.BatteryRoom.Val.High = 41 }, []string{
			"stop -G1: -G1, VRLA-AGM: battery room up to 41 °C, charging allowed to 40 °C | A room that stays at 40 °C or below.",
		}},
	})
}
