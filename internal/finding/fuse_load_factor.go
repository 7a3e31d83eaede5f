package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// fuseLoadFactor holds the design current against the share of the rating that the
// firm allows for lasting load.
var fuseLoadFactor = &Check{
	Name:  "fuse-load-factor",
	Title: "fuse loaded above the load factor",
	Doc: "A fuse that carries nearly its rating for hours in a warm box ages and opens without a fault. The lasting load should stay below " +
		"practice.load_factor of the rating. Take the next rating, and a cable that it protects.",
	Source: "practice.load_factor; common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		limit := quantity.Ratio(loadFactor(f))
		for _, x := range f.Fuses {
			if x.Rating <= 0 || over(x.Design, x.Rating) {
				continue
			}
			share := quantity.Ratio(x.Design / x.Rating)
			if !over(share, limit) {
				continue
			}
			v, bound := pair(share, limit)
			report(Finding{
				Severity: Caution, Subject: x.Part.Designation, At: x.Part.At,
				Message: fmt.Sprintf("%s: load %s, %s of its rating, limit %s", fuseTitle(x), say(x.Design), v, bound),
				Remedy:  fmt.Sprintf("%s for this load; its cable carries %s.", nextFuse(f, x), sayDown(x.CableAmpacity)),
				Value:   percent(share), Limit: percent(limit), Unit: "%",
			})
		}
	},
}
