package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// relayPickUp compares the coil's lowest feed with the pick-up voltage of a hot coil.
var relayPickUp = &Check{
	Name:  "relay-pick-up",
	Title: "relay may not pick up",
	Doc: "A coil that has been on for hours is hot, its resistance higher, and it needs more voltage to pick up. The lowest voltage that the supply gives " +
		"while the relay must hold has to reach it. Take a coil of lower voltage or a stiffer supply.",
	Source: "IEC 61810-1 clause 5 (operative range); copper's temperature law of IEC 60028",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, r := range f.Relays {
			if !under(r.LowestFeed, r.PickUp) {
				continue
			}
			v, bound := pair(r.LowestFeed, r.PickUp)
			report(Finding{
				Severity: Stop, Subject: r.Part.Designation, At: r.Part.At,
				Message: fmt.Sprintf("%s: coil gets %s, picks up hot at %s", title(r.Part.Designation, "changeover"), v, bound),
				Remedy:  fmt.Sprintf("A supply that gives %s more at low mains, or a coil that picks up at %s.", sayUp(r.PickUp-r.LowestFeed), sayDown(r.LowestFeed)),
				Value:   float64(r.LowestFeed), Limit: float64(r.PickUp), Unit: "V", Over: true,
			})
		}
	},
}
