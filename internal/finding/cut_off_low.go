package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// cutOffLow finds a cut-off that opens only when the battery is already harmed.
var cutOffLow = &Check{
	Name:  "cut-off-low",
	Title: "cut-off opens below the battery's end voltage",
	Doc: "The cut-off must open before the cells are discharged below the end voltage of their class: what lies below costs life, and below the class's " +
		"lowest voltage the battery can be lost. Raise the opening voltage.",
	Source: "end voltages of the battery class",
	Run: func(f *facts.Facts, report func(Finding)) {
		class, c := classOf(f), f.CutOff
		if class == nil || c == nil {
			return
		}
		opens := c.Opens
		if c.AtBattery > 0 {
			opens = c.AtBattery
		}
		limit, severity := whole(f, class.EndVolt), Caution
		if lowest := whole(f, class.LowestEnd); under(opens, lowest) {
			limit, severity = lowest, Stop
		} else if !under(opens, limit) {
			return
		}
		v, bound := pair(opens, limit)
		report(Finding{
			Severity: severity, Subject: c.Part.Designation, At: c.Part.At,
			Message: fmt.Sprintf("%s: opens with the battery at %s, least %s", title(c.Part.Designation, "cut-off"), v, bound),
			Remedy:  fmt.Sprintf("Set %s.", sayUp(max(whole(f, class.Opens), whole(f, class.EndVolt)))),
			Value:   float64(opens), Limit: float64(limit), Unit: "V", Over: true,
			Source: class.Evidence.String(),
		})
	},
}
