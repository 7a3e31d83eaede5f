package release

import (
	"reflect"
	"testing"

	"gloamwright/internal/design"
)

// TestPriceChanges: a price that decides can force work anywhere, one that is added up
// only is for the documents.
func TestPriceChanges(t *testing.T) {
	d := newDesk(t, "bracken-reach")
	d.edit("  paper: iso", "  prices: {luminaire corridor: 38, charger 24 V 1.5 A: 60, charger 24 V 2 A: 70}")
	d.mustIssue()
	d.edit("revision: A", "revision: B", "luminaire corridor: 38,", "luminaire corridor: 39,", "24 V 1.5 A: 60", "24 V 1.5 A: 90")
	_, made := d.open()
	c := made.Changes
	if len(c.Values) != 2 || c.Values[1].What != "Practice, price of charger 24 V 1.5 A" || c.Values[1].Was != "60" || c.Values[1].Is != "90" {
		t.Fatalf("values: %+v", c.Values)
	}
	if got := causesOf(c, design.Replace, made.Charger.Part.Designation); !reflect.DeepEqual(got, []int{2}) {
		t.Errorf("the new charger is from %v, want its price", got)
	}

	d = newDesk(t, "bracken-reach")
	d.edit("  paper: iso", "  prices: {luminaire corridor: 38}")
	d.mustIssue()
	d.edit("revision: A", "revision: B", "luminaire corridor: 38}", "luminaire corridor: 39}")
	if _, made = d.open(); len(made.Changes.Values) != 1 {
		t.Fatalf("values: %+v", made.Changes.Values)
	}
	for _, w := range made.Changes.Work {
		if w.Tool == design.Replace || w.Tool == design.ReCut {
			t.Errorf("the price of a lamp forces %+v", w)
		}
	}
}
