package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestFuseBlade(t *testing.T) {
	run(t, fuseBlade, []limitCase{
		{"on the limit", func(f *facts.Facts) { f.Fuses[0].Rating, f.Fuses[0].Design = 40, 30 }, nil},
		{"just over", func(f *facts.Facts) { f.Fuses[0].Rating, f.Fuses[0].Design = 40, 30.5 }, []string{
			"caution -F1: -F1, battery: 30.5 A through a blade holder, limit 30 A | A bolted fuse of 40 A.",
		}},
		{"bolted", func(f *facts.Facts) { f.Fuses[0].Style, f.Fuses[0].Design = "knife", 35 }, nil},
	})
}
