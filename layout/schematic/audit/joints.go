package audit

import (
	"cmp"
	"math"
	"slices"

	"gloamwright/layout/ink"
)

// node returns the union-find node of a place.
func (r *reader) node(p ink.Point) int {
	k := spotOf(p)
	n, ok := r.nodes[k]
	if !ok {
		n = len(r.parent)
		r.nodes[k] = n
		r.parent = append(r.parent, n)
	}
	return n
}

func (r *reader) root(n int) int {
	for r.parent[n] != n {
		r.parent[n] = r.parent[r.parent[n]]
		n = r.parent[n]
	}
	return n
}

func (r *reader) join(a, b ink.Point) {
	x, y := r.root(r.node(a)), r.root(r.node(b))
	r.parent[max(x, y)] = min(x, y)
}

// joints follows the lines: ends that meet are joined, an end on another line is a
// joint, lines that merely cross are not. It checks dots, loose ends, bodies and
// crossings on the way.
func (r *reader) joints() {
	pins := map[spot]*instance{}
	foreign := map[spot]int{}
	for _, x := range r.symbols {
		for _, p := range x.pins {
			k := spotOf(p.at)
			pins[k] = x
			foreign[k]++
			r.node(p.at)
			if !onGrid(p.at.X) || !onGrid(p.at.Y) {
				r.fault(RuleGrid, p.at, "a pin off the grid")
			}
		}
	}
	for _, l := range r.lines {
		if !l.lead {
			r.join(l.a, l.z)
		}
		if l.lead && r.inner[l.stroke] {
			r.join(l.a, l.z)
		}
	}
	for _, p := range r.probes {
		r.node(p.at)
	}
	dotted := map[spot]bool{}
	for _, d := range r.dots {
		k := spotOf(d.at)
		if dotted[k] {
			r.fault(RuleDot, d.at, "two dots on one another")
		}
		dotted[k] = true
		if !onGrid(d.at.X) || !onGrid(d.at.Y) {
			r.fault(RuleGrid, d.at, "a dot off the grid")
		}
	}
	places := map[spot]bool{}
	for _, l := range r.lines {
		places[spotOf(l.a)], places[spotOf(l.z)] = true, true
	}
	for k := range dotted {
		places[k] = true
	}
	var order []spot
	for k := range places {
		order = append(order, k)
	}
	slices.SortFunc(order, func(a, b spot) int { return cmp.Or(cmp.Compare(a.y, b.y), cmp.Compare(a.x, b.x)) })
	for _, k := range order {
		r.joint(k, dotted[k], pins[k] != nil)
	}
	r.loops(order)
	r.bodies(pins)
	r.crossings(pins, dotted)
}

// loops checks that lines form trees: between the joints on each line it draws the
// edges of a graph, which must close no ring.
func (r *reader) loops(places []spot) {
	parent := make([]int, len(places))
	for i := range parent {
		parent[i] = i
	}
	find := func(i int) int {
		for parent[i] != i {
			parent[i] = parent[parent[i]]
			i = parent[i]
		}
		return i
	}
	for _, l := range r.lines {
		if l.lead && !r.inner[l.stroke] {
			continue
		}
		var on []int
		for i, k := range places {
			if l.on(k.point()) {
				on = append(on, i)
			}
		}
		slices.SortFunc(on, func(i, j int) int {
			a, b := places[i], places[j]
			return cmp.Or(cmp.Compare(a.x, b.x), cmp.Compare(a.y, b.y))
		})
		for i := 1; i < len(on); i++ {
			a, b := find(on[i-1]), find(on[i])
			if a == b {
				r.fault(RuleLoop, places[on[i]].point(), "a ring of lines")
			}
			parent[max(a, b)] = min(a, b)
		}
	}
}

// directions finds in which of the four ways lines leave p, and whether any ends
// there.
func (r *reader) directions(p ink.Point) (ways int, ends, wires int) {
	var seen [4]bool
	mark := func(q ink.Point) {
		switch {
		case q.Y < p.Y-near:
			seen[0] = true
		case q.X < p.X-near:
			seen[1] = true
		case q.Y > p.Y+near:
			seen[2] = true
		case q.X > p.X+near:
			seen[3] = true
		}
	}
	for _, l := range r.lines {
		if !l.on(p) {
			continue
		}
		mark(l.a)
		mark(l.z)
		if l.ends(p) {
			ends++
			if !l.lead {
				wires++
			}
		}
	}
	for _, s := range seen {
		if s {
			ways++
		}
	}
	return ways, ends, wires
}

