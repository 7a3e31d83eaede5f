package finding

import (
	"testing"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

func TestOutageHeld(t *testing.T) {
	run(t, outageHeld, []limitCase{
		{"exactly held", func(f *facts.Facts) { f.Endurance.Held, f.Endurance.Lit[0].For = quantity.Hours(4), quantity.Hours(4) }, nil},
		{"just not held", func(f *facts.Facts) {
			f.Endurance.Held, f.Endurance.Lit[0].For = quantity.Hours(3.96), quantity.Hours(3.96)
		}, []string{
			"stop Workshop: Workshop: goes out after 3.96 h, outage 4 h | At least 33.4 Ah of battery.",
		}},
		{"not simulated", func(f *facts.Facts) { f.Endurance = facts.Endurance{} }, nil},
	})
}
