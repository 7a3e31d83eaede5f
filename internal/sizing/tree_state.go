package sizing

import (
	"math"
	"slices"
)

// state is one way of sizing all that hangs on a point, seen from that point: what it
// needs there, what it costs and what it draws.
//
// What a set of loads behind cables draws is a convex function of the voltage ahead of
// them: that of a constant power, of a current and of a resistor is, sums are, and a
// resistance in series keeps it so (the voltage at its far end is a concave function of
// that at its near end). The tangent at need therefore never promises too much current.
type state struct {
	need  float64 // V here, at least
	allow float64 // Ω from the source to here, at most
	cost  float64
	amps  float64 // drawn at need
	slope float64 // A/V: the tangent there
}

// at returns the least that is drawn at voltage v, which is need or more.
func (s *state) at(v float64) float64 { return s.amps + s.slope*(v-s.need) }

// raise moves the state to a voltage above its need.
func (s *state) raise(v float64) {
	if v > s.need {
		s.amps, s.need = s.at(v), v
	}
}

// cover lowers what s draws so far that it stands for b as well, between the need of b
// and top. The difference of two straight lines is greatest at an end.
func (s *state) cover(b *state, top float64) {
	if d := max(s.at(b.need)-b.amps, s.at(top)-b.at(top)); d > 0 {
		s.amps -= d
	}
}

// byNeed orders states so that none can be beaten by one behind it.
func byNeed(a, b *state) bool {
	switch {
	case a.need != b.need:
		return a.need < b.need
	case a.cost != b.cost:
		return a.cost < b.cost
	}
	return a.allow > b.allow
}

// order sorts states. By their needs they nearly are in order; many may have the same.
func order(in []state) {
	moves := 8 * len(in)
	for k := 1; k < len(in); k++ {
		if in[k].need >= in[k-1].need {
			continue
		}
		s, n := in[k], k
		for ; n > 0 && s.need < in[n-1].need; n-- {
			in[n] = in[n-1]
			moves--
		}
		in[n] = s
		if moves < 0 {
			sortStates(in)
			return
		}
	}
	for k := 0; k < len(in); {
		run := k + 1
		for run < len(in) && in[run].need == in[k].need {
			run++
		}
		if run > k+1 {
			sortStates(in[k:run])
		}
		k = run
	}
}

func sortStates(in []state) {
	slices.SortFunc(in, func(a, b state) int {
		switch {
		case byNeed(&a, &b):
			return -1
		case byNeed(&b, &a):
			return 1
		}
		return 0
	})
}

// front drops what another state beats in need, allow and cost, in place. Where they
// are relaxed, what stays draws no more than what it beat; top is the highest voltage
// that there can be.
func (c *pass) front(in []state, top float64) []state {
	if len(in) < 2 {
		return in
	}
	order(in)
	out := in[:0]
	steps := c.steps[:0] // by rising cost and allow: what may still beat a state with a higher need
	for k := range in {
		s := &in[k]
		at := len(steps)
		for at > 0 && out[steps[at-1]].cost > s.cost {
			at--
		}
		if at > 0 && out[steps[at-1]].allow >= s.allow {
			if c.relaxed {
				out[steps[at-1]].cover(s, top)
			}
			continue
		}
		end := at
		for end < len(steps) && out[steps[end]].allow <= s.allow {
			end++
		}
		if end == at+1 {
			steps[at] = len(out)
		} else {
			steps = slices.Replace(steps, at, end, len(out))
		}
		out = append(out, *s)
	}
	c.steps = steps
	return out
}

// few bounds the number of states, in place; they are a front by rising need. Neighbours
// become one, so that about the same share of the cost lies between those that stay: finely
// where a state may be part of a cheap choice, coarsely elsewhere. all is what all else
// costs at least, empty if that is not known.
func (c *pass) few(in []state, top float64, all *rest) []state {
	if len(in) <= c.cap {
		return in
	}
	apart, steps := 0.0, make([]float64, len(in))
	for k := 1; k < len(in); k++ {
		steps[k] = step(&in[k-1], &in[k])
		if len(all.cost) > 0 && in[k].cost > 0 {
			above := max(0, in[k].cost+all.at(in[k].need)-c.base) / (focus * in[k].cost)
			steps[k] /= 1 + above*above
		}
		apart += steps[k]
	}
	apart /= float64(c.cap)
	far := 0.0
	return c.merge(in, top, func(k int) bool {
		if far += steps[k]; far <= apart {
			return true
		}
		far = 0
		return false
	})
}

