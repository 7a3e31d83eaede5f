package finding

import (
	"fmt"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
)

// waysSpare remarks on boards without a free way.
var waysSpare = &Check{
	Name:   "ways-spare",
	Title:  "no spare way on a board",
	Doc:    "A board whose ways are all taken cannot take the lamp that is asked for next year. One way in five is usual.",
	Source: "common practice, no source",
	Run: func(f *facts.Facts, report func(Finding)) {
		for _, b := range f.Circuit.Boards {
			spare := 0
			for _, w := range b.Ways {
				if w.Spare() {
					spare++
				}
			}
			if spare > 0 || len(b.Ways) == 0 {
				continue
			}
			report(Finding{
				Severity: Note, Subject: b.Name, At: b.At,
				Message: fmt.Sprintf("%s: all %d ways taken", boardTitle(b), len(b.Ways)),
				Remedy:  fmt.Sprintf("%d ways.", len(b.Ways)+max(1, len(b.Ways)/waysForSpare)),
				Value:   0, Limit: 1, Unit: "ways", Over: true,
			})
		}
	},
}

// waysForSpare is how many used ways ask for a spare one (common practice, no source).
const waysForSpare = 4

func boardTitle(b *circuit.Board) string {
	if b.Title != "" {
		return b.Title
	}
	return b.Name
}
