package symbols

import "gloamwright/layout/ink"

// The measures of a test point, in modules.
const (
	levelStub   = 1.2 // wire to the middle of the ring, sideways
	uprightStub = 1.7 // the same, up or down
	ring        = 0.3 // radius
	joint       = 0.2 // radius of the dot on the wire
	tagGap      = 0.6 // middle of the ring to the tag
	tagHeight   = 1.72
	tagPad      = 0.55 // beside the letters
	tagCorner   = 0.25
)

// TagBox is the black field of a test point's tag: it starts at at when a is
// Start, ends there when a is End, and lies with its middle on that level.
func TagBox(at ink.Point, label string, a ink.Anchor) ink.Rect {
	w := ink.Width(label, tagFont) + 2*tagPad*M
	x := at.X
	switch a {
	case ink.Middle:
		x -= w / 2
	case ink.End:
		x -= w
	}
	return ink.Rect{X: x, Y: at.Y - tagHeight*M/2, W: w, H: tagHeight * M}
}

var tagFont = ink.Lettering(ink.Bold, normal*M)

// Tag writes a test point's label white on black, the only black field of a
// diagram. Place and anchor are those of TagBox.
func Tag(c ink.Canvas, at ink.Point, label string, a ink.Anchor) {
	b := TagBox(at, label, a)
	c.Fill(new(ink.Path).RoundRect(b, tagCorner*M), ink.Black)
	c.Text(ink.Point{X: b.X + b.W/2, Y: at.Y + normal*M/2}, label, tagFont, ink.Middle, ink.White, false)
}

// Probe draws a test point on a wire at at, mm: the dot, a stub toward d, the
// ring to touch, and the tag beyond it (toward the left, beside it at the right
// otherwise).
func Probe(c ink.Canvas, at ink.Point, d Dir, pen ink.Pen, label string) {
	ringAt, tagAt, a := probe(at, d)
	dx, dy := d.Step()
	edge := ink.Point{X: ringAt.X - float64(dx)*ring*M, Y: ringAt.Y - float64(dy)*ring*M}
	c.Fill(new(ink.Path).Circle(at, joint*M), pen.Color)
	c.Stroke(new(ink.Path).Move(at.X, at.Y).Line(edge.X, edge.Y), pen)
	c.Stroke(new(ink.Path).Circle(ringAt, ring*M), pen)
	Tag(c, tagAt, label, a)
}

// ProbeBox is the box around the ring and the tag that Probe draws.
func ProbeBox(at ink.Point, d Dir, label string) ink.Rect {
	r, tagAt, a := probe(at, d)
	t := TagBox(tagAt, label, a)
	left, right := min(t.X, r.X-ring*M), max(t.X+t.W, r.X+ring*M)
	return ink.Rect{X: left, Y: t.Y, W: right - left, H: t.H}
}

func probe(at ink.Point, d Dir) (ringAt, tagAt ink.Point, a ink.Anchor) {
	dx, dy := d.Step()
	stub := levelStub
	if dx == 0 {
		stub = uprightStub
	}
	ringAt = ink.Point{X: at.X + float64(dx)*stub*M, Y: at.Y + float64(dy)*stub*M}
	if d == Left {
		return ringAt, ink.Point{X: ringAt.X - tagGap*M, Y: ringAt.Y}, ink.End
	}
	return ringAt, ink.Point{X: ringAt.X + tagGap*M, Y: ringAt.Y}, ink.Start
}
