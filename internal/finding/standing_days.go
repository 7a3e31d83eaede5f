package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// secondsPerDay converts days.
const secondsPerDay quantity.Second = 24 * quantity.SecondsPerHour

// leastStanding is how long a system should stand with the mains off by daylight: a
// long weekend with the main switch off (common practice, no source).
const leastStanding = 3 * secondsPerDay

// standingDays compares the standing drain with the battery's capacity.
var standingDays = &Check{
	Name:  "standing-days",
	Title: "battery drained within days with the mains off",
	Doc: "With the mains off and the lights out, relay electronics, photocell, cut-off and charger still draw from the battery. " +
		"It should stand three days, so that a long weekend with the main switch off does not empty it. Open the isolator before a longer absence.",
	Source: "common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		e := f.Endurance
		if f.Battery.Part == nil || e.DrainA <= 0 || e.Standing <= 0 || !under(e.Standing, leastStanding) {
			return
		}
		b := f.Battery.Part
		days := float64(e.Standing / secondsPerDay)
		limit := float64(leastStanding / secondsPerDay)
		report(Finding{
			Severity: Caution, Subject: b.Designation, At: b.At,
			Message: fmt.Sprintf("%s: empty after %.3g days with mains off and lights out, drain %s; least %.3g days",
				title(b.Designation, f.Battery.ClassName), days, say(e.DrainA), limit),
			Remedy: fmt.Sprintf("Parts that draw %s together.", sayDown(quantity.Ampere(float64(e.DrainA)*days/limit))),
			Value:  days, Limit: limit, Unit: "days", Over: true,
		})
	},
}
