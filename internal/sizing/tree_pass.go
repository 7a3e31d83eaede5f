package sizing

import (
	"math"
	"slices"
)

// pass is one search from the lamps to the source. Each leg gets labels, one front of
// states for each size that it may take; what hangs on a point is joined from them.
// Relaxed, every step errs to the hopeful side, so that the cost is a lower bound;
// else each state is a true choice, whose figures are close.
type pass struct {
	*plan
	open    [][]int   // by group: the options in question
	floor   []float64 // A by leg that no choice undercuts
	relaxed bool
	lift    float64 // V that a true choice keeps above each least voltage
	window
	rests         // of a pass before
	limit float64 // what costs more is of no interest
	cap   int     // states kept at a point, for each size there

	labels  []state
	classes [][]class    // labels by leg and size
	draws   [][2]float64 // by leg: least current at the lowest and the highest voltage of its end

	// Room that is used again and again.
	steps              []int
	fresh, one, joined []state
	lists              [][]state
}

// class is a run of labels of one leg that the neighbours see as the same size.
type class struct{ size, from, to int }

// run makes all labels; ok is false if something does not fit. picks holds the option
// of each group in a choice of about that cost.
func (c *pass) run() (cost float64, picks []int, ok bool) {
	n := len(c.t.Legs)
	c.classes, c.draws = make([][]class, n), make([][2]float64, n)
	c.labels = c.labels[:0]
	if c.limit == 0 {
		c.limit = math.Inf(1)
	}
	if !c.span(c.plan, c.open) {
		return 0, nil, false
	}
	for i := n - 1; i >= 0; i-- {
		c.draws[i] = [2]float64{math.Inf(1), math.Inf(1)}
		if !c.extend(i) {
			return 0, nil, false
		}
	}
	cost = math.Inf(1)
	for _, j := range c.join(n, c.all(n)) {
		cost = min(cost, j.cost)
	}
	if math.IsInf(cost, 1) {
		return 0, nil, false
	}
	return cost, c.descend(), true
}

// descend picks sizes from the source to the lamps: at the voltage that stands at its
// start each leg takes its cheapest label that this satisfies, whatever was promised
// before; where none is satisfied, the one that needs least.
func (c *pass) descend() (picks []int) {
	n := len(c.t.Legs)
	picks = make([]int, len(c.open))
	volts, loop, size := make([]float64, n), make([]float64, n), make([]int, n)
	for i := range n {
		leg := &c.t.Legs[i]
		v, ohm, above := float64(c.t.Volts), float64(c.t.Ahead), free
		if q := leg.Parent; q >= 0 {
			v, ohm = volts[q], loop[q]
			if leg.Circuit != "" && c.t.Legs[q].Circuit == leg.Circuit {
				above = size[q]
			}
		}
		var best *state
		best, size[i] = c.fitting(i, v, ohm, above)
		o := c.option(i, size[i])
		volts[i], loop[i] = v-best.at(v)*c.t.ohms(i, o), ohm+c.t.faultOhms(i, o)
		if g := c.group[i]; g != free {
			picks[g] = size[i]
		}
	}
	return picks
}

// fitting returns the cheapest label of leg i that a voltage and a loop at its start
// satisfy, else that which needs least, with its size. Above is the size of the leg ahead of
// it in its circuit, free if there is none.
func (c *pass) fitting(i int, volts, loop float64, above int) (l *state, size int) {
	var best, least *state
	atBest, atLeast := free, free
	for _, cl := range c.classes[i] {
		if above != free && (cl.size > above || c.shared[i] && cl.size != above) {
			continue
		}
		for k := cl.from; k < cl.to; k++ {
			l := &c.labels[k]
			if least == nil || l.need < least.need {
				least, atLeast = l, cl.size
			}
			if l.need <= volts+voltSlack && l.allow >= loop*(1-slack) && (best == nil || l.cost < best.cost) {
				best, atBest = l, cl.size
			}
		}
	}
	if best != nil {
		return best, atBest
	}
	return least, atLeast
}

// extend makes the labels of leg i from those of the legs on its end.
func (c *pass) extend(i int) bool {
	var list []int
	pinned := c.group[i] == free
	if !pinned {
		list = c.open[c.group[i]]
	} else if g, ok := c.common[c.t.Legs[i].Circuit]; ok { // it hands the circuit's size on
		list = c.open[g]
	}
	switch {
	case len(list) == 0:
		c.add(i, free, c.join(i, c.all(i)))
	case c.t.Legs[i].Circuit == "":
		joins := c.join(i, c.all(i))
		for _, s := range list {
			c.add(i, s, joins)
		}
	default:
		c.inCircuit(i, list)
	}
	return len(c.classes[i]) > 0
}

// inCircuit makes the labels of a leg whose neighbours in the circuit must agree with
// its size: be of the same in a circuit of one size, be no thicker behind it in a tapering one.
func (c *pass) inCircuit(i int, sizes []int) {
	kids := c.kids[i]
	lists, next := c.empty(len(kids)), make([]int, len(kids))
	var joins []state
	for n, s := range sizes {
		more := n == 0
		for n, k := range kids {
			if c.shared[i] {
				lists[n], more = lists[n][:0], true
			}
			for cl := c.classes[k]; next[n] < len(cl) && cl[next[n]].size <= s; next[n]++ {
				if !c.shared[i] || cl[next[n]].size == s {
					lists[n], more = c.gather(lists[n], cl[next[n]], c.endMost[i]), true
				}
			}
		}
		if more {
			joins = c.join(i, lists)
		}
		c.add(i, s, joins)
	}
}

