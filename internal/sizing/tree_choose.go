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
// With the currents held at values that no choice can undercut, the search over
// labels gives a lower bound; with the currents of a solved choice it gives
// candidates that are then solved exactly. Branch and bound closes what gap is left,
// within a budget; the result says whether it is proven.
//
// When nothing fits, the error is a *BlockedError, and the result still holds sizes
// that keep the limits which can be kept.
func (t *Tree) Choose() (*TreeResult, error) {
	p, err := t.plan()
	if err != nil {
		return nil, err
	}
	s := &search{plan: p}
	s.run()
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

// searchWork bounds branch and bound by the labels that it makes: some tenths of a
// second. A tree of a few dozen legs is proven far within it.
const searchWork = 2_000_000

// leastAmps returns currents of all legs that no choice within limits undercuts.
// Constant power draws least at the highest voltage, a resistor at the lowest; the
// highest voltages follow from the least currents through the least resistances.
func (p *plan) leastAmps(fix []int) []float64 {
	n := len(p.t.Legs)
	r, v, a := make([]float64, n), make([]float64, n), make([]float64, n)
	for i := range r {
		k := free
		if c := p.choices(i, fix); c != nil {
			k = largest(c)
		}
		r[i] = p.t.ohms(i, p.option(i, k))
		v[i] = float64(p.t.Volts)
	}
	const rounds = 6
	for range rounds {
		for i := range a {
			l := &p.t.Legs[i]
			a[i] = float64(l.Load.Current)
			if l.Load.Power > 0 {
				a[i] += float64(l.Load.Power) / v[i]
			}
			if l.Load.Ohm > 0 {
				a[i] += float64(l.MinVolt) / float64(l.Load.Ohm)
			}
			a[i] = max(a[i], 0)
		}
		for i := n - 1; i >= 0; i-- {
			if q := p.t.Legs[i].Parent; q >= 0 {
				a[q] += a[i]
			}
		}
		for i := range v {
			up := float64(p.t.Volts)
			if q := p.t.Legs[i].Parent; q >= 0 {
				up = v[q]
			}
			v[i] = max(up-a[i]*r[i], collapsed*float64(p.t.Volts))
		}
	}
	return a
}

// mostAmps returns the currents of all legs when each load stands at the worst
// voltage for it within limits.
func (p *plan) mostAmps() []float64 {
	a := make([]float64, len(p.t.Legs))
	for i := len(a) - 1; i >= 0; i-- {
		l := &p.t.Legs[i]
		own := float64(l.Load.Current)
		if l.Load.Power > 0 {
			own += float64(l.Load.Power) / float64(l.MinVolt)
		}
		if l.Load.Ohm > 0 {
			own += float64(p.t.Volts) / float64(l.Load.Ohm)
		}
		a[i] += own
		if q := l.Parent; q >= 0 {
			a[q] += a[i]
		}
	}
	return a
}

// search is the state of one Choose.
type search struct {
	*plan
	best *TreeResult
}

// tieSlack is how far two costs may differ by rounding and still be equal.
const tieSlack = 1e-9

func (s *search) run() {
	bound, _, ok := s.search(s.leastAmps(s.noFix()), s.noFix(), true)
	if !ok {
		return // nothing fits even with the least currents
	}
	s.candidates()
	s.lighten()
	if s.best != nil && s.best.Cost <= bound*(1+tieSlack) {
		s.best.Bound, s.best.Proven = bound, true
		return
	}
	done := s.branch(s.noFix(), 0)
	if s.best == nil {
		return
	}
	s.best.Bound, s.best.Proven = bound, done
	if done {
		s.best.Bound = s.best.Cost
	}
}

// offer solves the picks and keeps them if they are the best so far.
func (s *search) offer(picks []int) (*TreeResult, bool) {
	sizes := s.sizes(picks)
	v, a, ok := s.t.meets(sizes)
	if !ok {
		return nil, false
	}
	r := &TreeResult{Sizes: sizes, Volts: v, Amps: a}
	for i, o := range sizes {
		r.Cost += s.cost(i, o)
	}
	if s.best == nil || r.Cost < s.best.Cost*(1-tieSlack) {
		s.best = r
	}
	return r, true
}

// candidates searches with the currents of solved choices until one meets all
// limits, and at last with the greatest currents there can be.
func (s *search) candidates() {
	amps := s.leastAmps(s.noFix())
	const rounds = 8
	for range rounds {
		_, picks, ok := s.search(amps, s.noFix(), false)
		if !ok {
			break
		}
		if _, ok := s.offer(picks); ok {
			return
		}
		_, solved, ok := s.t.Solve(s.sizes(picks))
		const step = 1.0005 // so that a choice which just fails is not found again
		for i := range amps {
			if ok {
				amps[i] = max(amps[i], float64(solved[i]))
			}
			amps[i] *= step
		}
	}
	if _, picks, ok := s.search(s.mostAmps(), s.noFix(), false); ok {
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

// lightenWork bounds lighten: legs × groups.
const lightenWork = 100_000

// lighten tries each group one size down.
func (s *search) lighten() {
	if s.best == nil || len(s.t.Legs)*len(s.allowed) > lightenWork {
		return
	}
	for changed := true; changed; {
		changed = false
		for g := range s.allowed {
			picks := s.picksOf(s.best)
			k := slices.Index(s.allowed[g], picks[g])
			if k <= 0 {
				continue
			}
			picks[g] = s.allowed[g][k-1]
			if !s.tapers(picks) {
				continue
			}
			before := s.best.Cost
			if _, ok := s.offer(picks); ok && s.best.Cost < before {
				changed = true
			}
		}
	}
}

// picksOf reads the picks back from a result.
func (s *search) picksOf(r *TreeResult) []int {
	picks := make([]int, len(s.allowed))
	for g, m := range s.members {
		for k := range s.t.Options {
			if &s.t.Options[k] == r.Sizes[m[0]] {
				picks[g] = k
			}
		}
	}
	return picks
}

// tapers reports whether no free leg is thicker than the free leg of its circuit
// that it hangs on.
func (p *plan) tapers(picks []int) bool {
	for i := range p.t.Legs {
		q := p.t.Legs[i].Parent
		if q < 0 || p.group[i] == free || p.group[q] == free || p.t.Legs[i].Circuit == "" || p.t.Legs[q].Circuit != p.t.Legs[i].Circuit {
			continue
		}
		if picks[p.group[i]] > picks[p.group[q]] {
			return false
		}
	}
	return true
}

// branch is branch and bound (Land and Doig, 1960) on the groups in order. It
// reports whether it could look at everything.
func (s *search) branch(fix []int, from int) bool {
	if s.work > searchWork {
		return false
	}
	bound, picks, ok := s.search(s.leastAmps(fix), fix, true)
	if !ok || s.best != nil && bound >= s.best.Cost*(1-tieSlack) {
		return true
	}
	if r, ok := s.offer(picks); ok && r.Cost <= bound*(1+tieSlack) {
		return true // the bound is reached: nothing cheaper hides here
	}
	for from < len(fix) && fix[from] != free {
		from++
	}
	if from == len(fix) {
		return true
	}
	done := true
	for _, k := range s.allowed[from] {
		next := slices.Clone(fix)
		next[from] = k
		if !s.branch(next, from+1) {
			done = false
			if s.work > searchWork {
				break
			}
		}
	}
	return done
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
