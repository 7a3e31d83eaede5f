package design_test

import (
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/sitegen"
	"gloamwright/internal/stage"
)

// What the sizing formulas choose a little too small, the simulated outage and recharge
// raise by a standard step: on sites whose battery and charger are not given neither
// may fall short while a larger one is allowed.
func TestUnpinnedStepsUp(t *testing.T) {
	for _, i := range []int{0, 141, 148} { // sites that fell short by formulas alone
		n, o := sitegen.Varied(i)
		site, list := describe.Parse("site.yaml", sitegen.Site(n, o), stage.Schema())
		if list.HasErrors() {
			t.Fatal(list)
		}
		d, err := design.Make(site, nil)
		if err != nil {
			t.Fatal(err)
		}
		for _, f := range d.Findings {
			if f.Check != "recharge-time" && f.Check != "outage-held" {
				continue
			}
			if c := d.Charger; f.Check == "recharge-time" && (c.Pinned || 1.3*c.Current > c.Limit) {
				continue // the battery stands no more
			}
			t.Errorf("site %d: %s", i, f.Message)
		}
	}
}
