package finding

import (
	"testing"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

func TestFeederDrop(t *testing.T) {
	run(t, feederDrop, []limitCase{
		{"on half", func(f *facts.Facts) { feeder(f, 1.8796) }, nil},
		{"just over half", func(f *facts.Facts) { feeder(f, 1.9) }, []string{
			"note -W3: -W3, Annex board: feeder loses 2.53 %, half the permitted drop is 2.5 % | 4 mm² loses 1.57 %.",
		}},
	})
}

// feeder sends a current through the annex board's feeder.
func feeder(f *facts.Facts, a quantity.Ampere) {
	for _, c := range f.Circuit.Boards[1].Feeder.Cores {
		outcome(f, c).Current = a
	}
}
