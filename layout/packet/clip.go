package packet

import "gloamwright/layout/ink"

// side is one edge of a rectangle: inside tells which half plane stays, cut where a
// segment crosses it.
type side struct {
	inside func(ink.Point) bool
	cut    func(a, b ink.Point) ink.Point
}

func sides(r ink.Rect) []side {
	atX := func(x float64) func(a, b ink.Point) ink.Point {
		return func(a, b ink.Point) ink.Point { return ink.Point{X: x, Y: a.Y + (b.Y-a.Y)*(x-a.X)/(b.X-a.X)} }
	}
	atY := func(y float64) func(a, b ink.Point) ink.Point {
		return func(a, b ink.Point) ink.Point { return ink.Point{X: a.X + (b.X-a.X)*(y-a.Y)/(b.Y-a.Y), Y: y} }
	}
	right, bottom := r.X+r.W, r.Y+r.H
	return []side{
		{func(p ink.Point) bool { return p.X >= r.X }, atX(r.X)},
		{func(p ink.Point) bool { return p.X <= right }, atX(right)},
		{func(p ink.Point) bool { return p.Y >= r.Y }, atY(r.Y)},
		{func(p ink.Point) bool { return p.Y <= bottom }, atY(bottom)},
	}
}

// clipPolygon cuts a polygon to a rectangle: Sutherland and Hodgman, "Reentrant
// polygon clipping", Communications of the ACM 17 (1974).
func clipPolygon(poly []ink.Point, r ink.Rect) []ink.Point {
	for _, s := range sides(r) {
		var out []ink.Point
		for i, b := range poly {
			a := poly[(i+len(poly)-1)%len(poly)]
			if s.inside(a) != s.inside(b) {
				out = append(out, s.cut(a, b))
			}
			if s.inside(b) {
				out = append(out, b)
			}
		}
		poly = out
	}
	return poly
}

// clipLine cuts a polyline to a rectangle; what leaves and comes back is several
// pieces.
func clipLine(line []ink.Point, r ink.Rect) [][]ink.Point {
	pieces := [][]ink.Point{line}
	for _, s := range sides(r) {
		var next [][]ink.Point
		for _, p := range pieces {
			next = append(next, clipSide(p, s)...)
		}
		pieces = next
	}
	return pieces
}

func clipSide(line []ink.Point, s side) [][]ink.Point {
	var out [][]ink.Point
	var now []ink.Point
	for i, b := range line {
		if i > 0 && s.inside(line[i-1]) != s.inside(b) {
			now = append(now, s.cut(line[i-1], b))
			if s.inside(line[i-1]) {
				out, now = append(out, now), nil
			}
		}
		if s.inside(b) {
			now = append(now, b)
		}
	}
	if len(now) > 1 {
		out = append(out, now)
	}
	return out
}
