package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// overloadFactor is the share of its ampacity that a cable stands for the conventional
// time: IEC 60364-4-43 clause 433.1, I2 ≤ 1.45 Iz.
const overloadFactor = 1.45

// fuseOverload holds the fuse's conventional operating current against the cable.
var fuseOverload = &Check{
	Name:  "fuse-overload",
	Title: "fuse opens too late on overload",
	Doc: "A fuse opens for sure only well above its rating. That current (I2) must not exceed 1.45 times what the cable carries. " +
		"Fuses that open late, such as cartridges at 2.1 times their rating, need a thicker cable for the same rating.",
	Source: "IEC 60364-4-43 clause 433.1 (I2 ≤ 1.45 Iz)",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, x := range f.Fuses {
			if x.Class == nil || x.CableAmpacity <= 0 {
				continue
			}
			i2 := x.Rating * quantity.Ampere(x.Class.Conventional)
			limit := overloadFactor * x.CableAmpacity
			if !over(i2, limit) {
				continue
			}
			v, bound := pair(i2, limit)
			report(Finding{
				Severity: Stop, Subject: x.Part.Designation, At: x.Part.At,
				Message: fmt.Sprintf("%s: opens for sure from %s, its %s cable stands %s", fuseTitle(x), v, x.CableSize, bound),
				Remedy:  fmt.Sprintf("A fuse of at most %s of this kind.", sayDown(x.Rating*limit/i2)),
				Value:   float64(i2), Limit: float64(limit), Unit: "A",
			})
		}
	},
}
