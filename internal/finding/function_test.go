package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestFunction(t *testing.T) {
	run(t, function, []limitCase{
		{"dark when asked", func(f *facts.Facts) { f.Function[0].Found[outageNight] = false }, []string{
			"stop Workshop: Workshop: asks for outage-night, dark in “mains off, dark” | Feed its board from a port that agrees in all 4 conditions, or change lit.",
		}},
		{"lit when not asked, twice", func(f *facts.Facts) { f.Function[1].Found[floating], f.Function[1].Found[outageDay] = true, true }, []string{
			"stop Stair: Stair: asks for outage-night, lit in “mains on, floating” and “mains off, daylight”",
		}},
		{"both", func(f *facts.Facts) { f.Function[2].Found = []bool{true, false, false, true} }, []string{
			"stop Shed: Shed: asks for outage-night, dark in “mains off, dark”, lit in “mains on, floating” and “mains back, recharging”",
		}},
		{"a condition that asks nothing", func(f *facts.Facts) {
			f.Function[0].Found[outageNight], f.Function[0].Known[outageNight] = false, false
		}, nil},
	})
}
