package finding

import (
	"fmt"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// feederShare is the part of the permitted drop from which a feeder is worth a thicker
// cable (common practice, no source).
const feederShare = 0.5

// feederDrop remarks on feeders that use up most of the permitted drop.
var feederDrop = &Check{
	Name:   "feeder-drop",
	Title:  "feeder takes most of the permitted drop",
	Doc:    "A feeder that loses more than half of practice.lamp_drop forces every cable of its board thicker. One size more in the feeder often saves copper behind it.",
	Source: "common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		limit := quantity.Ratio(feederShare * float64(f.Site.Practice.LampDrop.Val))
		for _, b := range f.Circuit.Boards {
			if b.Feeder == nil {
				continue
			}
			feeder := []*circuit.Cable{b.Feeder}
			drop := lost(f, feeder, quantity.WireSize{})
			if !over(drop, limit) {
				continue
			}
			v, bound := pair(drop, limit)
			remedy := "A board nearer to its lamps."
			if up := thicker(f, thickest(feeder)); len(up) > 0 {
				remedy = fmt.Sprintf("%s loses %s.", up[0], say(lost(f, feeder, up[0])))
			}
			report(Finding{
				Severity: Note, Subject: b.Feeder.Designation, At: b.At,
				Message: fmt.Sprintf("%s: feeder loses %s, half the permitted drop is %s", title(b.Feeder.Designation, b.Title), v, bound),
				Remedy:  remedy,
				Value:   percent(drop), Limit: percent(limit), Unit: "%",
			})
		}
	},
}
