package finding

import (
	"fmt"
	"strings"

	"gloamwright/internal/facts"
)

// lampOverdriven finds lamps that take more than their greatest lasting current.
var lampOverdriven = &Check{
	Name:  "lamp-overdriven",
	Title: "lamp over its greatest current",
	Doc: "An LED string at float or boost voltage must not take more than the greatest current that its type states, " +
		"in any condition. A larger series resistor or more LEDs in series bring it down.",
	Source: "the lamp type's current in the description; current from the solved circuit",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, l := range f.Luminaires {
			if l.Rated <= 0 {
				continue
			}
			worst := -1
			for i, a := range l.Amps {
				if over(a, l.Rated) && (worst < 0 || a > l.Amps[worst]) {
					worst = i
				}
			}
			if worst < 0 {
				continue
			}
			v, bound := pair(l.Amps[worst], l.Rated)
			report(Finding{
				Severity: Stop, Subject: l.Part.Designation, At: l.Part.At,
				Message: fmt.Sprintf("%s: takes %s in “%s”; limit %s",
					title(l.Part.Designation, l.Circuit), v, strings.ToLower(f.Conditions[worst].Name), bound),
				Remedy: fmt.Sprintf("A series resistor that takes up %s less current at %s.",
					sayUp(l.Amps[worst]-l.Rated), say(l.Volts[worst])),
				Value: float64(l.Amps[worst]), Limit: float64(l.Rated), Unit: "A",
			})
		}
	},
}
