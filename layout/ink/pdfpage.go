package ink

import (
	"fmt"
	"math"
	"slices"
	"strconv"
	"unicode/utf16"
)

// pdfPage is a Canvas that writes the content of one page: the operators of
// ISO 32000-1, annex A. A state that is set already is not set again.
type pdfPage struct {
	d        *pdfDoc
	n        int // sheet number, from 1
	high     float64
	wide     float64
	ops      []byte
	packed   []byte // the content as a stream object
	annots   []byte
	faults   []error
	pen      *Pen
	fill     Color
	filled   bool // fill is set
	font     Font
	lettered bool   // font is set
	room     []byte // for the text that is being written
}

// usualPage is the room that a page's operators take as a rule.
const usualPage = 1 << 16

// draw writes the content of sheet n.
func (d *pdfDoc) draw(n int) *pdfPage {
	s := d.sheets[n-1]
	g := &pdfPage{d: d, n: n, high: s.H, wide: s.W, ops: make([]byte, 0, usualPage)}
	s.Replay(g)
	g.packed = stream(g.ops, "")
	g.ops = nil
	return g
}

func (g *pdfPage) dictionary() []byte {
	b := fmt.Appendf(nil, "<</Type /Page /Parent %d 0 R /Resources %d 0 R /MediaBox [0 0 %.2f %.2f] /Contents %d 0 R",
		pagesObject, resourcesObject, g.wide*pointsPerMM, g.high*pointsPerMM, pageObject(g.n)+1)
	if len(g.annots) > 0 {
		b = append(append(append(b, " /Annots ["...), g.annots...), ']')
	}
	return append(b, ">>"...)
}

// number writes v and a space to the hundredth, without zeros that say nothing.
func (g *pdfPage) number(v float64) {
	const hundred = 100
	n := int64(math.Round(v * hundred))
	b := g.ops
	if n < 0 {
		b, n = append(b, '-'), -n
	}
	b = strconv.AppendInt(b, n/hundred, 10)
	if rest := n % hundred; rest > 0 {
		b = append(b, '.', byte('0'+rest/10))
		if rest%10 > 0 {
			b = append(b, byte('0'+rest%10))
		}
	}
	g.ops = append(b, ' ')
}

func (g *pdfPage) point(q Point) {
	g.number(q.X * pointsPerMM)
	g.number((g.high - q.Y) * pointsPerMM)
}

func (g *pdfPage) op(name string) { g.ops = append(g.ops, name...) }

// colour writes the three shares of a colour.
func (g *pdfPage) colour(c Color) {
	for _, shift := range []int{16, 8, 0} {
		g.ops = append(strconv.AppendFloat(g.ops, math.Round(1000*float64(c>>shift&0xFF)/255)/1000, 'f', -1, 64), ' ')
	}
}

// Stroke implements Canvas.
func (g *pdfPage) Stroke(p *Path, pen Pen) {
	if g.pen == nil || g.pen.Color != pen.Color {
		g.colour(pen.Color)
		g.op("RG\n")
	}
	if g.pen == nil || g.pen.Width != pen.Width {
		g.number(pen.Width * pointsPerMM)
		g.op("w\n")
	}
	if g.pen == nil && len(pen.Dash) > 0 || g.pen != nil && !slices.Equal(g.pen.Dash, pen.Dash) {
		g.op("[")
		for _, v := range pen.Dash {
			g.number(v * pointsPerMM)
		}
		g.op("] 0 d\n")
	}
	g.pen = &pen
	g.path(p)
	g.op("S\n")
}

// Fill implements Canvas.
func (g *pdfPage) Fill(p *Path, c Color) {
	g.paint(c)
	g.path(p)
	g.op("f\n")
}

// paint sets the colour of fills and letters.
func (g *pdfPage) paint(c Color) {
	if g.filled && g.fill == c {
		return
	}
	g.fill, g.filled = c, true
	g.colour(c)
	g.op("rg\n")
}

func (g *pdfPage) path(p *Path) {
	i := 0
	for _, v := range p.Verbs {
		q := p.Points[i:]
		switch v {
		case MoveTo:
			g.point(q[0])
			g.op("m\n")
			i++
		case LineTo:
			g.point(q[0])
			g.op("l\n")
			i++
		case CubicTo:
			g.point(q[0])
			g.point(q[1])
			g.point(q[2])
			g.op("c\n")
			i += 3
		case Close:
			g.op("h\n")
		}
	}
}

// Text implements Canvas. Signs are numbered by their Unicode value.
func (g *pdfPage) Text(at Point, s string, f Font, a Anchor, c Color, turn bool) {
	g.paint(c)
	g.op("BT ")
	if !g.lettered || g.font != f {
		g.font, g.lettered = f, true
		g.op("/F")
		g.ops = append(strconv.AppendInt(g.ops, int64(f.Face), 10), ' ')
		g.number(f.Size * pointsPerMM)
		g.op("Tf ")
	}
	shift := 0.0
	if a != Start {
		shift = anchorShift(a, Width(s, f))
	}
	if turn {
		g.op("0 1 -1 0 ")
		g.point(Point{at.X, at.Y + shift})
		g.op("Tm ")
	} else {
		g.point(Point{at.X - shift, at.Y})
		g.op("Td ")
	}
	g.room = g.room[:0]
	for _, r := range s {
		for _, u := range utf16.AppendRune(nil, r) {
			g.room = append(g.room, byte(u>>8), byte(u))
		}
	}
	g.ops = escaped(g.ops, g.room)
	g.op(" Tj ET\n")
}

// Group implements Canvas: the content only.
func (g *pdfPage) Group(_ Object, draw func()) { draw() }

// Image implements Imager.
func (g *pdfPage) Image(r Rect, png []byte) {
	g.op("q ")
	g.number(r.W * pointsPerMM)
	g.op("0 0 ")
	g.number(r.H * pointsPerMM)
	g.point(Point{r.X, r.Y + r.H})
	g.ops = fmt.Appendf(g.ops, "cm /I%d Do Q\n", g.d.images[sumOf(png)].object)
}

// Link implements Canvas.
func (g *pdfPage) Link(r Rect, t Target) {
	to, found := g.d.marks[markKey{t.Sheet, t.Anchor}]
	if t.Anchor == "" && t.Sheet >= 1 && t.Sheet <= len(g.d.sheets) {
		to, found = place{sheet: t.Sheet}, true
	}
	if !found {
		g.faults = append(g.faults, fmt.Errorf("sheet %q: link to %q on sheet %d leads nowhere", g.d.sheets[g.n-1].Title, t.Anchor, t.Sheet))
		return
	}
	g.annots = fmt.Appendf(g.annots, "<</Type /Annot /Subtype /Link /Rect [%.2f %.2f %.2f %.2f] /Border [0 0 0]",
		r.X*pointsPerMM, (g.high-r.Y-r.H)*pointsPerMM, (r.X+r.W)*pointsPerMM, (g.high-r.Y)*pointsPerMM)
	g.annots = append(destination(g.annots, to.sheet, g.d.sheets[to.sheet-1].H-to.y), ">>"...)
}

// Mark implements Canvas; findMarks has read it already.
func (g *pdfPage) Mark(string, Point) {}
