package finding

import (
	"fmt"
	"strings"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// lampDim finds LED strings whose current falls too far as the battery empties.
var lampDim = &Check{
	Name:  "lamp-dim",
	Title: "LED string too dim",
	Doc: "An LED string with a resistor loses light as the voltage falls. In every condition in which it must be lit its current must " +
		"stay above the share of its greatest current that its type states (dimmest). Fewer LEDs in series, thicker cable or a driver help.",
	Source: "the lamp type's dimmest share; current from the solved circuit",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, l := range f.Luminaires {
			if l.Rated <= 0 || l.Dimmest <= 0 {
				continue
			}
			need := wanted(f, l.Circuit)
			worst := -1
			for i, a := range l.Amps {
				if need[i] && (worst < 0 || a < l.Amps[worst]) {
					worst = i
				}
			}
			if worst < 0 {
				continue
			}
			amps := max(0, l.Amps[worst]) // a dark string takes the solver's rounding
			if amps < darkAmps {
				amps = 0
			}
			share := quantity.Ratio(amps / l.Rated)
			if !under(share, l.Dimmest) {
				continue
			}
			v, bound := pair(share, l.Dimmest)
			report(Finding{
				Severity: Stop, Subject: l.Part.Designation, At: l.Part.At,
				Message: fmt.Sprintf("%s: %s of its greatest current in “%s”; least %s",
					title(l.Part.Designation, l.Circuit), v, strings.ToLower(f.Conditions[worst].Name), bound),
				Remedy: fmt.Sprintf("It takes %s at %s and must take %s: fewer LEDs in series, or a lamp with a driver.",
					say(amps), say(l.Volts[worst]), sayUp(quantity.Ampere(float64(l.Rated)*float64(l.Dimmest)))),
				Value: percent(share), Limit: percent(l.Dimmest), Unit: "%", Over: true,
			})
		}
	},
}

// darkAmps is a current at which no LED gives light that one can see: a hundredth of the
// least test current of indicator LEDs (common practice, no source).
const darkAmps quantity.Ampere = 1e-6
