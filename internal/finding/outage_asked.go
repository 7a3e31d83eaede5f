package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// shortestOutage is the least duration of emergency lighting: EN 1838 clause 4.2.5,
// from memory.
const shortestOutage quantity.Second = quantity.SecondsPerHour

// outageAsked remarks on an outage shorter than codes ask.
var outageAsked = &Check{
	Name:   "outage-asked",
	Title:  "outage shorter than an hour",
	Doc:    "Codes for emergency lighting ask for one hour at least; where people sleep, often three. A shorter duty may be meant.",
	Source: "EN 1838 clause 4.2.5 (from memory)",
	Run: func(f *facts.Facts, report func(Finding)) {
		asked := f.Site.Duty.Outage
		if !under(asked.Val, shortestOutage) {
			return
		}
		v, bound := pair(asked.Val, shortestOutage)
		report(Finding{
			Severity: Caution, Subject: "duty.outage", At: asked.Pos,
			Message: fmt.Sprintf("Outage: %s asked, least %s", v, bound),
			Remedy:  fmt.Sprintf("duty.outage of %s.", bound),
			Value:   asked.Val.Hours(), Limit: shortestOutage.Hours(), Unit: "h", Over: true,
		})
	},
}
