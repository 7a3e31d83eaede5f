package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestColourBlue(t *testing.T) {
	run(t, colourBlue, []limitCase{
		{"blue negative", func(f *facts.Facts) { f.Site.Practice.Negative.Val = "BU" }, nil},
		{"blue positive", func(f *facts.Facts) { f.Site.Practice.Positive.Val = "BU"; f.Circuit.Conductors[0].Colour = "BU" }, []string{
			"caution practice.colours.positive: Colours: positive is BU, 1 conductor",
		}},
	})
}
