package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestCutOffRecovery(t *testing.T) {
	run(t, cutOffRecovery, []limitCase{
		{"on the recovered voltage", func(f *facts.Facts) { f.CutOff.Recloses = 23.88 }, nil},
		{"just below", func(f *facts.Facts) { f.CutOff.Recloses = 23.8 }, []string{
			"caution -Q1: -Q1, cut-off: opens at 21 V and recloses at 23.8 V, the resting battery climbs to 23.9 V | Set the reclosing voltage to 25.2 V.",
		}},
		{"no cut-off", func(f *facts.Facts) { f.CutOff = nil }, nil},
	})
}
