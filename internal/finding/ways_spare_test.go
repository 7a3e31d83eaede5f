package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestWaysSpare(t *testing.T) {
	run(t, waysSpare, []limitCase{
		{"one spare", nil, nil},
		{"none", func(f *facts.Facts) { f.Circuit.Boards[1].Ways = f.Circuit.Boards[1].Ways[:1] }, []string{
			"note annex: Annex board: all 1 ways taken | 2 ways.",
		}},
	})
}
