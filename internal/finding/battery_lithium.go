package finding

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/facts"
)

// batteryLithium reminds of the protection that lithium cells need.
var batteryLithium = &Check{
	Name:  "battery-lithium",
	Title: "lithium battery needs its own protection",
	Doc: "Lithium cells need a protection circuit that cuts charge and discharge by cell voltage and temperature. It can open at any time " +
		"and put out every light at once; its limits must lie outside those of charger and cut-off.",
	Source: "common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		c := classOf(f)
		if c == nil || c.Family != catalogue.LithiumIron {
			return
		}
		b := f.Battery
		load := f.Totals.LoadA
		report(Finding{
			Severity: Caution, Subject: b.Part.Designation, At: b.Part.At,
			Message: fmt.Sprintf("%s: needs a protection circuit of its own", title(b.Part.Designation, b.ClassName)),
			Remedy: fmt.Sprintf("One that carries %s and opens below %s and above %s for the battery.",
				sayUp(load), say(whole(f, c.LowestEnd)), sayUp(max(f.Charger.Boost, f.Charger.Float))),
			Value: float64(load), Unit: "A",
		})
	},
}
