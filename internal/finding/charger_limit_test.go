package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestChargerLimit(t *testing.T) {
	run(t, chargerLimit, []limitCase{
		{"on the limit", func(f *facts.Facts) { f.Charger.Current = 8.25 }, nil},
		{"just over it", func(f *facts.Facts) { f.Charger.Current = 8.3 }, []string{
			"stop -T1: -T1, charger: charges with 8.3 A, the battery allows 8.25 A | A charger of at most 8.25 A; 2.4 A is needed.",
		}},
	})
}
