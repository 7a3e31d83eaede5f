package finding

import (
	"testing"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

func TestChargerCompensation(t *testing.T) {
	run(t, chargerCompensation, []limitCase{
		{"ten kelvins either way", func(f *facts.Facts) {
			f.Charger.Compensated, f.Site.Duty.BatteryRoom.Val = false, quantity.Range[quantity.Celsius]{Low: 15, High: 35}
		}, nil},
		{"hotter", func(f *facts.Facts) {
			f.Charger.Compensated, f.Site.Duty.BatteryRoom.Val = false, quantity.Range[quantity.Celsius]{Low: 15, High: 36}
		}, []string{
			"caution -T1: -T1, charger: float 27.48 V fixed, 0.396 V off at 36 °C, limit 0.36 V | A charger with a probe at the battery: 27.84 V at 15 °C, 27.08 V at 36 °C.",
		}},
		{"colder", func(f *facts.Facts) { f.Charger.Compensated = false }, []string{
			"caution -T1: -T1, charger: float 27.48 V fixed, 0.72 V off at 5 °C, limit 0.36 V",
		}},
		{"a class without a slope", func(f *facts.Facts) {
			f.Charger.Compensated, f.Battery.Class, f.Charger.Float = false, "lifepo4", 40.56
		}, nil},
	})
}
