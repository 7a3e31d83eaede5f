package ink

import "math"

// Quad adds a quadratic Bézier segment with handle c and end e, raised to a
// cubic: the handles lie at two thirds of the way to c.
func (p *Path) Quad(c, e Point) *Path {
	s := p.end()
	lift := func(q Point) Point { return Point{q.X + (c.X-q.X)*2/3, q.Y + (c.Y-q.Y)*2/3} }
	return p.Cubic(lift(s), lift(e), e)
}

// Polyline adds an open piece through the points. Fewer than two points add
// nothing.
func (p *Path) Polyline(points ...Point) *Path {
	if len(points) < 2 {
		return p
	}
	p.Move(points[0].X, points[0].Y)
	for _, q := range points[1:] {
		p.Line(q.X, q.Y)
	}
	return p
}

// Polygon adds a closed piece through the points. Fewer than three points add
// nothing.
func (p *Path) Polygon(points ...Point) *Path {
	if len(points) < 3 {
		return p
	}
	return p.Polyline(points...).Close()
}

// Rect adds a closed rectangle, clockwise from its upper left corner.
func (p *Path) Rect(r Rect) *Path {
	return p.Polygon(Point{r.X, r.Y}, Point{r.X + r.W, r.Y}, Point{r.X + r.W, r.Y + r.H}, Point{r.X, r.Y + r.H})
}

// RoundRect adds a closed rectangle with corners rounded by radius mm. A radius
// over half the shorter side is cut to it; none gives a plain rectangle.
func (p *Path) RoundRect(r Rect, radius float64) *Path {
	radius = min(radius, r.W/2, r.H/2)
	if radius <= 0 {
		return p.Rect(r)
	}
	right, bottom := r.X+r.W, r.Y+r.H
	p.Move(r.X+radius, r.Y)
	p.Line(right-radius, r.Y).sweep(Point{right - radius, r.Y + radius}, radius, radius, -math.Pi/2, math.Pi/2)
	p.Line(right, bottom-radius).sweep(Point{right - radius, bottom - radius}, radius, radius, 0, math.Pi/2)
	p.Line(r.X+radius, bottom).sweep(Point{r.X + radius, bottom - radius}, radius, radius, math.Pi/2, math.Pi/2)
	p.Line(r.X, r.Y+radius).sweep(Point{r.X + radius, r.Y + radius}, radius, radius, math.Pi, math.Pi/2)
	return p.Close()
}

// Circle adds a full circle of radius r mm about c.
func (p *Path) Circle(c Point, r float64) *Path { return p.Ellipse(c, r, r) }

// Ellipse adds a full ellipse with half axes rx and ry mm about c.
func (p *Path) Ellipse(c Point, rx, ry float64) *Path {
	p.Move(c.X+rx, c.Y)
	return p.sweep(c, rx, ry, 0, 2*math.Pi).Close()
}

// Arc adds a circular arc of radius r mm from the present point to end. It runs
// clockwise on the page (y down) when clockwise is true; large chooses the arc
// over 180 degrees. A radius under half the distance is raised to it.
func (p *Path) Arc(end Point, r float64, clockwise, large bool) *Path {
	s := p.end()
	dx, dy := end.X-s.X, end.Y-s.Y
	d := math.Hypot(dx, dy)
	if d == 0 {
		return p
	}
	r = max(r, d/2)
	// The centre lies beside the middle of the chord, on its right hand (y
	// down) for a small clockwise arc.
	h := math.Sqrt(max(0, r*r-d*d/4))
	if clockwise == large {
		h = -h
	}
	c := Point{(s.X+end.X)/2 - h*dy/d, (s.Y+end.Y)/2 + h*dx/d}
	from := math.Atan2(s.Y-c.Y, s.X-c.X)
	turn := math.Atan2(end.Y-c.Y, end.X-c.X) - from
	if clockwise && turn <= 0 {
		turn += 2 * math.Pi
	}
	if !clockwise && turn >= 0 {
		turn -= 2 * math.Pi
	}
	p.sweep(c, r, r, from, turn)
	p.Points[len(p.Points)-1] = end // no rounding at the joint
	return p
}

// Sector adds the closed piece of a circle between two angles in degrees,
// measured clockwise on the page from the direction of x.
func (p *Path) Sector(c Point, r, from, to float64) *Path {
	a, b := from*math.Pi/180, to*math.Pi/180
	p.Move(c.X, c.Y).Line(c.X+r*math.Cos(a), c.Y+r*math.Sin(a))
	return p.sweep(c, r, r, a, b-a).Close()
}

// sweep adds an elliptical arc from angle from over turn radians, in pieces of
// at most a quarter. The handle length 4/3·tan(piece/4) keeps each piece within
// 0.03 % of the radius.
func (p *Path) sweep(c Point, rx, ry, from, turn float64) *Path {
	n := int(math.Ceil(math.Abs(turn)/(math.Pi/2) - 1e-9))
	n = max(n, 1)
	step := turn / float64(n)
	k := 4.0 / 3 * math.Tan(step/4)
	at := func(a, along float64) Point {
		sin, cos := math.Sincos(a)
		return Point{c.X + rx*(cos-along*sin), c.Y + ry*(sin+along*cos)}
	}
	for i := range n {
		a := from + step*float64(i)
		b := a + step
		p.Cubic(at(a, k), at(b, -k), at(b, 0))
	}
	return p
}

