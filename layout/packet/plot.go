package packet

import (
	"math"

	"gloamwright/layout/ink"
)

// Greys of a plot.
const (
	gridGrey  ink.Color = 0xBBBBBB
	stripPale ink.Color = 0xECECEC
	stripGrey ink.Color = 0xE0E0E0
)

// Dashes that tell curves apart, mm on and off; nil is a solid line.
var (
	dashLong    = []float64{2.2, 0.9}
	dashDot     = []float64{3.2, 0.8, 0.6, 0.8}
	dashDots    = []float64{0.6, 0.9}
	curveDashes = [][]float64{nil, dashLong, dashDot}
)

// plot is a picture with two axes while it is drawn.
type plot struct {
	p     *pad
	x, y  axis
	frame ink.Rect
	names []ink.Rect  // boxes of the names that stand already
	inked []ink.Point // places on the curves, close together
}

// xy is a point in the units of the axes.
type xy struct{ x, y float64 }

// plot starts a picture whose frame is r: grid and figures.
func (p *pad) plot(x, y axis, r ink.Rect) *plot {
	g := &plot{p: p, x: x, y: y, frame: r}
	for _, t := range x.ticks {
		at := g.at(xy{t, y.min})
		p.stroke(at.X, r.Y, at.X, r.Y+r.H, hairline, gridGrey)
		p.write(at.X, r.Y+r.H+4, tickText(t), noteText, ink.Middle)
	}
	for _, t := range y.ticks {
		at := g.at(xy{x.min, t})
		p.rule(r.X, at.Y, r.W, hairline, gridGrey)
		p.write(r.X-1.5, at.Y+1.1, tickText(t), noteText, ink.End)
	}
	return g
}

// rightFigures prints the figures of a second upright axis, at the right.
func (g *plot) rightFigures(a axis) {
	r := g.frame
	for _, t := range a.ticks {
		g.p.write(r.X+r.W+1.5, r.Y+r.H*(1-a.at(t))+1.1, tickText(t), noteText, ink.Start)
	}
}

// close draws the frame.
func (g *plot) close() {
	r := g.frame
	g.p.frame(r.X, r.Y, r.W, r.H, 0.35, ink.Black)
}

func (g *plot) at(v xy) ink.Point {
	r := g.frame
	return ink.Point{X: r.X + r.W*g.x.at(v.x), Y: r.Y + r.H*(1-g.y.at(v.y))}
}

func (g *plot) points(values []xy) []ink.Point {
	out := make([]ink.Point, len(values))
	for i, v := range values {
		out[i] = g.at(v)
	}
	return out
}

// curve draws a line through values; what is outside the frame is left out.
func (g *plot) curve(values []xy, width float64, dash []float64) {
	for _, piece := range clipLine(g.points(values), g.frame) {
		g.p.c.Stroke((&ink.Path{}).Polyline(piece...), ink.Pen{Width: width, Color: ink.Black, Dash: dash})
		g.remember(piece)
	}
}

// remember notes where a curve runs, so that names can keep off it.
func (g *plot) remember(piece []ink.Point) {
	const step = 1.0
	for i := 1; i < len(piece); i++ {
		a, z := piece[i-1], piece[i]
		n := 1 + int(math.Hypot(z.X-a.X, z.Y-a.Y)/step)
		for k := range n {
			f := float64(k) / float64(n)
			g.inked = append(g.inked, ink.Point{X: a.X + f*(z.X-a.X), Y: a.Y + f*(z.Y-a.Y)})
		}
	}
}

// area fills the polygon through values.
func (g *plot) area(values []xy, c ink.Color) {
	if poly := clipPolygon(g.points(values), g.frame); len(poly) > 2 {
		g.p.polygon(c, poly...)
	}
}

// above is the room over the frame that one level of upright lines takes, mm.
const above = 8.4

// upright draws a dotted line over the whole height and its words over the frame, the
// figure in bold; level 0 is next to the frame.
func (g *plot) upright(x float64, fig, words string, level int) {
	at := g.at(xy{x, g.y.min})
	y := g.frame.Y - 6 - above*float64(level)
	g.p.stroke(at.X, y+4.4, at.X, g.frame.Y+g.frame.H, 0.35, ink.Black, dashDots...)
	g.remember([]ink.Point{{X: at.X, Y: g.frame.Y}, at})
	g.patch(at.X, y, fig, noteText.as(ink.Bold), ink.Middle)
	g.patch(at.X, y+3.7, words, noteText, ink.Middle)
}