// joint judges one place where lines end or a dot stands, and joins what meets.
func (r *reader) joint(k spot, dotted, pinned bool) {
	p := k.point()
	ways, ends, wires := r.directions(p)
	if ends > 0 {
		for _, l := range r.lines {
			if !l.lead && l.on(p) || l.lead && r.inner[l.stroke] && l.ends(p) {
				r.join(p, l.a)
			}
		}
	}
	switch {
	case ways >= 4 && (dotted || ends > 0):
		r.fault(RuleFour, p, "a joint of four directions")
	case dotted && (ways < 3 || ends == 0):
		r.fault(RuleDot, p, "a dot where %d directions meet and %d lines end", ways, ends)
	case !dotted && ways >= 3 && ends > 0:
		r.fault(RuleDot, p, "three directions meet without a dot")
	}
	if wires > 0 && ways < 2 && !pinned && !r.probed(p) {
		r.fault(RuleEnd, p, "a loose end")
	}
}

func (r *reader) probed(p ink.Point) bool {
	for _, q := range r.probes {
		if samePoint(q.at, p) {
			return true
		}
	}
	return false
}

// bodies checks that no line runs through a symbol and none passes a pin.
func (r *reader) bodies(pins map[spot]*instance) {
	for _, l := range r.lines {
		if l.lead {
			continue
		}
		for _, x := range r.symbols {
			if b := grow(x.body, -0.05); b.W > 0 && b.H > 0 && crosses(l, b) {
				r.fault(RuleBody, l.a, "a line through a symbol")
			}
		}
		for k := range pins {
			if p := k.point(); l.on(p) && !l.ends(p) {
				r.fault(RuleBody, p, "a line that runs past a pin")
			}
		}
	}
	for i, x := range r.symbols {
		for _, y := range r.symbols[:i] {
			if x.sym == nil || y.sym == nil || x.group == y.group { // a device's own contact stands in its box
				continue
			}
			if a, b := grow(x.body, -0.05), y.body; a.X < b.X+b.W && b.X < a.X+a.W && a.Y < b.Y+b.H && b.Y < a.Y+a.H {
				r.fault(RuleBody, x.at, "two symbols on one another")
			}
		}
	}
}

// crosses reports whether a line enters a box.
func crosses(l segment, b ink.Rect) bool {
	x0, x1 := math.Min(l.a.X, l.z.X), math.Max(l.a.X, l.z.X)
	y0, y1 := math.Min(l.a.Y, l.z.Y), math.Max(l.a.Y, l.z.Y)
	return x0 < b.X+b.W && x1 > b.X && y0 < b.Y+b.H && y1 > b.Y
}

// crossings checks that lines that only cross do so a module or more from
// everything that could be taken for a joint.
func (r *reader) crossings(pins map[spot]*instance, dotted map[spot]bool) {
	r.crossed = nil
	for i, l := range r.lines {
		for _, m := range r.lines[:i] {
			p, ok := meet(l, m)
			if !ok || l.ends(p) || m.ends(p) {
				continue
			}
			r.crossed = append(r.crossed, p)
			for k := range dotted {
				if d := k.point(); math.Hypot(d.X-p.X, d.Y-p.Y) < module-near {
					r.fault(RuleCrossing, p, "a crossing too near a dot")
				}
			}
			for k := range pins {
				if d := k.point(); math.Hypot(d.X-p.X, d.Y-p.Y) < module-near {
					r.fault(RuleCrossing, p, "a crossing too near a pin")
				}
			}
			for _, e := range []ink.Point{l.a, l.z, m.a, m.z} {
				if math.Hypot(e.X-p.X, e.Y-p.Y) < module-near {
					r.fault(RuleCrossing, p, "a crossing too near a bend")
				}
			}
		}
	}
}

// meet is where a level and an upright line cross.
func meet(l, m segment) (ink.Point, bool) {
	if same(l.a.X, l.z.X) == same(m.a.X, m.z.X) {
		return ink.Point{}, false
	}
	if same(l.a.X, l.z.X) {
		l, m = m, l
	}
	p := ink.Point{X: m.a.X, Y: l.a.Y}
	return p, l.on(p) && m.on(p)
}
