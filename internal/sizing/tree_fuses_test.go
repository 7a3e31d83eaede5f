package sizing

import (
	"errors"
	"math"
	"math/rand/v2"
	"testing"

	"pgregory.net/rapid"

	"gloamwright/internal/quantity"
)

// fusedTree makes a small priced tree of which each circuit and each feeder is a way
// with one to three fuses, larger ones often cheaper.
func fusedTree(rt *rapid.T) (*Tree, []FusedWay) {
	r := rand.New(rand.NewPCG(rapid.Uint64().Draw(rt, "seed"), 1))
	t := randomTree(r, 1+r.IntN(4))
	t.Options = metricOptions(1, 1.5, 2.5)
	for i := range t.Options {
		t.Options[i].Price = 0.2 + 2*r.Float64() // in no order
	}
	ends := []float64{r.Float64(), 3 * r.Float64(), r.Float64()}
	for i := range t.Legs {
		l := &t.Legs[i]
		l.Loop, l.Carry = 0, 0
		if l.Pinned != nil {
			l.Pinned = &t.Options[r.IntN(3)]
		}
		if r.IntN(2) == 0 {
			l.Ends = func(o *Option) float64 {
				for k := range t.Options {
					if t.Options[k].Size == o.Size {
						return ends[k]
					}
				}
				return 0
			}
		}
	}
	var ways []FusedWay
	byLeg := make([]int, len(t.Legs)) // way of each leg
	circuits := map[string]int{}
	for i := len(t.Legs) - 1; i >= 0; i-- {
		l := &t.Legs[i]
		if n, ok := circuits[l.Circuit]; ok && l.Circuit != "" {
			ways[n].Legs = append([]int{i}, ways[n].Legs...)
			byLeg[i] = n
			continue
		}
		w := FusedWay{Legs: []int{i}}
		byLeg[i], circuits[l.Circuit] = len(ways), len(ways)
		for k := range 1 + r.IntN(3) {
			rating := quantity.Ampere([]float64{2, 5, 10}[k])
			w.Fuses = append(w.Fuses, FuseOption{
				Rating: rating, Price: 30 * r.Float64(), Carry: rating * 1.1, Loop: quantity.Ohm(4 / float64(rating) * (0.5 + r.Float64())), Extra: quantity.Ohm(0.1 / float64(rating)),
			})
		}
		ways = append(ways, w)
	}
	for i := range t.Legs { // ways of later legs stand first, so what is behind does too
		if p := t.Legs[i].Parent; p >= 0 && byLeg[p] != byLeg[i] {
			for q := p; q >= 0; q = t.Legs[q].Parent {
				if f := byLeg[q]; f > byLeg[i] {
					ways[f].Behind = append(ways[f].Behind, byLeg[i])
				}
			}
		}
	}
	for n := range ways { // the smallest fuse of a feeder stands above the smallest ones behind it
		least := quantity.Ampere(0)
		for _, b := range ways[n].Behind {
			least = max(least, 1.6*ways[b].Fuses[0].Rating)
		}
		for k := range ways[n].Fuses {
			if f := &ways[n].Fuses[k]; least > 0 {
				f.Rating = least * quantity.Ampere([]float64{1, 2.5, 5}[k])
				f.Carry = f.Rating * 1.1
			}
		}
	}
	return t, ways
}

// fusedExhaustive tries every fuse of every way with every set of sizes, by an
// implementation of its own of the rules.
func fusedExhaustive(t *Tree, ways []FusedWay, ratio float64) (best float64, found bool) {
	best = math.Inf(1)
	picks := make([]int, len(ways))
	mayStand := func(i int) bool {
		w := ways[i]
		allowed := func(k int) bool {
			for _, b := range w.Behind {
				if float64(w.Fuses[k].Rating) < ratio*float64(ways[b].Fuses[picks[b]].Rating) {
					return false
				}
			}
			return true
		}
		if !allowed(picks[i]) {
			return false
		}
		for k := range picks[i] { // a smaller one that is no dearer
			if allowed(k) && w.Fuses[k].Price <= w.Fuses[picks[i]].Price {
				return false
			}
		}
		return true
	}
	var sizes func(i int, chosen []*Option, fuses float64)
	sizes = func(i int, chosen []*Option, fuses float64) {
		if i == len(t.Legs) {
			if _, _, ok := t.meets(chosen); !ok {
				return
			}
			cost := fuses
			for j, o := range chosen {
				cost += float64(t.Legs[j].Length) * o.Price
				if t.Legs[j].Ends != nil {
					cost += t.Legs[j].Ends(o)
				}
			}
			best, found = min(best, cost), true
			return
		}
		options := []*Option{t.Legs[i].Pinned}
		if options[0] == nil {
			options = nil
			for k := range t.Options {
				options = append(options, &t.Options[k])
			}
		}
		for _, o := range options {
			if o.Ampacity >= t.Legs[i].Carry && o.Size.Area >= t.Legs[i].Least && (t.Legs[i].Pinned != nil || agrees(t, chosen, i, o)) {
				chosen[i] = o
				sizes(i+1, chosen, fuses)
			}
		}
	}
	var try func(i int, fuses float64)
	try = func(i int, fuses float64) {
		if i == len(ways) {
			sizes(0, make([]*Option, len(t.Legs)), fuses)
			return
		}
		for k, f := range ways[i].Fuses {
			if picks[i] = k; !mayStand(i) {
				continue
			}
			for n, l := range ways[i].Legs {
				t.Legs[l].Carry, t.Legs[l].Loop = f.Carry, f.Loop
				if n == 0 {
					t.Legs[l].Extra = f.Extra
				}
			}
			try(i+1, fuses+f.Price)
		}
	}
	try(0, 0)
	return best, found
}

