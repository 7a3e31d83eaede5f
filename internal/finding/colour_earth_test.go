package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestColourEarth(t *testing.T) {
	run(t, colourEarth, []limitCase{
		{"red and black", nil, nil},
		{"green-and-yellow negative", func(f *facts.Facts) { f.Site.Practice.Negative.Val = "GNYE" }, []string{
			"stop practice.colours.negative: Colour of the negative pole: GNYE belongs to the protective conductor",
		}},
		{"yellow positive", func(f *facts.Facts) { f.Site.Practice.Positive.Val = "YE" }, []string{
			"caution practice.colours.positive: Colour of the positive pole: YE can be taken for the protective conductor",
		}},
	})
}
