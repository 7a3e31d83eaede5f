package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// colourSame finds both poles in one colour.
var colourSame = &Check{
	Name:   "colour-same",
	Title:  "both poles in the same colour",
	Doc:    "Positive and negative must be told apart by colour at every end, or a battery is joined the wrong way round sooner or later.",
	Source: "IEC 60445 clause 6 (from memory)",
	Run: func(f *facts.Facts, report func(Finding)) {
		p := f.Site.Practice
		if p.Positive.Val != p.Negative.Val {
			return
		}
		report(Finding{
			Severity: Stop, Subject: "practice.colours", At: p.Negative.Pos,
			Message: fmt.Sprintf("Colours: positive and negative both %s", p.Positive.Val),
			Remedy:  "2 colours, such as RD and BK.",
			Value:   1, Limit: 2, Unit: "colours", Over: true,
		})
	},
}
