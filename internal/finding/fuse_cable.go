package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// fuseCable holds the rating against the ampacity of the cable behind the fuse.
var fuseCable = &Check{
	Name:   "fuse-cable",
	Title:  "fuse rated above its cable",
	Doc:    "The rating must not exceed what the thinnest cable behind the fuse carries at its ambient temperature and grouping (In ≤ Iz), or the cable overheats before the fuse opens.",
	Source: "IEC 60364-4-43 clause 433.1; ampacity of IEC 60364-5-52 or the gauge tables",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, x := range f.Fuses {
			if x.CableAmpacity <= 0 || !over(x.Rating, x.CableAmpacity) {
				continue
			}
			v, bound := pair(x.Rating, x.CableAmpacity)
			remedy := fmt.Sprintf("A fuse of at most %s; the load is %s.", sayDown(x.CableAmpacity), say(x.Design))
			for _, s := range thicker(f, x.CableSize) {
				if a, ok := carries(f, x.CableAmpacity, x.CableSize, s); ok && !under(a, x.Rating) {
					remedy = fmt.Sprintf("%s carries %s; or a fuse of at most %s for the load of %s.", s, sayDown(a), sayDown(x.CableAmpacity), say(x.Design))
					break
				}
			}
			report(Finding{
				Severity: Stop, Subject: x.Part.Designation, At: x.Part.At,
				Message: fmt.Sprintf("%s: rating %s, its %s cable carries %s", fuseTitle(x), v, x.CableSize, bound),
				Remedy:  remedy,
				Value:   float64(x.Rating), Limit: float64(x.CableAmpacity), Unit: "A",
			})
		}
	},
}
