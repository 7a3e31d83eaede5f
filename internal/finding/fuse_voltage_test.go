package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestFuseVoltage(t *testing.T) {
	run(t, fuseVoltage, []limitCase{
		{"on its rating", func(f *facts.Facts) { f.Fuses[2].BreakingVolt = 29.76 }, nil},
		{"just below the highest", func(f *facts.Facts) { f.Fuses[2].BreakingVolt = 29.7 }, []string{
			"stop -F102: -F102, Stair: rated 29.7 V DC, the system reaches 29.8 V in boost at 5 °C | A fuse rated 29.8 V DC or more.",
		}},
	})
}