// end is the last point of the path, zero when it is empty.
func (p *Path) end() Point {
	if len(p.Points) == 0 {
		return Point{}
	}
	return p.Points[len(p.Points)-1]
}

// Map returns a copy of the path with every point moved by f. An affine f gives
// the moved shape exactly.
func (p *Path) Map(f func(Point) Point) *Path {
	q := &Path{Verbs: append([]Verb(nil), p.Verbs...), Points: make([]Point, len(p.Points))}
	for i, pt := range p.Points {
		q.Points[i] = f(pt)
	}
	return q
}

// Bounds is the upright box around the path itself, without the width of a pen.
func (p *Path) Bounds() Rect {
	if len(p.Points) == 0 {
		return Rect{}
	}
	lo, hi := p.Points[0], p.Points[0]
	grow := func(q Point) {
		lo.X, lo.Y = min(lo.X, q.X), min(lo.Y, q.Y)
		hi.X, hi.Y = max(hi.X, q.X), max(hi.Y, q.Y)
	}
	p.Segments(func(from Point, v Verb, q []Point) {
		grow(q[len(q)-1])
		if v != CubicTo {
			return
		}
		for _, t := range extremes(from.X, q[0].X, q[1].X, q[2].X) {
			grow(onCubic(from, q, t))
		}
		for _, t := range extremes(from.Y, q[0].Y, q[1].Y, q[2].Y) {
			grow(onCubic(from, q, t))
		}
	})
	return Rect{lo.X, lo.Y, hi.X - lo.X, hi.Y - lo.Y}
}

// Segments calls f for every segment with the point it starts from and its own
// points. A Close comes as LineTo the start of its piece, left out when the piece
// is there already.
func (p *Path) Segments(f func(from Point, v Verb, points []Point)) {
	var from, start Point
	i := 0
	for _, v := range p.Verbs {
		n := 1
		switch v {
		case CubicTo:
			n = 3
		case Close:
			if from != start {
				f(from, LineTo, []Point{start})
			}
			from = start
			continue
		}
		q := p.Points[i : i+n]
		if v == MoveTo {
			start = q[0]
		}
		f(from, v, q)
		from = q[n-1]
		i += n
	}
}

func onCubic(from Point, q []Point, t float64) Point {
	m := 1 - t
	a, b, c, d := m*m*m, 3*m*m*t, 3*m*t*t, t*t*t
	return Point{a*from.X + b*q[0].X + c*q[1].X + d*q[2].X, a*from.Y + b*q[0].Y + c*q[1].Y + d*q[2].Y}
}

// extremes are the parameters inside (0, 1) where a cubic of the given ordinates
// stands still: the roots of its derivative.
func extremes(p0, p1, p2, p3 float64) (out []float64) {
	a, b, c := p3-3*p2+3*p1-p0, 2*(p2-2*p1+p0), p1-p0
	roots := []float64{-c / b}
	if a != 0 {
		d := math.Sqrt(b*b - 4*a*c) // NaN without roots, dropped below
		roots = []float64{(-b + d) / (2 * a), (-b - d) / (2 * a)}
	}
	for _, t := range roots {
		if t > 0 && t < 1 {
			out = append(out, t)
		}
	}
	return out
}

// Length is the length of the path in mm; curves are measured in short chords,
// within 0.1 % for quarter circles.
func (p *Path) Length() float64 {
	const chords = 16
	sum := 0.0
	p.Segments(func(from Point, v Verb, q []Point) {
		switch v {
		case LineTo:
			sum += math.Hypot(q[0].X-from.X, q[0].Y-from.Y)
		case CubicTo:
			last := from
			for k := 1; k <= chords; k++ {
				next := onCubic(from, q, float64(k)/chords)
				sum += math.Hypot(next.X-last.X, next.Y-last.Y)
				last = next
			}
		}
	})
	return sum
}

// FitDash scales a dash pattern, in mm on, off, …, so that it suits the path: an
// open one begins and ends with a whole first dash, a closed one meets itself
// without a break. The scale is as near 1 as can be.
func (p *Path) FitDash(dash ...float64) []float64 {
	period := 0.0
	for _, d := range dash {
		period += d
	}
	length := p.Length()
	if len(dash) == 0 || period <= 0 || length <= 0 {
		return nil
	}
	first := dash[0]
	if p.Verbs[len(p.Verbs)-1] == Close {
		first = 0
	}
	n := max(1, math.Round((length-first)/period))
	scale := length / (n*period + first)
	out := make([]float64, len(dash))
	for i, d := range dash {
		out[i] = d * scale
	}
	return out
}
