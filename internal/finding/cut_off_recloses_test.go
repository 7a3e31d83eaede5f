package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestCutOffRecloses(t *testing.T) {
	run(t, cutOffRecloses, []limitCase{
		{"just below float in the heat", func(f *facts.Facts) { f.CutOff.Recloses = 27.29 }, nil},
		{"on it", func(f *facts.Facts) { f.CutOff.Recloses = 27.3 }, []string{
			"stop -Q1: -Q1, cut-off: recloses at 27.3 V, float at 30 °C is 27.3 V | Set the reclosing voltage to 25.2 V.",
		}},
		{"without a probe float stays", func(f *facts.Facts) { f.Charger.Compensated, f.CutOff.Recloses = false, 27.4 }, nil},
		{"no charger", func(f *facts.Facts) { f.Charger, f.CutOff.Recloses = facts.Charger{}, 99 }, nil},
	})
}
