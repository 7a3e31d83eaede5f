package schematic

import (
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
)

// style is a kind of lettering.
type style uint8

// The styles. Lettering is 2.5 mm high, headings and way numbers 3.5 mm.
const (
	valueStyle style = iota // values, types, places, lengths, terminals, targets, notes
	nameStyle               // designations, rail names, table heads
	wireStyle               // wire numbers and core names
	headStyle               // stage headings, way numbers
)

const (
	textHeight = 1.0 // capitals of all circuit texts
	linePitch  = 1.6 // baselines of stacked labels
	wordGap    = 0.5 // between a name and what follows on its line
)

func (s style) font() ink.Font {
	switch s {
	case nameStyle:
		return ink.Lettering(ink.Medium, 2.5)
	case wireStyle:
		return ink.Lettering(ink.Mono, 2.5)
	case headStyle:
		return ink.Lettering(ink.Bold, 3.5)
	}
	return ink.Lettering(ink.Regular, 2.5)
}

// width is how long s is in that style, in modules.
func width(s string, st style) float64 { return ink.Width(s, st.font()) / module }

// fit shortens s to a width; the full text is in the object's title and in the
// packet's tables.
func fit(s string, st style, room float64) string { return ink.Cut(s, st.font(), room*module) }

// run is a piece of a line in one style: fixed text, or the place of something
// that is known only when all sheets are drawn.
type run struct {
	s     string
	st    style
	to    *place
	short bool // only the sheet of the place
	after string
}

func (r run) text() string {
	switch {
	case r.to != nil && r.short:
		return r.s + r.to.Sheet() + r.after
	case r.to != nil:
		return r.s + r.to.String()
	}
	return r.s
}

// line is one line of text.
type line struct {
	at     point
	anchor ink.Anchor
	runs   []run
	close  bool // little room between the pieces
}

func (l *line) gap() float64 {
	if l.close {
		return wordGap / 2
	}
	return wordGap
}

func (l *line) width() float64 {
	w := l.gap() * float64(len(l.runs)-1)
	for _, r := range l.runs {
		w += width(r.text(), r.st)
	}
	return w
}

func (l *line) draw(p *painter) {
	x := l.at.X
	switch l.anchor {
	case ink.Middle:
		x -= l.width() / 2
	case ink.End:
		x -= l.width()
	}
	for _, r := range l.runs {
		s := r.text()
		p.c.Text(mm(point{x, l.at.Y}), s, r.st.font(), ink.Start, ink.Black, false)
		w := width(s, r.st)
		if r.to != nil {
			p.link(point{x, l.at.Y - textHeight}, w, textHeight, r.to)
		}
		x += w + l.gap()
	}
}

// box is the room that the line takes.
func (l *line) box() ink.Rect {
	w := l.width()
	x := l.at.X
	switch l.anchor {
	case ink.Middle:
		x -= w / 2
	case ink.End:
		x -= w
	}
	return ink.Rect{X: x, Y: l.at.Y - textHeight, W: w, H: textHeight + 0.3}
}

func textAt(x, y float64, s string, st style, a ink.Anchor) *line {
	return &line{at: point{x, y}, anchor: a, runs: []run{{s: s, st: st}}}
}

// valueLines are the ratings printed at a part: those marked to be shown, packed
// into lines of at most room modules.
func valueLines(p *circuit.Part, room float64) []string {
	var out []string
	for _, v := range p.Values {
		if !v.Show || v.Text == "" {
			continue
		}
		if n := len(out); n > 0 && width(out[n-1]+" "+v.Text, valueStyle) <= room {
			out[n-1] += " " + v.Text
			continue
		}
		out = append(out, v.Text)
	}
	return out
}

// title is what a pointer resting on a part tells.
func title(p *circuit.Part) string {
	s := p.Designation
	if p.Description != "" {
		s += " " + p.Description
	}
	var vals []string
	for _, v := range p.Values {
		if v.Text != "" {
			vals = append(vals, v.Text)
		}
	}
	if len(vals) > 0 {
		s += ", " + strings.Join(vals, ", ")
	}
	return s
}
