package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestStandingDays(t *testing.T) {
	run(t, standingDays, []limitCase{
		{"three days", func(f *facts.Facts) { f.Endurance.Standing = 3 * secondsPerDay }, nil},
		{"just less", func(f *facts.Facts) { f.Endurance.Standing = 2.9 * secondsPerDay }, []string{
			"caution -G1: -G1, VRLA-AGM: empty after 2.9 days with mains off and lights out, drain 40 mA; least 3 days | Parts that draw 38.6 mA together.",
		}},
		{"nothing drawn", func(f *facts.Facts) { f.Endurance.Standing, f.Endurance.DrainA = 1, 0 }, nil},
	})
}
