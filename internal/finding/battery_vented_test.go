package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestBatteryVented(t *testing.T) {
	run(t, batteryVented, []limitCase{
		{"valve-regulated", nil, nil},
		{"flooded", func(f *facts.Facts) { f.Battery.Class, f.Battery.ClassName = "flooded", "Flooded" }, []string{
			"caution -G1: -G1, Flooded: vented cells, 5 mA of gas current for each Ah at float | A tray and an enclosure with air; valve-regulated cells gas with 1 mA for each Ah.",
		}},
		{"no battery", func(f *facts.Facts) { f.Battery = facts.Battery{Class: "flooded"} }, nil},
	})
}
