package finding

import (
	"testing"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

func TestRechargeAsked(t *testing.T) {
	run(t, rechargeAsked, []limitCase{
		{"a day", nil, nil},
		{"just longer", func(f *facts.Facts) { f.Site.Duty.Recharge.Val = quantity.Hours(25) }, []string{
			"caution duty.recharge: Recharge: 25 h asked, limit 24 h | duty.recharge of 24 h.",
		}},
	})
}
