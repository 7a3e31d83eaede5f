package finding

import (
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

func TestDusk(t *testing.T) {
	run(t, dusk, []limitCase{
		{"as asked", func(f *facts.Facts) { twilight(f, 10, 14) }, nil},
		{"a quarter lighter", func(f *facts.Facts) { twilight(f, 12.5, 14) }, nil},
		{"just lighter", func(f *facts.Facts) { twilight(f, 12.6, 14) }, []string{
			"caution dusk: dusk: lights come on at 12.6 lx, asked 10 lx | Set it between 8 lx and 12.5 lx on site, or take a sensor or divider for 10 lx.",
		}},
		{"four fifths", func(f *facts.Facts) { twilight(f, 8, 14) }, nil},
		{"just darker", func(f *facts.Facts) { twilight(f, 7.9, 14) }, []string{
			"caution dusk: dusk: lights come on at 7.9 lx, asked 10 lx",
		}},
		{"no photocell", func(f *facts.Facts) { f.Thresholds = nil }, nil},
	})
}

// twilight says at which illuminances the lights come on and go off; 10 lx is asked.
func twilight(f *facts.Facts, dark, light float64) {
	s := &describe.Stage{Name: given("dusk", 36), Kind: given("photocell", 36)}
	s.Fields.Set("dark_below", describe.At[any]{Val: quantity.Lux(10)})
	f.Site.Stages = append(f.Site.Stages, s)
	f.Thresholds = []*facts.Threshold{{Key: "dark", Value: dark, Unit: "lx"}, {Key: "light", Value: light, Unit: "lx"}}
}
