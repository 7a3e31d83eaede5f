package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// oneCircuit remarks on a job whose lamps all hang on one fuse.
var oneCircuit = &Check{
	Name:   "one-circuit",
	Title:  "all lamps on one circuit",
	Doc:    "One open fuse or broken wire then leaves the whole site dark. Two circuits whose lamps alternate along the way leave half the light.",
	Source: "IEC 60364-5-56 clause 560.9 (alternate circuits, from memory)",
	Run: func(f *facts.Facts, report func(Finding)) {
		circuits := map[string]bool{}
		for _, l := range f.Luminaires {
			circuits[l.Circuit] = true
		}
		n := len(f.Luminaires)
		if len(circuits) != 1 || n < 2 {
			return
		}
		name := f.Luminaires[0].Circuit
		x := Finding{
			Severity: Note, Subject: name,
			Message: fmt.Sprintf("%s: all %d lamps on one circuit", name, n),
			Remedy:  fmt.Sprintf("2 circuits of %d lamps, alternating.", (n+1)/2),
			Value:   1, Limit: 2, Unit: "circuits", Over: true,
		}
		if l := lightingOf(f, name); l != nil {
			x.At = l.At
		}
		report(x)
	},
}
