package sizing

import (
	"cmp"
	"math"
	"slices"
)

// label is one way of sizing a leg and all that hangs on it, seen from the leg's
// start: what it needs there and what it costs.
type label struct {
	need  float64 // V at the start, at least
	allow float64 // Ω from the source to the start, at most
	cost  float64
	size  int // option that the neighbours of the same circuit must respect; free: none
	leg   int
	pick  int // option of the leg itself; free: pinned
	under *bundle
}

const free = -1

// bundle joins one label each of several legs that hang on one point.
type bundle struct {
	need, allow, cost float64
	rest              *bundle
	one               *label
}

// labelCap bounds how many labels are kept at a point; a tree of a few boards never
// reaches it.
const labelCap = 64

// plan is the search for sizes with the current of every leg held fixed, where the
// limits add up along a path and labels that cost more and give less can be dropped:
// dynamic programming over the tree (Bellman, 1957).
type plan struct {
	t        *Tree
	kids     [][]int // legs on the end of each leg; the root's are kids[len(Legs)]
	group    []int   // group of each leg; free: pinned
	allowed  [][]int // options that a group may take, ascending
	members  [][]int // legs of each group
	shared   []bool  // by leg: its circuit shares one size
	priced   bool
	inactive []bool // by leg: its loop limit holds for every allowed choice
}

// cost of leg i with option o.
func (p *plan) cost(i int, o *Option) float64 {
	l := float64(p.t.Legs[i].Length)
	if p.priced {
		return l * o.Price
	}
	return 2 * l * float64(o.Size.Area)
}

