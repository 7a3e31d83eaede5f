package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// batteryCold compares the coldest battery room with what the class stands while it
// is charged.
var batteryCold = &Check{
	Name:  "battery-cold",
	Title: "battery room colder than the battery may be charged",
	Doc: "Lithium cells plate metal and can short inside when they are charged below 0 °C; other classes take no charge or freeze when empty. " +
		"Warm the room, choose another class, or a charger that waits for warmth.",
	Source: "lowest charging temperature of the battery class, see its charge figures",
	Run: func(f *facts.Facts, report func(Finding)) {
		c := classOf(f)
		if c == nil {
			return
		}
		room := f.Site.Duty.BatteryRoom
		if !under(room.Val.Low, c.ChargeLowest) {
			return
		}
		v, bound := pair(room.Val.Low, c.ChargeLowest)
		report(Finding{
			Severity: Stop, Subject: f.Battery.Part.Designation, At: room.Pos,
			Message: fmt.Sprintf("%s: battery room down to %s, charging allowed from %s", title(f.Battery.Part.Designation, f.Battery.ClassName), v, bound),
			Remedy:  fmt.Sprintf("A room kept at %s or above, or another class.", bound),
			Value:   float64(room.Val.Low), Limit: float64(c.ChargeLowest), Unit: "°C", Over: true,
			Source: c.ChargeEvi.String(),
		})
	},
}
