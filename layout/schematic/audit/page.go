// Package audit reads finished sheets back, from the recorded drawing calls or from
// the written SVG, and judges them without help from the layout: it recognises
// symbols by their strokes, follows the lines as a reader would, and compares what
// it finds connected with what the circuit connects. Its rules are listed in
// rules.go.
//
// Lengths are millimetres from the upper left corner of the sheet.
package audit

import (
	"math"
	"strings"

	"gloamwright/layout/ink"
)

// module is the drawing's grid.
const module = 2.5

// near is the tolerance of all comparisons: the SVG holds three decimals.
const near = 0.01

// Page is one sheet as strokes, fills and texts.
type Page struct {
	W, H    float64
	Strokes []Stroke
	Texts   []Text
	Groups  []*Group // every group, outer ones first
}

// Group is an object of the sheet: class, data and what it is inside of.
type Group struct {
	ink.Object
	Parent *Group
}

// Get returns a data attribute of the group or of one that it is inside of.
func (g *Group) Get(name string) string {
	for ; g != nil; g = g.Parent {
		for _, a := range g.Data {
			if a.Name == name {
				return a.Value
			}
		}
	}
	return ""
}

// In reports whether the group is, or is inside of, one of that class.
func (g *Group) In(class string) bool {
	for ; g != nil; g = g.Parent {
		if g.Class == class {
			return true
		}
	}
	return false
}

// Stroke is one stroked or filled path.
type Stroke struct {
	Path  *ink.Path
	Width float64 // 0 for a fill
	Dash  bool
	White bool
	Group *Group
}

// Text is one text with the box of its ink.
type Text struct {
	S     string
	At    ink.Point
	Font  ink.Font
	Turn  bool
	White bool
	Box   ink.Rect
	Group *Group

	anchor ink.Anchor
}

// FromRecorder reads a page from recorded drawing calls.
func FromRecorder(r *ink.Recorder) *Page {
	p := &Page{W: r.W, H: r.H}
	p.read(r.Calls, nil)
	return p
}

func (p *Page) read(calls []ink.Call, g *Group) {
	for _, c := range calls {
		switch c := c.(type) {
		case ink.Stroked:
			p.Strokes = append(p.Strokes, Stroke{Path: c.Path, Width: c.Pen.Width, Dash: len(c.Pen.Dash) > 0, White: c.Pen.Color == ink.White, Group: g})
		case ink.Filled:
			p.Strokes = append(p.Strokes, Stroke{Path: c.Path, White: c.Color == ink.White, Group: g})
		case ink.Written:
			p.Texts = append(p.Texts, Text{S: c.Text, At: c.At, Font: c.Font, Turn: c.Turn, White: c.Color == ink.White,
				Box: ink.TextBox(c.At, c.Text, c.Font, c.Anchor, c.Turn), Group: g})
		case ink.Grouped:
			n := &Group{Object: c.Object, Parent: g}
			p.Groups = append(p.Groups, n)
			p.read(c.Calls, n)
		}
	}
}

// straight reports whether the stroke is an open line of straight pieces.
func (s Stroke) straight() bool {
	for i, v := range s.Path.Verbs {
		if v != ink.LineTo && (i > 0 || v != ink.MoveTo) {
			return false
		}
	}
	return len(s.Path.Verbs) > 1
}

// closed reports whether the stroke is one closed piece.
func (s Stroke) closed() bool {
	return len(s.Path.Verbs) > 0 && s.Path.Verbs[len(s.Path.Verbs)-1] == ink.Close
}

// rectangle returns the box of a closed upright rectangle.
func (s Stroke) rectangle() (ink.Rect, bool) {
	if !s.closed() || len(s.Path.Points) != 4 {
		return ink.Rect{}, false
	}
	b := s.Path.Bounds()
	for _, p := range s.Path.Points {
		if !(same(p.X, b.X) || same(p.X, b.X+b.W)) || !(same(p.Y, b.Y) || same(p.Y, b.Y+b.H)) {
			return ink.Rect{}, false
		}
	}
	return b, true
}

// circle returns middle and radius of a full circle.
func (s Stroke) circle() (c ink.Point, r float64, ok bool) {
	n := 0
	for _, v := range s.Path.Verbs {
		if v == ink.CubicTo {
			n++
		}
	}
	if n != 4 || !s.closed() || len(s.Path.Points) != 13 {
		return c, 0, false
	}
	b := s.Path.Bounds()
	if !same(b.W, b.H) {
		return c, 0, false
	}
	return ink.Point{X: b.X + b.W/2, Y: b.Y + b.H/2}, b.W / 2, true
}

func same(a, b float64) bool { return math.Abs(a-b) <= near }

func samePoint(a, b ink.Point) bool { return same(a.X, b.X) && same(a.Y, b.Y) }

// spot is a place on the grid, or a place between grid lines to a hundredth.
type spot struct{ x, y int }

func spotOf(p ink.Point) spot { return spot{int(math.Round(p.X * 50)), int(math.Round(p.Y * 50))} }

func (s spot) point() ink.Point { return ink.Point{X: float64(s.x) / 50, Y: float64(s.y) / 50} }

func onGrid(v float64) bool { return same(math.Round(v/module)*module, v) }

// named reports whether a text is a reference such as /3.B7.
func named(s string) (sheet int, zone string, ok bool) {
	if !strings.HasPrefix(s, "/") {
		return 0, "", false
	}
	n, z, found := strings.Cut(s[1:], ".")
	if !found || len(z) < 2 {
		return 0, "", false
	}
	for _, r := range n {
		if r < '0' || r > '9' {
			return 0, "", false
		}
		sheet = sheet*10 + int(r-'0')
	}
	return sheet, z, n != ""
}
