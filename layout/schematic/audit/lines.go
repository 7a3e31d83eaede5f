package audit

import (
	"cmp"
	"math"
	"slices"

	"gloamwright/layout/ink"
)

// lineGraph are the lines between ends, as a reader follows them.
type lineGraph struct {
	lines      int
	bends      int
	inBranches int // bends between pins that face one another, down and up
}

// graph cuts all lines at pins, dots, test points and references, and follows what
// lies between them round its corners.
func (r *reader) graph() lineGraph {
	ends := map[spot]bool{}
	faces := map[spot]ink.Point{} // of upright pins, the way that they look
	for _, x := range r.symbols {
		for _, p := range x.pins {
			ends[spotOf(p.at)] = true
			if p.dir.X == 0 {
				faces[spotOf(p.at)] = p.dir
			}
		}
	}
	for _, d := range r.dots {
		ends[spotOf(d.at)] = true
	}
	for _, p := range r.probes {
		ends[spotOf(p.at)] = true
	}
	for _, l := range r.lines {
		if r.ofRail(l) {
			ends[spotOf(l.a)], ends[spotOf(l.z)] = true, true
		}
	}
	next := map[spot][]spot{}
	for _, l := range r.lines {
		if l.lead {
			continue
		}
		on := []spot{spotOf(l.a), spotOf(l.z)}
		for e := range ends {
			if p := e.point(); l.on(p) && !l.ends(p) {
				on = append(on, e)
			}
		}
		slices.SortFunc(on, func(a, b spot) int { return cmp.Or(cmp.Compare(a.x, b.x), cmp.Compare(a.y, b.y)) })
		for i := 1; i < len(on); i++ {
			next[on[i-1]] = append(next[on[i-1]], on[i])
			next[on[i]] = append(next[on[i]], on[i-1])
		}
	}
	var g lineGraph
	stop := func(s spot) bool { return ends[s] || len(next[s]) != 2 }
	for s := range next {
		if !stop(s) {
			continue
		}
		for _, n := range next[s] {
			bends, before, at := 0, s, n
			for !stop(at) {
				on := next[at][0]
				if on == before {
					on = next[at][1]
				}
				if heading(before, at) != heading(at, on) {
					bends++
				}
				before, at = at, on
			}
			// every line is walked from both ends; the totals are halved
			g.lines++
			g.bends += bends
			if faces[s].Y*faces[at].Y < 0 {
				g.inBranches += bends
			}
		}
	}
	return lineGraph{g.lines / 2, g.bends / 2, g.inBranches / 2}
}

// heading is the way from a to b, of length 1.
func heading(a, b spot) ink.Point {
	return ink.Point{X: sign(b.x - a.x), Y: sign(b.y - a.y)}
}

func sign(v int) float64 {
	if v == 0 {
		return 0
	}
	return math.Copysign(1, float64(v))
}
