package sizing

import (
	"fmt"
	"slices"
)

// plan is a tree made ready for the search: which legs take one size together, and
// which sizes they may take.
type plan struct {
	t        *Tree
	kids     [][]int        // legs on the end of each leg; the root's are kids[len(Legs)]
	group    []int          // group of each leg; free: pinned
	allowed  [][]int        // options that a group may take, ascending
	members  [][]int        // legs of each group
	common   map[string]int // group of a circuit whose legs share one size
	shared   []bool         // by leg: its circuit shares one size
	priced   bool
	inactive []bool  // by leg: its loop limit holds for every allowed choice
	also     []*plan // the tree in its other conditions
	work     int     // states made so far
}

// free stands for "no option" and "no group".
const free = -1

// cost of leg i with option o.
func (p *plan) cost(i int, o *Option) float64 {
	l := float64(p.t.Legs[i].Length)
	switch ends := p.t.Legs[i].Ends; {
	case p.priced && ends != nil:
		return l*o.Price + ends(o)
	case p.priced:
		return l * o.Price
	}
	return 2 * l * float64(o.Size.Area)
}

// plan checks the tree's form and lists what each group of legs may take.
func (t *Tree) plan() (*plan, error) {
	n := len(t.Legs)
	p := &plan{
		t: t, kids: make([][]int, n+1), group: make([]int, n), common: map[string]int{},
		shared: make([]bool, n), inactive: make([]bool, n), priced: t.Priced(),
	}
	heads := map[string]bool{}
	for i := range t.Legs {
		l := &t.Legs[i]
		if err := t.sound(i, heads); err != nil {
			return nil, err
		}
		at := l.Parent
		if at < 0 {
			at = n
		}
		p.kids[at] = append(p.kids[at], i)
		p.shared[i] = l.Circuit != "" && !t.Taper
		p.group[i] = free
		if l.Pinned == nil {
			p.join(i)
		}
	}
	for _, m := range p.members {
		a, err := p.allowedFor(m)
		if err != nil {
			return nil, err
		}
		p.allowed = append(p.allowed, a)
	}
	p.markInactive()
	for _, c := range t.Also {
		q, err := t.in(c).plan()
		if err != nil {
			return nil, err
		}
		p.also = append(p.also, q)
	}
	return p, nil
}

// join puts leg i into its group.
func (p *plan) join(i int) {
	g := len(p.members)
	if p.shared[i] {
		if known, ok := p.common[p.t.Legs[i].Circuit]; ok {
			g = known
		} else {
			p.common[p.t.Legs[i].Circuit] = g
		}
	}
	if g == len(p.members) {
		p.members = append(p.members, nil)
	}
	p.members[g] = append(p.members[g], i)
	p.group[i] = g
}

// sound checks one leg.
func (t *Tree) sound(i int, heads map[string]bool) error {
	l := &t.Legs[i]
	if l.Parent >= i || l.Parent < -1 {
		return fmt.Errorf("sizing: leg %d hangs on leg %d, which must come before it", i, l.Parent)
	}
	up := ""
	if l.Parent >= 0 {
		up = t.Legs[l.Parent].Circuit
	}
	switch {
	case up != "" && l.Circuit != up:
		return fmt.Errorf("sizing: leg %q hangs on circuit %q and is not of it", l.Name, up)
	case l.Circuit != "" && up == "" && heads[l.Circuit]:
		return fmt.Errorf("sizing: circuit %q starts at two legs", l.Circuit)
	case l.Load.Power > 0 && l.MinVolt <= 0:
		return fmt.Errorf("sizing: leg %q feeds a constant power and states no least voltage", l.Name)
	case l.Load.Power < 0 || l.MinVolt > 0 && l.Load.Draws(l.MinVolt) < 0:
		return fmt.Errorf("sizing: the load of leg %q would feed current back", l.Name)
	}
	if l.Circuit != "" {
		heads[l.Circuit] = true
	}
	return nil
}

// allowedFor lists the options that every leg of a group can take.
func (p *plan) allowedFor(legs []int) ([]int, error) {
	var out []int
	for k := range p.t.Options {
		if !slices.ContainsFunc(legs, func(i int) bool { return !p.fits(i, &p.t.Options[k]) }) {
			out = append(out, k)
		}
	}
	if len(out) > 0 {
		return out, nil
	}
	if len(p.t.Options) == 0 {
		return nil, &BlockedError{Limit: LimitStock, Subject: "the number of sizes to choose from", Bound: 1, Frees: "list at least one conductor size"}
	}
	top := &p.t.Options[len(p.t.Options)-1]
	for _, i := range legs {
		l := &p.t.Legs[i]
		if l.Carry > top.Ampacity*(1+slack) {
			return nil, &BlockedError{
				Limit: LimitAmpacity, Subject: fmt.Sprintf("what the cable of %s must carry", l.Name),
				Value: float64(l.Carry), Bound: float64(top.Ampacity), Unit: "A",
				Frees: fmt.Sprintf("fuse it at %v or less, share the load over two ways, or stock a size above %v", top.Ampacity, top.Size),
			}
		}
	}
	l := &p.t.Legs[legs[0]]
	return nil, &BlockedError{
		Limit: LimitLeastSize, Subject: "the least area for " + l.Name, Value: float64(l.Least), Bound: float64(top.Size.Area), Unit: "mm²",
		Frees: fmt.Sprintf("stock a size of at least %v", l.Least),
	}
}

// fits reports whether an option keeps the limits that concern leg i alone.
func (p *plan) fits(i int, o *Option) bool {
	l := &p.t.Legs[i]
	return o.Ampacity >= l.Carry*(1-slack) && o.Size.Area >= l.Least*(1-slack)
}

// markInactive finds the loop limits that hold whatever is chosen.
func (p *plan) markInactive() {
	loops := p.t.loops(p.extreme(smallest))
	for i := range loops {
		most := float64(p.t.Legs[i].Loop)
		p.inactive[i] = most <= 0 || loops[i] <= most
	}
}

// extreme picks one allowed option for each group.
func (p *plan) extreme(pick func(allowed []int) int) []*Option {
	picks := make([]int, len(p.allowed))
	for g, a := range p.allowed {
		picks[g] = pick(a)
	}
	return p.sizes(picks)
}

func largest(a []int) int  { return a[len(a)-1] }
func smallest(a []int) int { return a[0] }

// option returns what leg i is made of when its group takes k.
func (p *plan) option(i, k int) *Option {
	if p.group[i] == free {
		return p.t.Legs[i].Pinned
	}
	return &p.t.Options[k]
}

// sizes turns picks by group into options by leg.
func (p *plan) sizes(picks []int) []*Option {
	out := make([]*Option, len(p.t.Legs))
	for i := range out {
		k := free
		if g := p.group[i]; g != free {
			k = picks[g]
		}
		out[i] = p.option(i, k)
	}
	return out
}

// result solves a choice; the voltages are zero if there is no operating point.
func (p *plan) result(sizes []*Option) *TreeResult {
	r := &TreeResult{Sizes: sizes}
	r.Volts, r.Amps, _ = p.t.Solve(sizes)
	for i, o := range sizes {
		r.Cost += p.cost(i, o)
	}
	return r
}
