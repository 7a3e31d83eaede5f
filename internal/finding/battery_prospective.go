package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// highProspective is the short-circuit current from which common fuses and isolators
// of such systems no longer break safely (common practice, no source).
const highProspective quantity.Ampere = 10000

// batteryProspective warns of a very high short-circuit current at the battery.
var batteryProspective = &Check{
	Name:  "battery-prospective",
	Title: "very high short-circuit current at the battery",
	Doc: "From 10 kA on a dropped spanner melts and throws metal, and only fuses with a high DC breaking capacity clear a fault. " +
		"Shroud the poles, use insulated tools, and check the breaking capacity of fuse and isolator on their own sheets.",
	Source: "common practice, no source; current after IEC 61660-1",
	Run: func(f *facts.Facts, report func(Finding)) {
		b := f.Battery
		if b.Part == nil || !over(b.Prospective, highProspective) {
			return
		}
		v, bound := pair(b.Prospective, highProspective)
		report(Finding{
			Severity: Caution, Subject: b.Part.Designation, At: b.Part.At,
			Message: fmt.Sprintf("%s: short-circuit current %s, limit %s", title(b.Part.Designation, b.ClassName), v, bound),
			Remedy:  fmt.Sprintf("Shrouded poles; %d strings with a fuse each draw %s each.", 2, say(b.Prospective/2)),
			Value:   float64(b.Prospective), Limit: float64(highProspective), Unit: "A",
		})
	},
}
