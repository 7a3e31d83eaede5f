package schematic

import (
	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// The pens. Neighbours in meaning differ by a factor of at least 1.4.
var (
	normalPen     = ink.Pen{Width: 0.25}
	railPen       = ink.Pen{Width: 0.5}
	middlePen     = ink.Pen{Width: 0.35}
	thinPen       = ink.Pen{Width: 0.18}
	thinFigurePen = ink.Pen{Width: 0.18}
	guidePen      = ink.Pen{Width: 0.25, Dash: []float64{0.25, 2.25}}
)

// dashLengths is the boundary's long dash, gap, dot, gap in mm: 24-3-0.5-3 line
// widths (ISO 128-2, from memory).
var dashLengths = []float64{24 * 0.25, 3 * 0.25, 0.5 * 0.25, 3 * 0.25}

const (
	dotRadius     = 0.2  // joint of wires
	railDotRadius = 0.26 // joint on a rail
	ringRadius    = 0.3  // terminal and test point
)

// painter draws on a canvas in modules.
type painter struct {
	c    ink.Canvas
	goTo func(pl *place) (ink.Target, bool)
}

func mm(p point) ink.Point { return ink.Point{X: p.X * module, Y: p.Y * module} }

func (p *painter) link(at point, w, h float64, to *place) {
	if t, ok := p.goTo(to); ok {
		p.c.Link(ink.Rect{X: at.X * module, Y: at.Y * module, W: w * module, H: h * module}, t)
	}
}

// stroke is a polyline.
type stroke struct {
	pts    []point
	closed bool
	pen    ink.Pen
}

func (s *stroke) draw(p *painter) {
	path := &ink.Path{}
	for i, q := range s.pts {
		if i == 0 {
			path.Move(mm(q).X, mm(q).Y)
			continue
		}
		path.Line(mm(q).X, mm(q).Y)
	}
	if s.closed {
		path.Close()
	}
	p.c.Stroke(path, s.pen)
}

func segment(pen ink.Pen, x0, y0, x1, y1 float64) *stroke {
	return &stroke{pts: []point{{x0, y0}, {x1, y1}}, pen: pen}
}

func box(pen ink.Pen, x0, y0, x1, y1 float64) *stroke {
	return &stroke{pts: []point{{x0, y0}, {x1, y0}, {x1, y1}, {x0, y1}}, closed: true, pen: pen}
}

// oval is an ellipse: a cable around its cores.
type oval struct {
	at     point
	rx, ry float64
}

func (o *oval) draw(p *painter) {
	p.c.Stroke((&ink.Path{}).Ellipse(mm(o.at), o.rx*module, o.ry*module), normalPen)
}

// disc is a filled circle.
type disc struct {
	at point
	r  float64
}

func (d *disc) draw(p *painter) {
	p.c.Fill((&ink.Path{}).Circle(mm(d.at), d.r*module), ink.Black)
}

// ring is an open circle.
type ring struct {
	at point
	r  float64
}

func (r *ring) draw(p *painter) {
	p.c.Stroke((&ink.Path{}).Circle(mm(r.at), r.r*module), normalPen)
}

// head is a filled arrowhead.
type head struct {
	tip      point
	dx, dy   float64 // direction, one of them ±1
	len, wid float64
}

func (h *head) draw(p *painter) {
	bx, by := h.tip.X-h.dx*h.len, h.tip.Y-h.dy*h.len
	w := h.wid / 2
	p.c.Fill((&ink.Path{}).Polygon(mm(h.tip), mm(point{bx - h.dy*w, by + h.dx*w}), mm(point{bx + h.dy*w, by - h.dx*w})), ink.Black)
}

// tag is a test point's black label; at is the middle of its left edge.
type tag struct {
	at    point
	label string
}

func (t *tag) draw(p *painter) { symbols.Tag(p.c, mm(t.at), t.label, ink.Start) }

// boundarySide is one straight dash-dot line that begins and ends with a whole dash.
func boundarySide(x0, y0, x1, y1 float64) *stroke {
	pen := normalPen
	pen.Dash = (&ink.Path{}).Move(x0*module, y0*module).Line(x1*module, y1*module).FitDash(dashLengths...)
	return segment(pen, x0, y0, x1, y1)
}

// boundary frames a place or a stage; open holds the letters of the sides that
// are left open.
func boundary(o *object, x0, y0, x1, y1 float64, open string) {
	has := func(b byte) bool {
		for i := range len(open) {
			if open[i] == b {
				return false
			}
		}
		return true
	}
	if has('N') {
		o.add(boundarySide(x0, y0, x1, y0))
	}
	if has('E') {
		o.add(boundarySide(x1, y0, x1, y1))
	}
	if has('S') {
		o.add(boundarySide(x0, y1, x1, y1))
	}
	if has('W') {
		o.add(boundarySide(x0, y0, x0, y1))
	}
}
