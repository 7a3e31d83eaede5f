package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// blocked reports the sizing steps for which nothing fits.
var blocked = &Check{
	Name:   "blocked",
	Title:  "nothing fits",
	Doc:    "A sizing step found no product or size that meets all limits at once. The finding names the limit that blocks and the smallest change that frees it.",
	Source: "the limit's own source",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, b := range f.Blocked {
			unit := ""
			if b.Unit != "" {
				unit = " " + b.Unit
			}
			report(Finding{
				Severity: Stop, Subject: b.Subject, At: b.At,
				Message: fmt.Sprintf("%s: nothing fits; %s %s%s, limit %s%s", b.Subject, b.Limit, number(b.Figure), unit, number(b.Bound), unit),
				Remedy:  b.Remedy, Value: b.Figure, Limit: b.Bound, Unit: b.Unit, Source: b.Source,
			})
		}
	},
}
