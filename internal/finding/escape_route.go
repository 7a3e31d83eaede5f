package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// escapeRoute says once what this system is not.
var escapeRoute = &Check{
	Name:  "escape-route",
	Title: "not escape-route lighting",
	Doc: "Standby lighting lets people go on and find their way. Escape-route lighting that a code demands needs listed equipment, monitored circuits, " +
		"tested light levels and an approved designer; this system does not stand in for it. Where people sleep, ask the authority first.",
	Source: "EN 1838, IEC 60364-5-56; local codes prevail",
	Run: func(f *facts.Facts, report func(Finding)) {
		n := len(f.Luminaires)
		if n == 0 {
			return
		}
		report(Finding{
			Severity: Caution, Subject: f.Site.Job.Number.Val, At: f.Site.Job.Title.Pos,
			Message: fmt.Sprintf("%s: standby lighting, not escape-route lighting", count(n, "lamp")),
			Remedy:  "Where a code demands lit escape routes: listed equipment and an approved designer.",
			Value:   float64(n), Unit: "lamps",
		})
	},
}
