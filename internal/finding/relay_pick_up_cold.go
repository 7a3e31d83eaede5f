package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// relayPickUpCold compares the coil's feed from a nearly empty battery with its pick-up.
var relayPickUpCold = &Check{
	Name:  "relay-pick-up-cold",
	Title: "relay may not pick up from the battery",
	Doc: "Where the photocell holds the relay from the battery by day, the coil must pick up at the end of discharge, or the lights burn on in daylight and " +
		"empty the battery. Take a coil of lower voltage or a higher end of discharge.",
	Source: "IEC 61810-1 clause 5 (operative range)",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, r := range f.Relays {
			if r.PickUpCold <= 0 || !under(r.LowestCold, r.PickUpCold) {
				continue
			}
			v, bound := pair(r.LowestCold, r.PickUpCold)
			report(Finding{
				Severity: Stop, Subject: r.Part.Designation, At: r.Part.At,
				Message: fmt.Sprintf("%s: coil gets %s from the nearly empty battery, picks up at %s", title(r.Part.Designation, "changeover"), v, bound),
				Remedy:  fmt.Sprintf("A coil that picks up at %s, or an end of discharge higher by %s.", sayDown(r.LowestCold), sayUp(r.PickUpCold-r.LowestCold)),
				Value:   float64(r.LowestCold), Limit: float64(r.PickUpCold), Unit: "V", Over: true,
			})
		}
	},
}
