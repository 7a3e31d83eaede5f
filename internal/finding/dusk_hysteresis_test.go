package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestDuskHysteresis(t *testing.T) {
	run(t, duskHysteresis, []limitCase{
		{"enough", func(f *facts.Facts) { twilight(f, 10, 11.5) }, nil},
		{"just too little", func(f *facts.Facts) { twilight(f, 10, 11.4) }, []string{
			"caution photocell: Photocell: lights come on at 10 lx and go off at 11.4 lx, 1.14 times as light; least 1.15 | Going off at 11.5 lx or more.",
		}},
		{"no photocell", nil, nil},
	})
}
