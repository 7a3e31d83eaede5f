package finding

import (
	"testing"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

func TestRechargeTime(t *testing.T) {
	run(t, rechargeTime, []limitCase{
		{"exactly in time", func(f *facts.Facts) { f.Endurance.Recharge = quantity.Hours(24) }, nil},
		{"just too late", func(f *facts.Facts) { f.Endurance.Recharge = quantity.Hours(24.5) }, []string{
			"stop -T1: -T1, charger: battery full again after 24.5 h, asked within 24 h | A charger of at least 3.07 A; the battery stands 8.25 A.",
		}},
		{"never", func(f *facts.Facts) { f.Endurance.Recharge = 0 }, []string{
			"stop -T1: -T1, charger: battery never full again, asked within 24 h | A charger of at least 2.4 A; the battery stands 8.25 A.",
		}},
		{"not simulated", func(f *facts.Facts) { f.Endurance.Recharge, f.Endurance.Runs = 0, nil }, nil},
	})
}
