package packet

import (
	"fmt"

	"gloamwright/layout/ink"
)

// refs is where sections and marks stand. A packet is laid out again until the sheets
// that its texts name are the sheets on which the things stand.
type refs struct {
	first, last map[string]int // of sections, by key
	at          map[string]int // sheet of a mark
	total       int
	asked       map[string]bool // what texts referred to
}

func newRefs() *refs {
	return &refs{first: map[string]int{}, last: map[string]int{}, at: map[string]int{}, asked: map[string]bool{}}
}

func (r *refs) equal(o *refs) bool {
	same := func(a, b map[string]int) bool {
		if len(a) != len(b) {
			return false
		}
		for k, v := range a {
			if b[k] != v {
				return false
			}
		}
		return true
	}
	return r.total == o.total && same(r.first, o.first) && same(r.last, o.last) && same(r.at, o.at)
}

// first is the first sheet of a section; 0 if there is none (yet).
func (b *book) first(key string) int { return b.refs.first[key] }

// sheets names the sheets of a section: "sheet 7", "sheets 7 and 8", "sheets 7 to 9".
func (b *book) sheets(key string) string {
	b.refs.asked[key] = true
	f, l := b.refs.first[key], b.refs.last[key]
	switch {
	case l <= f:
		return fmt.Sprintf("sheet %d", f)
	case l == f+1:
		return fmt.Sprintf("sheets %d and %d", f, l)
	}
	return fmt.Sprintf("sheets %d to %d", f, l)
}

// Sheets is sheets at the beginning of a sentence.
func (b *book) upperSheets(key string) string {
	s := b.sheets(key)
	return "S" + s[1:]
}

// on names the sheet on which a mark stands: "sheet 7".
func (b *book) on(mark string) string {
	b.refs.asked[mark] = true
	return fmt.Sprintf("sheet %d", b.refs.at[mark])
}

// mark names the places of a block for links.
func (p *pad) mark(names []string, y float64) {
	for _, n := range names {
		p.c.Mark(n, ink.Point{X: p.pg.l, Y: y})
	}
}

// linkTo leads from a designation to its symbol on the schematic or, if it has none,
// to its row in the lists.
func (p *pad) linkTo(r ink.Rect, name string) {
	if t, ok := p.b.target(name); ok && r.W > 0 {
		p.c.Link(r, t)
	}
}
