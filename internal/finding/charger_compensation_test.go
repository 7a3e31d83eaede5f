package finding

import (
	"testing"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

func TestChargerCompensation(t *testing.T) {
	run(t, chargerCompensation, []limitCase{
		{"ten kelvins either way", func(f *facts.Facts) {
			f.Charger.Compensated, f.Site.Duty.BatteryRoom.Val = false, quantity.Range[quantity.Celsius]{Low: 10, High: 30}
		}, nil},
		{"hotter", func(f *facts.Facts) {
			f.Charger.Compensated, f.Site.Duty.BatteryRoom.Val = false, quantity.Range[quantity.Celsius]{Low: 10, High: 31}
		}, []string{
			"caution -T1: -T1, charger: float 27.66 V fixed, 0.396 V off at 31 °C, limit 0.36 V | A charger with a probe at the battery: 28.02 V at 10 °C, 27.26 V at 31 °C.",
		}},
		{"colder", func(f *facts.Facts) { f.Charger.Compensated = false }, []string{
			"caution -T1: -T1, charger: float 27.66 V fixed, 0.54 V off at 5 °C, limit 0.36 V",
		}},
		{"a class without a slope", func(f *facts.Facts) {
			f.Charger.Compensated, f.Battery.Class, f.Charger.Float = false, "lifepo4", 40.56
		}, nil},
	})
}
