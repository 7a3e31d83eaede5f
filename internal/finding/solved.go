package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// mostResidual is the greatest current that may be left over at a node of a solution:
// 1 nA is a millionth of the smallest standing current of such a system.
const mostResidual = 1e-9

// solved finds conditions whose solution does not obey Kirchhoff's current law.
var solved = &Check{
	Name:  "solved",
	Title: "a condition is not solved exactly",
	Doc: "At every node of every solution the currents must add up to zero. Where they do not, no reading of that " +
		"condition can be trusted, and the documents must not be built from.",
	Source: "Kirchhoff's current law; limit 1 nA",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, c := range f.Conditions {
			if c.Residual <= mostResidual {
				continue
			}
			report(Finding{
				Severity: Stop, Subject: c.Key,
				Message: fmt.Sprintf("Condition %d, %s: %s left over at a node, limit %s", c.Number, c.Name,
					say(quantity.Ampere(c.Residual)), say(quantity.Ampere(mostResidual))),
				Remedy: fmt.Sprintf("Look for a lamp far below its working voltage in this condition; the battery stands at %s.", say(c.BatteryV)),
				Value:  c.Residual, Limit: mostResidual, Unit: "A",
			})
		}
	},
}
