package sizing

import (
	"cmp"
	"math"
	"slices"
)

// label is one way of sizing a leg of a circuit and all that hangs on it, seen from
// the leg's start: what it needs there and what it costs.
type label struct {
	need  float64 // V at the start, at least
	allow float64 // Ω from the source to the start, at most
	cost  float64
	size  int // option that the neighbours of the same circuit must respect; free: none
	leg   int
	pick  int // option of the leg itself; free: pinned
	under *bundle
}

// bundle joins one label each of several legs that hang on one point.
type bundle struct {
	need, allow, cost float64
	rest              *bundle
	one               *label
}

// labelCap bounds how many labels are kept at a point. Circuits that share one size
// never reach it; tapered ones may, with many sizes and long runs.
const labelCap = 100

// circuits is the search in all circuits for fixed leg currents.
type circuits struct {
	*plan
	amps    []float64
	fix     []int
	relaxed bool      // merge surplus labels into optimistic ones instead of dropping them
	most    []float64 // by leg: highest voltage at its start that any choice gives
	least   []float64 // by leg: the lowest; needs below it are as good as it
	loop    []float64 // by leg: least loop to its start
	labels  [][]*label
}

// window bounds the voltage and the loop at the start of each leg.
func (c *circuits) window() bool {
	n := len(c.t.Legs)
	c.most, c.least, c.loop = make([]float64, n), make([]float64, n), make([]float64, n)
	endMost, endLeast, endLoop := make([]float64, n), make([]float64, n), make([]float64, n)
	for i := range n {
		c.most[i], c.least[i], c.loop[i] = float64(c.t.Volts), float64(c.t.Volts), float64(c.t.Ahead)
		if q := c.t.Legs[i].Parent; q >= 0 {
			c.most[i], c.least[i], c.loop[i] = endMost[q], endLeast[q], endLoop[q]
		}
		thick, thin := free, free
		if ch := c.choices(i, c.fix); ch != nil {
			thick, thin = largest(ch), smallest(ch)
		}
		endMost[i] = c.most[i] - c.amps[i]*c.t.ohms(i, c.option(i, thick))
		endLeast[i] = c.least[i] - c.amps[i]*c.t.ohms(i, c.option(i, thin))
		endLoop[i] = c.loop[i] + c.t.faultOhms(i, c.option(i, thick))
		if endMost[i] < float64(c.t.Legs[i].MinVolt)-voltSlack {
			return false
		}
	}
	return true
}

// run makes the labels of every leg that belongs to a circuit; false if a circuit has
// none.
func (c *circuits) run() bool {
	c.labels = make([][]*label, len(c.t.Legs))
	for i := len(c.t.Legs) - 1; i >= 0; i-- {
		if c.t.Legs[i].Circuit == "" {
			continue
		}
		if c.labels[i] = c.extend(i); len(c.labels[i]) == 0 {
			return false
		}
	}
	return true
}

// cheapest returns the cheapest label of leg i that a voltage and a loop at its start
// satisfy; nil if none does.
func (c *circuits) cheapest(i int, volts, loop float64) *label {
	var best *label
	for _, l := range c.labels[i] {
		if l.need <= volts+voltSlack && l.allow >= loop*(1-slack) && (best == nil || l.cost < best.cost) {
			best = l
		}
	}
	return best
}

// collect reads the picks out of a label.
func (p *plan) collect(l *label, picks []int) {
	if g := p.group[l.leg]; g != free {
		picks[g] = l.pick
	}
	for b := l.under; b != nil && b.one != nil; b = b.rest {
		p.collect(b.one, picks)
	}
}

// extend makes the labels of leg i from those of the legs on its end.
func (c *circuits) extend(i int) []*label {
	var out []*label
	add := func(size, pick int, under []*bundle) {
		c.work += len(under)
		o := c.option(i, pick)
		r, rf, cost := c.t.ohms(i, o), c.t.faultOhms(i, o), c.cost(i, o)
		for _, b := range under {
			l := label{need: max(b.need+c.amps[i]*r, c.least[i]), allow: b.allow - rf, cost: b.cost + cost, size: size, leg: i, pick: pick, under: b}
			if l.need <= c.most[i]+voltSlack && l.allow >= c.loop[i]*(1-slack) {
				out = append(out, &l)
			}
		}
	}
	sizes := c.choices(i, c.fix)
	if g, ok := c.common[c.t.Legs[i].Circuit]; sizes == nil && ok { // a pinned leg hands the circuit's size on
		if sizes = c.allowed[g]; c.fix[g] != free {
			sizes = c.fix[g : g+1]
		}
	}
	if len(sizes) == 0 {
		lists := make([][]*label, 0, len(c.kids[i]))
		for _, k := range c.kids[i] {
			lists = append(lists, thinAlike(slices.Clone(c.labels[k])))
		}
		add(free, free, c.bundles(i, lists))
	}
	reach := c.reach(i)
	for _, s := range sizes {
		pick := s
		if c.group[i] == free {
			pick = free
		}
		add(s, pick, c.bundles(i, reach(s)))
	}
	return thinLabels(out)
}

