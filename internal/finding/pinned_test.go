package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestPinned(t *testing.T) {
	run(t, pinned, []limitCase{
		{"nothing given", nil, nil},
		{"cable and fuse", func(f *facts.Facts) { pin(f, true, true) }, []string{
			"note Stair: Stair, given: 1.5 mm² and 2 A checked: they hold. Drop 2 %, limit 5 %",
		}},
		{"cable", func(f *facts.Facts) { pin(f, true, false) }, []string{
			"note Stair: Stair, given: 1.5 mm² checked: it holds. Drop 2 %, limit 5 %",
		}},
		{"fuse", func(f *facts.Facts) { pin(f, false, true) }, []string{
			"note Stair: Stair, given: 2 A checked: it holds. Drop 2 %, limit 5 %",
		}},
		{"on every limit", func(f *facts.Facts) {
			pin(f, true, true)
			f.Luminaires[2].Drop = 0.05
			f.Fuses[2].Design, f.Fuses[2].OpensWithin, f.Fuses[2].CableAmpacity = 1.5, 5, 2
		}, []string{
			"note Stair: Stair, given: 1.5 mm² and 2 A checked: they hold. Drop 5 %, limit 5 %",
		}},
		{"drop just over", func(f *facts.Facts) { pin(f, true, true); f.Luminaires[2].Drop = 0.051 }, nil},
		{"load just over", func(f *facts.Facts) { pin(f, true, true); f.Fuses[2].Design = 1.51 }, nil},
		{"cable just too thin", func(f *facts.Facts) { pin(f, true, true); f.Fuses[2].CableAmpacity = 1.9 }, nil},
		{"opens just too late", func(f *facts.Facts) { pin(f, true, true); f.Fuses[2].OpensWithin = 5.1 }, nil},
	})
}

// pin says that the circuit Stair's cable, its fuse or both were given.
func pin(f *facts.Facts, cable, fuse bool) {
	l := lightingOf(f, "Stair")
	l.Points[0].Leg.Pinned, f.Fuses[2].Pinned = cable, fuse
}
