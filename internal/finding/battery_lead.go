package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// The lead between battery pole and main fuse is protected by nothing. Common practice
// keeps it shorter than mostLead; IEC 60364-4-43 clause 434.2.1 allows at most
// farthestLead even where a short is made unlikely (from memory).
const (
	mostLead     quantity.Metre = 0.3
	farthestLead quantity.Metre = 3
)

// batteryLead measures the unprotected lead at the battery.
var batteryLead = &Check{
	Name:  "battery-lead",
	Title: "unprotected lead at the battery",
	Doc: "Between the battery's pole and the main fuse nothing limits a short: the lead must be as short as can be, in its own sleeve, and fixed. " +
		"Over 0.3 m is a caution, over 3 m must not be built.",
	Source: "common practice (0.3 m); IEC 60364-4-43 clause 434.2.1 (3 m, from memory)",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, o := range f.Conductors {
			c := o.Conductor
			if !c.Positive || o.Fuse != "" || f.Battery.Part == nil ||
				c.From.Part != f.Battery.Part && c.To.Part != f.Battery.Part {
				continue
			}
			limit, severity := mostLead, Caution
			switch {
			case over(c.Length, farthestLead):
				limit, severity = farthestLead, Stop
			case !over(c.Length, mostLead):
				continue
			}
			unit := f.Site.Practice.LengthUnit()
			v, bound := unit.Format(c.Length), unit.Format(limit)
			if v == bound {
				v, bound = pair(c.Length, limit)
			}
			report(Finding{
				Severity: severity, Subject: c.Number, At: c.At,
				Message: fmt.Sprintf("Wire %s, %s to %s: %s without a fuse, limit %s; a short draws %s", c.Number, c.From, c.To, v, bound, say(f.Battery.Prospective)),
				Remedy:  fmt.Sprintf("The main fuse within %s of the pole.", unit.Format(mostLead)),
				Value:   float64(c.Length), Limit: float64(limit), Unit: "m",
			})
		}
	},
}
