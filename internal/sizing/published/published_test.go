package published

import (
	"math"
	"strings"
	"testing"
)

// TestPrintedAnswers runs every example through the program.
func TestPrintedAnswers(t *testing.T) {
	worked, ids := 0, map[string]bool{}
	for _, c := range All() {
		if strings.HasPrefix(c.ID, "W") {
			worked++
			ids[c.ID] = true
		}
		if c.Source == "" || c.Topic == "" || c.Quantity == "" || c.Seen == "" || math.IsNaN(c.Theirs()) {
			t.Errorf("%s: incomplete: %+v", c.ID, c)
		}
		if !c.Agrees() {
			t.Errorf("%s, %s, %s: ours %.6g %s, printed %s", c.ID, c.Source, c.Quantity, c.Ours(), c.Unit, c.Printed)
		}
	}
	if worked < 60 {
		t.Errorf("%d printed answers of worked examples; at least 60 are promised", worked)
	}
	t.Logf("%d printed answers of %d worked examples, %d figures in all", worked, len(ids), len(All()))
}

// TestAgreesIsStrict makes sure that a figure which is off by one in its last digit
// is refused.
func TestAgreesIsStrict(t *testing.T) {
	for _, c := range All() {
		off := c
		step := math.Pow(10, -float64(c.Decimals()))
		off.Ours = func() float64 { return c.Ours() + 1.01*step }
		if off.Agrees() {
			t.Errorf("%s, %s: accepts %g for %s", c.ID, c.Quantity, off.Ours(), c.Printed)
		}
	}
}
