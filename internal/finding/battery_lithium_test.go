package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestBatteryLithium(t *testing.T) {
	run(t, batteryLithium, []limitCase{
		{"lead-acid", nil, nil},
		{"lithium iron", func(f *facts.Facts) { f.Battery.Class, f.Battery.ClassName, f.Battery.Series = "lifepo4", "LiFePO4", 8 }, []string{
			"caution -G1: -G1, LiFePO4: needs a protection circuit of its own | One that carries 1.2 A and opens below 20 V and above 29.1 V for the battery.",
		}},
	})
}
