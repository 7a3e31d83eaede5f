package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestBatteryLead(t *testing.T) {
	run(t, batteryLead, []limitCase{
		{"on the limit of practice", func(f *facts.Facts) { f.Conductors[0].Conductor.Length = 0.3 }, nil},
		{"just over", func(f *facts.Facts) { f.Conductors[0].Conductor.Length = 0.4 }, []string{
			"caution 1+: Wire 1+, -G1:+ to -F1:2: 0.4 m without a fuse, limit 0.3 m; a short draws 1200 A | The main fuse within 0.3 m of the pole.",
		}},
		{"on the farthest", func(f *facts.Facts) { f.Conductors[0].Conductor.Length = 3 }, []string{
			"caution 1+: Wire 1+, -G1:+ to -F1:2: 3 m without a fuse, limit 0.3 m; a short draws 1200 A",
		}},
		{"just over the farthest", func(f *facts.Facts) { f.Conductors[0].Conductor.Length = 3.1 }, []string{
			"stop 1+: Wire 1+, -G1:+ to -F1:2: 3.1 m without a fuse, limit 3 m; a short draws 1200 A",
		}},
		{"long but protected", func(f *facts.Facts) { f.Conductors[0].Conductor.Length, f.Conductors[0].Fuse = 9, "-F9" }, nil},
	})
}
