package network

import (
	"math"
	"slices"
)

// Sweep moves one thing of a condition from one end to the other.
type Sweep struct {
	From, To  float64
	Set       func(x float64) Environment // the condition at x
	Watch     []string                    // elements with memory to wait for; none: any
	Geometric bool                        // steps in a fixed ratio, for illuminance
	Steps     int                         // 0 means sweepSteps
}

// Search of a threshold.
const (
	sweepSteps = 40
	sweepFine  = 1e-6 // of the whole span, or of the ratio when geometric
)

// Threshold is where an element with memory moves.
type Threshold struct {
	Found  bool
	At     float64   // the first x at which it has moved
	Moved  []string  // all elements that moved there
	Before *Solution // just short of it; when nothing was found, at the end of the sweep
	After  *Solution // just past it; nil when nothing was found
}

// Threshold sweeps from s.From to s.To, keeping memory on the way, until a watched
// element moves, and closes in on the place. Sweeping on from After.State in the
// other direction finds the other end of its hysteresis. The errors are those of Solve.
func (n *Network) Threshold(s Sweep, from State) (Threshold, error) {
	steps := s.Steps
	if steps == 0 {
		steps = sweepSteps
	}
	place := func(t float64) float64 {
		if s.Geometric {
			return s.From * math.Pow(s.To/s.From, t)
		}
		return s.From + (s.To-s.From)*t
	}
	// Every solution starts from the voltages of the one before it on the sweep; halfway
	// between two, from halfway between what they had before anything moved.
	solve := func(t float64, before, after *Solution) (*Solution, error) {
		at := s.Set(place(t))
		r, err := n.start(&at, before.State)
		if err != nil {
			return nil, err
		}
		copy(r.x, before.run.x)
		if x := after.at(r.positions()); x != nil {
			for i := range r.x {
				r.x[i] = (r.x[i] + x[i]) / 2
			}
		}
		return r.settle(true, after)
	}
	before, err := n.Solve(s.Set(place(0)), from)
	if err != nil {
		return Threshold{}, err
	}
	low := 0.0
	for k := 1; k <= steps; k++ {
		high := float64(k) / float64(steps)
		after, err := solve(high, before, nil)
		if err != nil {
			return Threshold{}, err
		}
		moved := n.moved(before.State, after.State)
		if !watched(moved, s.Watch) {
			low, before = high, after
			continue
		}
		for high-low > sweepFine {
			mid := (low + high) / 2
			at, err := solve(mid, before, after)
			if err != nil {
				return Threshold{}, err
			}
			if m := n.moved(before.State, at.State); watched(m, s.Watch) {
				high, after, moved = mid, at, m
			} else {
				low, before = mid, at
			}
		}
		return Threshold{Found: true, At: place(high), Moved: moved, Before: before, After: after}, nil
	}
	return Threshold{Before: before}, nil
}

// moved lists the elements with memory whose positions differ, in the netlist's order.
func (n *Network) moved(a, b State) []string {
	var out []string
	for _, k := range n.memory {
		if id := n.devices[k].el.ID; a[id] != b[id] {
			out = append(out, id)
		}
	}
	return out
}

func watched(moved, watch []string) bool {
	if len(watch) == 0 {
		return len(moved) > 0
	}
	return slices.ContainsFunc(moved, func(id string) bool { return slices.Contains(watch, id) })
}
