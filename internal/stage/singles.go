package stage

import (
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
)

// minusNet is how a description names L− for single parts and test points, alone or
// behind any stage's name.
const minusNet = "minus"

// partsStage is the name of the block that single parts and extra test points stand in.
// No stage of a description can bear it.
const partsStage = "+parts"

// single is one entry of parts on its way to the circuit.
type single struct {
	d     *describe.SinglePart
	kind  *PartKind
	nets  []*net
	part  *circuit.Part
	pins  [2]string // the part's pins, in the order of nets
	relay *single   // of a contact
	top   *net      // at its upper end
}

// other returns the net at the far side of s.
func (s *single) other(n *net) *net {
	if s.nets[0] == n {
		return s.nets[1]
	}
	return s.nets[0]
}

// net is what single parts name: a rail of a stage, L−, or a net of their own.
type net struct {
	name   string
	rail   string // rail key; empty for a net of their own
	at     []*single
	points []*describe.ExtraTestPoint
	ends   []*single // terminals on it
	level  int       // row of its bus, counted from the top
	cut    bool      // a plain link, drawn as a bus all the same
}

func (n *net) free() bool  { return n.rail == "" }
func (n *net) minus() bool { return n.rail == Minus }

// joint reports whether the net is drawn as a bus: it is no plain link between two
// parts.
func (n *net) joint() bool { return n.free() && (len(n.at) != 2 || len(n.ends) > 0 || n.cut) }

// loose reports whether only one pin is on the net; sizing refuses it.
func (n *net) loose() bool { return len(n.at)+len(n.ends) == 1 }

// singles is what parts and test_points describe, before it is drawn.
type singles struct {
	b      *Build
	list   []*single
	nets   []*net
	byName map[string]*net
}

// railOf returns the rail key that a net's name means; empty if it means none.
func (b *Build) railOf(name string) string {
	stage, port, dotted := strings.Cut(name, ".")
	if name == minusNet || dotted && port == minusNet {
		return Minus
	}
	if !dotted {
		return ""
	}
	for _, s := range b.Site.Stages {
		if s.Name.Val != stage {
			continue
		}
		for _, p := range kindOf(s.Kind.Val).Ports {
			if p.Name == port && p.Sink && !p.Signal { // fed into the same rail as the stage's own
				return b.sourceKey(describe.Ref{Stage: stage})
			}
		}
	}
	if b.rails[name] != nil {
		return name
	}
	return ""
}

func (x *singles) net(name string) *net {
	rail := x.b.railOf(name)
	key := name
	if rail != "" {
		key = rail
	}
	if n := x.byName[key]; n != nil {
		return n
	}
	n := &net{name: name, rail: rail}
	x.byName[key] = n
	x.nets = append(x.nets, n)
	return n
}

// expandSingles builds the parts and test points that stand besides the stages.
func (b *Build) expandSingles() {
	if len(b.Site.Parts)+len(b.Site.TestPoints) == 0 {
		return
	}
	x := &singles{b: b, byName: map[string]*net{}}
	relays := map[string]*single{}
	for _, d := range b.Site.Parts {
		s := &single{d: d, kind: partKindOf(d.Kind.Val)}
		if s.kind.Name == "relay" {
			relays[d.Name.Val] = s
		}
		x.list = append(x.list, s)
	}
	// A contact of no relay and a part with both pins on one net are left out; sizing
	// says so.
	x.list = slices.DeleteFunc(x.list, func(s *single) bool {
		if s.kind.Name == "contact" {
			s.relay = relays[partField[string](s.d, "of")]
			if s.relay == nil {
				return true
			}
		}
		for _, port := range s.kind.Ports {
			for _, pin := range s.d.Pins {
				if pin.Pin.Val == port.Name {
					s.nets = append(s.nets, x.net(pin.Net.Val))
				}
			}
		}
		return len(s.nets) == 2 && s.nets[0] == s.nets[1]
	})
	for _, s := range x.list {
		for _, n := range s.nets {
			if len(s.kind.Ports) == 1 {
				n.ends = append(n.ends, s)
			} else {
				n.at = append(n.at, s)
			}
		}
	}
	for _, t := range b.Site.TestPoints {
		n := x.net(t.At_.Val)
		n.points = append(n.points, t)
	}
	x.draw(x.groups())
}

// group is what hangs together by nets of its own; a rail does not join.
type group struct {
	list []*single
	nets []*net // its own, and the rails that it touches
	runs []*run
	rows int // buses
}

