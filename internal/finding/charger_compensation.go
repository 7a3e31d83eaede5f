package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// mostFloatError is how far a fixed float voltage may lie from the right one, for each
// cell: ten kelvins at 3 mV (common practice, no source).
const mostFloatError quantity.Volt = 0.03

// chargerCompensation finds a fixed charge voltage in a room of changing temperature.
var chargerCompensation = &Check{
	Name:  "charger-compensation",
	Title: "charge voltage does not follow the temperature",
	Doc: "The right float voltage falls as the battery warms. Without a probe at the battery a room that changes much overcharges it in summer " +
		"and leaves it empty in winter: more than 30 mV a cell off at either end. Take a charger with a probe.",
	Source: "temperature law of the battery class; 30 mV a cell: common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		class, c := classOf(f), f.Charger
		if class == nil || c.Part == nil || c.Compensated || c.Float <= 0 || f.Battery.Series <= 0 {
			return
		}
		room := f.Site.Duty.BatteryRoom
		limit := whole(f, mostFloatError)
		t, off := room.Val.High, c.Float-floatAt(f, class, room.Val.High)
		if cold := floatAt(f, class, room.Val.Low) - c.Float; cold > off {
			t, off = room.Val.Low, cold
		}
		if !over(off, limit) {
			return
		}
		v, bound := pair(off, limit)
		report(Finding{
			Severity: Caution, Subject: c.Part.Designation, At: c.Part.At,
			Message: fmt.Sprintf("%s: float %s fixed, %s off at %s, limit %s", title(c.Part.Designation, "charger"),
				quantity.Fixed(c.Float, 2), v, say(t), bound),
			Remedy: fmt.Sprintf("A charger with a probe at the battery: %s at %s, %s at %s.",
				quantity.Fixed(floatAt(f, class, room.Val.Low), 2), say(room.Val.Low),
				quantity.Fixed(floatAt(f, class, room.Val.High), 2), say(room.Val.High)),
			Value: float64(off), Limit: float64(limit), Unit: "V",
		})
	},
}
