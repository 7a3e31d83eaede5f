package finding

import (
	"testing"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

func TestOutageAsked(t *testing.T) {
	run(t, outageAsked, []limitCase{
		{"an hour", func(f *facts.Facts) { f.Site.Duty.Outage.Val = quantity.Hours(1) }, nil},
		{"just shorter", func(f *facts.Facts) { f.Site.Duty.Outage.Val = 3540 }, []string{
			"caution duty.outage: Outage: 59 min asked, least 1 h | duty.outage of 1 h.",
		}},
	})
}
