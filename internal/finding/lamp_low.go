package finding

import (
	"fmt"
	"strings"

	"gloamwright/internal/facts"
)

// lampLow finds lamps that get less than their working voltage while they must be lit.
var lampLow = &Check{
	Name:  "lamp-low",
	Title: "lamp below its working voltage",
	Doc: "In every condition in which a circuit must be lit, every lamp of it must get at least the low end of its working range, " +
		"or it dims, flickers or goes out. Raise the end of discharge, take thicker cable or another lamp.",
	Source: "the lamp's working range in the description; voltages from the solved circuit",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, l := range f.Luminaires {
			low := l.Works.Low
			need := wanted(f, l.Circuit)
			worst := -1
			for i, v := range l.Volts {
				if need[i] && v > 0 && under(v, low) && (worst < 0 || v < l.Volts[worst]) {
					worst = i
				}
			}
			if low <= 0 || worst < 0 {
				continue
			}
			v, bound := pair(l.Volts[worst], low)
			report(Finding{
				Severity: Stop, Subject: l.Part.Designation, At: l.Part.At,
				Message: fmt.Sprintf("%s: %s at the lamp in “%s”; it works from %s",
					title(l.Part.Designation, l.Circuit), v, strings.ToLower(f.Conditions[worst].Name), bound),
				Remedy: fmt.Sprintf("The way from the battery must lose %s less, or the lamp must work from %s.",
					sayUp(low-l.Volts[worst]), sayDown(l.Volts[worst])),
				Value: float64(l.Volts[worst]), Limit: float64(low), Unit: "V", Over: true,
			})
		}
	},
}
