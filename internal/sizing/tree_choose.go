package sizing

import (
	"math"
	"slices"
)

// Choose returns the sizes with the least copper (or price) that keep every limit
// of the tree: voltage at each leg's end by the exact nonlinear solution, ampacity,
// far-end clearing, least area; one size a circuit, or legs that only get thinner
// down the run when Taper is set. Pinned legs keep their size.
//
// A relaxed pass over the tree gives a lower bound, a second one true choices that are
// then solved exactly (dynamic programming: Bellman, 1957). What cannot be part of a
// cheaper choice is left out, and the pass repeated on what remains. Branch and bound
// closes what gap is left, within a budget; the result says whether it is proven.
//
// When nothing fits, the error is a *BlockedError, and the result still holds sizes
// that keep the limits which can be kept.
func (t *Tree) Choose() (*TreeResult, error) {
	p, err := t.plan()
	if err != nil {
		return nil, err
	}
	s := p.seek(firstCap)
	if s.best == nil {
		return p.relaxed(), p.blocked()
	}
	return s.best, p.verdict(s.best.Sizes, s.best) // a pinned size may break its own limits
}

// Check returns the state of the tree with the given sizes, and a *BlockedError if
// they break a limit.
func (t *Tree) Check(sizes []*Option) (*TreeResult, error) {
	p, err := t.plan()
	if err != nil {
		return nil, err
	}
	r := p.result(sizes)
	return r, p.verdict(sizes, r)
}

// searchWork bounds branch and bound by the states that it makes: some hundredths of a
// second. A tree of a dozen legs is proven far within it.
const searchWork = 200_000

// search is the state of one Choose.
type search struct {
	*plan
	conditions []*condition // of the tree, the plan's own first
	binding    *condition   // that which asked most in the last relaxed pass
	best       *TreeResult
	open       [][]int // by group: options that may be part of a cheaper choice
	bound      float64
	cap        int  // see pass
	passWork   int  // states made in the last pass
	hopeless   bool // no choice keeps all limits
}

// condition is a state in which the tree must keep its limits, with what the last relaxed
// pass there says.
type condition struct {
	*plan
	rests
	with [][]float64 // by group and option: least cost of a choice with it
	pass pass
	cost float64
}

// search begins a search.
func (p *plan) search(states int) *search {
	s := &search{plan: p, open: slices.Clone(p.allowed), cap: states}
	for _, q := range append([]*plan{p}, p.also...) {
		s.conditions = append(s.conditions, &condition{plan: q})
	}
	s.binding = s.conditions[0]
	return s
}

// states is how many states were made so far.
func (s *search) states() int {
	n := 0
	for _, c := range s.conditions {
		n += c.work
	}
	return n
}

// tieSlack is how far two costs may differ by rounding and still be equal.
const tieSlack = 1e-9

// seek searches with at first so many states at a point.
func (p *plan) seek(states int) *search {
	s := p.search(states)
	for s.refine() {
		s.cap *= finer
	}
	if before := s.states(); !s.hopeless && !s.closed() && s.passWork*leastNodes < searchWork {
		s.bound = max(s.bound, s.branch(s.open, before+searchWork))
	}
	if s.best != nil {
		s.best.Proven = s.closed()
		s.best.Bound = min(s.bound, s.best.Cost)
	}
	return s
}

// The search starts coarse, so that it soon has a good choice with which to strike out
// what is not worth a closer look, and grows finer as less is left. All found by trial.
const (
	firstCap    = 32 // states at a point, for each size there
	finer       = 2
	lastCap     = 1000
	refineWork  = 200_000 // states made in all, before a gap of goodGap will do
	goodGap     = 0.005
	refineByLeg = 10_000 // states made in all, for each leg, beyond which any gap must do
	leastNodes  = 10     // branch and bound that cannot look at so many is of no use
)

// refine makes a relaxed pass over the open options, looks for true choices near it,
// and strikes out what cannot be part of a cheaper one. It reports whether a finer pass
// is of use.
func (s *search) refine() bool {
	before := s.states()
	cost, picks, ok := s.relax(s.open)
	s.passWork = s.states() - before
	if !ok {
		if s.best != nil {
			s.bound = s.best.Cost // nothing cheaper is left
		}
		s.hopeless = s.best == nil // nothing fits even with every promise kept
		return false
	}
	s.bound = max(s.bound, cost)
	for _, c := range s.conditions {
		c.rests, c.with = c.pass.complete(c.cost)
	}
	s.repair(picks)
	if s.best == nil {
		s.candidates()
	}
	s.lighten()
	if s.best == nil || s.closed() {
		return false
	}
	if work := s.states(); work > refineWork && s.best.Cost <= s.bound*(1+goodGap) || work > refineWork+refineByLeg*len(s.t.Legs) {
		return false
	}
	return s.tighten() || s.cap < lastCap
}

