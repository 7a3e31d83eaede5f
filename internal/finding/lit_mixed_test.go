package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestLitMixed(t *testing.T) {
	run(t, litMixed, []limitCase{
		{"another board may ask otherwise", func(f *facts.Facts) { f.Circuit.Boards[1].Ways[0].Lighting.Lit = "always" }, nil},
		{"two on one board", func(f *facts.Facts) { f.Circuit.Boards[0].Ways[1].Lighting.Lit = "always" }, []string{
			"caution main: Main board: its circuits ask for outage-night and always | 2 boards, one for each.",
		}},
	})
}
