package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// fuseDiscrimination looks whether a fault opens the nearest fuse alone.
var fuseDiscrimination = &Check{
	Name:  "fuse-discrimination",
	Title: "a fault can open the fuse before as well",
	Doc: "A short right behind a fuse should open that fuse alone, or lights of other circuits go out with it. The gates of the two fuses promise that " +
		"only up to a current; above it both may open. A larger step between the two ratings raises it. One finding for each fuse that may open too.",
	Source: "IEC 60364-5-53 clause 536; gate limits of the fuses' standards",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, up := range f.Fuses {
			var worst *facts.Fuse
			n := 0
			for _, x := range f.Fuses {
				if x.Before != up || spare(x) || !under(x.DiscriminatesTo, x.Prospective) {
					continue
				}
				n++
				if worst == nil || x.DiscriminatesTo < worst.DiscriminatesTo {
					worst = x
				}
			}
			if worst == nil {
				continue
			}
			v, bound := pair(worst.DiscriminatesTo, worst.Prospective)
			more := ""
			if n > 1 {
				more = "; " + count(n-1, "fuse") + " more likewise"
			}
			from := "above " + v
			if worst.DiscriminatesTo <= 0 {
				from = "at any current"
			}
			report(Finding{
				Severity: Caution, Subject: up.Part.Designation, At: up.Part.At,
				Message: fmt.Sprintf("%s: a short behind %s may open both %s, %s can flow%s", fuseTitle(up), worst.Part.Designation, from, bound, more),
				Remedy: fmt.Sprintf("A larger step between the ratings than %s to %s; after such a fault look at both fuses.",
					say(worst.Rating), say(up.Rating)),
				Value: float64(worst.DiscriminatesTo), Limit: float64(worst.Prospective), Unit: "A", Over: true,
			})
		}
	},
}
