package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// leastSupply is the current below which a supply counts as feeding nothing: the
// leakage of a suppression diode and a meter lies under it.
const leastSupply quantity.Ampere = 1e-4

// supplyIdle finds a supply on which nothing hangs.
var supplyIdle = &Check{
	Name:   "supply-idle",
	Title:  "supply feeds nothing",
	Doc:    "A mains supply that gives no current in any condition is left over from an earlier layout, or the coil that it should hold names another stage.",
	Source: "current from the solved circuit",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, s := range f.Supplies {
			if s.Current >= leastSupply {
				continue
			}
			report(Finding{
				Severity: Caution, Subject: s.Part.Designation, At: s.Part.At,
				Message: fmt.Sprintf("%s: gives %s in every condition", title(s.Part.Designation, "supply"), say(s.Current)),
				Remedy:  fmt.Sprintf("Name it as coil of the changeover, or leave it out; it is rated %s.", say(s.Rated)),
				Value:   float64(s.Current), Limit: float64(leastSupply), Unit: "A", Over: true,
			})
		}
	},
}
