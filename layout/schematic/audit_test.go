package schematic

import (
	"fmt"
	"testing"

	"gloamwright/internal/design"
	"gloamwright/internal/sitegen"
	"gloamwright/layout/schematic/audit"
)

// Every sheet of the descriptions that come with the program is free of faults and
// connects exactly what the circuit connects, read from the calls and from the files.
func TestSamplesPassTheAudit(t *testing.T) {
	for name, src := range samples(t) {
		t.Run(name, func(t *testing.T) {
			d := designed(t, src)
			for _, files := range []bool{false, true} {
				for _, f := range audit.Judge(drawn(t, d, files), audit.FromCircuit(d.Circuit)) {
					t.Error(f)
				}
			}
		})
	}
}

// varied is how many generated sites are drawn; each sizedEach-th is sized as well.
const (
	varied    = 200
	sizedEach = 5
)

// Every generated site is drawn without a fault: with what sizing found, and with
// ratings as long as they come.
func TestGeneratedSitesPassTheAudit(t *testing.T) {
	count := varied
	if testing.Short() {
		count = varied / 10
	}
	for i := range count {
		n, o := sitegen.Varied(i)
		t.Run(fmt.Sprint(i), func(t *testing.T) {
			src := sitegen.Site(n, o)
			list := []*design.Design{dressed(t, parsed(t, src))}
			if i%sizedEach == 0 {
				list = append(list, designed(t, src))
			}
			for _, d := range list {
				for _, f := range audit.Judge(drawn(t, d, false), audit.FromCircuit(d.Circuit)) {
					t.Errorf("%v (%d luminaires, %+v)", f, n, o)
				}
			}
		})
	}
}

// What a revision changes is marked, and the marks touch nothing.
func TestChangesAreMarked(t *testing.T) {
	for name, src := range samples(t) {
		d := designed(t, src)
		d.Changes = &design.Changes{From: "A", To: "B", Touched: map[string]bool{}}
		for _, p := range d.Circuit.Parts {
			d.Changes.Touched[p.Designation] = true
		}
		for _, c := range d.Circuit.Conductors {
			d.Changes.Touched[c.Number] = true
		}
		for _, p := range d.Circuit.TestPoints {
			d.Changes.Touched[p.Label] = true
		}
		sheets := drawn(t, d, false)
		for _, f := range audit.Judge(sheets, audit.FromCircuit(d.Circuit)) {
			t.Errorf("%s: %v", name, f)
		}
		marked, all := map[*audit.Group]bool{}, 0
		for _, s := range sheets {
			for _, k := range s.Page.Strokes {
				b := k.Path.Bounds()
				if k.Width == 0 && len(k.Path.Points) == 3 && k.Group.Class == classPart && abs(b.W-deltaWidth*module) < 0.01 && abs(b.H-deltaHeight*module) < 0.01 {
					marked[k.Group] = true
				}
			}
			for _, g := range s.Page.Groups {
				if g.Class == classPart {
					all++
					if !marked[g] {
						t.Logf("%s: no room at %s", name, g.ID)
					}
				}
			}
		}
		if len(marked) < all*9/10 {
			t.Errorf("%s: %d of %d symbols are marked", name, len(marked), all)
		}
	}
}
