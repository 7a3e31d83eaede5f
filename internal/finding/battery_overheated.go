package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// batteryOverheated compares the hottest battery room with what the class stands while
// it is charged.
var batteryOverheated = &Check{
	Name:  "battery-overheated",
	Title: "battery room hotter than the battery may be charged",
	Doc: "Above its highest charging temperature a battery can run away: it takes more current as it warms. " +
		"Cool or air the room, or place the battery elsewhere.",
	Source: "highest charging temperature of the battery class, see its charge figures",
	Run: func(f *facts.Facts, report func(Finding)) {
		c := classOf(f)
		if c == nil {
			return
		}
		room := f.Site.Duty.BatteryRoom
		if !over(room.Val.High, c.ChargeHighest) {
			return
		}
		v, bound := pair(room.Val.High, c.ChargeHighest)
		report(Finding{
			Severity: Stop, Subject: f.Battery.Part.Designation, At: room.Pos,
			Message: fmt.Sprintf("%s: battery room up to %s, charging allowed to %s", title(f.Battery.Part.Designation, f.Battery.ClassName), v, bound),
			Remedy:  fmt.Sprintf("A room that stays at %s or below.", bound),
			Value:   float64(room.Val.High), Limit: float64(c.ChargeHighest), Unit: "°C",
			Source: c.ChargeEvi.String(),
		})
	},
}
