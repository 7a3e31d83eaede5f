package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestWeekHeld(t *testing.T) {
	run(t, weekHeld, []limitCase{
		{"held every day", func(f *facts.Facts) {
			f.Endurance.Days = []facts.Day{{Started: 1, Held: true}, {Started: 0.99, Held: true}}
		}, nil},
		{"the last day not", func(f *facts.Facts) { f.Endurance.Days = []facts.Day{{Started: 1, Held: true}, {Started: 0.8}} }, []string{
			"caution -T1: -T1, charger: with an outage a day the lights fail on 1 day of 2; the last starts at 80 % of the charge | A charger of more than 3 A; the battery stands 8.25 A. First day without: 2.",
		}},
	})
}
