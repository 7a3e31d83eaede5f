package finding

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
)

// conductorLeast holds every conductor against the least size for its strength.
var conductorLeast = &Check{
	Name:   "conductor-least",
	Title:  "conductor too thin to be handled",
	Doc:    "Below a least size conductors break when they are pulled, bent and clamped, whatever their current. Lighting cables need more than control wires.",
	Source: "IEC 60364-5-52 table 52.2 (from memory)",
	Run: func(f *facts.Facts, report func(Finding)) {
		system := catalogue.System(f.Site.Practice.Conductors.Val)
		seen := map[*circuit.Cable]bool{}
		for _, o := range f.Conductors {
			c := o.Conductor
			if c.Cable != nil && seen[c.Cable] {
				continue
			}
			seen[c.Cable] = true
			use := catalogue.LeastControl
			if c.Cable != nil && c.Circuit != "" {
				use = catalogue.LeastFixed
			}
			limit := use.Least(system)
			if !under(c.Size.Area, limit) {
				continue
			}
			subject := "Wire " + c.Number
			if c.Cable != nil {
				subject = title(c.Cable.Designation, c.Circuit)
			}
			v, bound := pair(c.Size.Area, limit)
			if system == catalogue.AWG {
				v, bound = c.Size.String(), use.Gauge+" AWG"
			}
			report(Finding{
				Severity: Stop, Subject: c.Number, At: c.At,
				Message: fmt.Sprintf("%s: %s, least %s for a %s", subject, v, bound, use.Use),
				Remedy:  fmt.Sprintf("%s or thicker.", bound),
				Value:   float64(c.Size.Area), Limit: float64(limit), Unit: "mm²", Over: true,
				Source: use.Evidence.String(),
			})
		}
	},
}
