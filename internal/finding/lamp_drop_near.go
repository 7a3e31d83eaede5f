package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// dropReserve is the distance from the limit, in shares of the nominal voltage, below
// which a longer route or a poor joint uses up what is left (common practice, no
// source).
const dropReserve quantity.Ratio = 0.005

// lampDropNear warns of a drop that meets its limit with little in hand.
var lampDropNear = &Check{
	Name:  "lamp-drop-near",
	Title: "voltage drop at a lamp close to the limit",
	Doc: "A drop within half a point of practice.lamp_drop leaves nothing for a route that turns out longer than drawn. " +
		"Measure the route before cutting, or take the next size.",
	Source: "common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		limit := f.Site.Practice.LampDrop.Val
		for _, w := range worstLamps(f) {
			l := w.lamp
			if over(l.Drop, limit) || under(l.Drop, limit-dropReserve) {
				continue
			}
			v, bound := pair(l.Drop, limit)
			legs := legsTo(lightingOf(f, l.Circuit), l.Part)
			least := thinnest(legs)
			remedy := fmt.Sprintf("%s leaves %s in hand", least, say(limit-l.Drop))
			if up := thicker(f, least); len(up) > 0 {
				would := l.Drop - lost(f, legs, quantity.WireSize{}) + lost(f, legs, up[0])
				remedy += fmt.Sprintf("; %s would drop %s", up[0], say(would))
			}
			report(Finding{
				Severity: Caution, Subject: l.Part.Designation, At: l.Part.At,
				Message: fmt.Sprintf("%s: drop %s, limit %s", title(l.Part.Designation, l.Circuit), v, bound),
				Remedy:  remedy + ".",
				Value:   percent(l.Drop), Limit: percent(limit), Unit: "%",
			})
		}
	},
}
