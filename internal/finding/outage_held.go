package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// outageHeld compares how long the lights last with the outage asked for.
var outageHeld = &Check{
	Name:  "outage-held",
	Title: "lights do not last the outage",
	Doc: "In the simulated outage from full, at the coldest battery room and the end of the battery's life, every circuit must stay lit " +
		"for duty.outage. Take a larger battery, fewer watts, or lower cut-off.",
	Source: "duty.outage; simulated discharge",
	Run: func(f *facts.Facts, report func(Finding)) {
		e, asked := f.Endurance, f.Site.Duty.Outage
		if len(e.Lit) == 0 || !under(e.Held, asked.Val) {
			return
		}
		first := e.Lit[0]
		for _, l := range e.Lit {
			if l.For < first.For {
				first = l
			}
		}
		v, bound := pair(e.Held, asked.Val)
		remedy := "A shorter outage."
		if f.Battery.Part != nil && e.Held > 0 {
			remedy = fmt.Sprintf("At least %s of battery.", sayUp(quantity.AmpereHour(float64(f.Battery.Capacity)*float64(asked.Val/e.Held))))
		}
		report(Finding{
			Severity: Stop, Subject: first.Circuit, At: asked.Pos,
			Message: fmt.Sprintf("%s: goes out after %s, outage %s", first.Circuit, v, bound),
			Remedy:  remedy,
			Value:   e.Held.Hours(), Limit: asked.Val.Hours(), Unit: "h", Over: true,
		})
	},
}
