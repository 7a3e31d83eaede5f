package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestFuseLoadFactor(t *testing.T) {
	run(t, fuseLoadFactor, []limitCase{
		{"on the factor", func(f *facts.Facts) { f.Fuses[1].Design = 1.5 }, nil},
		{"just over", func(f *facts.Facts) { f.Fuses[1].Design = 1.6 }, []string{
			"caution -F101: -F101, Workshop: load 1.6 A, 80 % of its rating, limit 75 % | 3 A for this load; its cable carries 17.5 A.",
		}},
		{"over the rating is another check", func(f *facts.Facts) { f.Fuses[1].Design = 2.1 }, nil},
	})
}
