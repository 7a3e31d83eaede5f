package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// mostStrings is how many strings of blocks share evenly in parallel (common practice,
// no source).
const mostStrings = 4

// batteryStrings counts the parallel strings of the battery.
var batteryStrings = &Check{
	Name:  "battery-strings",
	Title: "many battery strings in parallel",
	Doc: "Strings in parallel share charge and load by their small differences; with more than four the weakest ages ahead of the others. " +
		"Take larger blocks in fewer strings.",
	Source: "common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		b := f.Battery
		if b.Part == nil || b.Parallel <= mostStrings {
			return
		}
		report(Finding{
			Severity: Caution, Subject: b.Part.Designation, At: b.Part.At,
			Message: fmt.Sprintf("%s: %d strings in parallel, limit %d", title(b.Part.Designation, b.ClassName), b.Parallel, mostStrings),
			Remedy:  fmt.Sprintf("Blocks of at least %s in %d strings.", sayUp(b.Capacity/mostStrings), mostStrings),
			Value:   float64(b.Parallel), Limit: mostStrings, Unit: "strings",
		})
	},
}
