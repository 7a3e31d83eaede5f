package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestCutOffCurrent(t *testing.T) {
	run(t, cutOffCurrent, []limitCase{
		{"on its rating", func(f *facts.Facts) { f.CutOff.Current = 5 }, nil},
		{"just over", func(f *facts.Facts) { f.CutOff.Current = 5.1 }, []string{
			"stop -Q1: -Q1, cut-off: carries 5.1 A, rated 5 A | A cut-off rated 10 A or more.",
		}},
		{"over every rating", func(f *facts.Facts) { f.CutOff.Current = 400 }, []string{
			"stop -Q1: -Q1, cut-off: carries 400 A, rated 5 A | A cut-off rated 400 A or more.",
		}},
	})
}
