package finding

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// fuseFarEnd looks whether a short at the far end opens the fuse in time.
var fuseFarEnd = &Check{
	Name:  "fuse-far-end",
	Title: "short at the far end does not open the fuse in time",
	Doc: "A short at the farthest lamp, with the battery at the end of discharge, must draw enough current to open the fuse within " +
		"practice.clear_within; else the cable smoulders and the battery runs flat. A lower rating, a thicker or a shorter cable help.",
	Source: "practice.clear_within; IEC 60364-4-43 clause 434.5.2; gate limits of the fuse's standard",
	Run: func(f *facts.Facts, report func(Finding)) {
		within := f.Site.Practice.ClearWithin.Val
		for _, x := range f.Fuses {
			if x.FarEnd <= 0 || x.Opens && !over(x.OpensWithin, within) {
				continue
			}
			found := Finding{
				Severity: Stop, Subject: x.Part.Designation, At: x.Part.At,
				Remedy: farEndRemedy(x, within),
				Value:  float64(x.OpensWithin), Limit: float64(within), Unit: "s",
			}
			if x.Opens {
				v, bound := pair(x.OpensWithin, within)
				found.Message = fmt.Sprintf("%s: %s at the far end opens it within %s, limit %s", fuseTitle(x), say(x.FarEnd), v, bound)
			} else {
				found.Message = fmt.Sprintf("%s: %s at the far end does not surely open it, limit %s", fuseTitle(x), say(x.FarEnd), say(within))
			}
			report(found)
		}
	},
}

// farEndRemedy names the greatest rating of the same class that opens in time and still
// carries the load, and the share of the loop's resistance at which the present one would.
func farEndRemedy(x *facts.Fuse, within quantity.Second) string {
	need, ok := opensFrom(x, x.Rating, within)
	if !ok {
		return fmt.Sprintf("A fuse with published times that opens on %s within %s.", say(x.FarEnd), say(within))
	}
	remedy := fmt.Sprintf("It takes %s: a loop of at most %s of its resistance", sayUp(need), sayDown(quantity.Ratio(x.FarEnd/need)))
	for i := len(x.Class.Ratings) - 1; i >= 0; i-- {
		r := x.Class.Ratings[i]
		if a, ok := opensFrom(x, r, within); ok && r < x.Rating && !over(a, x.FarEnd) && !under(r, x.Design) {
			remedy += fmt.Sprintf(", or %s, which opens on %s", say(r), sayUp(a))
			break
		}
	}
	return remedy + "."
}
