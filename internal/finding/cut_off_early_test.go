package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestCutOffEarly(t *testing.T) {
	run(t, cutOffEarly, []limitCase{
		{"on the end of discharge", func(f *facts.Facts) { f.CutOff.Opens = 21 }, nil},
		{"just above", func(f *facts.Facts) { f.CutOff.Opens = 21.1 }, []string{
			"caution -Q1: -Q1, cut-off: opens when the battery is at 21.1 V, it is sized down to 21 V | Set it 0.1 V lower, or give the battery an end voltage of 21.1 V.",
		}},
		{"on its own setting, but the battery stands higher then", func(f *facts.Facts) { f.CutOff.AtBattery = 21.2 }, []string{
			"caution -Q1: -Q1, cut-off: opens when the battery is at 21.2 V, it is sized down to 21 V",
		}},
		{"no cut-off", func(f *facts.Facts) { f.CutOff = nil }, nil},
	})
}
