package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// chargerLimit compares the charger's current with what the battery stands.
var chargerLimit = &Check{
	Name:   "charger-limit",
	Title:  "charger stronger than the battery allows",
	Doc:    "The charger's rated current must not exceed the highest charging current of the battery, or the cells overheat and gas. Take a smaller charger or a larger battery.",
	Source: "highest charging current of the battery class, see its charge figures",
	Run: func(f *facts.Facts, report func(Finding)) {
		c := f.Charger
		if c.Part == nil || c.Limit <= 0 || !over(c.Current, c.Limit) {
			return
		}
		v, bound := pair(c.Current, c.Limit)
		x := Finding{
			Severity: Stop, Subject: c.Part.Designation, At: c.Part.At,
			Message: fmt.Sprintf("%s: charges with %s, the battery allows %s", title(c.Part.Designation, "charger"), v, bound),
			Remedy:  fmt.Sprintf("A charger of at most %s; %s is needed.", sayDown(c.Limit), sayUp(c.Required)),
			Value:   float64(c.Current), Limit: float64(c.Limit), Unit: "A",
		}
		if class := classOf(f); class != nil {
			x.Source = class.ChargeEvi.String()
		}
		report(x)
	},
}
