package finding

import (
	"testing"

	"gloamwright/internal/facts"
)

func TestNominal(t *testing.T) {
	run(t, nominal, []limitCase{
		{"preferred", func(f *facts.Facts) { f.Site.Duty.Nominal.Val = 48 }, nil},
		{"not preferred", func(f *facts.Facts) { f.Site.Duty.Nominal.Val = 32 }, []string{
			"note duty.nominal: Nominal voltage 32 V is not a preferred one | 36 V is.",
		}},
	})
}
