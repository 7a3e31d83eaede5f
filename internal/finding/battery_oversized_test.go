package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestBatteryOversized(t *testing.T) {
	run(t, batteryOversized, []limitCase{
		{"twice", func(f *facts.Facts) { f.Battery.Required = 16.5 }, nil},
		{"just more", func(f *facts.Facts) { f.Battery.Required = 16.4 }, []string{
			"note -G1: -G1, VRLA-AGM: capacity 33 Ah, required 16.4 Ah | 16.4 Ah is enough.",
		}},
	})
}
