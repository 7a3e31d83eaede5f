package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestEscapeRoute(t *testing.T) {
	run(t, escapeRoute, []limitCase{
		{"always, once", nil, []string{
			"caution T-1: 4 lamps: standby lighting, not escape-route lighting | Where a code demands lit escape routes: listed equipment and an approved designer.",
		}},
		{"no lamps", func(f *facts.Facts) { f.Luminaires = nil }, nil},
	})
}
