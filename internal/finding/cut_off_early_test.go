package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestCutOffEarly(t *testing.T) {
	run(t, cutOffEarly, []limitCase{
		{"on the end of discharge", func(f *facts.Facts) { f.CutOff.Opens = 21 }, nil},
		{"just above", func(f *facts.Facts) { f.CutOff.Opens = 21.1 }, []string{
			"caution -Q1: -Q1, cut-off: opens at 21.1 V, the battery is sized down to 21 V | Set 21 V, or give the battery an end voltage of 21.1 V.",
		}},
		{"no cut-off", func(f *facts.Facts) { f.CutOff = nil }, nil},
	})
}
