package release

import (
	"reflect"
	"slices"
	"testing"

	"gloamwright/internal/design"
)

func causesOf(c *design.Changes, tool, label string) []int {
	for _, w := range c.Work {
		if w.Tool == tool && slices.Contains(w.Labels, label) {
			return w.Causes
		}
	}
	return nil
}

// Each piece of work names the change without which it would not be.
func TestCauses(t *testing.T) {
	d := newDesk(t, "juniper-flat")
	d.mustIssue()
	d.edit("revision: A", "revision: B",
		"recharge: 24 h", "recharge: 10 h",
		"30 ft bulkhead at saddles", "30 ft step at saddles",
		"15 ft step at gate", "6 ft step at gate",
		"{name: Office,", "{name: Bureau, was: Office,")
	_, made := d.open()
	c := made.Changes
	number := map[string]int{}
	for _, v := range c.Values {
		number[v.Path] = v.Number
	}
	recharge, lamp, leg := number["duty.recharge"], number["circuits.Tack room.points.1.luminaire"], number["circuits.Yard door.points.2.leg"]
	if recharge*lamp*leg == 0 || len(c.Values) != 4 {
		t.Fatalf("values: %+v", c.Values)
	}
	charger, saddles, gate := made.Charger.Part.Designation, "-E15", "-W17"
	for _, want := range []struct {
		tool, label string
		causes      []int
	}{
		{design.Replace, charger, []int{recharge}},
		{design.Replace, saddles, []int{lamp}},
		{design.ReCut, gate, []int{leg}},
		{design.TestAgain, gate, []int{leg}},
	} {
		if got := causesOf(c, want.tool, want.label); !reflect.DeepEqual(got, want.causes) {
			t.Errorf("%s %s: from %v, want %v", want.tool, want.label, got, want.causes)
		}
	}
	for _, w := range c.Work {
		if slices.Contains(w.Causes, number["circuits.Bureau.name"]) && w.Tool != design.Relabel {
			t.Errorf("the new name of a circuit is said to force: %+v", w)
		}
		if len(w.Causes) == 1 && w.From != w.Causes[0] {
			t.Errorf("From is %d, the only cause %v", w.From, w.Causes)
		}
	}
}

// What two changes force together, or each alone would, names both.
func TestCausesTogether(t *testing.T) {
	d := newDesk(t, "juniper-flat")
	d.mustIssue()
	// The same lamp, further away by the choice of its type and by its cable.
	d.edit("revision: A", "revision: B",
		"30 ft bulkhead at saddles", "60 ft bulkhead at saddles",
		"bulkhead: {kind: led-driver, power: 4 W", "bulkhead: {kind: led-driver, power: 8 W")
	_, made := d.open()
	got := causesOf(made.Changes, design.ReCut, "-W15")
	if !reflect.DeepEqual(got, []int{1, 2}) {
		t.Errorf("the cable is longer and carries more: from %v, want both", got)
	}
}
