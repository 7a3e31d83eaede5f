package schematic

import "container/heap"

// The directions of travel.
const (
	east = iota
	south
	west
	north
)

var stepOf = [4]node{{1, 0}, {0, 1}, {-1, 0}, {0, -1}}

func (n node) add(d, k int) node { return node{n.X + stepOf[d].X*k, n.Y + stepOf[d].Y*k} }

// Costs of a line over the overview, in tenths of a module.
const (
	costStep  = 10
	costBend  = 40
	costCross = 160 // another line
	costFrame = 20  // the frame of a place
	costNear  = 4   // a module beside another line or a frame
)

// portLead is how far a line runs straight from a block, in modules: the length of an
// arrowhead and a little.
const portLead = 2

// port is a place at the edge of a block where a line can begin or end, with the
// direction of travel there.
type port struct {
	at   node
	dir  int
	cost int
}

// used says what lies at a point of the grid.
type used uint8

const (
	level   used = 1 << iota // a line that runs level
	upright                  // a line that runs upright
	turned                   // a bend, an end or a joint
	solid                    // a block with the room around it, or a text
	frameLevel
	frameUpright
)

// router finds lines of right angles between blocks: none through a block, none upon
// another.
type router struct {
	w, h  int
	grid  []used
	along [2][]bool // pieces taken from a point to the east, to the south
}

func newRouter(w, h int) *router {
	return &router{w: w, h: h, grid: make([]used, w*h), along: [2][]bool{make([]bool, w*h), make([]bool, w*h)}}
}

func (r *router) index(n node) int { return n.Y*r.w + n.X }

func (r *router) inside(n node) bool { return n.X >= 0 && n.Y >= 0 && n.X < r.w && n.Y < r.h }

// block takes the room of a block, with a module around it.
func (r *router) block(x0, y0, x1, y1 int) {
	for y := max(0, y0-1); y <= min(r.h-1, y1+1); y++ {
		for x := max(0, x0-1); x <= min(r.w-1, x1+1); x++ {
			r.grid[r.index(node{x, y})] |= solid
		}
	}
}

// frame takes the sides of a frame that lines may cross but not follow.
func (r *router) frame(x0, y0, x1, y1 int) {
	for x := x0; x <= x1; x++ {
		r.grid[r.index(node{x, y0})] |= frameLevel
		r.grid[r.index(node{x, y1})] |= frameLevel
	}
	for y := y0; y <= y1; y++ {
		r.grid[r.index(node{x0, y})] |= frameUpright
		r.grid[r.index(node{x1, y})] |= frameUpright
	}
}

// piece is the index of the grid's piece from n in direction d.
func (r *router) piece(n node, d int) (axis, index int) {
	if d == west || d == north {
		n = n.add(d, 1)
	}
	return d % 2, r.index(n)
}

func passing(d int) used {
	if d%2 == 0 {
		return level
	}
	return upright
}

// take notes a line.
func (r *router) take(pts []node) {
	for i := 1; i < len(pts); i++ {
		d := dirOf(pts[i-1], pts[i])
		for n := pts[i-1]; n != pts[i]; n = n.add(d, 1) {
			axis, k := r.piece(n, d)
			r.along[axis][k] = true
			r.grid[r.index(n)] |= passing(d)
		}
		r.grid[r.index(pts[i])] |= passing(d)
	}
	for _, n := range pts {
		r.grid[r.index(n)] |= turned
	}
}

func dirOf(a, z node) int {
	switch {
	case z.X > a.X:
		return east
	case z.Y > a.Y:
		return south
	case z.X < a.X:
		return west
	}
	return north
}

// visit is one state of the search.
type visit struct {
	n           node
	dir         int
	cost, guess int
	order       int // of discovery: equal costs are taken in one order
	from        *visit
	port        *port // where it began
	end         *port // where it ends, once it is there
}

type visits []*visit

func (v visits) Len() int { return len(v) }
func (v visits) Less(i, j int) bool {
	if v[i].guess != v[j].guess {
		return v[i].guess < v[j].guess
	}
	return v[i].order < v[j].order
}
func (v visits) Swap(i, j int) { v[i], v[j] = v[j], v[i] }
func (v *visits) Push(x any)   { *v = append(*v, x.(*visit)) }
func (v *visits) Pop() any {
	old := *v
	x := old[len(old)-1]
	*v = old[:len(old)-1]
	return x
}

