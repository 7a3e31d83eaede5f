package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestBatteryProspective(t *testing.T) {
	run(t, batteryProspective, []limitCase{
		{"on the limit", func(f *facts.Facts) { f.Battery.Prospective = 10000 }, nil},
		{"just over it", func(f *facts.Facts) { f.Battery.Prospective = 10100 }, []string{
			"caution -G1: -G1, VRLA-AGM: short-circuit current 10100 A, limit 10000 A",
		}},
	})
}
