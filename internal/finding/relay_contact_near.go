package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// contactReserve is the share of its rating that a contact should carry at most: lamp
// drivers draw several times their current for some milliseconds as they start (common
// practice, no source).
const contactReserve quantity.Ratio = 0.8

// relayContactNear warns of a contact that is used close to its rating.
var relayContactNear = &Check{
	Name:   "relay-contact-near",
	Title:  "relay contact close to its rating",
	Doc:    "Lamp drivers charge their capacitors when they start: for some milliseconds they draw several times their current. A contact used above 80 % of its rating wears or welds early.",
	Source: "common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, r := range f.Relays {
			if r.Rated <= 0 || over(r.Contact, r.Rated) {
				continue
			}
			share := quantity.Ratio(r.Contact / r.Rated)
			if !over(share, contactReserve) {
				continue
			}
			v, bound := pair(share, contactReserve)
			report(Finding{
				Severity: Caution, Subject: r.Part.Designation, At: r.Part.At,
				Message: fmt.Sprintf("%s: contact carries %s, %s of its rating, limit %s", title(r.Part.Designation, "changeover"), say(r.Contact), v, bound),
				Remedy:  fmt.Sprintf("A relay rated %s DC or more.", sayUp(quantity.Ampere(float64(r.Contact)/float64(contactReserve)))),
				Value:   percent(share), Limit: percent(contactReserve), Unit: "%",
			})
		}
	},
}