// focus is how far above the cheapest choice one with a state may stand, as a share of
// the state's cost, before the state is looked at half as finely. Found by trial.
const focus = 0.05

// merge joins state k to those before it where together says so. Relaxed, what comes of it
// promises the best of all; else it is the cheapest of them.
func (c *pass) merge(in []state, top float64, together func(k int) bool) []state {
	out := 0
	for k := range in {
		if k == 0 || !together(k) {
			in[out] = in[k]
			out++
			continue
		}
		best, b := &in[out-1], &in[k]
		switch {
		case c.relaxed:
			best.cover(b, top)
			best.allow = max(best.allow, b.allow)
			best.cost = min(best.cost, b.cost)
		case b.cost < best.cost && out > 1:
			*best = *b
		}
	}
	return in[:out]
}

// step is how far the costs of two states lie apart.
func step(a, b *state) float64 {
	if low := min(a.cost, b.cost); low > 0 {
		return abs(a.cost-b.cost) / low
	}
	return 0
}

// flat reports whether all states allow the same loop, so that it tells none apart.
func flat(in []state) bool {
	for k := range in {
		if in[k].allow != in[0].allow {
			return false
		}
	}
	return true
}

// pairs appends to out the joins of one state of each list. both lists are fronts.
func (c *pass) pairs(out, a, b []state, top float64) []state {
	if len(a) == 0 || len(b) == 0 {
		return out
	}
	if !flat(a) || !flat(b) {
		for i, j := 0, 0; i < len(a) || j < len(b); {
			if j == len(b) || i < len(a) && a[i].need <= b[j].need {
				for k := range j {
					out = append(out, pair(&a[i], &b[k], a[i].need))
				}
				i++
				continue
			}
			for k := range i {
				out = append(out, pair(&a[k], &b[j], b[j].need))
			}
			j++
		}
		return out
	}
	// Needs alone tell them apart: at each voltage at which a list offers something
	// cheaper, the cheapest of both.
	return c.zip(out, a, b, top)
}

// pair joins two states at voltage v.
func pair(a, b *state, v float64) state {
	return state{
		need: v, allow: min(a.allow, b.allow), cost: a.cost + b.cost, amps: a.at(v) + b.at(v), slope: a.slope + b.slope,
	}
}

// zip joins two fronts by rising need alone. A pair that is passed over, for one list
// offers something cheaper at its need, is covered by lowering what that draws.
func (c *pass) zip(out, a, b []state, top float64) []state {
	lowA, lowB := a[0], b[0] // the cheapest so far, covering all before
	i, j := 0, 0
	v := max(a[0].need, b[0].need)
	for {
		for i+1 < len(a) && a[i+1].need <= v {
			i++
			lowA = c.covering(a[i], &lowA, top)
		}
		for j+1 < len(b) && b[j+1].need <= v {
			j++
			lowB = c.covering(b[j], &lowB, top)
		}
		x, y := a[i], b[j]
		if x.need < v || y.need == v {
			x = lowA
		}
		if y.need < v || a[i].need == v {
			y = lowB
		}
		out = append(out, pair(&x, &y, v))
		v = math.Inf(1)
		if i+1 < len(a) {
			v = a[i+1].need
		}
		if j+1 < len(b) {
			v = min(v, b[j+1].need)
		}
		if math.IsInf(v, 1) {
			return out
		}
	}
}

func (c *pass) covering(s state, before *state, top float64) state {
	if c.relaxed {
		if d := max(s.amps-before.at(s.need), s.at(top)-before.at(top)); d > 0 {
			s.amps -= d
		}
	}
	return s
}
