package finding

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/facts"
)

// extraLowVoltage keeps the highest voltage of the system below the extra-low limit.
var extraLowVoltage = &Check{
	Name:   "extra-low-voltage",
	Title:  "voltage above the extra-low limit",
	Doc:    "The highest voltage, boost at the coldest battery room included, must not exceed 60 V DC; above it bare parts need protection against shock, which this system does not have. Take fewer cells.",
	Source: "IEC 61140 (60 V DC, ripple-free)",
	Run: func(f *facts.Facts, report func(Finding)) {
		top, when := highest(f)
		if !over(top, catalogue.ExtraLow) {
			return
		}
		v, bound := pair(top, catalogue.ExtraLow)
		x := Finding{
			Severity: Stop, Subject: designation(f.Battery.Part, "duty.nominal"), At: f.Site.Duty.Nominal.Pos,
			Message: fmt.Sprintf("%s: %s in %s, limit %s", designation(f.Battery.Part, "System"), v, when, bound),
			Remedy:  fmt.Sprintf("A nominal voltage of at most %s.", sayDown(f.Site.Duty.Nominal.Val*catalogue.ExtraLow/top)),
			Value:   float64(top), Limit: float64(catalogue.ExtraLow), Unit: "V",
		}
		if n := f.Battery.Series; n > 0 {
			x.Remedy = fmt.Sprintf("At most %d cells in series.", int(float64(catalogue.ExtraLow/top)*float64(n)))
		}
		report(x)
	},
}
