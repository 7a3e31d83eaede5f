package finding

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/facts"
)

// supplyCurrent compares the current of the presence supply with its rating.
var supplyCurrent = &Check{
	Name:   "supply-current",
	Title:  "supply gives more than its rating",
	Doc:    "The mains supply that holds the relay must carry what hangs on it in the worst condition. Take the next rating.",
	Source: "rating of the supply; current from the solved circuit",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, s := range f.Supplies {
			if !over(s.Current, s.Rated) {
				continue
			}
			v, bound := pair(s.Current, s.Rated)
			report(Finding{
				Severity: Stop, Subject: s.Part.Designation, At: s.Part.At,
				Message: fmt.Sprintf("%s: gives %s, rated %s", title(s.Part.Designation, "supply"), v, bound),
				Remedy:  fmt.Sprintf("A supply rated %s or more.", nextRated(catalogue.SupplyCurrents, s.Current)),
				Value:   float64(s.Current), Limit: float64(s.Rated), Unit: "A",
			})
		}
	},
}
