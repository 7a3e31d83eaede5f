package packet

import (
	"bytes"
	"slices"
	"testing"

	"gloamwright/internal/finding"
	"gloamwright/internal/sitegen"
)

// Where a relay may stand either way the test point table has a row for each reading: a
// general-purpose relay, which picks up too late for the follower that holds it.
func TestEitherWayRows(t *testing.T) {
	src := bytes.Replace(sitegen.Site(10, sitegen.Options{Control: sitegen.Follower}), []byte("kind: changeover-relay,"), []byte("kind: changeover-relay, class: general,"), 1)
	d := made(t, "site.yaml", src)
	want := 0
	for _, r := range d.Readings {
		for i, c := range d.Conditions {
			if c.Shown {
				want += len(r.OrAt(i))
			}
		}
	}
	if want == 0 {
		t.Fatal("no reading stands either way")
	}
	p := built(t, d)
	rows := 0
	for _, w := range textsOf(p) {
		if p.plans[w.sheet-1].s.key == keyTestPoints && w.Text == "or" {
			rows++
		}
	}
	if rows != want {
		t.Errorf("%d rows tell of it, want %d", rows, want)
	}
	checkSheets(t, p, newBook(d, nil).pg, newBook(d, nil).sidePg)
	if !slices.ContainsFunc(d.Findings, func(f finding.Finding) bool { return f.Check == "either-way" }) {
		t.Error("no finding tells of it")
	}
}
