package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestFuseFarEnd(t *testing.T) {
	run(t, fuseFarEnd, []limitCase{
		{"exactly in time", func(f *facts.Facts) { f.Fuses[1].OpensWithin = 5 }, nil},
		{"just too late", func(f *facts.Facts) { f.Fuses[1].OpensWithin, f.Fuses[1].FarEnd = 5.6, 3.9 }, []string{
			"stop -F101: -F101, Workshop: 3.9 A at the far end opens it within 5.6 s, limit 5 s | It takes 4 A: a loop of at most 97.5 % of its resistance, or 1 A, which opens on 2 A.",
		}},
		{"never", func(f *facts.Facts) {
			f.Fuses[1].Opens, f.Fuses[1].OpensWithin, f.Fuses[1].FarEnd, f.Fuses[1].Design = false, 0, 2.2, 1.1
		}, []string{
			"stop -F101: -F101, Workshop: 2.2 A at the far end does not surely open it, limit 5 s | It takes 4 A: a loop of at most 55 % of its resistance.",
		}},
		{"no published times", func(f *facts.Facts) { f.Fuses[1].Opens, f.Fuses[1].Class = false, nil }, []string{
			"stop -F101: -F101, Workshop: 60 A at the far end does not surely open it, limit 5 s | A fuse with published times that opens on 60 A within 5 s.",
		}},
	})
}
