package sizing

import "math"

// rest is the least that all but one leg and what hangs on it must cost, when the
// voltage at the start of that leg is to be at least v: by steps over its window.
type rest struct {
	low, step float64
	cost      []float64
}

// restSteps is how finely the voltage is told apart.
const restSteps = 64

func (r *rest) at(v float64) float64 {
	if len(r.cost) == 0 {
		return 0
	}
	k := 0
	if r.step > 0 {
		k = max(0, min(int((v-voltSlack-r.low)/r.step), len(r.cost)-1))
	}
	return r.cost[k]
}

// rests are what a relaxed pass says about all but a part of the tree.
type rests struct {
	start []rest  // by leg: all but it and what hangs on it; by the voltage at its start
	end   []rest  // by leg: all but what hangs on it; by the voltage at its end
	base  float64 // least cost of the whole
}

// complete goes once more through the labels of a relaxed pass, from the source to the
// lamps, and returns the rests; and for each group and option the least that a choice with
// it must cost.
func (c *pass) complete(cost float64) (r rests, with [][]float64) {
	n := len(c.t.Legs)
	r = rests{make([]rest, n), make([]rest, n), cost}
	c.share(n, rest{low: float64(c.t.Volts), cost: []float64{0}}, r.start)
	for i := range n {
		if len(c.kids[i]) == 0 || c.shared[i] {
			continue // within a circuit of one size the labels of its first leg say all
		}
		r.end[i] = c.ahead(i, &r.start[i])
		c.share(i, r.end[i], r.start)
	}
	with = make([][]float64, len(c.open))
	for g := range with {
		with[g] = make([]float64, len(c.t.Options))
		for k := range with[g] {
			with[g][k] = math.Inf(1)
		}
	}
	for i := range n {
		g := c.group[i]
		if g == free || i != c.members[g][0] {
			continue
		}
		for _, cl := range c.classes[i] {
			for k := cl.from; k < cl.to; k++ {
				l := &c.labels[k]
				with[g][cl.size] = min(with[g][cl.size], l.cost+r.start[i].at(l.need))
			}
		}
	}
	return r, with
}

// ahead is the least cost of leg i and all but what hangs on it, by the voltage at its end.
func (c *pass) ahead(i int, start *rest) rest {
	r := rest{low: c.endLeast[i], step: (c.endMost[i] - c.endLeast[i]) / restSteps, cost: make([]float64, restSteps)}
	if r.step <= voltSlack {
		r.step, r.cost = 0, r.cost[:1]
	}
	options := []*Option{c.t.Legs[i].Pinned}
	if g := c.group[i]; g != free {
		options = options[:0]
		for _, k := range c.open[g] {
			options = append(options, &c.t.Options[k])
		}
	}
	for m := range r.cost {
		low := r.low + float64(m)*r.step
		amps := max(min(c.drawn(i, low), c.drawn(i, low+r.step)), c.floor[i])
		r.cost[m] = math.Inf(1)
		for _, o := range options {
			if v := low + amps*c.t.ohms(i, o); v <= c.most[i]+voltSlack {
				r.cost[m] = min(r.cost[m], c.cost(i, o)+start.at(v))
			}
		}
	}
	for m := len(r.cost) - 2; m >= 0; m-- {
		r.cost[m] = min(r.cost[m], r.cost[m+1])
	}
	return r
}

// drawn is no more than what leg i carries when the voltage at its end is v. The least of
// straight lines lies above the chord between its ends.
func (c *pass) drawn(i int, v float64) float64 {
	low, high := c.endLeast[i], c.endMost[i]
	if high <= low {
		return min(c.draws[i][0], c.draws[i][1])
	}
	f := max(0, min((v-low)/(high-low), 1))
	return c.draws[i][0] + f*(c.draws[i][1]-c.draws[i][0])
}

// share fills in the rests of all legs on the end of leg i: what stands ahead, with what
// the others on that point cost at least.
func (c *pass) share(i int, ahead rest, start []rest) {
	kids, steps := c.kids[i], len(ahead.cost)
	of := make([][]float64, len(kids)) // least cost of each by step
	sum, none := make([]float64, steps), make([]int, steps)
	for n, k := range kids {
		of[n] = c.stepwise(k, ahead.low, ahead.step, steps)
		for m, x := range of[n] {
			if math.IsInf(x, 1) {
				none[m]++
			} else {
				sum[m] += x
			}
		}
	}
	for n, k := range kids {
		r := rest{low: ahead.low, step: ahead.step, cost: make([]float64, steps)}
		least := math.Inf(1)
		for m := steps - 1; m >= 0; m-- {
			x, missing := ahead.cost[m]+sum[m], none[m]
			if math.IsInf(of[n][m], 1) {
				missing--
			} else {
				x -= of[n][m]
			}
			if missing == 0 {
				least = min(least, x)
			}
			r.cost[m] = least
		}
		start[k] = r
	}
}

// stepwise is the least cost of a leg with what hangs on it when the voltage at its
// start is no higher than the upper end of each step.
func (c *pass) stepwise(k int, low, step float64, steps int) []float64 {
	out := make([]float64, steps)
	for m := range out {
		out[m] = math.Inf(1)
	}
	for _, cl := range c.classes[k] {
		for n := cl.from; n < cl.to; n++ {
			m := 0
			if step > 0 {
				m = max(0, min(int((c.labels[n].need-voltSlack-low)/step), steps-1))
			}
			out[m] = min(out[m], c.labels[n].cost)
		}
	}
	for m := 1; m < steps; m++ {
		out[m] = min(out[m], out[m-1])
	}
	return out
}