// find is the cheapest line from one of the first ports to one of the second; nil if
// there is no room.
func (r *router) find(from, to []port) []node {
	goal := map[[3]int]*port{}
	for i := range to {
		p := &to[i]
		at := p.at.add(p.dir, -portLead)
		if !r.inside(at) || r.grid[r.index(at)]&(level|upright|turned|solid) != 0 {
			continue
		}
		key := [3]int{at.X, at.Y, p.dir}
		if old := goal[key]; old == nil || p.cost < old.cost {
			goal[key] = p
		}
	}
	ahead := func(n node) int {
		best := 1 << 30
		for i := range to {
			at := to[i].at.add(to[i].dir, -portLead)
			best = min(best, costStep*(absInt(at.X-n.X)+absInt(at.Y-n.Y))+to[i].cost)
		}
		return best
	}
	var open visits
	seq := 0
	push := func(v *visit) {
		v.guess, v.order = v.cost, seq
		if v.end == nil {
			v.guess += ahead(v.n)
		}
		seq++
		heap.Push(&open, v)
	}
	for i := range from {
		p := &from[i]
		at := p.at.add(p.dir, portLead)
		if !r.inside(at) || r.grid[r.index(at)]&(level|upright|turned|solid) != 0 || r.grid[r.index(p.at.add(p.dir, 1))]&(level|upright|turned) != 0 {
			continue
		}
		if axis, k := r.piece(p.at, p.dir); r.along[axis][k] {
			continue
		}
		push(&visit{n: at, dir: p.dir, cost: p.cost, port: p})
	}
	done := map[[3]int]bool{}
	for len(open) > 0 {
		v := heap.Pop(&open).(*visit)
		if v.end != nil {
			return corners(v)
		}
		key := [3]int{v.n.X, v.n.Y, v.dir}
		if done[key] {
			continue
		}
		done[key] = true
		if p := goal[key]; p != nil {
			push(&visit{n: v.n, dir: v.dir, cost: v.cost + p.cost, from: v.from, port: v.port, end: p})
		}
		for d := range 4 {
			if d == (v.dir+2)%4 {
				continue
			}
			if next := r.move(v, d); next != nil {
				push(next)
			}
		}
		for _, d := range []int{(v.dir + 1) % 4, (v.dir + 3) % 4} { // an end right behind a bend
			if p := goal[[3]int{v.n.X, v.n.Y, d}]; p != nil && r.grid[r.index(v.n)]&(level|upright) == 0 {
				push(&visit{n: v.n, dir: d, cost: v.cost + costBend, from: v, port: v.port})
			}
		}
	}
	return nil
}

func absInt(a int) int {
	if a < 0 {
		return -a
	}
	return a
}

// move is one step in direction d; nil where the way is barred.
func (r *router) move(v *visit, d int) *visit {
	to := v.n.add(d, 1)
	if !r.inside(to) || r.grid[r.index(to)]&solid != 0 {
		return nil
	}
	if axis, k := r.piece(v.n, d); r.along[axis][k] {
		return nil
	}
	cost := v.cost + costStep
	here := r.grid[r.index(v.n)]
	if d != v.dir {
		if here&(level|upright|turned) != 0 {
			return nil // a bend on another line would look like a joint
		}
		cost += costBend
	}
	there := r.grid[r.index(to)]
	if there&turned != 0 || there&passing(d) != 0 {
		return nil
	}
	if there&(level|upright) != 0 {
		cost += costCross
	}
	follow, meet := frameLevel, frameUpright
	if d%2 == 1 {
		follow, meet = meet, follow
	}
	if there&follow != 0 {
		return nil
	}
	if there&meet != 0 {
		cost += costFrame
	}
	for _, side := range []int{(d + 1) % 4, (d + 3) % 4} {
		if n := to.add(side, 1); r.inside(n) && r.grid[r.index(n)]&(passing(d)|follow) != 0 {
			cost += costNear
		}
	}
	return &visit{n: to, dir: d, cost: cost, from: v, port: v.port}
}

// corners is the line of a finished search, from block to block.
func corners(v *visit) []node {
	line := []node{v.end.at, v.n}
	for x := v; x != nil; x = x.from {
		line = append(line, x.n)
	}
	line = append(line, v.port.at)
	var out []node
	for i := len(line) - 1; i >= 0; i-- {
		n := line[i]
		if k := len(out); k > 0 && out[k-1] == n {
			continue
		}
		if k := len(out); k > 1 && dirOf(out[k-2], out[k-1]) == dirOf(out[k-1], n) {
			out[k-1] = n
			continue
		}
		out = append(out, n)
	}
	return out
}
