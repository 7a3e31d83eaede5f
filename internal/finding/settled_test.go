package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestSettled(t *testing.T) {
	run(t, settled, []limitCase{
		{"all settle", nil, nil},
		{"one does not", func(f *facts.Facts) {
			c := f.Conditions[1]
			c.Settled, c.State = false, []facts.State{{Element: "-K1"}, {Element: "-Q1"}}
		}, []string{
			"stop c2: Condition 2, Mains off, dark: does not come to rest: -K1 and -Q1 switch to and fro",
		}},
	})
}
