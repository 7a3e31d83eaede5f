package finding

import (
	"testing"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/facts"
)

func TestFuseOverload(t *testing.T) {
	run(t, fuseOverload, []limitCase{
		{"on the limit", func(f *facts.Facts) {
			f.Fuses[1].Class, f.Fuses[1].CableAmpacity = catalogue.FuseCartridgeT, 2*2.1/1.45
		}, nil},
		{"just over it", func(f *facts.Facts) { f.Fuses[1].Class, f.Fuses[1].CableAmpacity = catalogue.FuseCartridgeT, 2.8 }, []string{
			"stop -F101: -F101, Workshop: opens for sure from 4.2 A, its 1.5 mm² cable stands 4.06 A | A fuse of at most 1.93 A of this kind.",
		}},
		{"a blade fuse meets it wherever it meets its cable", func(f *facts.Facts) { f.Fuses[1].CableAmpacity = 2 }, nil},
	})
}
