package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestBlocked(t *testing.T) {
	run(t, blocked, []limitCase{
		{"nothing blocked", nil, nil},
		{"one step", func(f *facts.Facts) {
			f.Blocked = []*facts.Blocked{{Subject: "Boathouse", Limit: "drop", Figure: 6.23, Bound: 5, Unit: "%", Remedy: "A board nearer by 8 m.", Source: "practice"}}
		}, []string{
			"stop Boathouse: Boathouse: nothing fits; drop 6.23 %, limit 5 % | A board nearer by 8 m.",
		}},
	})
}