// demand draws a heavy upright line with its words beside its foot.
func (g *plot) demand(x float64, words string) {
	at := g.at(xy{x, g.y.min})
	g.p.stroke(at.X, g.frame.Y, at.X, at.Y, barLine, ink.Black)
	g.remember([]ink.Point{{X: at.X, Y: g.frame.Y}, at})
	st := noteText.as(ink.Bold)
	a, left := ink.Start, at.X+1.2
	if w := spans(words, st).width(); left+w > g.frame.X+g.frame.W-1 {
		a, left = ink.End, at.X-1.2
	}
	g.fixed(left, at.Y-1.8, words, st, a)
}

// level draws a dotted level line with its words at its right end, under it where
// there is room.
func (g *plot) level(y float64, words string) {
	at := g.at(xy{g.x.min, y})
	right := g.frame.X + g.frame.W
	g.p.stroke(at.X, at.Y, right, at.Y, 0.35, ink.Black, dashDots...)
	y1 := at.Y + 3.6
	if y1 > g.frame.Y+g.frame.H-1 {
		y1 = at.Y - 1.4
	}
	g.fixed(right-1.2, y1, words, noteText, ink.End)
}

// name writes the name of a curve beside one of its values, the first whose
// neighbourhood is free; the first line is bold. Without a place there is no name.
func (g *plot) name(values []xy, lines ...string) {
	if len(values) == 0 {
		return
	}
	w := 0.0
	for _, l := range lines {
		w = max(w, spans(l, noteText.as(ink.Bold)).width())
	}
	h := noteText.lead * float64(len(lines))
	for _, most := range []int{0, 2, 6, len(g.inked)} { // places of curves that the name may hide
		for _, v := range values {
			c := g.at(v)
			for _, d := range []ink.Point{{X: 1.6, Y: 0}, {X: 1.6, Y: -h - 0.8}, {X: -w - 1.2, Y: 0}, {X: -w / 2, Y: -h - 1.2}, {X: -w - 1.2, Y: -h - 0.8}, {X: -w / 2, Y: 1.2}} {
				if box := (ink.Rect{X: c.X + d.X, Y: c.Y + d.Y, W: w, H: h}); g.free(box) && g.hides(box) <= most {
					g.put(box, lines)
					return
				}
			}
		}
	}
	c := g.at(values[0])
	g.put(ink.Rect{X: c.X + 1.2, Y: c.Y, W: w, H: h}, lines)
}

// hides counts the noted places of curves in a box.
func (g *plot) hides(b ink.Rect) int {
	n := 0
	for _, q := range g.inked {
		if q.X > b.X-0.4 && q.X < b.X+b.W+0.4 && q.Y > b.Y && q.Y < b.Y+b.H {
			n++
		}
	}
	return n
}

func (g *plot) put(box ink.Rect, lines []string) {
	g.names = append(g.names, box)
	for i, l := range lines {
		st := noteText
		if i == 0 {
			st = st.as(ink.Bold)
		}
		g.patch(box.X, box.Y+3+noteText.lead*float64(i), l, st, ink.Start)
	}
}

// free reports whether a box lies in the frame and on no other name.
func (g *plot) free(b ink.Rect) bool {
	const clear = 0.8
	r := g.frame
	if b.X < r.X+clear || b.Y < r.Y+clear || b.X+b.W > r.X+r.W-clear || b.Y+b.H > r.Y+r.H-clear {
		return false
	}
	for _, n := range g.names {
		if b.X < n.X+n.W+clear && n.X < b.X+b.W+clear && b.Y < n.Y+n.H+clear && n.Y < b.Y+b.H+clear {
			return false
		}
	}
	return true
}

// fixed writes words at a place that names then leave free.
func (g *plot) fixed(x, y float64, words string, st style, a ink.Anchor) {
	w := spans(words, st).width()
	left := x
	if a == ink.End {
		left -= w
	}
	g.names = append(g.names, ink.Rect{X: left, Y: y - 3, W: w, H: st.lead})
	g.patch(x, y, words, st, a)
}

// patch writes words on a white ground.
func (g *plot) patch(x, y float64, words string, st style, a ink.Anchor) {
	l := spans(words, st)
	w, size := l.width(), st.font().Size
	left := x
	switch a {
	case ink.Middle:
		left -= w / 2
	case ink.End:
		left -= w
	}
	g.p.fill(left-0.5, y-0.8*size, w+1, 1.05*size, ink.White)
	g.p.text(x, y, l, a)
}
