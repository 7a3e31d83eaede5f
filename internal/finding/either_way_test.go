package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestEitherWay(t *testing.T) {
	stands := func(lit ...string) func(f *facts.Facts) {
		return func(f *facts.Facts) {
			c := f.Conditions[outageDay]
			c.Either = []facts.Either{{Parts: []facts.State{{Element: "-K1", Position: "let go"}}, Lit: lit, Tolerance: len(lit) > 1}}
		}
	}
	both := func(f *facts.Facts) {
		stands("Stair")(f)
		f.Conditions[outageNight].Either = f.Conditions[outageDay].Either
		f.Conditions[outageNight].Lit = []string{"Workshop", "Stair"}
	}
	run(t, eitherWay, []limitCase{
		{"one way", nil, nil},
		{"the same lights", stands(), []string{"note -K1: -K1: may also stand let go in “mains off, daylight”, by what was before, with the same lights"}},
		{"other lights", stands("Stair"), []string{"caution -K1: -K1: may also stand let go in “mains off, daylight”, by what was before, with other lights: Stair"}},
		{"in two conditions", both, []string{"caution -K1: -K1: may also stand let go in “mains off, dark” and “mains off, daylight”, by what was before, with other lights: Workshop and Stair"}},
		{"by the tolerances", stands("Stair", "Shed"), []string{"caution -K1: -K1: may also stand let go in “mains off, daylight”, by the tolerances, with other lights: Stair and Shed"}},
	})
}
