package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestColourSame(t *testing.T) {
	run(t, colourSame, []limitCase{
		{"two colours", nil, nil},
		{"one", func(f *facts.Facts) { f.Site.Practice.Negative.Val = "RD" }, []string{
			"stop practice.colours: Colours: positive and negative both RD | 2 colours, such as RD and BK.",
		}},
	})
}
