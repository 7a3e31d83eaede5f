package finding

import (
	"fmt"

	"gloamwright/internal/facts"
)

// litMixed finds boards whose circuits ask for different hours.
var litMixed = &Check{
	Name:  "lit-mixed",
	Title: "one board, different lit",
	Doc: "All circuits of a board are switched together by what feeds it. Circuits that ask for different conditions " +
		"cannot all be right; they belong on boards of their own.",
	Source: "lit of the circuits; topology of the boards",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, b := range f.Circuit.Boards {
			var asked []string
			seen := map[string]bool{}
			for _, w := range b.Ways {
				if w.Lighting != nil && !seen[w.Lighting.Lit] {
					seen[w.Lighting.Lit] = true
					asked = append(asked, w.Lighting.Lit)
				}
			}
			if len(asked) < 2 {
				continue
			}
			report(Finding{
				Severity: Caution, Subject: b.Name, At: b.At,
				Message: fmt.Sprintf("%s: its circuits ask for %s", b.Title, names(asked)),
				Remedy:  fmt.Sprintf("%d boards, one for each.", len(asked)),
				Value:   float64(len(asked)), Limit: 1, Unit: "kinds of lit",
			})
		}
	},
}
