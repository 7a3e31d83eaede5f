package symbols

import "gloamwright/layout/ink"

// Heights of lettering in symbols, in modules. Small letters occur only inside
// blocks of four modules, which serve on sheets printed at full size; diagrams
// that may be reduced take the blocks of six.
const (
	small  = 0.72
	normal = 1.0
	large  = 1.4
)

// form says in which turns a shape shows and whether it turns with the symbol.
type form uint8

const (
	turns form = iota // goes round with the symbol
	stays             // same coordinates in every turn
	inV               // only upright (V, U), in its own coordinates
	inH               // only level (H, HU), in its own coordinates
)

// shape is one stroke, filled area or text of a symbol, in modules.
type shape struct {
	path             *ink.Path // nil for text
	fill, bold, dash bool
	form             form

	text   string
	slot   bool // text is given when drawing
	at     ink.Point
	height float64
	anchor ink.Anchor
}

func points(xy []float64) []ink.Point {
	out := make([]ink.Point, len(xy)/2)
	for i := range out {
		out[i] = ink.Point{X: xy[2*i], Y: xy[2*i+1]}
	}
	return out
}

// line is an open line through x, y, x, y, ….
func line(xy ...float64) shape { return shape{path: new(ink.Path).Polyline(points(xy)...)} }

// polygon is a closed line.
func polygon(xy ...float64) shape { return shape{path: new(ink.Path).Polygon(points(xy)...)} }

// box is a rectangle with its upper left corner at (x, y).
func box(x, y, w, h float64) shape {
	return shape{path: new(ink.Path).Rect(ink.Rect{X: x, Y: y, W: w, H: h})}
}

func circle(x, y, r float64) shape {
	return shape{path: new(ink.Path).Circle(ink.Point{X: x, Y: y}, r)}
}

func ellipse(x, y, rx, ry float64) shape {
	return shape{path: new(ink.Path).Ellipse(ink.Point{X: x, Y: y}, rx, ry)}
}

// cw and ccw are arcs from (x1, y1) to (x2, y2), clockwise or not on the page.
func cw(x1, y1, x2, y2, r float64) shape  { return arc(x1, y1, x2, y2, r, true, false) }
func ccw(x1, y1, x2, y2, r float64) shape { return arc(x1, y1, x2, y2, r, false, false) }

// cwLarge is the clockwise arc over half a circle.
func cwLarge(x1, y1, x2, y2, r float64) shape { return arc(x1, y1, x2, y2, r, true, true) }

func arc(x1, y1, x2, y2, r float64, clockwise, long bool) shape {
	return shape{path: new(ink.Path).Move(x1, y1).Arc(ink.Point{X: x2, Y: y2}, r, clockwise, long)}
}

// text stands upright in every turn; (x, y) is the anchor on the baseline.
func text(x, y float64, s string, height float64, a ink.Anchor) shape {
	return shape{text: s, at: ink.Point{X: x, Y: y}, height: height, anchor: a}
}

// slot is a place for a text that the caller of Draw gives.
func slot(x, y float64, a ink.Anchor) shape {
	return shape{slot: true, at: ink.Point{X: x, Y: y}, height: normal, anchor: a}
}

func (s shape) filled() shape { s.fill = true; return s }
func (s shape) heavy() shape  { s.bold = true; return s }
func (s shape) dashed() shape { s.dash = true; return s }
func (s shape) keep() shape   { s.form = stays; return s }
func (s shape) onlyV() shape  { s.form = inV; return s }
func (s shape) onlyH() shape  { s.form = inH; return s }

// with is base followed by more, for symbols that build on another.
func with(base []shape, more ...shape) []shape {
	return append(append([]shape(nil), base...), more...)
}

// shows reports whether the shape is drawn in turn t.
func (s shape) shows(t Turn) bool {
	switch s.form {
	case inV:
		return !t.level()
	case inH:
		return t.level()
	}
	return true
}

// turned is the path in turn t.
func (s shape) turned(t Turn) *ink.Path {
	if s.form != turns {
		t = V
	}
	return s.path.Map(t.Apply)
}

// textAt is the anchor of a text in turn t: the middle of its letters goes round
// with the symbol, the letters stay upright.
func (s shape) textAt(t Turn) ink.Point {
	if s.form != turns || t == V {
		return s.at
	}
	width := ink.Width(s.text, ink.Lettering(ink.Regular, s.height))
	half := [...]float64{ink.Start: width / 2, ink.Middle: 0, ink.End: -width / 2}[s.anchor]
	m := t.Apply(ink.Point{X: s.at.X + half, Y: s.at.Y - s.height/2})
	return ink.Point{X: m.X - half, Y: m.Y + s.height/2}
}

// through is the pins of a part of four modules that current runs through.
func through(first, second string) []Pin {
	return []Pin{{first, 0, -2, Up}, {second, 0, 2, Down}}
}
