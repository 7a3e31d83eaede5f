package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// rechargeTime compares how long the recharge takes with what is asked.
var rechargeTime = &Check{
	Name:  "recharge-time",
	Title: "battery not full again in time",
	Doc: "After the outage asked for, the simulated recharge with the standing load taken off must fill the battery within duty.recharge. " +
		"Take a charger of more current, as far as the battery allows it.",
	Source: "duty.recharge; simulated recharge",
	Run: func(f *facts.Facts, report func(Finding)) {
		asked := f.Site.Duty.Recharge
		simulated := false
		for _, r := range f.Endurance.Runs {
			simulated = simulated || r.Recharge
		}
		if f.Charger.Part == nil || !simulated {
			return
		}
		got := f.Endurance.Recharge
		x := Finding{
			Severity: Stop, Subject: f.Charger.Part.Designation, At: f.Charger.Part.At,
			Value: got.Hours(), Limit: asked.Val.Hours(), Unit: "h",
			Remedy: fmt.Sprintf("A charger of at least %s; the battery stands %s.", sayUp(f.Charger.Required), sayDown(f.Charger.Limit)),
		}
		switch {
		case got <= 0:
			x.Message = fmt.Sprintf("%s: battery never full again, asked within %s", title(f.Charger.Part.Designation, "charger"), say(asked.Val))
		case over(got, asked.Val):
			v, bound := pair(got, asked.Val)
			x.Message = fmt.Sprintf("%s: battery full again after %s, asked within %s", title(f.Charger.Part.Designation, "charger"), v, bound)
			need := quantity.Ampere(float64(f.Charger.Current) * float64(got/asked.Val))
			x.Remedy = fmt.Sprintf("A charger of at least %s; the battery stands %s.", sayUp(max(need, f.Charger.Required)), sayDown(f.Charger.Limit))
		default:
			return
		}
		report(x)
	},
}
