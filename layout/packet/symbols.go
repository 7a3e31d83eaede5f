package packet

import (
	"regexp"
	"strconv"
	"strings"

	"gloamwright/layout/ink"
	"gloamwright/layout/schematic"
)

// schematicSections is one section for each schematic sheet.
func (b *book) schematicSections() []*section {
	var out []*section
	for _, s := range b.drawings {
		out = append(out, &section{key: keySchematic, title: "Schematic", book: "Schematic: " + s.Supplement, drawing: s})
	}
	return out
}

// symbolMark names the place of a symbol on the schematic for links.
func symbolMark(designation string) string { return "symbol " + designation }

// rowMark names the row of a thing in the lists.
func rowMark(designation string) string { return "row " + designation }

// symbolAt is a drawn symbol.
type symbolAt struct {
	name string
	box  ink.Rect
}

// recorded draws a schematic sheet to read its symbols back; each is drawn once.
func (b *book) recorded(s *schematic.Sheet) *ink.Recorder {
	if r := b.recordings[s]; r != nil {
		return r
	}
	r := ink.NewRecorder(s.Paper.W, s.Paper.H, s.Supplement)
	s.Draw(r, schematic.Options{})
	b.recordings[s] = r
	return r
}

// symbolsOf finds the symbols of parts and test points on a drawing.
func symbolsOf(r *ink.Recorder) []symbolAt {
	var out []symbolAt
	var walk func(calls []ink.Call)
	walk = func(calls []ink.Call) {
		for _, c := range calls {
			g, ok := c.(ink.Grouped)
			if !ok {
				continue
			}
			if n := objectName(g.Object); n != "" {
				if box := boundsOf(g.Calls); box.W > 0 && box.H > 0 {
					out = append(out, symbolAt{n, box})
				}
			}
			walk(g.Calls)
		}
	}
	walk(r.Calls)
	return out
}

// objectName is the designation or label that an object of the drawing stands for.
func objectName(o ink.Object) string {
	switch o.Class {
	case "part", "testpoint", "cable":
		for _, a := range o.Data {
			if a.Name == "part" || a.Name == "testpoint" || a.Name == "cable" {
				return a.Value
			}
		}
	}
	return ""
}

// boundsOf is the box of what a group draws.
func boundsOf(calls []ink.Call) ink.Rect {
	var box ink.Rect
	first := true
	grow := func(r ink.Rect) {
		if first {
			box, first = r, false
			return
		}
		x2, y2 := max(box.X+box.W, r.X+r.W), max(box.Y+box.H, r.Y+r.H)
		box.X, box.Y = min(box.X, r.X), min(box.Y, r.Y)
		box.W, box.H = x2-box.X, y2-box.Y
	}
	for _, c := range calls {
		switch c := c.(type) {
		case ink.Stroked:
			grow(c.Path.Bounds())
		case ink.Filled:
			grow(c.Path.Bounds())
		case ink.Grouped:
			if r := boundsOf(c.Calls); r.W > 0 || r.H > 0 {
				grow(r)
			}
		}
	}
	return box
}

// findSymbols notes on which sheet each symbol stands.
func (b *book) findSymbols(plans []*sheetPlan) {
	b.symbols = map[string]ink.Target{}
	for _, s := range plans {
		if s.s.drawing == nil {
			continue
		}
		list := symbolsOf(b.recorded(s.s.drawing))
		for _, x := range list {
			if _, ok := b.symbols[x.name]; !ok {
				b.symbols[x.name] = ink.Target{Sheet: s.n, Anchor: symbolMark(x.name)}
			}
		}
	}
}

// target is where a designation leads: to its symbol, else to its row in a list.
func (b *book) target(name string) (ink.Target, bool) {
	whole, _, _ := strings.Cut(name, ":")
	for _, n := range []string{name, whole} {
		if t, ok := b.symbols[n]; ok {
			return t, true
		}
	}
	for _, n := range []string{name, whole} {
		if s := b.refs.at[rowMark(n)]; s > 0 {
			return ink.Target{Sheet: s, Anchor: rowMark(n)}, true
		}
	}
	return ink.Target{}, false
}

// renumbered prints references from sheet to sheet with the numbers of the packet,
// which has one series for all its sheets.
type renumbered struct {
	ink.Canvas
	shift int
}

// sheetReference is "/3.B7" or "/3".
var sheetReference = regexp.MustCompile(`/(\d+)(\.[A-Z]\d+)?$`)

// Image implements ink.Imager.
func (r *renumbered) Image(b ink.Rect, png []byte) {
	if m, ok := r.Canvas.(ink.Imager); ok {
		m.Image(b, png)
	}
}

// Text implements ink.Canvas.
func (r *renumbered) Text(at ink.Point, s string, f ink.Font, a ink.Anchor, c ink.Color, turn bool) {
	if m := sheetReference.FindStringSubmatchIndex(s); m != nil {
		if n, err := strconv.Atoi(s[m[2]:m[3]]); err == nil {
			s = s[:m[2]] + strconv.Itoa(n+r.shift) + s[m[3]:]
		}
	}
	r.Canvas.Text(at, s, f, a, c, turn)
}

// drawSchematic draws a schematic sheet with its packet number; its symbols lead to
// their rows in the lists.
func (b *book) drawSchematic(c ink.Canvas, s *sheetPlan, last int) {
	first := b.first(keySchematic)
	list := symbolsOf(b.recorded(s.s.drawing))
	places := map[string]string{} // object ID: mark
	s.s.drawing.Draw(&renumbered{c, first - 1}, schematic.Options{Number: s.n, Of: last, Target: func(number int, object string) ink.Target {
		if m, ok := places[object]; ok {
			return ink.Target{Sheet: first + number - 1, Anchor: m}
		}
		return ink.Target{Sheet: first + number - 1}
	}})
	seen := map[string]bool{}
	for _, x := range list {
		if !seen[x.name] {
			seen[x.name] = true
			c.Mark(symbolMark(x.name), ink.Point{X: x.box.X, Y: x.box.Y})
		}
		if at := b.refs.at[rowMark(x.name)]; at > 0 {
			c.Link(x.box, ink.Target{Sheet: at, Anchor: rowMark(x.name)})
		}
	}
}
