package finding

import (
	"fmt"
	"slices"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// fuseStandard finds ratings that no class of fuse has.
var fuseStandard = &Check{
	Name:   "fuse-standard",
	Title:  "fuse rating that is not made",
	Doc:    "A rating that the class of fuse does not list cannot be bought. Take the next one down where the load allows it, else the next one up and a cable that it protects.",
	Source: "ratings of ISO 8820-3, IEC 60127 and the other classes of fuse",
	Run: func(f *facts.Facts, report func(Finding)) {
		var all []quantity.Ampere
		for _, c := range catalogue.FuseClasses() {
			all = append(all, c.Ratings...)
		}
		slices.Sort(all)
		for _, x := range f.Fuses {
			if spare(x) {
				continue
			}
			below, above := quantity.Ampere(0), quantity.Ampere(0)
			made := false
			list := all
			if x.Class != nil {
				list = x.Class.Ratings
			}
			for _, r := range list {
				switch {
				case !under(r, x.Rating) && !over(r, x.Rating):
					made = true
				case r < x.Rating:
					below = r
				case above == 0:
					above = r
				}
			}
			if made {
				continue
			}
			nearest := say(above)
			switch {
			case above == 0:
				nearest = say(below)
			case below > 0:
				nearest = say(below) + " or " + say(above)
			}
			report(Finding{
				Severity: Stop, Subject: x.Part.Designation, At: x.Part.At,
				Message: fmt.Sprintf("%s: rating %s is not made", fuseTitle(x), say(x.Rating)),
				Remedy:  fmt.Sprintf("%s for the load of %s.", nearest, say(x.Design)),
				Value:   float64(x.Rating), Limit: float64(max(below, above)), Unit: "A",
			})
		}
	},
}
