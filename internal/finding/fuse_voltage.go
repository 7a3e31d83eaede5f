package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// fuseVoltage holds the fuses' DC voltage rating against the highest voltage.
var fuseVoltage = &Check{
	Name:   "fuse-voltage",
	Title:  "fuse rated below the system's voltage",
	Doc:    "An open fuse stands the whole battery voltage, boost at the coldest room included. Its DC voltage rating must reach that, or the arc does not go out.",
	Source: "IEC 60269-1, ISO 8820-3, IEC 60127: rated voltage of the fuse",
	Run: func(f *facts.Facts, report func(Finding)) {
		top, when := highest(f)
		for _, x := range f.Fuses {
			if x.BreakingVolt <= 0 || !over(top, x.BreakingVolt) {
				continue
			}
			v, bound := pair(top, x.BreakingVolt)
			report(Finding{
				Severity: Stop, Subject: x.Part.Designation, At: x.Part.At,
				Message: fmt.Sprintf("%s: rated %s DC, the system reaches %s in %s", fuseTitle(x), bound, v, when),
				Remedy:  fmt.Sprintf("A fuse rated %s DC or more.", sayUp(top)),
				Value:   float64(top), Limit: float64(x.BreakingVolt), Unit: "V",
			})
		}
	},
}
