package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// oversizedFrom is how many times the required capacity a battery must have to be
// remarked on (common practice, no source).
const oversizedFrom quantity.Ratio = 2

// batteryOversized remarks on a battery far larger than the duty asks for.
var batteryOversized = &Check{
	Name:  "battery-oversized",
	Title: "battery far larger than required",
	Doc: "More than twice the required capacity costs money, weight and fault current, and takes a larger charger to refill. " +
		"It does no harm; it may be meant.",
	Source: "common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		b := f.Battery
		if b.Part == nil || b.Required <= 0 {
			return
		}
		times := quantity.Ratio(b.Capacity / b.Required)
		if !over(times, oversizedFrom) {
			return
		}
		report(Finding{
			Severity: Note, Subject: b.Part.Designation, At: b.Part.At,
			Message: fmt.Sprintf("%s: capacity %s, required %s", title(b.Part.Designation, b.ClassName), say(b.Capacity), say(b.Required)),
			Remedy:  fmt.Sprintf("%s is enough.", sayUp(b.Required)),
			Value:   float64(times), Limit: float64(oversizedFrom), Unit: "times",
		})
	},
}
