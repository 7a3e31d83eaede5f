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
			c.Settled, c.Restless = false, []string{"-K1", "-Q1"}
		}, []string{
			"stop c2: Condition 2, Mains off, dark: does not come to rest: -K1 and -Q1 switch to and fro",
		}},
		{"a sweep does not", func(f *facts.Facts) {
			f.Thresholds = append(f.Thresholds, &facts.Threshold{Key: "opens", Name: "cut-off opens", Restless: []string{"-Q1"}})
		}, []string{"stop -Q1: Where cut-off opens: nothing comes to rest: -Q1 switches to and fro"}},
	})
}
