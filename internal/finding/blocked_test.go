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
		{"a figure that needs a name", func(f *facts.Facts) {
			f.Blocked = []*facts.Blocked{{Subject: "Cables", Limit: "voltage drop", What: "the voltage at the end of -E15", Figure: 16.2, Bound: 18, Unit: "V", Remedy: "shorten the run by 8 m"}}
		}, []string{
			"stop Cables: Cables: nothing fits (voltage drop): the voltage at the end of -E15 is 16.2 V, limit 18 V | Shorten the run by 8 m.",
		}},
		{"beyond the tables", func(f *facts.Facts) {
			f.Blocked = []*facts.Blocked{{Subject: "Cables", Unknown: true, Limit: "the ampacity at 60 °C is not known", Remedy: "a cooler way"}}
		}, []string{
			"stop Cables: Cables: the ampacity at 60 °C is not known | A cooler way.",
		}},
	})
}
