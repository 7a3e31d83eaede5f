package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestCollapse(t *testing.T) {
	at := func(share float64) func(f *facts.Facts) {
		return func(f *facts.Facts) {
			f.Collapse = &facts.Collapse{Circuit: "Workshop", Condition: "mains off, dark", Share: share}
		}
	}
	run(t, collapse, []limitCase{
		{"the line just carries it", at(1), nil},
		{"just not", at(0.8), []string{
			"stop Workshop: Workshop: the voltage collapses in “mains off, dark”; the line carries 80 % of the power at most | Take 20 % of the watts off, or lay cable of at least 1.3 times the section.",
		}},
		{"nothing to be had", at(0), []string{
			"stop Workshop: Workshop: the voltage collapses in “mains off, dark”; the line carries 0 % of the power at most | No cable helps here: a higher system voltage, or lamps that work from less.",
		}},
	})
}