// groups finds the connected groups in the order of the description. A group without
// parts holds what stands on a rail alone: a terminal or a test point.
func (x *singles) groups() []*group {
	var out []*group
	done := map[*single]bool{}
	for _, s := range x.list {
		if done[s] || len(s.nets) < 2 {
			continue
		}
		g := &group{}
		var walk func(s *single)
		walk = func(s *single) {
			if done[s] {
				return
			}
			done[s] = true
			g.list = append(g.list, s)
			for _, n := range s.nets {
				if n.free() {
					for _, o := range n.at {
						walk(o)
					}
				}
			}
		}
		walk(s)
		slices.SortFunc(g.list, func(a, b *single) int { return slices.Index(x.list, a) - slices.Index(x.list, b) })
		for _, s := range g.list {
			for _, n := range s.nets {
				if !slices.Contains(g.nets, n) {
					g.nets = append(g.nets, n)
				}
			}
		}
		g.trace()
		out = append(out, g)
	}
	for _, n := range x.nets {
		if n.rail != "" && len(n.ends)+len(n.points) > 0 || n.free() && len(n.at) == 0 {
			out = append(out, &group{nets: []*net{n}})
		}
	}
	return out
}

// run is a chain of parts in series between two nets that are drawn as rails or buses.
type run struct {
	top, bottom *net
	list        []*single // from the top
	links       []*net    // between them
	col         *column
}

// trace folds what stands in series into runs, gives the buses their rows from top to
// bottom, and turns every run so that it leads downward.
func (g *group) trace() {
	marked := func(n *net) bool { return !n.free() || n.joint() }
	if !slices.ContainsFunc(g.nets, marked) { // a ring of its own: open it somewhere
		g.nets[0].cut = true
	}
	done := map[*single]bool{}
	for _, n := range g.nets {
		if !marked(n) {
			continue
		}
		for _, s := range g.list {
			if done[s] || !slices.Contains(s.nets, n) {
				continue
			}
			r := &run{top: n}
			at := n
			for {
				done[s] = true
				r.list = append(r.list, s)
				at = s.other(at)
				if marked(at) {
					break
				}
				r.links = append(r.links, at)
				next := at.at[0]
				if next == s {
					next = at.at[1]
				}
				s = next
			}
			r.bottom = at
			g.runs = append(g.runs, r)
		}
	}
	g.levels()
	for _, r := range g.runs {
		// One that comes back to its bus or to L− gets a bus in between; only from plus to
		// plus can a run go up again.
		if r.top.level == r.bottom.level && (r.top.free() || r.top.minus()) {
			r.links[0].cut, g.runs = true, nil
			g.trace()
			return
		}
		if r.top.level > r.bottom.level {
			r.top, r.bottom = r.bottom, r.top
			slices.Reverse(r.list)
			slices.Reverse(r.links)
		}
	}
	slices.SortStableFunc(g.runs, func(a, b *run) int { return a.top.level - b.top.level })
	for _, r := range g.runs {
		at := r.top
		for _, s := range r.list {
			s.top, at = at, s.other(at)
		}
	}
}

// levels ranks the buses by how near the plus rails and how far from L− they are, in
// runs; each has a row of its own. Plus rails come first, L− last.
func (g *group) levels() {
	far := len(g.runs) + 1
	distance := func(from func(*net) bool) map[*net]int {
		d := map[*net]int{}
		var queue []*net
		for _, n := range g.nets {
			if from(n) {
				queue = append(queue, n)
			}
		}
		for len(queue) > 0 {
			n := queue[0]
			queue = queue[1:]
			for _, r := range g.runs {
				for _, to := range []*net{r.top, r.bottom} {
					if _, known := d[to]; !known && (r.top == n || r.bottom == n) && to != n && !from(to) {
						d[to] = d[n] + 1
						queue = append(queue, to)
					}
				}
			}
		}
		return d
	}
	at := func(d map[*net]int, n *net) int {
		if v, ok := d[n]; ok {
			return v
		}
		return far
	}
	down := distance(func(n *net) bool { return !n.free() && !n.minus() })
	up := distance((*net).minus)
	var buses []*net
	for _, n := range g.nets {
		switch {
		case n.minus():
			n.level = far
		case !n.free():
			n.level = -1
		case n.joint():
			buses = append(buses, n)
		}
	}
	slices.SortStableFunc(buses, func(a, b *net) int { return (at(down, a) - at(up, a)) - (at(down, b) - at(up, b)) })
	for i, n := range buses {
		n.level = i
	}
	g.rows = len(buses)
}
