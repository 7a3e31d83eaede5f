package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestFuseLoad(t *testing.T) {
	run(t, fuseLoad, []limitCase{
		{"on its rating", func(f *facts.Facts) { f.Fuses[1].Design = 2 }, nil},
		{"just over", func(f *facts.Facts) { f.Fuses[1].Design = 2.1 }, []string{
			"stop -F101: -F101, Workshop: load 2.1 A, rating 2 A | 3 A for this load; its cable carries 17.5 A.",
		}},
	})
}
