package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// conductorAmpacity holds every conductor's highest current against what it carries.
var conductorAmpacity = &Check{
	Name:   "conductor-ampacity",
	Title:  "conductor carries more than it may",
	Doc:    "The highest current of every conductor over all conditions must not exceed its ampacity at the ambient temperature and grouping. Take the next size.",
	Source: "IEC 60364-5-52 clause 523 or the gauge tables of NFPA 70",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, o := range f.Conductors {
			c := o.Conductor
			if o.Ampacity <= 0 || !over(o.Current, o.Ampacity) {
				continue
			}
			v, bound := pair(o.Current, o.Ampacity)
			remedy := fmt.Sprintf("A size that carries %s.", sayUp(o.Current))
			for _, s := range thicker(f, c.Size) {
				if a, ok := carries(f, o.Ampacity, c.Size, s); ok && !under(a, o.Current) {
					remedy = fmt.Sprintf("%s carries %s.", s, sayDown(a))
					break
				}
			}
			report(Finding{
				Severity: Stop, Subject: c.Number, At: c.At,
				Message: fmt.Sprintf("Wire %s, %s to %s: carries %s, %s is good for %s", c.Number, c.From, c.To, v, c.Size, bound),
				Remedy:  remedy,
				Value:   float64(o.Current), Limit: float64(o.Ampacity), Unit: "A",
			})
		}
	},
}
