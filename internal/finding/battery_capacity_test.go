package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestBatteryCapacity(t *testing.T) {
	run(t, batteryCapacity, []limitCase{
		{"exactly enough", func(f *facts.Facts) { f.Battery.Required = 33 }, nil},
		{"just too small", func(f *facts.Facts) { f.Battery.Required = 33.1 }, []string{
			"stop -G1: -G1, VRLA-AGM: capacity 33 Ah, required 33.1 Ah | 100 mAh more, or an outage shorter than 4 h.",
		}},
		{"no battery", func(f *facts.Facts) { f.Battery = facts.Battery{Required: 5} }, nil},
	})
}
