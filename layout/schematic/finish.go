package schematic

import (
	"cmp"
	"fmt"
	"slices"

	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// finish turns the scene's wires, symbols, test points and references into drawn
// objects: pieces of one line are joined, joints get their dots, objects get their
// order.
func (s *scene) finish(b *book) {
	s.joinPieces()
	s.settleRings()
	s.drawWires(b)
	s.drawDots()
	for _, y := range s.symbols {
		y.draw(s, b)
	}
	for _, p := range s.points {
		r := p.box()
		p.obj.hit(r)
		p.obj.add(p)
	}
	for _, n := range s.numbers {
		s.conductor(b, n.c).add(n.l)
	}
	rank := map[string]int{}
	for i, c := range []string{classBoundary, classGuide, classRail, classWire, classDot, classCable, classPart,
		classTerminal, classTestPoint, classReference, classBlock, classTable, classNote} {
		rank[c] = i
	}
	slices.SortStableFunc(s.objects, func(x, y *object) int { return cmp.Compare(rank[x.Class], rank[y.Class]) })
}

// joinPieces makes one polyline of wires that meet end to end with nothing else at
// the place, and drops bends that are none.
func (s *scene) joinPieces() {
	busy := s.fixedPoints()
	for {
		ends := map[node][]*wire{}
		for _, w := range s.wires {
			if !w.rail {
				ends[w.pts[0]] = append(ends[w.pts[0]], w)
				ends[w.pts[len(w.pts)-1]] = append(ends[w.pts[len(w.pts)-1]], w)
			}
		}
		joined := false
		for _, w := range s.wires {
			if w.rail {
				continue
			}
			n := w.pts[len(w.pts)-1]
			if at := ends[n]; len(at) == 2 && at[0] != at[1] && !busy[n] && !s.passes(n, at[0], at[1]) {
				other := at[0]
				if other == w {
					other = at[1]
				}
				if w.cond != nil && other.cond != nil && w.cond != other.cond {
					continue
				}
				s.join(w, other, n)
				joined = true
				break
			}
		}
		if !joined {
			break
		}
	}
	for _, w := range s.wires {
		w.pts = straighten(w.pts)
	}
}

// fixedPoints are the places where a wire's end stands for something.
func (s *scene) fixedPoints() map[node]bool {
	busy := map[node]bool{}
	for _, y := range s.symbols {
		for _, p := range y.pinsAt() {
			busy[p.at] = true
		}
	}
	for _, p := range s.points {
		busy[p.at] = true
	}
	for _, r := range s.refs {
		for _, e := range r.ends {
			busy[e] = true
		}
	}
	return busy
}

// passes reports whether a wire other than a and b runs through n.
func (s *scene) passes(n node, a, b *wire) bool {
	for _, w := range s.wires {
		if w != a && w != b && w.touches(n) {
			return true
		}
	}
	return false
}

func (s *scene) join(w, other *wire, at node) {
	pts := slices.Clone(other.pts)
	if pts[0] != at {
		slices.Reverse(pts)
	}
	w.pts = append(w.pts, pts[1:]...)
	if w.cond == nil {
		w.cond = other.cond
	}
	if w.name == "" {
		w.name = other.name
	}
	s.wires = slices.DeleteFunc(s.wires, func(x *wire) bool { return x == other })
}

func straighten(pts []node) []node {
	out := pts[:1:1]
	for i := 1; i < len(pts); i++ {
		if i+1 < len(pts) && (out[len(out)-1].X == pts[i].X && pts[i].X == pts[i+1].X ||
			out[len(out)-1].Y == pts[i].Y && pts[i].Y == pts[i+1].Y) {
			continue
		}
		out = append(out, pts[i])
	}
	return out
}

// touches reports whether n lies on the wire.
func (w *wire) touches(n node) bool {
	for i := 1; i < len(w.pts); i++ {
		a, b := w.pts[i-1], w.pts[i]
		if between(a.X, n.X, b.X) && between(a.Y, n.Y, b.Y) {
			return true
		}
	}
	return false
}

func between(a, x, b int) bool { return min(a, b) <= x && x <= max(a, b) }

// directions counts in how many directions the wire leaves n.
func (w *wire) directions(n node) int {
	d := 0
	for i := 1; i < len(w.pts); i++ {
		a, b := w.pts[i-1], w.pts[i]
		switch {
		case a == n || b == n:
			d++
		case between(a.X, n.X, b.X) && between(a.Y, n.Y, b.Y):
			d += 2
		}
	}
	return d
}

func (s *scene) drawWires(b *book) {
	tracks := 0
	for _, w := range s.wires {
		var o *object
		switch {
		case w.cond != nil:
			o = s.conductor(b, w.cond)
			if w.rail {
				o.Class = classRail
			}
		case w.rail:
			o = s.object(classRail, w.name, w.name)
		case w.name != "":
			o = s.object(classWire, w.name, w.name)
		default:
			tracks++
			o = s.object(classWire, fmt.Sprintf("track %d", tracks), "Connection on the card or inside the device")
		}
		pen := normalPen
		if w.thick {
			pen = railPen
		}
		o.add(&stroke{pts: points(w.pts), pen: pen})
		o.along(w.pts)
		w.owner = o
	}
}

// drawDots puts a dot wherever three directions meet.
func (s *scene) drawDots() {
	extra := map[node]int{}
	at := map[node]bool{}
	for _, w := range s.wires {
		at[w.pts[0]], at[w.pts[len(w.pts)-1]] = true, true
	}
	for _, y := range s.symbols {
		for _, p := range y.pinsAt() {
			extra[p.at]++
		}
	}
	marked := map[node]bool{} // a test point brings its own dot
	for _, p := range s.points {
		extra[p.at]++
		at[p.at] = true
		marked[p.at] = p.side != "F"
	}
	for _, r := range s.refs {
		for _, e := range r.ends {
			extra[e]++
		}
	}
	var nodes []node
	for n := range at {
		nodes = append(nodes, n)
	}
	slices.SortFunc(nodes, func(a, b node) int { return cmp.Or(cmp.Compare(a.Y, b.Y), cmp.Compare(a.X, b.X)) })
	for _, n := range nodes {
		d, r := extra[n], dotRadius
		of := ""
		for _, w := range s.wires {
			if k := w.directions(n); k > 0 {
				d += k
				if w.thick {
					r = railDotRadius
				}
				if of == "" || w.rail {
					of = w.owner.Title
				}
			}
		}
		for _, p := range s.points {
			if p.at == n && d < 3 {
				p.bare = true
			}
		}
		if d >= 3 && !marked[n] {
			o := s.object(classDot, fmt.Sprintf("%d-%d", n.X, n.Y), "Junction: "+of, ink.Attr{Name: "on", Value: of})
			o.add(&disc{n.point(), r})
			o.hit(around(n.point(), jointReach))
		}
	}
}

// settleRings finds which pin of a terminal in a level wire is on which side: the
// pin that the wire's conductor ends on.
func (s *scene) settleRings() {
	for _, y := range s.symbols {
		if y.sym != &symbols.Terminal || y.turn != symbols.H || y.pins["1"] == "" {
			continue
		}
		s.settle(y, "1", "2", node{y.at.X - 1, y.at.Y})
		s.settle(y, "2", "1", node{y.at.X + 1, y.at.Y})
	}
}

func (s *scene) settle(y *symbol, side, other string, n node) {
	in, out := y.part.Pin("in"), y.part.Pin("out")
	for _, w := range s.wires {
		switch {
		case w.cond == nil || !w.touches(n):
		case w.cond.From == in || w.cond.To == in:
			y.pins[side], y.pins[other] = "in", "out"
		case w.cond.From == out || w.cond.To == out:
			y.pins[side], y.pins[other] = "out", "in"
		}
	}
}
