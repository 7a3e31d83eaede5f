package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestChargerCurrent(t *testing.T) {
	run(t, chargerCurrent, []limitCase{
		{"exactly enough", func(f *facts.Facts) { f.Charger.Current = 2.4 }, nil},
		{"just too weak", func(f *facts.Facts) { f.Charger.Current = 2.39 }, []string{
			"stop -T1: -T1, charger: gives 2.39 A, required 2.4 A | A charger of at least 2.4 A; the battery allows 8.25 A.",
		}},
	})
}
