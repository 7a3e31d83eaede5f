package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestFuseWithstand(t *testing.T) {
	run(t, fuseWithstand, []limitCase{
		{"exactly as long", func(f *facts.Facts) { f.Fuses[1].OpensWithin, f.Fuses[1].Withstand = 2, 2 }, nil},
		{"just shorter", func(f *facts.Facts) { f.Fuses[1].OpensWithin, f.Fuses[1].Withstand = 2, 1.9 }, []string{
			"stop -F101: -F101, Workshop: 60 A opens it within 2 s, its 1.5 mm² cable stands that for 1.9 s | 2.5 mm² stands this current for 5.27 s.",
		}},
		{"a fuse that does not open is another check", func(f *facts.Facts) { f.Fuses[1].Opens, f.Fuses[1].Withstand = false, 0.01 }, nil},
	})
}