// search returns the cheapest picks (by group) for fixed leg currents. fix holds an
// option for groups that are decided, free for the others. When there are too many
// labels, the relaxed search merges neighbours into one that promises the best of
// each, so that its cost is a lower bound; the other drops the dearer.
func (p *plan) search(amps []float64, fix []int, relaxed bool) (cost float64, picks []int, ok bool) {
	n := len(p.t.Legs)
	labels := make([][]*label, n)
	for i := n - 1; i >= 0; i-- {
		labels[i] = p.extend(i, amps[i], labels, fix, relaxed)
		if len(labels[i]) == 0 {
			return 0, nil, false
		}
	}
	picks = slices.Clone(fix)
	for _, k := range p.kids[n] { // the root's needs are known: each leg takes its cheapest
		best := labels[k][0]
		for _, l := range labels[k][1:] {
			if l.cost < best.cost {
				best = l
			}
		}
		cost += best.cost
		p.collect(best, picks)
	}
	return cost, picks, true
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
func (p *plan) extend(i int, amps float64, labels [][]*label, fix []int, relaxed bool) []*label {
	leg := &p.t.Legs[i]
	var out []*label
	add := func(size, pick int, o *Option, under []*bundle) {
		r, rf, c := p.t.ohms(i, o), p.t.faultOhms(i, o), p.cost(i, o)
		for _, b := range under {
			l := &label{need: b.need + amps*r, allow: b.allow - rf, cost: b.cost + c, size: size, leg: i, pick: pick, under: b}
			if l.need <= float64(p.t.Volts)+voltSlack && l.allow >= float64(p.t.Ahead)*(1-slack) {
				out = append(out, l)
			}
		}
	}
	var sizes []int // what the leg's circuit may take
	g := p.group[i]
	switch {
	case g == free && p.shared[i]: // a pinned leg hands the circuit's size on
		sizes = p.sizesOfCircuit(leg.Circuit, fix)
	case g != free && fix[g] != free:
		sizes = []int{fix[g]}
	case g != free:
		sizes = p.allowed[g]
	}
	if len(sizes) == 0 {
		add(free, free, leg.Pinned, p.join(i, free, labels, relaxed))
		return thinLabels(out, relaxed)
	}
	same := p.hasSame(i)
	var under []*bundle
	for n, s := range sizes {
		if n == 0 || same {
			under = p.join(i, s, labels, relaxed)
		}
		o, pick := &p.t.Options[s], s
		if g == free {
			o, pick = leg.Pinned, free
		}
		add(s, pick, o, under)
	}
	return thinLabels(out, relaxed)
}

// sizesOfCircuit lists the options of the group that a circuit forms; none if every
// leg of it is pinned.
func (p *plan) sizesOfCircuit(circuit string, fix []int) []int {
	for i := range p.t.Legs {
		if g := p.group[i]; g != free && p.t.Legs[i].Circuit == circuit {
			if fix[g] != free {
				return []int{fix[g]}
			}
			return p.allowed[g]
		}
	}
	return nil
}

// hasSame reports whether a leg of the same circuit hangs on leg i.
func (p *plan) hasSame(i int) bool {
	for _, k := range p.kids[i] {
		if p.sameCircuit(i, k) {
			return true
		}
	}
	return false
}

func (p *plan) sameCircuit(i, k int) bool {
	return p.t.Legs[i].Circuit != "" && p.t.Legs[i].Circuit == p.t.Legs[k].Circuit
}

// join makes the bundles of all legs on the end of leg i when leg i takes option s.
func (p *plan) join(i, s int, labels [][]*label, relaxed bool) []*bundle {
	leg := &p.t.Legs[i]
	base := &bundle{need: float64(leg.MinVolt), allow: math.Inf(1)}
	if leg.Loop > 0 && !p.inactive[i] {
		base.allow = float64(leg.Loop)
	}
	acc := []*bundle{base}
	for _, k := range p.kids[i] {
		ls := labels[k]
		if s != free && p.sameCircuit(i, k) {
			ls = slices.DeleteFunc(slices.Clone(ls), func(l *label) bool {
				if p.shared[k] {
					return l.size != free && l.size != s
				}
				return l.size > s
			})
		}
		acc = thinBundles(pair(acc, ls), relaxed)
	}
	return acc
}

// pair forms every sum of a bundle and a label.
func pair(acc []*bundle, ls []*label) []*bundle {
	out := make([]*bundle, 0, len(acc)*len(ls))
	for _, a := range acc {
		for _, l := range ls {
			out = append(out, &bundle{
				need: max(a.need, l.need), allow: min(a.allow, l.allow), cost: a.cost + l.cost, rest: a, one: l,
			})
		}
	}
	return out
}

// thinBundles drops what another bundle beats in every respect, and bounds the rest.
func thinBundles(in []*bundle, relaxed bool) []*bundle {
	slices.SortFunc(in, func(a, b *bundle) int {
		return cmp.Or(cmp.Compare(a.cost, b.cost), cmp.Compare(a.need, b.need), cmp.Compare(b.allow, a.allow))
	})
	out := in[:0:0]
	for _, b := range in {
		if !slices.ContainsFunc(out, func(o *bundle) bool { return o.need <= b.need && o.allow >= b.allow }) {
			out = append(out, b)
		}
	}
	if len(out) <= labelCap {
		return out
	}
	slices.SortFunc(out, func(a, b *bundle) int { return cmp.Or(cmp.Compare(a.need, b.need), cmp.Compare(a.cost, b.cost)) })
	var few []*bundle
	for g := range labelCap {
		part := out[g*len(out)/labelCap : (g+1)*len(out)/labelCap]
		if len(part) == 0 {
			continue
		}
		best := *part[0]
		for _, b := range part[1:] {
			if relaxed {
				best.allow = max(best.allow, b.allow)
				if b.cost < best.cost {
					best.cost, best.rest, best.one = b.cost, b.rest, b.one
				}
			} else if b.cost < best.cost && g > 0 {
				best = *b
			}
		}
		few = append(few, &best)
	}
	return few
}

// thinLabels does the same among the labels of one leg, size by size.
func thinLabels(in []*label, relaxed bool) []*label {
	slices.SortFunc(in, func(a, b *label) int {
		return cmp.Or(cmp.Compare(a.size, b.size), cmp.Compare(a.cost, b.cost), cmp.Compare(a.need, b.need), cmp.Compare(b.allow, a.allow))
	})
	out := in[:0:0]
	start := 0
	for _, l := range in {
		if len(out) > 0 && out[len(out)-1].size != l.size {
			start = len(out)
		}
		if !slices.ContainsFunc(out[start:], func(o *label) bool { return o.need <= l.need && o.allow >= l.allow }) {
			out = append(out, l)
		}
	}
	return out
}