// empty returns n empty lists.
func (c *pass) empty(n int) [][]state {
	for len(c.lists) < n {
		c.lists = append(c.lists, nil)
	}
	for k := range n {
		c.lists[k] = c.lists[k][:0]
	}
	return c.lists[:n]
}

// gather merges a class of labels into a front of them and keeps the front.
func (c *pass) gather(list []state, cl class, top float64) []state {
	out, n := c.fresh[:0], 0
	for k := cl.from; k < cl.to; k++ {
		l := c.labels[k]
		for n < len(list) && !byNeed(&l, &list[n]) {
			out = append(out, list[n])
			n++
		}
		out = append(out, l)
	}
	out = append(out, list[n:]...)
	c.fresh = out
	return append(list[:0], c.front(out, top)...)
}

// all lists the labels of the legs on the end of leg i, whatever their sizes.
func (c *pass) all(i int) [][]state {
	top := float64(c.t.Volts)
	if i < len(c.t.Legs) {
		top = c.endMost[i]
	}
	lists := c.empty(len(c.kids[i]))
	for n, k := range c.kids[i] {
		for _, cl := range c.classes[k] {
			lists[n] = c.gather(lists[n], cl, top)
		}
	}
	return lists
}

// add makes the labels of leg i of one size from the joins at its end.
func (c *pass) add(i, size int, joins []state) {
	c.work += len(joins)
	o := c.option(i, size)
	r, rf, cost := c.t.ohms(i, o), c.t.faultOhms(i, o), c.cost(i, o)
	out := c.fresh[:0]
	var rest *rest
	if c.start != nil {
		rest = &c.start[i]
	}
	for k := range joins {
		j := &joins[k]
		l := state{need: j.need + r*j.amps, allow: j.allow - rf, cost: j.cost + cost, amps: j.amps}
		// Ahead of the resistance the current answers less to the voltage. Where it would
		// answer the other way, near collapse, only the floor is sure.
		if d := 1 + r*j.slope; d > steep {
			l.slope = j.slope / d
		} else {
			l.amps = c.floor[i]
			l.need = j.need + r*l.amps
		}
		if l.need > c.most[i]+voltSlack || l.allow < c.loop[i]*(1-slack) {
			continue
		}
		l.raise(c.least[i])
		if l.amps < c.floor[i] {
			l.amps, l.slope = c.floor[i], 0
		}
		if l.allow > c.longest[i]*(1-slack) {
			l.allow = c.longest[i]
		}
		if rest != nil && l.cost+rest.at(l.need) > c.limit {
			continue
		}
		out = append(out, l)
	}
	c.fresh = out
	if out = c.front(out, c.most[i]); len(out) > 0 {
		c.classes[i] = append(c.classes[i], class{size, len(c.labels), len(c.labels) + len(out)})
		if cap(c.labels) < len(c.labels)+len(out) {
			c.labels = slices.Grow(c.labels, len(c.labels)+len(out)) // twice the room
		}
		c.labels = append(c.labels, out...)
	}
}

// steep is the least share of a change of voltage that must arrive behind a cable.
const steep = 0.1

// join makes the states at the end of leg i (or at the source) and returns
// them; they stand until the next call.
func (c *pass) join(i int, lists [][]state) []state {
	low, high := float64(c.t.Volts), float64(c.t.Volts)
	base := state{allow: math.Inf(1)}
	var load *Load
	if i < len(c.t.Legs) {
		leg := &c.t.Legs[i]
		low, high = c.endLeast[i], c.endMost[i]
		base.need = low
		if leg.MinVolt > 0 {
			base.need = max(low, float64(leg.MinVolt)+c.lift)
		}
		base.allow = c.endLongest[i]
		if !c.inactive[i] {
			base.allow = min(base.allow, float64(leg.Loop))
		}
		load = &leg.Load
	} else {
		base.need, base.allow = low, float64(c.t.Ahead)
	}
	if base.need > high+voltSlack {
		return nil
	}
	acc := append(c.joined[:0], base)
	var whole rest
	if i < len(c.t.Legs) && c.end != nil {
		whole = c.end[i]
	}
	for n, list := range lists {
		list = append(c.one[:0], list...) // more classes may still join the list itself
		c.one = list
		for k := range list {
			l := &list[k]
			l.raise(base.need)
			l.allow = min(l.allow, base.allow)
		}
		var one rest
		if c.start != nil {
			one = c.start[c.kids[i][n]]
		}
		list = c.few(c.front(list, high), high, &one)
		if n == 0 {
			acc = append(acc[:0], list...)
			continue
		}
		next := c.pairs(c.fresh[:0], acc, list, high)
		c.fresh = next
		c.work += len(next)
		next = c.front(next, high)
		switch {
		case n == len(lists)-1:
			next = c.few(next, high, &whole)
		case !flat(next):
			next = c.few(next, high, &rest{})
		}
		acc = append(acc[:0], next...)
	}
	c.joined = acc
	c.own(i, load, acc)
	return acc
}

// own adds the load of leg i itself to what is drawn at its end, and notes the least of all.
func (c *pass) own(i int, load *Load, acc []state) {
	if load == nil {
		return
	}
	for k := range acc {
		s := &acc[k]
		s.amps += float64(load.Current)
		if load.Power > 0 {
			s.amps += float64(load.Power) / s.need
			s.slope -= float64(load.Power) / (s.need * s.need)
		}
		if load.Ohm > 0 {
			s.amps += s.need / float64(load.Ohm)
			s.slope += 1 / float64(load.Ohm)
		}
		c.draws[i][0] = min(c.draws[i][0], s.at(c.endLeast[i]))
		c.draws[i][1] = min(c.draws[i][1], s.at(c.endMost[i]))
	}
}
