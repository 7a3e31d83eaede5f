package finding

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// Float life of lead-acid batteries: stated at lifeReference, halved by each lifeHalving
// above it (common practice; a charging note read).
const (
	lifeReference quantity.Celsius = 20
	lifeHalving   quantity.Celsius = 10
	warmFrom      quantity.Celsius = 30
)

// batteryWarm warns of a battery room that shortens the battery's life.
var batteryWarm = &Check{
	Name:  "battery-warm",
	Title: "warm battery room shortens the battery's life",
	Doc: "Float life of a lead-acid battery halves for every 10 K above 20 °C. A room that goes above 30 °C should be aired " +
		"or the battery moved; else plan on earlier replacement.",
	Source: "common practice: life halves for each 10 K",
	Run: func(f *facts.Facts, report func(Finding)) {
		c := classOf(f)
		if c == nil || c.Family != catalogue.LeadAcid {
			return
		}
		room := f.Site.Duty.BatteryRoom
		if !over(room.Val.High, warmFrom) {
			return
		}
		v, bound := pair(room.Val.High, warmFrom)
		share := quantity.Ratio(math.Pow(2, -float64((room.Val.High-lifeReference)/lifeHalving)))
		report(Finding{
			Severity: Caution, Subject: f.Battery.Part.Designation, At: room.Pos,
			Message: fmt.Sprintf("%s: battery room up to %s, limit %s", title(f.Battery.Part.Designation, f.Battery.ClassName), v, bound),
			Remedy:  fmt.Sprintf("Air the room; a battery that always stands at %s keeps %s of its life at %s.", v, quantity.Format(share, 2), say(lifeReference)),
			Value:   float64(room.Val.High), Limit: float64(warmFrom), Unit: "°C",
		})
	},
}
