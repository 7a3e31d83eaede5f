package schematic

import (
	"slices"
	"strings"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/internal/sitegen"
	"gloamwright/layout/schematic/audit"
)

// Every job's last sheet is its legend: every symbol that the sheets draw, every class
// letter that a part bears.
func TestEveryJobHasALegend(t *testing.T) {
	list := samples(t)
	list["crowded"] = crowded()
	for i := range 12 {
		n, o := sitegen.Varied(i)
		list["site "+string(rune('a'+i))] = sitegen.Site(n, o)
	}
	for name, src := range list {
		b := planned(t, src)
		last := b.sheets[len(b.sheets)-1]
		if last.Kind != legendDiagram {
			t.Fatalf("%s ends with a %s", name, last.Kind)
		}
		for _, s := range b.sheets[:len(b.sheets)-1] {
			if s.Kind == legendDiagram {
				t.Errorf("%s: two legends", name)
			}
		}
		page := audit.FromRecorder(recorded(t, last))
		has := func(s string) bool {
			return slices.ContainsFunc(page.Texts, func(x audit.Text) bool { return strings.EqualFold(x.S, s) })
		}
		for _, s := range b.sheets {
			for _, y := range s.scene.symbols {
				if y.sym != nil && !has(y.sym.Name) {
					t.Errorf("%s: no %s in the legend", name, y.sym.Name)
				}
			}
		}
		for _, p := range b.c.Parts {
			if !has(p.Kind.Letter()) {
				t.Errorf("%s: no %s in the legend", name, p.Kind.Letter())
			}
		}
		if !has("How to read a way") || !has("How labels are built") {
			t.Errorf("%s: the legend does not tell how to read", name)
		}
		if !slices.ContainsFunc(last.notes, func(n string) bool { return strings.Contains(n, circuit.LetterEdition) }) {
			t.Errorf("%s: the legend does not name %s", name, circuit.LetterEdition)
		}
	}
}
