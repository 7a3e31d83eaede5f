package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// batteryCapacity compares the battery's capacity with what the duty asks for.
var batteryCapacity = &Check{
	Name:  "battery-capacity",
	Title: "battery smaller than required",
	Doc: "The rated capacity must reach what the sectional method asks for the load cycle at the coldest battery room, " +
		"at the end of the battery's life, with the design margin. Take a larger battery or leave the capacity out so that it is sized.",
	Source: "IEEE 485 clause 6 (lead-acid), IEEE 1115 clause 6 (nickel-cadmium)",
	Run: func(f *facts.Facts, report func(Finding)) {
		b := f.Battery
		if b.Part == nil || !under(b.Capacity, b.Required) {
			return
		}
		v, bound := pair(b.Capacity, b.Required)
		report(Finding{
			Severity: Stop, Subject: b.Part.Designation, At: b.Part.At,
			Message: fmt.Sprintf("%s: capacity %s, required %s", title(b.Part.Designation, b.ClassName), v, bound),
			Remedy:  fmt.Sprintf("%s more, or an outage shorter than %s.", sayUp(b.Required-b.Capacity), say(f.Site.Duty.Outage.Val)),
			Value:   float64(b.Capacity), Limit: float64(b.Required), Unit: "Ah", Over: true,
		})
	},
}
