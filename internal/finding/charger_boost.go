package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// boostSlack is how far a boost setting may pass the class's figure: the accuracy of a
// packaged charger and of the figure itself (common practice, no source).
const boostSlack quantity.Ratio = 0.02

// chargerBoost compares the boost setting with the class's figure.
var chargerBoost = &Check{
	Name:  "charger-boost",
	Title: "boost voltage above the class's figure",
	Doc: "Boost more than 2 % above the figure of the battery class makes sealed cells vent and lithium cells open their protection. " +
		"Set it lower, or state a class that takes it.",
	Source: "boost voltage of the battery class; 2 %: common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		class, c := classOf(f), f.Charger
		if class == nil || c.Part == nil {
			return
		}
		right := whole(f, class.Boost)
		limit := right * quantity.Volt(1+boostSlack)
		if !over(c.Boost, limit) {
			return
		}
		v, bound := pair(c.Boost, limit)
		report(Finding{
			Severity: Stop, Subject: c.Part.Designation, At: c.Part.At,
			Message: fmt.Sprintf("%s: boost %s at %s, limit %s", title(c.Part.Designation, "charger"), v, say(class.ChargeAt), bound),
			Remedy:  fmt.Sprintf("Set %s.", quantity.Fixed(right, 2)),
			Value:   float64(c.Boost), Limit: float64(limit), Unit: "V",
			Source: class.ChargeEvi.String(),
		})
	},
}
