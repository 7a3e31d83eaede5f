package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestVentilation(t *testing.T) {
	run(t, ventilation, []limitCase{
		{"none needed", func(f *facts.Facts) { f.Battery.Gas = true }, nil},
		{"some needed", func(f *facts.Facts) { f.Battery.Gas, f.Battery.Ventilation, f.Battery.OpeningCM2 = true, 0.158, 4.43 }, []string{
			"caution -G1: -G1, VRLA-AGM: needs 0.158 m³ of air an hour | Two openings of 4.43 cm² each, one low, one high, on opposite walls; never a sealed box.",
		}},
	})
}
