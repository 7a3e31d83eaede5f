package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// cutOffRecloses finds a cut-off that the charger can never close again.
var cutOffRecloses = &Check{
	Name:  "cut-off-recloses",
	Title: "cut-off never recloses",
	Doc: "After it has opened, the cut-off closes when the battery's voltage reaches the reclosing voltage. If the float voltage in the hottest room " +
		"does not reach it, the lights stay off for good once the battery has been empty. Lower the reclosing voltage.",
	Source: "float setting and its temperature law",
	Run: func(f *facts.Facts, report func(Finding)) {
		c, g := f.CutOff, f.Charger
		if c == nil || g.Part == nil || g.Float <= 0 {
			return
		}
		room := f.Site.Duty.BatteryRoom.Val.High
		least := settingAt(f, g.Float, room)
		if under(c.Recloses, least) {
			return
		}
		v, bound := pair(c.Recloses, least)
		remedy := fmt.Sprintf("A reclosing voltage below %s.", bound)
		if class := classOf(f); class != nil {
			remedy = fmt.Sprintf("Set the reclosing voltage to %s.", say(whole(f, class.Recloses)))
		}
		report(Finding{
			Severity: Stop, Subject: c.Part.Designation, At: c.Part.At,
			Message: fmt.Sprintf("%s: recloses at %s, float at %s is %s", title(c.Part.Designation, "cut-off"), v, say(room), bound),
			Remedy:  remedy,
			Value:   float64(c.Recloses), Limit: float64(least), Unit: "V",
		})
	},
}
