package finding

import (
	"fmt"
	"strings"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// mostBlade is the greatest lasting current of a plug-in blade holder: its springs warm
// up above it (common practice, no source).
const mostBlade quantity.Ampere = 30

// fuseBlade warns of blade fuses that carry a large current.
var fuseBlade = &Check{
	Name:   "fuse-blade",
	Title:  "large lasting current through a blade holder",
	Doc:    "The spring contacts of plug-in blade holders warm up on large lasting currents and lose their force. Above 30 A take a bolted fuse.",
	Source: "common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, x := range f.Fuses {
			if !strings.HasPrefix(strings.ToLower(x.Style), "blade") || !over(x.Design, mostBlade) {
				continue
			}
			v, bound := pair(x.Design, mostBlade)
			report(Finding{
				Severity: Caution, Subject: x.Part.Designation, At: x.Part.At,
				Message: fmt.Sprintf("%s: %s through a blade holder, limit %s", fuseTitle(x), v, bound),
				Remedy:  fmt.Sprintf("A bolted fuse of %s.", say(x.Rating)),
				Value:   float64(x.Design), Limit: float64(mostBlade), Unit: "A",
			})
		}
	},
}
