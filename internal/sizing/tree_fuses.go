package sizing

import (
	"math"
	"slices"

	"gloamwright/internal/quantity"
)

// FuseOption is one fuse that may stand before a way, with what it asks of its cable.
type FuseOption struct {
	Rating quantity.Ampere
	Price  float64
	Carry  quantity.Ampere // ampacity of every leg that it protects, at least
	Loop   quantity.Ohm    // loop from the source to their ends, at most; 0: no limit
	Extra  quantity.Ohm    // in series at the start of the first leg
}

// FusedWay is a way of a tree whose fuse is chosen together with its cable.
type FusedWay struct {
	Legs   []int        // that the fuse protects, the first one first
	Fuses  []FuseOption // by rising rating; a feeder's first stands above the first ones behind it
	Behind []int        // of a feeder: the ways behind it; each stands before it in the list
	Given  bool         // the one fuse was given: it follows no other
}

// ChooseFused returns the sizes and fuses of the least cost together: that of the tree
// and that of a fuse for each way. A feeder's fuse stands ratio times above those
// behind it. A larger fuse protects less well, so it comes into question only where it
// costs less than every smaller one that may stand there. The picks index Fuses; the
// tree's legs are left with what they ask. Cost and Bound of the result are those of
// the tree without its fuses.
//
// The fuses are decided way by way, branch and bound (Land and Doig, 1960): what is
// not decided asks no more than any of its fuses and costs what the cheapest costs.
// When the smallest fuses do not fit, they stand, with their error.
func (t *Tree) ChooseFused(ways []FusedWay, ratio float64) (*TreeResult, []int, error) {
	s := &fused{t: t, ways: ways, ratio: ratio, left: max(fewestSearches, fusedWork/max(1, len(t.Legs)))}
	least, open := make([]int, len(ways)), false
	for i := range ways {
		may := s.may(i, least)
		open = open || len(may) != 1
		if len(may) > 0 {
			least[i] = may[0]
		}
	}
	s.lay(least, len(ways))
	r, err := t.Choose()
	if err != nil || !open {
		return r, least, err
	}
	s.best, s.picks, s.cost = r, slices.Clone(least), r.Cost+s.price(least)
	s.lay(least, 0)
	relaxed, err := t.Choose()
	if err != nil {
		return r, least, nil // cannot be: what is laid asks no more than the least fuses
	}
	bound := relaxed.Bound + s.cheapest(0)
	done := s.branch(slices.Clone(least), 0)
	s.lay(s.picks, len(ways))
	s.best.Proven = done
	if s.best.Bound = s.best.Cost; !done {
		s.best.Bound = min(s.best.Cost, bound-s.price(s.picks))
	}
	return s.best, s.picks, nil
}

// fusedWork bounds ChooseFused by the legs of all trees that it searches, some tenths
// of a second, and fewestSearches from below.
const (
	fusedWork      = 10_000
	fewestSearches = 20
)

// fused is the state of one ChooseFused.
type fused struct {
	t     *Tree
	ways  []FusedWay
	ratio float64
	left  int // trees that may still be searched
	best  *TreeResult
	picks []int
	cost  float64 // of best, its fuses included
}

// may lists the fuses that come into question for way i, given those behind it.
func (s *fused) may(i int, picks []int) []int {
	w := &s.ways[i]
	least := quantity.Ampere(0)
	if !w.Given {
		for _, b := range w.Behind {
			least = max(least, s.ways[b].Fuses[picks[b]].Rating*quantity.Ampere(s.ratio))
		}
	}
	var out []int
	below := math.Inf(1)
	for k, f := range w.Fuses {
		if f.Rating >= least*(1-slack) && f.Price < below {
			out, below = append(out, k), f.Price
		}
	}
	return out
}

// lay writes what the fuses ask into the legs: the picked ones of the first n ways; of
// the others the least of each that any fuse asks.
func (s *fused) lay(picks []int, n int) {
	for i, w := range s.ways {
		ask := w.Fuses[picks[i]]
		if i >= n {
			ask = w.Fuses[0]
			for _, f := range w.Fuses[1:] {
				ask.Carry, ask.Extra = min(ask.Carry, f.Carry), min(ask.Extra, f.Extra)
				if ask.Loop > 0 && (f.Loop == 0 || f.Loop > ask.Loop) {
					ask.Loop = f.Loop
				}
			}
		}
		for k, l := range w.Legs {
			leg := &s.t.Legs[l]
			leg.Carry, leg.Loop = ask.Carry, ask.Loop
			if k == 0 {
				leg.Extra = ask.Extra
			}
		}
	}
}

// price sums what the picked fuses cost.
func (s *fused) price(picks []int) float64 {
	sum := 0.0
	for i, k := range picks {
		sum += s.ways[i].Fuses[k].Price
	}
	return sum
}

// cheapest sums the cheapest fuses of the ways from n on.
func (s *fused) cheapest(n int) float64 {
	sum := 0.0
	for _, w := range s.ways[n:] {
		sum += slices.MinFunc(w.Fuses, func(a, b FuseOption) int {
			switch {
			case a.Price < b.Price:
				return -1
			case a.Price > b.Price:
				return 1
			}
			return 0
		}).Price
	}
	return sum
}

// branch decides way n; it reports whether it could look at everything.
func (s *fused) branch(picks []int, n int) bool {
	if s.left--; s.left < 0 {
		return false
	}
	s.lay(picks, n)
	r, err := s.t.Choose()
	if err != nil {
		return true
	}
	decided := s.price(picks[:n])
	if r.Bound+decided+s.cheapest(n) >= s.cost*(1-tieSlack) {
		return true
	}
	if n == len(s.ways) {
		s.best, s.picks, s.cost = r, slices.Clone(picks), r.Cost+decided
		return r.Proven
	}
	done := true
	for _, k := range s.may(n, picks) {
		picks[n] = k
		done = s.branch(picks, n+1) && done
	}
	return done
}
