package release

// Point is what the register remembers of one luminaire, so that its labels follow
// it when others are put in before it or taken away.
type Point struct {
	Path   string // "3", "3a1": points counted from the board
	Name   string // identity within the circuit: the place, or the path
	Leg    string // length of its leg, as written out by the program
	Lamp   string // luminaire type
	Place  string // as described; "" if it has none
	before int    // index of the point that it hangs on; -1 on the main run
	run    int    // 0 the main run, 1 … the branches of before
}

// Costs of the alignment. Leaving a point out on one side and putting one in on the
// other costs more than taking them for one whose length and type both changed, and
// less than taking two places of different names for one.
const (
	costGap      = 3
	costLength   = 2
	costLamp     = 3
	costRenamed  = 1
	costNever    = 1 << 20
	rewardByName = -100
)

// match pairs the points of a circuit before and after a change. It returns, for each
// new point, the index of the old one that it is, or -1. A place is an identity
// wherever it moves to in the circuit. Points without one are paired run by run, in
// order, so that as little as possible has changed.
func match(old, now []Point) []int {
	m := &matcher{old: old, now: now, pair: make([]int, len(now)), taken: make([]bool, len(old))}
	byName := map[string]int{}
	for i, p := range old {
		if p.Name != p.Path {
			byName[p.Name] = i
		}
	}
	for j, p := range now {
		m.pair[j] = -1
		if i, ok := byName[p.Name]; ok && p.Name != p.Path {
			m.pair[j], m.taken[i] = i, true
		}
	}
	m.run(runOf(old, -1, 0), runOf(now, -1, 0))
	return m.pair
}

type matcher struct {
	old, now []Point
	pair     []int
	taken    []bool
}

// run aligns two runs, then the branches of the points that were paired.
func (m *matcher) run(a, b []int) {
	m.align(a, b)
	for _, n := range b {
		o := m.pair[n]
		if o < 0 {
			continue
		}
		for r := 1; ; r++ {
			was, is := runOf(m.old, o, r), runOf(m.now, n, r)
			if len(was) == 0 || len(is) == 0 {
				break
			}
			m.run(was, is)
		}
	}
}

// runOf returns the points of run r of point p, in order.
func runOf(points []Point, p, r int) []int {
	var out []int
	for i, q := range points {
		if q.before == p && q.run == r {
			out = append(out, i)
		}
	}
	return out
}

// mostCells bounds the table of one alignment; longer runs, far beyond any that can
// be lit, are paired by position.
const mostCells = 4 << 20

// align pairs the old points a with the new points b in order at the least cost
// (global alignment by dynamic programming: Needleman and Wunsch, 1970). Among equal
// ones the pairing nearest to the board wins.
func (m *matcher) align(a, b []int) {
	for len(a) > 0 && len(b) > 0 && m.cost(a[0], b[0]) <= 0 {
		m.pair[b[0]], m.taken[a[0]] = a[0], true
		a, b = a[1:], b[1:]
	}
	if (len(a)+1)*(len(b)+1) > mostCells {
		for k := 0; k < len(a) && k < len(b); k++ {
			if m.cost(a[k], b[k]) < costNever {
				m.pair[b[k]], m.taken[a[k]] = a[k], true
			}
		}
		return
	}
	best := make([][]int, len(a)+1)
	for i := range best {
		best[i] = make([]int, len(b)+1)
	}
	for i := len(a); i >= 0; i-- {
		for j := len(b); j >= 0; j-- {
			switch {
			case i == len(a) && j == len(b):
			case i == len(a):
				best[i][j] = costGap + best[i][j+1]
			case j == len(b):
				best[i][j] = costGap + best[i+1][j]
			default:
				best[i][j] = min(m.cost(a[i], b[j])+best[i+1][j+1], costGap+best[i+1][j], costGap+best[i][j+1])
			}
		}
	}
	for i, j := 0, 0; i < len(a) && j < len(b); {
		switch best[i][j] {
		case m.cost(a[i], b[j]) + best[i+1][j+1]:
			m.pair[b[j]], m.taken[a[i]] = a[i], true
			i, j = i+1, j+1
		case costGap + best[i][j+1]:
			j++
		default:
			i++
		}
	}
}

// cost says how much must have changed if old point i is new point j.
func (m *matcher) cost(i, j int) int {
	o, n := m.old[i], m.now[j]
	if m.pair[j] == i {
		return rewardByName
	}
	if m.pair[j] >= 0 || m.taken[i] {
		return costNever
	}
	c := 0
	if o.Leg != n.Leg {
		c += costLength
	}
	if o.Lamp != n.Lamp {
		c += costLamp
	}
	if o.Place != n.Place {
		if c > 0 && o.Place != "" && n.Place != "" {
			return costNever // another name and another lamp: another thing
		}
		c += costRenamed
	}
	return c
}
