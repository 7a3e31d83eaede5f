package packet

import (
	"gloamwright/layout/ink"
)

// pad draws one sheet of lists.
type pad struct {
	c    ink.Canvas
	pg   page
	b    *book
	n    int // sheet number
	last int // number of sheets
}

func (p *pad) stroke(x1, y1, x2, y2, w float64, c ink.Color, dash ...float64) {
	p.c.Stroke((&ink.Path{}).Move(x1, y1).Line(x2, y2), ink.Pen{Width: w, Color: c, Dash: dash})
}

// rule is a level line.
func (p *pad) rule(x, y, length, w float64, c ink.Color) { p.stroke(x, y, x+length, y, w, c) }

func (p *pad) frame(x, y, w, h, lw float64, c ink.Color, dash ...float64) {
	p.c.Stroke((&ink.Path{}).Rect(ink.Rect{X: x, Y: y, W: w, H: h}), ink.Pen{Width: lw, Color: c, Dash: dash})
}

func (p *pad) fill(x, y, w, h float64, c ink.Color) {
	p.c.Fill((&ink.Path{}).Rect(ink.Rect{X: x, Y: y, W: w, H: h}), c)
}

// text writes a set line with its baseline at y and returns its width. Designations
// in it become links to where the thing is drawn or listed.
func (p *pad) text(x, y float64, l line, a ink.Anchor) float64 {
	w := l.width()
	switch a {
	case ink.Middle:
		x -= w / 2
	case ink.End:
		x -= w
	}
	for _, s := range l {
		x += s.pre
		sw := ink.Width(s.text, s.font)
		p.c.Text(ink.Point{X: x, Y: y + s.drop}, s.text, s.font, ink.Start, s.color, false)
		if s.ref != "" {
			p.linkTo(ink.Rect{X: x, Y: y - s.font.Size*0.8, W: sw, H: s.font.Size}, s.ref)
		}
		x += sw
	}
	return w
}

// write sets a text on one line that is known to fit.
func (p *pad) write(x, y float64, text string, st style, a ink.Anchor) float64 {
	return p.text(x, y, spans(text, st), a)
}

// lines writes lines below each other, the first baseline at y.
func (p *pad) lines(x, y float64, list []line, lead float64) {
	for i, l := range list {
		p.text(x, y+float64(i)*lead, l, ink.Start)
	}
}

// fit writes a text on one line of at most width mm; what is cut is noted.
func (p *pad) fit(x, y float64, text string, st style, width float64, a ink.Anchor) float64 {
	l, cut := cutLine(text, st, width)
	if cut {
		p.b.noteCut(text)
	}
	return p.text(x, y, l, a)
}

// tick draws a box to tick, centred.
func (p *pad) tick(cx, cy float64) {
	const half = tickSize / 2
	p.fill(cx-half, cy-half, tickSize, tickSize, ink.White)
	p.frame(cx-half, cy-half, tickSize, tickSize, tickLine, ink.Dusk)
}

// blank draws a frame to write in.
func (p *pad) blank(x, y, w, h float64) {
	p.fill(x, y, w, h, ink.White)
	p.frame(x, y, w, h, blankLine, ink.Dusk)
}

// namedBlank is a frame with its caption above: 11.4 high in all.
func (p *pad) namedBlank(x, y, w float64, caption, guide string) {
	p.write(x, y+2.4, caption, blankCaption, ink.Start)
	p.blank(x, y+3.4, w, blankRow)
	if guide != "" {
		p.write(x+w-1.2, y+3.4+blankRow-1.3, guide, guideText, ink.End)
	}
}

const namedBlankHeight = 3.4 + blankRow

// dateGuide stands in blanks for dates.
const dateGuide = "year-month-day"

func (p *pad) circle(x, y, r, w float64, c ink.Color) {
	p.c.Stroke((&ink.Path{}).Circle(ink.Point{X: x, Y: y}, r), ink.Pen{Width: w, Color: c})
}

func (p *pad) disc(x, y, r float64, c ink.Color) {
	p.c.Fill((&ink.Path{}).Circle(ink.Point{X: x, Y: y}, r), c)
}

// halfDisc is the sun on a line at y.
func (p *pad) halfDisc(x, y, r float64) {
	q := (&ink.Path{}).Move(x-r, y)
	const k = 0.5522847498 // control point of a quarter circle
	q.Cubic(ink.Point{X: x - r, Y: y - k*r}, ink.Point{X: x - k*r, Y: y - r}, ink.Point{X: x, Y: y - r})
	q.Cubic(ink.Point{X: x + k*r, Y: y - r}, ink.Point{X: x + r, Y: y - k*r}, ink.Point{X: x + r, Y: y})
	p.c.Fill(q.Close(), ink.Dusk)
}

func (p *pad) polygon(c ink.Color, pts ...ink.Point) {
	p.c.Fill((&ink.Path{}).Polygon(pts...), c)
}

// arrow is a line with a head at its end, level or upright.
func (p *pad) arrow(x1, y1, x2, y2, w float64, dash ...float64) {
	const long, half = 2.8, 1.3
	dx, dy := sign(x2-x1), sign(y2-y1)
	p.stroke(x1, y1, x2-dx*long, y2-dy*long, w, ink.Black, dash...)
	p.polygon(ink.Black, ink.Point{X: x2, Y: y2},
		ink.Point{X: x2 - dx*long - dy*half, Y: y2 - dy*long - dx*half},
		ink.Point{X: x2 - dx*long + dy*half, Y: y2 - dy*long + dx*half})
}

func sign(v float64) float64 {
	switch {
	case v > 0:
		return 1
	case v < 0:
		return -1
	}
	return 0
}

// changed draws the revision bar beside a row.
func (p *pad) changed(y, h float64) {
	x := p.pg.l - 2.5
	p.stroke(x, y+0.3, x, y+h-0.3, barLine, ink.Black)
}
