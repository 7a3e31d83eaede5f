package ink

// Verb is the kind of one path segment.
type Verb uint8

// The verbs. A path has no arcs or quadratics: they are lowered to cubics when
// the path is built, so that back ends cannot differ.
const (
	MoveTo  Verb = iota // 1 point
	LineTo              // 1 point
	CubicTo             // 3 points: two handles, the end
	Close               // no point
)

// Path is a sequence of segments. The zero Path is empty and ready to use.
type Path struct {
	Verbs  []Verb
	Points []Point
}

// Move starts a new piece at p.
func (p *Path) Move(x, y float64) *Path {
	p.Verbs = append(p.Verbs, MoveTo)
	p.Points = append(p.Points, Point{x, y})
	return p
}

// Line adds a straight segment.
func (p *Path) Line(x, y float64) *Path {
	p.Verbs = append(p.Verbs, LineTo)
	p.Points = append(p.Points, Point{x, y})
	return p
}

// Cubic adds a Bézier segment with handles a, b and end e.
func (p *Path) Cubic(a, b, e Point) *Path {
	p.Verbs = append(p.Verbs, CubicTo)
	p.Points = append(p.Points, a, b, e)
	return p
}

// Close closes the piece with a straight segment to its start.
func (p *Path) Close() *Path {
	p.Verbs = append(p.Verbs, Close)
	return p
}
