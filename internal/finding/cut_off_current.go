package finding

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/facts"
)

// cutOffCurrent compares the current through the cut-off with its rating.
var cutOffCurrent = &Check{
	Name:   "cut-off-current",
	Title:  "cut-off carries more than its rating",
	Doc:    "The highest lasting current through the cut-off must not exceed its rating. Take the next rating.",
	Source: "rating of the cut-off; current from the solved circuit",
	Run: func(f *facts.Facts, report func(Finding)) {
		c := f.CutOff
		if c == nil || !over(c.Current, c.Rated) {
			return
		}
		v, bound := pair(c.Current, c.Rated)
		report(Finding{
			Severity: Stop, Subject: c.Part.Designation, At: c.Part.At,
			Message: fmt.Sprintf("%s: carries %s, rated %s", title(c.Part.Designation, "cut-off"), v, bound),
			Remedy:  fmt.Sprintf("A cut-off rated %s or more.", nextRated(catalogue.CutOffCurrents, c.Current)),
			Value:   float64(c.Current), Limit: float64(c.Rated), Unit: "A",
		})
	},
}
