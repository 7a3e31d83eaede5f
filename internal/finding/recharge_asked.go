package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// longestRecharge is the time in which emergency lighting must be ready again:
// IEC 60598-2-22 clause 22.19, from memory.
const longestRecharge quantity.Second = 24 * quantity.SecondsPerHour

// rechargeAsked warns of a recharge longer than a day.
var rechargeAsked = &Check{
	Name:  "recharge-asked",
	Title: "recharge longer than a day",
	Doc: "A system that takes more than 24 h to fill is not ready when the mains fails again the next evening. " +
		"Standards for emergency lighting ask for 24 h.",
	Source: "IEC 60598-2-22 clause 22.19 (from memory)",
	Run: func(f *facts.Facts, report func(Finding)) {
		asked := f.Site.Duty.Recharge
		if !over(asked.Val, longestRecharge) {
			return
		}
		v, bound := pair(asked.Val, longestRecharge)
		report(Finding{
			Severity: Caution, Subject: "duty.recharge", At: asked.Pos,
			Message: fmt.Sprintf("Recharge: %s asked, limit %s", v, bound),
			Remedy:  fmt.Sprintf("duty.recharge of %s.", bound),
			Value:   asked.Val.Hours(), Limit: longestRecharge.Hours(), Unit: "h",
		})
	},
}
