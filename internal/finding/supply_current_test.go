package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestSupplyCurrent(t *testing.T) {
	run(t, supplyCurrent, []limitCase{
		{"on its rating", func(f *facts.Facts) { f.Supplies[0].Current = 0.5 }, nil},
		{"just over", func(f *facts.Facts) { f.Supplies[0].Current = 0.51 }, []string{
			"stop -T2: -T2, supply: gives 510 mA, rated 500 mA | A supply rated 800 mA or more.",
		}},
		{"no supply", func(f *facts.Facts) { f.Supplies = nil }, nil},
	})
}
