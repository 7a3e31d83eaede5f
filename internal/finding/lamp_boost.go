package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// litWithMains reports whether a circuit can be lit while mains is on.
func litWithMains(f *facts.Facts, circuit string) bool {
	for _, r := range f.Function {
		if r.Circuit == circuit {
			return r.Asked == "night" || r.Asked == "always"
		}
	}
	return false
}

// lampBoost compares the lamps' range with the highest charging voltage.
var lampBoost = &Check{
	Name:  "lamp-boost",
	Title: "boost voltage above a lamp's working range",
	Doc: "A lamp that is lit while mains is on gets the boost voltage " +
		"at the coldest battery room. Where its range ends below that, keep lamps off while boosting, or take other lamps.",
	Source: "common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		boost := boostAtColdest(f)
		seen := map[string]bool{}
		for _, l := range f.Luminaires {
			if !litWithMains(f, l.Circuit) || l.Works.High <= 0 || seen[l.Type] || !over(boost, l.Works.High) {
				continue
			}
			seen[l.Type] = true
			v, bound := pair(boost, l.Works.High)
			report(Finding{
				Severity: Caution, Subject: l.Type, At: l.Part.At,
				Message: fmt.Sprintf("%s, first at %s: boost at %s is %s, the lamp works to %s", l.Type, l.Part.Designation,
					say[quantity.Celsius](f.Site.Duty.BatteryRoom.Val.Low), v, bound),
				Remedy: fmt.Sprintf("A lamp that works to %s, or a boost setting lower by %s.", sayUp(boost), sayUp(boost-l.Works.High)),
				Value:  float64(boost), Limit: float64(l.Works.High), Unit: "V",
			})
		}
	},
}
