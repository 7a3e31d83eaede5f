package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// colourBlue finds a blue positive conductor.
var colourBlue = &Check{
	Name:   "colour-blue",
	Title:  "blue positive conductor",
	Doc:    "Blue marks a neutral or mid-point conductor; on the positive pole it misleads those who know it so. Local codes prevail.",
	Source: "IEC 60445 clause 6.2.2 (from memory)",
	Run: func(f *facts.Facts, report func(Finding)) {
		p := f.Site.Practice.Positive
		if p.Val != "BU" {
			return
		}
		n := 0
		for _, c := range f.Circuit.Conductors {
			if c.Colour == p.Val {
				n++
			}
		}
		report(Finding{
			Severity: Caution, Subject: "practice.colours.positive", At: p.Pos,
			Message: fmt.Sprintf("Colours: positive is %s, %s", p.Val, count(n, "conductor")),
			Remedy:  "RD or BN for the positive pole; 1 colour a pole on the whole site.",
			Value:   float64(n), Limit: 0, Unit: "conductors",
		})
	},
}