// reach returns a function that lists, for each leg on the end of leg i, its labels
// that go with option s: of the same size in a circuit of one size, of no greater
// size in a tapering one. It is called with rising s.
func (c *circuits) reach(i int) func(s int) [][]*label {
	kids := c.kids[i]
	lists, next := make([][]*label, len(kids)), make([]int, len(kids))
	return func(s int) [][]*label {
		for n, k := range kids {
			if c.shared[k] {
				lists[n] = slices.DeleteFunc(slices.Clone(c.labels[k]), func(l *label) bool { return l.size != free && l.size != s })
				continue
			}
			before := next[n]
			for next[n] < len(c.labels[k]) && c.labels[k][next[n]].size <= s {
				lists[n] = append(lists[n], c.labels[k][next[n]])
				next[n]++
			}
			if next[n] > before {
				lists[n] = thinAlike(lists[n])
			}
		}
		return lists
	}
}

// bundles joins the labels of all legs on the end of leg i.
func (c *circuits) bundles(i int, lists [][]*label) []*bundle {
	leg := &c.t.Legs[i]
	base := &bundle{need: float64(leg.MinVolt), allow: math.Inf(1)}
	if !c.inactive[i] {
		base.allow = float64(leg.Loop)
	}
	acc := []*bundle{base}
	for _, list := range lists {
		next := make([]*bundle, 0, len(acc)*len(list))
		for _, l := range list {
			for _, a := range acc {
				c.work++
				next = append(next, &bundle{
					need: max(a.need, l.need), allow: min(a.allow, l.allow), cost: a.cost + l.cost, rest: a, one: l,
				})
			}
		}
		acc = c.thinBundles(next)
	}
	return acc
}

// staircase holds the best pairs of need and allow seen so far: by rising need, and
// by rising allow too, for what needs more and allows no more is beaten.
type staircase struct{ need, allow []float64 }

// admit reports whether need and allow are not beaten by what was admitted before,
// and remembers them. Calls come by rising cost.
func (s *staircase) admit(need, allow float64) bool {
	at, _ := slices.BinarySearchFunc(s.need, need, func(have, want float64) int {
		if have <= want {
			return -1
		}
		return 1
	})
	if at > 0 && s.allow[at-1] >= allow {
		return false
	}
	if at > 0 && s.need[at-1] == need {
		at--
	}
	end := at
	for end < len(s.need) && s.allow[end] <= allow {
		end++
	}
	s.need = slices.Replace(s.need, at, end, need)
	s.allow = slices.Replace(s.allow, at, end, allow)
	return true
}

// thinBundles drops what another bundle beats in every respect, and bounds the rest.
func (c *circuits) thinBundles(in []*bundle) []*bundle {
	if len(in) < 2 {
		return in
	}
	slices.SortFunc(in, func(a, b *bundle) int {
		return cmp.Or(cmp.Compare(a.cost, b.cost), cmp.Compare(a.need, b.need), cmp.Compare(b.allow, a.allow))
	})
	var s staircase
	out := in[:0]
	for _, b := range in {
		if s.admit(b.need, b.allow) {
			out = append(out, b)
		}
	}
	if len(out) <= labelCap {
		return out
	}
	slices.SortFunc(out, func(a, b *bundle) int { return cmp.Or(cmp.Compare(a.need, b.need), cmp.Compare(a.cost, b.cost)) })
	few := make([]*bundle, 0, labelCap)
	for g := range labelCap {
		part := out[g*len(out)/labelCap : (g+1)*len(out)/labelCap]
		best := *part[0]
		for _, b := range part[1:] {
			switch {
			case c.relaxed: // promise the least need, the greatest loop and the least cost
				best.allow = max(best.allow, b.allow)
				if b.cost < best.cost {
					best.cost, best.rest, best.one = b.cost, b.rest, b.one
				}
			case b.cost < best.cost && g > 0:
				best = *b
			}
		}
		few = append(few, &best)
	}
	return few
}

// byCost orders labels so that none can be beaten by one behind it.
func byCost(a, b *label) int {
	return cmp.Or(cmp.Compare(a.cost, b.cost), cmp.Compare(a.need, b.need), cmp.Compare(b.allow, a.allow))
}

// thinAlike drops labels that another one beats, whatever their sizes.
func thinAlike(in []*label) []*label {
	slices.SortFunc(in, byCost)
	var s staircase
	out := in[:0]
	for _, l := range in {
		if s.admit(l.need, l.allow) {
			out = append(out, l)
		}
	}
	return out
}

// thinLabels drops labels that another one of the same size beats, and leaves the
// rest by rising size.
func thinLabels(in []*label) []*label {
	if len(in) < 2 {
		return in
	}
	slices.SortFunc(in, func(a, b *label) int { return cmp.Or(cmp.Compare(a.size, b.size), byCost(a, b)) })
	var s staircase
	out := in[:0]
	for n, l := range in {
		if n > 0 && in[n-1].size != l.size {
			s = staircase{}
		}
		if s.admit(l.need, l.allow) {
			out = append(out, l)
		}
	}
	return out
}
