package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// settled finds conditions in which a relay or switch never comes to rest.
var settled = &Check{
	Name:  "settled",
	Title: "a condition does not settle",
	Doc: "Relays, cut-off and comparator take a position by the voltages that their own switching changes. " +
		"Where no position agrees with its own voltages the contacts chatter and burn. Give the part more hysteresis or feed its coil from elsewhere.",
	Source: "solution of the network: positions and voltages must agree",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, c := range f.Conditions {
			if c.Settled {
				continue
			}
			report(Finding{
				Severity: Stop, Subject: c.Key,
				Message: fmt.Sprintf("Condition %d, %s: does not come to rest%s", c.Number, c.Name, toAndFro(c.Restless)),
				Remedy:  fmt.Sprintf("More distance between the switching voltages than the step when the load switches; the battery stands at %s here.", say(c.BatteryV)),
				Value:   0, Limit: 1, Unit: "settled", Over: true,
			})
		}
		for _, t := range f.Thresholds {
			if len(t.Restless) == 0 {
				continue
			}
			report(Finding{
				Severity: Stop, Subject: t.Restless[0],
				Message: fmt.Sprintf("Where %s: nothing comes to rest%s", t.Name, toAndFro(t.Restless)),
				Remedy:  fmt.Sprintf("More distance between the switching voltages than the step when the load of %s switches.", say(f.Totals.LoadA)),
				Value:   0, Limit: 1, Unit: "settled", Over: true,
			})
		}
	},
}

// toAndFro says which parts switch by turns.
func toAndFro(elements []string) string {
	switch len(elements) {
	case 0:
		return ""
	case 1:
		return ": " + elements[0] + " switches to and fro"
	}
	return ": " + names(elements) + " switch to and fro"
}
