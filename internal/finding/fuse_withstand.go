package finding

import (
	"fmt"
	"math"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// fuseWithstand holds the opening time against the time that the cable stands the
// current without heat leaving it.
var fuseWithstand = &Check{
	Name:  "fuse-withstand",
	Title: "cable overheats before the fuse opens",
	Doc: "While the fuse opens, the whole heat of the short stays in the copper. The time t = k²S²/I² in which the insulation reaches its limit " +
		"must not be shorter than the fuse's opening time.",
	Source: "IEC 60364-4-43 clause 434.5.2 (k²S² ≥ I²t)",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, x := range f.Fuses {
			if !x.Opens || x.Withstand <= 0 || !over(x.OpensWithin, x.Withstand) {
				continue
			}
			v, bound := pair(x.OpensWithin, x.Withstand)
			// t rises with the square of the area at the same current.
			least := float64(x.CableSize.Area) * math.Sqrt(float64(x.OpensWithin/x.Withstand))
			remedy := fmt.Sprintf("A cable of at least %s.", sayUp(quantity.SquareMM(least)))
			for _, s := range thicker(f, x.CableSize) {
				times := float64(s.Area / x.CableSize.Area)
				if longer := quantity.Second(float64(x.Withstand) * times * times); !under(longer, x.OpensWithin) {
					remedy = fmt.Sprintf("%s stands this current for %s.", s, sayDown(longer))
					break
				}
			}
			report(Finding{
				Severity: Stop, Subject: x.Part.Designation, At: x.Part.At,
				Message: fmt.Sprintf("%s: %s opens it within %s, its %s cable stands that for %s", fuseTitle(x), say(x.FarEnd), v, x.CableSize, bound),
				Remedy:  remedy,
				Value:   float64(x.OpensWithin), Limit: float64(x.Withstand), Unit: "s",
			})
		}
	},
}
