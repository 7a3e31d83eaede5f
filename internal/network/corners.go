package network

import (
	"math"
	"slices"
)

// cornerTurns bounds how often the signs are followed to another corner.
const cornerTurns = 3

// noEffect is the change of an output, in volts or amperes, below which a parameter is
// left where it is: what rounding leaves of parts that do not act on it at all.
const noEffect = 1e-12

// chase is the search for one end of a band.
type chase struct {
	band  int
	side  float64 // −1 the low end, 1 the high one
	signs []int8  // of the effect of each parameter
	x     []float64
}

// corners replaces the linear limits of the bands by solutions at their worst corners.
// Ends with the same corner, as those of two points of one net, share its solution.
func (r *run) corners(bands []Band, inf []influence, slopes [][]float64) error {
	var open []*chase
	for k := range bands {
		b := &bands[k]
		b.Corners = true
		b.Low, b.High = b.Typical, b.Typical
		signs := signsOf(slopes[k], inf)
		for _, side := range []float64{-1, 1} {
			open = append(open, &chase{band: k, side: side, signs: signs, x: r.x})
		}
	}
	var there []influence
	var steep []float64
	for turn := range cornerTurns {
		var turned []*chase
		for len(open) > 0 {
			first := open[0]
			var here, others []*chase
			for _, c := range open {
				if sameCorner(first, c) {
					here = append(here, c)
				} else {
					others = append(others, c)
				}
			}
			open = others
			q := r.atCorner(inf, first)
			if err := q.converge(true); err != nil {
				return err
			}
			doubtful := q.wants()
			last := turn == cornerTurns-1
			if !last {
				there = q.influences(there)
				last = len(there) != len(inf) // a tolerance is gone: nothing to follow
			}
			for _, c := range here {
				b := &bands[c.band]
				v := q.value(b.Output)
				b.Low, b.High = min(b.Low, v), max(b.High, v)
				for _, k := range doubtful {
					if id := r.n.devices[r.n.memory[k]].el.ID; !slices.Contains(b.Doubtful, id) {
						b.Doubtful = append(b.Doubtful, id)
					}
				}
				if last {
					continue
				}
				// The factors are those of the last step to x: near enough for signs.
				steep = q.slopes(b.Output, there, steep)
				if next := signsOf(steep, inf); turns(c.signs, next) {
					turned = append(turned, &chase{band: c.band, side: c.side, signs: next, x: q.x})
				}
			}
		}
		open = turned
	}
	return nil
}

// sameCorner reports whether two ends lie at the same corner.
func sameCorner(a, b *chase) bool {
	if a.side == b.side {
		return slices.Equal(a.signs, b.signs)
	}
	for k, s := range a.signs {
		if s != -b.signs[k] {
			return false
		}
	}
	return true
}

// signsOf are the signs of slopes that matter.
func signsOf(slopes []float64, inf []influence) []int8 {
	out := make([]int8, len(slopes))
	for j, s := range slopes {
		switch e := s * inf[j].half; {
		case e > noEffect:
			out[j] = 1
		case e < -noEffect:
			out[j] = -1
		}
	}
	return out
}

// turns reports whether an effect that matters points another way than before.
func turns(before, now []int8) bool {
	for k, s := range now {
		if s != 0 && s != before[k] {
			return true
		}
	}
	return false
}

// atCorner is r with every parameter at the end that its sign points to.
func (r *run) atCorner(inf []influence, c *chase) *run {
	q := *r
	q.rules = nil
	q.p = slices.Clone(r.p)
	q.x, q.f, q.old = slices.Clone(c.x), make([]float64, len(r.f)), make([]float64, len(r.old))
	for j := range inf {
		in := &inf[j]
		if c.signs[j] == 0 {
			continue
		}
		if &q.p[in.device][0] == &r.p[in.device][0] {
			q.p[in.device] = slices.Clone(r.p[in.device])
		}
		q.p[in.device][in.param] += math.Copysign(in.half, c.side*float64(c.signs[j]))
	}
	for i, d := range r.n.devices {
		if d.m.derive != nil && &q.p[i][0] != &r.p[i][0] {
			d.m.derive(q.p[i], r.given[i])
		}
	}
	return &q
}
