package audit

import (
	"fmt"
	"math"
	"slices"

	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// reader reads one page.
type reader struct {
	sheet   Sheet
	page    *Page
	used    []bool
	sigs    []signature
	inner   []bool // leads inside a box that are read as lines
	symbols []*instance
	lines   []segment
	dots    []dot
	probes  []probe
	refs    []*reference
	faults  []Fault
	crossed []ink.Point  // where lines cross without a joint
	nodes   map[spot]int // node of every place where something ends
	parent  []int
	framed  map[string]ink.Rect // the stages' frames, once they are asked for
}

// segment is one straight piece of a line.
type segment struct {
	a, z   ink.Point
	stroke int
	width  float64
	lead   bool // of a symbol
}

type dot struct {
	at ink.Point
	r  float64
}

// probe is a test point: where it touches the line, and its label.
type probe struct {
	at    ink.Point
	label string
	far   bool // the line itself ends in the ring
}

func newReader(s Sheet) *reader {
	n := len(s.Page.Strokes)
	return &reader{sheet: s, page: s.Page, used: make([]bool, n), inner: make([]bool, n), nodes: map[spot]int{}}
}

func (r *reader) fault(rule Rule, at ink.Point, format string, args ...any) {
	r.faults = append(r.faults, Fault{rule, r.sheet.Number, r.sheet.Format.Zone(at.X, at.Y), at, fmt.Sprintf(format, args...)})
}

// widths are the line widths of the set.
var widths = []float64{0.18, 0.25, 0.35, 0.5, 0.7}

func (r *reader) circuit() {
	r.find()
	r.findBlocks()
	r.findProbes()
	r.sortStrokes()
	r.geometry()
	r.joints()
	r.names()
}

// sheetGroups are objects around the circuit: frame, title block, tables, notes.
var sheetGroups = []string{"frame", "title-block", "scale", "notes", "table", "note", "guide", "cable"}

func (g *Group) around() bool {
	for _, c := range sheetGroups {
		if g.In(c) {
			return true
		}
	}
	return false
}

// findProbes recognises test points: an open ring that is no terminal's, a stub
// that ends on it, a tag.
func (r *reader) findProbes() {
	const ringRadius = 0.3 * module
	for i, s := range r.page.Strokes {
		c, radius, ok := s.circle()
		if !ok || r.used[i] || s.Width != 0.25 || !same(radius, ringRadius) || s.Group.around() {
			continue
		}
		for j, l := range r.page.Strokes {
			if r.used[j] || !l.straight() || len(l.Path.Points) != 2 || l.Width != 0.25 {
				continue
			}
			a, z := l.Path.Points[0], l.Path.Points[1]
			if same(math.Hypot(a.X-c.X, a.Y-c.Y), radius) {
				a, z = z, a
			}
			if !same(math.Hypot(z.X-c.X, z.Y-c.Y), radius) || !(same(a.X, c.X) || same(a.Y, c.Y)) || l.Group != s.Group {
				continue
			}
			r.used[i], r.used[j] = true, true
			far := a.Y < c.Y && same(a.X, c.X) && c.Y-a.Y > 2*module
			r.probes = append(r.probes, probe{a, r.tagNear(s.Group), far})
			r.lines = append(r.lines, segment{a, z, j, 0.25, true})
			break
		}
	}
}

// tagNear is the white text of a test point's group.
func (r *reader) tagNear(g *Group) string {
	for _, t := range r.page.Texts {
		if t.Group == g && t.White {
			return t.S
		}
	}
	return ""
}

// sortStrokes takes what is left: dots, lines, and ink that is neither.
func (r *reader) sortStrokes() {
	for _, x := range r.symbols {
		for _, i := range x.uses {
			s := r.page.Strokes[i]
			if s.straight() && len(s.Path.Points) == 2 && s.Width == 0.25 && !s.Dash {
				r.lead(x, s.Path.Points[0], s.Path.Points[1], i)
			}
		}
		if x.sym == &symbols.ReferenceLeaving || x.sym == &symbols.ReferenceArriving {
			r.refs = append(r.refs, &reference{x: x, r: r})
		}
	}
	for i, s := range r.page.Strokes {
		if r.used[i] || s.White || len(s.Path.Points) == 0 {
			continue
		}
		if s.Width > 0 && !slices.ContainsFunc(widths, func(w float64) bool { return same(w, s.Width) }) {
			r.fault(RuleWidth, s.Path.Points[0], "a line %.2f mm wide", s.Width)
		}
		c, radius, round := s.circle()
		switch {
		case s.Group.around() || s.Dash:
		case s.Width == 0 && round && radius < 0.8:
			r.dots = append(r.dots, dot{c, radius})
		case s.Width == 0: // arrowheads and tags
		case s.straight() && (s.Width == 0.25 || s.Width == 0.5):
			p := s.Path.Points
			for k := 1; k < len(p); k++ {
				r.lines = append(r.lines, segment{p[k-1], p[k], i, s.Width, r.inner[i]})
			}
		default:
			r.fault(RuleUnknown, s.Path.Points[0], "a stroke that is neither symbol nor line")
		}
	}
}

// lead adds a symbol's own line that ends on one of its pins.
func (r *reader) lead(x *instance, a, z ink.Point, stroke int) {
	for _, p := range x.pins {
		if samePoint(p.at, a) || samePoint(p.at, z) {
			r.lines = append(r.lines, segment{a, z, stroke, 0.25, true})
			return
		}
	}
}

// geometry checks grid, directions and overlaps.
func (r *reader) geometry() {
	f := r.sheet.Format.Frame()
	block := r.sheet.Format.TitleBlock()
	for _, l := range r.lines {
		if l.lead {
			continue
		}
		for _, p := range []ink.Point{l.a, l.z} {
			if !onGrid(p.X) || !onGrid(p.Y) {
				r.fault(RuleGrid, p, "a line's end off the grid")
			}
			if !inside(p, f) || inside(p, block) {
				r.fault(RuleField, p, "a line outside the drawing's field")
			}
		}
		if !same(l.a.X, l.z.X) && !same(l.a.Y, l.z.Y) {
			r.fault(RuleSquare, l.a, "an oblique line")
		}
	}
	for i, l := range r.lines {
		for _, m := range r.lines[:i] {
			if n := overlap(l, m); n > near {
				r.fault(RuleOverlap, l.a, "two lines lie on one another for %.1f mm", n)
			}
		}
	}
}

// overlap is the length for which two lines lie on one another.
func overlap(l, m segment) float64 {
	switch {
	case same(l.a.X, l.z.X) && same(m.a.X, m.z.X) && same(l.a.X, m.a.X):
		return shared(l.a.Y, l.z.Y, m.a.Y, m.z.Y)
	case same(l.a.Y, l.z.Y) && same(m.a.Y, m.z.Y) && same(l.a.Y, m.a.Y):
		return shared(l.a.X, l.z.X, m.a.X, m.z.X)
	}
	return 0
}

func shared(a, b, c, d float64) float64 {
	return math.Min(math.Max(a, b), math.Max(c, d)) - math.Max(math.Min(a, b), math.Min(c, d))
}

// on reports whether p lies on the line, its ends included.
func (l segment) on(p ink.Point) bool {
	if same(l.a.X, l.z.X) {
		return same(p.X, l.a.X) && p.Y >= math.Min(l.a.Y, l.z.Y)-near && p.Y <= math.Max(l.a.Y, l.z.Y)+near
	}
	return same(p.Y, l.a.Y) && p.X >= math.Min(l.a.X, l.z.X)-near && p.X <= math.Max(l.a.X, l.z.X)+near
}

func (l segment) ends(p ink.Point) bool { return samePoint(l.a, p) || samePoint(l.z, p) }
