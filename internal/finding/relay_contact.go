package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// relayContact compares the current through the changeover contact with its DC rating.
var relayContact = &Check{
	Name:  "relay-contact",
	Title: "relay contact carries more than its rating",
	Doc: "Direct current does not pass through zero, so a contact breaks far less of it than its alternating rating says. " +
		"The whole lighting current must lie within the DC rating at the highest battery voltage.",
	Source: "DC contact rating of the relay; IEC 61810-1",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, r := range f.Relays {
			if !over(r.Contact, r.Rated) {
				continue
			}
			v, bound := pair(r.Contact, r.Rated)
			report(Finding{
				Severity: Stop, Subject: r.Part.Designation, At: r.Part.At,
				Message: fmt.Sprintf("%s: contact carries %s, rated %s DC", title(r.Part.Designation, "changeover"), v, bound),
				Remedy:  fmt.Sprintf("A relay rated %s DC or more, or circuits for %s on another.", sayUp(r.Contact), sayUp(r.Contact-r.Rated)),
				Value:   float64(r.Contact), Limit: float64(r.Rated), Unit: "A",
			})
		}
	},
}
