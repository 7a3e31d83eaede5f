package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// fuseLoad holds the design current against the rating.
var fuseLoad = &Check{
	Name:   "fuse-load",
	Title:  "fuse rated below its load",
	Doc:    "The current that the fuse carries for long must not exceed its rating (IB ≤ In), or it opens in service. Take the next rating, and a cable that it protects.",
	Source: "IEC 60364-4-43 clause 433.1",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, x := range f.Fuses {
			if !over(x.Design, x.Rating) {
				continue
			}
			v, bound := pair(x.Design, x.Rating)
			report(Finding{
				Severity: Stop, Subject: x.Part.Designation, At: x.Part.At,
				Message: fmt.Sprintf("%s: load %s, rating %s", fuseTitle(x), v, bound),
				Remedy:  fmt.Sprintf("%s for this load; its cable carries %s.", nextFuse(f, x), sayDown(x.CableAmpacity)),
				Value:   float64(x.Design), Limit: float64(x.Rating), Unit: "A",
			})
		}
	},
}

// loadFactor returns practice.load_factor; 1 where none is set.
func loadFactor(f *facts.Facts) float64 {
	if v := float64(f.Site.Practice.LoadFactor.Val); v > 0 {
		return v
	}
	return 1
}
