package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestBatteryStrings(t *testing.T) {
	run(t, batteryStrings, []limitCase{
		{"four", func(f *facts.Facts) { f.Battery.Parallel = 4 }, nil},
		{"five", func(f *facts.Facts) { f.Battery.Parallel, f.Battery.Capacity = 5, 200 }, []string{
			"caution -G1: -G1, VRLA-AGM: 5 strings in parallel, limit 4 | Blocks of at least 50 Ah in 4 strings.",
		}},
	})
}