// closed reports whether the best choice costs no more than the bound.
func (s *search) closed() bool { return s.best != nil && s.best.Cost <= s.bound*(1+tieSlack) }

// limit is what a choice must not cost to be of interest.
func (s *search) limit() float64 {
	if s.best == nil {
		return math.Inf(1)
	}
	return s.best.Cost * (1 + tieSlack)
}

// relax makes a relaxed pass over the options in question for each condition: no choice
// costs less than the dearest of them. ok is false if no choice among them fits, or none
// that is cheaper than the best.
func (s *search) relax(open [][]int) (cost float64, picks []int, ok bool) {
	cost = -1
	for _, c := range s.conditions {
		c.pass.plan, c.pass.open, c.pass.relaxed, c.pass.cap = c.plan, open, true, s.cap
		c.pass.floor, c.pass.rests, c.pass.limit = c.leastAmps(open), c.rests, s.limit()
		least, of, ok := c.pass.run()
		if !ok {
			return 0, nil, false
		}
		if c.cost = least; least > cost {
			cost, picks, s.binding = least, of, c
		}
	}
	return cost, picks, true
}

// tighten strikes out options that no cheaper choice holds; false if there are none.
func (s *search) tighten() bool {
	limit, struck := s.limit(), false
	for g, all := range s.open {
		var keep []int
		for _, k := range all {
			if !slices.ContainsFunc(s.conditions, func(c *condition) bool { return c.with[g][k] > limit }) {
				keep = append(keep, k)
			}
		}
		if len(keep) == 0 {
			keep = all // only rounding leaves none
		}
		struck = struck || len(keep) < len(all)
		s.open[g] = keep
	}
	return struck
}

// offer solves the picks and keeps them if they are the best so far. short is the
// voltage that misses most; 0 if all limits are kept or others than voltages are not.
func (s *search) offer(picks []int) (short float64, ok bool) {
	sizes := s.sizes(picks)
	if !s.t.clears(sizes) {
		return 0, false
	}
	r := &TreeResult{Sizes: sizes}
	for n, c := range s.conditions {
		v, a, ok := c.t.Solve(sizes)
		if !ok {
			return 0, false
		}
		for i := range v {
			short = max(short, float64(c.t.Legs[i].MinVolt-v[i]))
		}
		if n == 0 {
			r.Volts, r.Amps = v, a
		}
	}
	if short > voltSlack {
		return short, false
	}
	for i, o := range sizes {
		r.Cost += s.cost(i, o)
	}
	if s.best == nil || r.Cost < s.best.Cost*(1-tieSlack) {
		s.best = r
	}
	return 0, true
}

// candidates looks for true choices: with a little more than the least voltages until one
// meets all limits, else with the greatest currents there can be, else the thickest sizes.
func (s *search) candidates() {
	c := s.binding
	p := &pass{plan: c.plan, open: s.open, rests: c.rests, limit: s.limit(), floor: c.pass.floor, cap: s.cap}
	const rounds = 5
	for range rounds {
		_, picks, ok := p.run()
		if !ok {
			break
		}
		short, ok := s.offer(picks)
		if ok {
			return
		}
		if short == 0 {
			break // not a voltage is amiss
		}
		p.lift += 1.05 * short
	}
	if s.best != nil {
		return
	}
	p.floor, p.lift = c.mostAmps(), 0
	if _, picks, ok := p.run(); ok {
		s.offer(picks)
	}
	if s.best == nil {
		picks := make([]int, len(s.allowed))
		for g, a := range s.allowed {
			picks[g] = largest(a)
		}
		s.offer(picks)
	}
}

// branch is branch and bound (Land and Doig, 1960) on the groups in order. It returns a
// lower bound on what the open options hold.
func (s *search) branch(open [][]int, budget int) float64 {
	bound, picks, ok := s.relax(open)
	if !ok || s.best != nil && bound >= s.best.Cost*(1-tieSlack) {
		return s.limit()
	}
	s.offer(picks)
	if s.best != nil && s.best.Cost <= bound*(1+tieSlack) {
		return bound // the bound is reached: nothing cheaper hides here
	}
	at := slices.IndexFunc(open, func(o []int) bool { return len(o) > 1 })
	if at < 0 {
		return s.limit()
	}
	least := s.limit()
	for n := range open[at] {
		if s.states() > budget {
			return bound
		}
		next := slices.Clone(open)
		next[at] = open[at][n : n+1]
		least = min(least, s.branch(next, budget))
	}
	return max(bound, least)
}

// worst returns the index of the largest value; −1 if none is above zero.
func worst(values []float64) int {
	at, top := -1, 0.0
	for i, v := range values {
		if v > top && !math.IsNaN(v) {
			at, top = i, v
		}
	}
	return at
}
