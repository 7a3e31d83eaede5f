package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestFuseBreaking(t *testing.T) {
	run(t, fuseBreaking, []limitCase{
		{"on its capacity", func(f *facts.Facts) { f.Fuses[0].Prospective = 1000 }, nil},
		{"just over", func(f *facts.Facts) { f.Fuses[0].Prospective = 1010 }, []string{
			"stop -F1: -F1, battery: short-circuit current 1010 A, breaks 1000 A | A fuse that breaks at least 1010 A DC; this kind (blade, medium) breaks 1000 A.",
		}},
		{"class unknown", func(f *facts.Facts) { f.Fuses[0].Class, f.Fuses[0].Prospective = nil, 1010 }, nil},
	})
}
