package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestCutOffLow(t *testing.T) {
	run(t, cutOffLow, []limitCase{
		{"on the end voltage of the class", func(f *facts.Facts) { f.CutOff.Opens = 21 }, nil},
		{"just below", func(f *facts.Facts) { f.CutOff.Opens = 20.9 }, []string{
			"caution -Q1: -Q1, cut-off: opens with the battery at 20.9 V, least 21 V | Set 21 V.",
		}},
		{"on the lowest of the class", func(f *facts.Facts) { f.CutOff.Opens = 19.2 }, []string{
			"caution -Q1: -Q1, cut-off: opens with the battery at 19.2 V, least 21 V",
		}},
		{"below that", func(f *facts.Facts) { f.CutOff.Opens = 19.1 }, []string{
			"stop -Q1: -Q1, cut-off: opens with the battery at 19.1 V, least 19.2 V",
		}},
		{"no cut-off", func(f *facts.Facts) { f.CutOff = nil }, nil},
	})
}
