package packet

import (
	"bytes"
	"slices"
	"strings"
	"testing"

	"gloamwright/internal/facts"
)

// Every lighting circuit has its picture, each fuse on its way is named, and the same
// design gives the same bytes.
func TestTimeCurrentShowsEveryPath(t *testing.T) {
	d := example(t, "bracken-reach")
	data, err := TimeCurrent(d)
	if err != nil {
		t.Fatal(err)
	}
	for _, c := range d.Site.Circuits {
		if !bytes.Contains(data, []byte("From the battery to "+c.Name.Val)) {
			t.Errorf("no picture of %s", c.Name.Val)
		}
	}
	for _, f := range d.Fuses {
		if f.Way != nil && f.Way.Lighting != nil && !bytes.Contains(data, []byte(f.Part.Designation)) {
			t.Errorf("%s stands nowhere", f.Part.Designation)
		}
	}
	again, err := TimeCurrent(d)
	if err != nil || !bytes.Equal(data, again) {
		t.Error("drawn twice, the bytes differ", err)
	}
}

// The packet shows the path to every lighting circuit, in a picture of its own or in one
// that names it.
func TestPacketShowsEveryPath(t *testing.T) {
	for _, name := range examples {
		d := example(t, name)
		p := built(t, d)
		text := textOf(p, keyCurves)
		for _, f := range d.Fuses {
			if !drawable(f) {
				continue
			}
			if p.refs.at[curveMark(f)] == 0 || !strings.Contains(text, f.Feeds) || !strings.Contains(text, f.Part.Designation) {
				t.Errorf("%s: no picture of %s, %s", name, f.Part.Designation, f.Feeds)
			}
		}
	}
}

// Sixty equal circuits share one picture; a thicker cable, another rating or a current
// that moves by more than a line's width draws another.
func TestEqualPathsShareAPicture(t *testing.T) {
	d := example(t, "bracken-reach")
	d.Facts = copyFacts(d.Facts)
	i := slices.IndexFunc(d.Fuses, func(f *facts.Fuse) bool { return drawable(f) })
	first := d.Fuses[i]
	var fuses []*facts.Fuse
	for _, f := range d.Fuses {
		if !drawable(f) {
			fuses = append(fuses, f)
		}
	}
	for range 60 {
		c := *first
		fuses = append(fuses, &c)
	}
	n := len(fuses)
	fuses[n-1].CableSize.Area *= 2
	fuses[n-2].Rating *= 2
	fuses[n-3].FarEnd *= 1.3
	fuses[n-4].FarEnd *= 1.03
	d.Fuses = fuses
	large, small := newBook(d, nil).fusePaths()
	got := 0
	for _, p := range append(large, small...) {
		got += len(p.leaves())
	}
	if got != 60 || len(large)+len(small) != 4 {
		t.Errorf("%d paths in %d large and %d small pictures, want 60 in 4", got, len(large), len(small))
	}
}
