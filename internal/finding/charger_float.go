package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// chargerFloat compares the float setting with the class's band.
var chargerFloat = &Check{
	Name:  "charger-float",
	Title: "float voltage outside the class's band",
	Doc: "Too low a float voltage leaves the battery half empty and its plates sulphated; too high a one dries it out. " +
		"The setting must lie in the band of the battery class.",
	Source: "float band of the battery class, see its charge figures",
	Run: func(f *facts.Facts, report func(Finding)) {
		class, c := classOf(f), f.Charger
		if class == nil || c.Part == nil || c.Float <= 0 {
			return
		}
		low, high := whole(f, class.FloatBand.Low), whole(f, class.FloatBand.High)
		limit := low
		below := under(c.Float, low)
		if !below {
			limit = high
			if !over(c.Float, high) {
				return
			}
		}
		v, _ := pair(c.Float, limit)
		report(Finding{
			Severity: Stop, Subject: c.Part.Designation, At: c.Part.At,
			Message: fmt.Sprintf("%s: float %s at %s, the class takes %s to %s", title(c.Part.Designation, "charger"), v,
				say(class.ChargeAt), quantity.Fixed(low, 2), quantity.Fixed(high, 2)),
			Remedy: fmt.Sprintf("Set %s.", quantity.Fixed(whole(f, class.Float), 2)),
			Value:  float64(c.Float), Limit: float64(limit), Unit: "V", Over: below,
			Source: class.ChargeEvi.String(),
		})
	},
}
