package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// chargerCurrent compares the charger's current with what the recharge needs.
var chargerCurrent = &Check{
	Name:  "charger-current",
	Title: "charger weaker than required",
	Doc: "The charger must return the charge of the outage, times the charge factor, within duty.recharge, and carry the standing load meanwhile. " +
		"Take a stronger charger or a longer recharge.",
	Source: "duty.recharge; charge factor of the battery class",
	Run: func(f *facts.Facts, report func(Finding)) {
		c := f.Charger
		if c.Part == nil || !under(c.Current, c.Required) {
			return
		}
		v, bound := pair(c.Current, c.Required)
		report(Finding{
			Severity: Stop, Subject: c.Part.Designation, At: c.Part.At,
			Message: fmt.Sprintf("%s: gives %s, required %s", title(c.Part.Designation, "charger"), v, bound),
			Remedy:  fmt.Sprintf("A charger of at least %s; the battery allows %s.", sayUp(c.Required), sayDown(c.Limit)),
			Value:   float64(c.Current), Limit: float64(c.Required), Unit: "A", Over: true,
		})
	},
}