// TestFusedEqualsExhaustive holds the choice of cables, terminals and fuses together
// against trying everything.
func TestFusedEqualsExhaustive(t *testing.T) {
	const (
		ratio  = 1.6
		rounds = 10 // the trees are small and quick: some hundreds, even in a short run
	)
	fits, dearer := 0, 0
	check := func(rt *rapid.T) {
		tree, ways := fusedTree(rt)
		got, picks, err := tree.ChooseFused(ways, ratio)
		var b *BlockedError
		if err != nil && !errors.As(err, &b) {
			rt.Fatal(err)
		}
		if err != nil { // the smallest fuses do not fit: nothing is claimed
			return
		}
		cost := got.Cost
		for i, k := range picks {
			cost += ways[i].Fuses[k].Price
			if k > 0 {
				dearer++
			}
		}
		want, found := fusedExhaustive(tree, ways, ratio)
		if !found || math.Abs(cost-want) > 1e-9*want || !got.Proven || got.Bound > got.Cost*(1+1e-9) {
			rt.Fatalf("costs %v (proven %v), the least is %v", cost, got.Proven, want)
		}
		fits++
	}
	for range rounds {
		rapid.Check(t, check)
	}
	if fits < 20 || dearer < 5 {
		t.Errorf("only %d trees fit, %d fuses are not the smallest: the trees prove little", fits, dearer)
	}
}

// TestCheapest: the one chosen without prices stands among equals and where it has no
// price; what has no price is never taken for cheap.
func TestCheapest(t *testing.T) {
	for _, c := range []struct {
		name  string
		list  []Candidate
		pick  int
		known bool
	}{
		{"a larger one is cheaper", []Candidate{{"1 A", "", 5, true}, {"2 A", "", 4, true}}, 1, true},
		{"equal", []Candidate{{"1 A", "", 5, true}, {"2 A", "", 5, true}}, 0, true},
		{"the larger one has no price", []Candidate{{"1 A", "", 5, true}, {"2 A", "", 0, false}}, 0, true},
		{"the first has no price", []Candidate{{"1 A", "", 0, false}, {"2 A", "", 4, true}}, 0, false},
		{"free of charge", []Candidate{{"1 A", "", 5, true}, {"2 A", "", 0, true}}, 1, true},
	} {
		pick, w, known := Cheapest(c.list, "EUR")
		if pick != c.pick || known != c.known || known && w.Value != c.list[pick].Price {
			t.Errorf("%s: takes %d, %v, %v", c.name, pick, known, w.Value)
		}
	}
}

// TestLineCost: lengths are drawn in half metres with 3 % for cutting, lines rounded to
// hundredths; worked by hand.
func TestLineCost(t *testing.T) {
	for _, c := range []struct{ length, drawn, each, cost float64 }{
		{10, 10.5, 0.62, 6.51},  // 10.3 m
		{17, 18, 0.333, 5.99},   // 17.51 m; 5.994
		{0.25, 0.5, 0.17, 0.09}, // 0.2575 m; 0.085
		{50 / 1.03, 50, 1, 50},
	} {
		// 40 ft with 3 % are 41.2 ft, drawn as 42 ft
		if d := quantity.InFeet.Of(Drawn(quantity.InFeet.Metres(40), quantity.InFeet)); math.Abs(d-42) > 1e-9 {
			t.Errorf("draws %v ft, want 42", d)
		}
		if d := float64(Drawn(quantity.Metre(c.length), quantity.InMetres)); d != c.drawn || LineCost(c.each, d) != c.cost {
			t.Errorf("%v m: draws %v for %v, want %v for %v", c.length, d, LineCost(c.each, d), c.drawn, c.cost)
		}
	}
}
