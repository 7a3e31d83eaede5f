package sizing

import (
	"errors"
	"fmt"
	"math"
	"math/rand/v2"
	"testing"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// metricOptions are standard metric sizes at 70 °C without derating.
func metricOptions(areas ...float64) []Option {
	var out []Option
	for _, c := range catalogue.Conductors(catalogue.Metric) {
		for _, a := range areas {
			if float64(c.Size.Area) == a {
				iz, _, err := Ampacity(AmpacityInput{Table: catalogue.AmpacityB2, Size: c.Size, Ambient: 30})
				if err != nil {
					panic(err)
				}
				out = append(out, Option{Size: c.Size, PerMetre: PerMetre(c, 70), Ampacity: iz})
			}
		}
	}
	return out
}

// randomTree makes a small tree with feeders, circuits, branches, pins and all kinds
// of load, tight enough that sizes differ.
func randomTree(r *rand.Rand, legs int) *Tree {
	t := &Tree{Volts: 21, Ahead: 0.02, Options: metricOptions(1, 1.5, 2.5, 4, 6), Taper: r.IntN(2) == 0}
	circuits := 0
	for i := range legs {
		l := Leg{Name: fmt.Sprint("leg ", i), Parent: -1, Length: quantity.Metre(2 + 30*r.Float64()), Extra: quantity.Ohm(0.02 * r.Float64())}
		if i > 0 {
			l.Parent = r.IntN(i+1) - 1
		}
		up := ""
		if l.Parent >= 0 {
			up = t.Legs[l.Parent].Circuit
		}
		switch {
		case up != "":
			l.Circuit = up
		case r.IntN(3) > 0:
			circuits++
			l.Circuit = fmt.Sprint("circuit ", circuits)
		}
		if l.Circuit != "" || r.IntN(3) == 0 {
			l.MinVolt = quantity.Volt(19.2 + 1.2*r.Float64())
			switch r.IntN(4) {
			case 0:
				l.Load.Current = quantity.Ampere(1.2 * r.Float64())
			case 1:
				l.Load.Ohm = quantity.Ohm(15 + 60*r.Float64())
			case 2: // a string: V_F 15 V behind a resistor
				l.Load.Ohm = quantity.Ohm(4 + 20*r.Float64())
				l.Load.Current = quantity.Ampere(-15 / float64(l.Load.Ohm))
			default:
				l.Load.Power = quantity.Watt(25 * r.Float64())
			}
		}
		if r.IntN(3) == 0 {
			l.Loop = quantity.Ohm(0.4 + 1.5*r.Float64())
		}
		if r.IntN(4) == 0 {
			l.Carry = quantity.Ampere(5 + 25*r.Float64())
		}
		if r.IntN(7) == 0 {
			l.Pinned = &t.Options[r.IntN(len(t.Options))]
		}
		t.Legs = append(t.Legs, l)
	}
	return t
}

// exhaustive tries every set of sizes, by an implementation of its own of the rules.
func exhaustive(t *Tree) (best float64, found bool) {
	best = math.Inf(1)
	sizes := make([]*Option, len(t.Legs))
	var try func(i int)
	try = func(i int) {
		if i == len(t.Legs) {
			ok := true
			for _, c := range append([]Condition{{t.Volts, minVolts(t)}}, t.Also...) {
				_, _, fits := t.in(c).meets(sizes)
				ok = ok && fits
			}
			if ok {
				if c := t.Copper(sizes); c < best {
					best, found = c, true
				}
			}
			return
		}
		l := &t.Legs[i]
		if o := l.Pinned; o != nil {
			if o.Ampacity >= l.Carry && o.Size.Area >= l.Least {
				sizes[i] = o
				try(i + 1)
			}
			return
		}
		for k := range t.Options {
			o := &t.Options[k]
			if o.Ampacity < l.Carry || o.Size.Area < l.Least || !agrees(t, sizes, i, o) {
				continue
			}
			sizes[i] = o
			try(i + 1)
		}
	}
	try(0)
	return best, found
}

func minVolts(t *Tree) []quantity.Volt {
	out := make([]quantity.Volt, len(t.Legs))
	for i := range out {
		out[i] = t.Legs[i].MinVolt
	}
	return out
}

// agrees applies the rule of one size a circuit, or of thinning down the run, to the
// legs already given a size.
func agrees(t *Tree, sizes []*Option, i int, o *Option) bool {
	l := &t.Legs[i]
	if l.Circuit == "" {
		return true
	}
	if t.Taper {
		p := l.Parent
		return p < 0 || t.Legs[p].Circuit != l.Circuit || t.Legs[p].Pinned != nil || o.Size.Area <= sizes[p].Size.Area
	}
	for j := range i {
		if t.Legs[j].Circuit == l.Circuit && t.Legs[j].Pinned == nil && sizes[j] != o {
			return false
		}
	}
	return true
}

// TestChooseEqualsExhaustive holds the search against trying everything.
func TestChooseEqualsExhaustive(t *testing.T) {
	r := rand.New(rand.NewPCG(7, 11))
	fits, blocked := 0, 0
	for n := range 600 {
		tree := randomTree(r, 2+r.IntN(5))
		want, found := exhaustive(tree)
		got, err := tree.Choose()
		var be *BlockedError
		switch {
		case errors.As(err, &be):
			blocked++
			if found {
				t.Fatalf("tree %d: blocked by %v, but a choice of %.3f cm³ exists", n, be, want)
			}
			if be.Frees == "" {
				t.Errorf("tree %d: %v names no remedy", n, be)
			}
		case err != nil:
			t.Fatalf("tree %d: %v", n, err)
		case !found:
			t.Fatalf("tree %d: chose %.3f cm³ where nothing fits", n, got.Cost)
		default:
			fits++
			if math.Abs(got.Cost-want) > 1e-6*want {
				t.Errorf("tree %d (taper %v): %.4f cm³, least is %.4f", n, tree.Taper, got.Cost, want)
			}
			if !got.Proven || got.Bound > want*(1+1e-9) {
				t.Errorf("tree %d: bound %.4f proven %v for least %.4f", n, got.Bound, got.Proven, want)
			}
			if _, _, ok := tree.meets(got.Sizes); !ok {
				t.Errorf("tree %d: the choice breaks a limit", n)
			}
		}
	}
	if fits < 100 || blocked < 50 {
		t.Errorf("the trees are too easy or too hard: %d fit, %d blocked", fits, blocked)
	}
	t.Logf("%d fit, %d blocked", fits, blocked)
}

// TestCoarseEqualsExhaustive does the same where a search that starts with one state at a
// point must merge all, strike out and look again; on larger trees with fewer sizes too.
func TestCoarseEqualsExhaustive(t *testing.T) {
	r := rand.New(rand.NewPCG(13, 17))
	fits := 0
	for n := range 400 {
		tree := randomTree(r, 2+r.IntN(5))
		if n%8 == 0 {
			tree = randomTree(r, 9)
			tree.Options = metricOptions(1, 2.5, 6)
			for i := range tree.Legs {
				if tree.Legs[i].Pinned != nil {
					tree.Legs[i].Pinned = &tree.Options[1]
				}
			}
		}
		want, found := exhaustive(tree)
		p, err := tree.plan()
		if err != nil {
			continue // what it says is tested elsewhere
		}
		s := p.seek(1)
		if s.best != nil && p.verdict(s.best.Sizes, s.best) != nil {
			continue // a pinned size breaks its own limits
		}
		switch {
		case (s.best != nil) != found:
			t.Errorf("tree %d: found %v, exists %v", n, s.best != nil, found)
		case found:
			fits++
			if s.bound > want*(1+1e-9) {
				t.Errorf("tree %d: bound %.6f above the least %.6f", n, s.bound, want)
			}
			if !s.best.Proven || math.Abs(s.best.Cost-want) > 1e-6*want {
				t.Errorf("tree %d: %.4f cm³ (proven %v), least is %.4f", n, s.best.Cost, s.best.Proven, want)
			}
		}
	}
	if fits < 200 {
		t.Errorf("only %d trees fit", fits)
	}
}

// TestTwoConditionsEqualExhaustive: with a second condition in which resistors and strings
// draw more, the sizes keep both sets of limits with the least copper.
func TestTwoConditionsEqualExhaustive(t *testing.T) {
	r := rand.New(rand.NewPCG(29, 31))
	fits, dearer := 0, 0
	for n := range 400 {
		tree := randomTree(r, 2+r.IntN(5))
		alone, _ := exhaustive(tree)
		const higher = 5 // V above the first condition
		c := Condition{tree.Volts + higher, minVolts(tree)}
		for i, v := range c.MinVolt {
			if v > 0 {
				c.MinVolt[i] = v + higher - quantity.Volt(0.3*r.Float64())
			}
		}
		tree.Also = append(tree.Also, c)
		want, found := exhaustive(tree)
		got, err := tree.Choose()
		if (err == nil) != found {
			t.Errorf("tree %d: %v, exists %v", n, err, found)
		}
		if err != nil || !found {
			continue
		}
		fits++
		if want > alone*(1+1e-9) {
			dearer++
		}
		if !got.Proven || math.Abs(got.Cost-want) > 1e-6*want {
			t.Errorf("tree %d: %.4f cm³ (proven %v), least is %.4f", n, got.Cost, got.Proven, want)
		}
	}
	if fits < 100 || dearer < 20 {
		t.Errorf("%d trees fit, in %d the second condition asks more", fits, dearer)
	}
}

// TestBoundBelowExhaustive: one relaxed pass with few states at a point, before and after
// the rests are known, promises no less than the best choice costs.
func TestBoundBelowExhaustive(t *testing.T) {
	r := rand.New(rand.NewPCG(19, 23))
	fits, tight := 0, 0
	for n := range 400 {
		tree := randomTree(r, 4+r.IntN(4))
		tree.Options = metricOptions(1, 2.5, 6)
		for i := range tree.Legs {
			if tree.Legs[i].Pinned != nil {
				tree.Legs[i].Pinned = &tree.Options[1]
			}
		}
		want, found := exhaustive(tree)
		p, err := tree.plan()
		if err != nil || !found {
			continue
		}
		fits++
		s := p.search(1 + n%3)
		for range 3 {
			cost, _, ok := s.relax(p.allowed)
			if !ok || cost > want*(1+1e-9) {
				t.Fatalf("tree %d: bound %.6f (%v) above the least %.6f", n, cost, ok, want)
			}
			c := s.conditions[0]
			if c.rests, c.with = c.pass.complete(cost); cost > want*0.999 {
				tight++
			}
			s.cap += 2
		}
	}
	if fits < 100 || tight < fits {
		t.Errorf("%d trees fit, %d bounds were tight", fits, tight)
	}
}

// meets reports whether sizes keep every voltage and loop limit; sizes are within
// the allowed ones. On success the solved state is returned.
func (t *Tree) meets(sizes []*Option) ([]quantity.Volt, []quantity.Ampere, bool) {
	if !t.clears(sizes) {
		return nil, nil, false
	}
	v, a, ok := t.Solve(sizes)
	if !ok {
		return nil, nil, false
	}
	for i := range t.Legs {
		if float64(v[i]) < float64(t.Legs[i].MinVolt)-voltSlack {
			return nil, nil, false
		}
	}
	return v, a, true
}
