package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestSupplyIdle(t *testing.T) {
	run(t, supplyIdle, []limitCase{
		{"just used", func(f *facts.Facts) { f.Supplies[0].Current = 1e-4 }, nil},
		{"idle", func(f *facts.Facts) { f.Supplies[0].Current = 0.9e-4 }, []string{
			"caution -T2: -T2, supply: gives 90 µA in every condition | Name it as coil of the changeover, or leave it out; it is rated 500 mA.",
		}},
		{"no supply", func(f *facts.Facts) { f.Supplies = nil }, nil},
	})
}
