package network

import (
	"slices"
	"strings"
)

// Solve finds the operating point in a condition that is reached from a state: the
// elements with memory start in their positions there and move until all agree with
// the voltages they see. A nil state is the state at rest.
//
// All elements that want to move do so at once. If that goes round in a circle they
// move one at a time, in the order of the netlist; if that does too, the error is a
// *ChatterError. The other errors are *ElementError, *LoopError, *ConvergenceError.
func (n *Network) Solve(at Environment, from State) (*Solution, error) {
	r, err := n.start(&at, from)
	if err != nil {
		return nil, err
	}
	return r.settle(false, nil)
}

// SolveNear is Solve for a condition that differs little from that of another solution,
// as one with a fault or with other values does from the sound one: for every set of
// positions the search begins at the voltages that it had there, and for positions that
// it never had, at its last.
func (n *Network) SolveNear(at Environment, from State, near *Solution) (*Solution, error) {
	r, err := n.start(&at, from)
	if err != nil {
		return nil, err
	}
	return r.settle(false, near)
}

// settle moves the elements with memory until all are at rest. With warm it begins at
// x, else where near had these positions or came to rest, and goes on where near had the
// next ones; near may be nil.
func (r *run) settle(warm bool, near *Solution) (*Solution, error) {
	var stops []stop
	key := r.positions()
	seen := map[string]bool{key: true}
	oneByOne := false
	var moving []int // since the circle began
	for {
		if err := r.checkLoops(); err != nil {
			return nil, err
		}
		if !warm || len(stops) > 0 {
			x := near.at(key)
			if x == nil && near != nil && !warm {
				x = near.run.x
			}
			if x != nil {
				copy(r.x, x)
				warm = true
			}
		}
		if err := r.converge(warm); err != nil {
			return nil, err
		}
		stops = append(stops, stop{key, slices.Clone(r.x)})
		warm = true
		wants := r.wants()
		if len(wants) == 0 {
			s, err := r.finish()
			if err == nil {
				s.stops = stops
			}
			return s, err
		}
		if oneByOne {
			wants = wants[:1]
		}
		for _, k := range wants {
			r.on[k] = !r.on[k]
			if !slices.Contains(moving, k) {
				moving = append(moving, k)
			}
		}
		key = r.positions()
		if !seen[key] {
			seen[key] = true
			continue
		}
		if oneByOne {
			return nil, r.chatter(moving)
		}
		oneByOne = true
		moving = nil
		clear(seen)
		seen[key] = true
	}
}

// at returns the operating point that a set of positions had on the way to s; nil if
// there was none.
func (s *Solution) at(positions string) []float64 {
	if s == nil {
		return nil
	}
	for _, p := range slices.Backward(s.stops) {
		if p.positions == positions {
			return p.x
		}
	}
	return nil
}

// wants returns the elements with memory that are not where they should be.
func (r *run) wants() []int {
	var out []int
	for k, i := range r.n.memory {
		if r.stuck[k] != nil {
			continue
		}
		d := r.n.devices[i]
		r.exact(i, d)
		r.cell.on = r.on[k]
		if d.m.next(&r.cell) != r.on[k] {
			out = append(out, k)
		}
	}
	return out
}

func (r *run) positions() string {
	var b strings.Builder
	for _, on := range r.on {
		if on {
			b.WriteByte('1')
		} else {
			b.WriteByte('0')
		}
	}
	return b.String()
}

func (r *run) chatter(moving []int) error {
	e := &ChatterError{Condition: r.at.Name}
	slices.Sort(moving)
	for _, k := range moving {
		d := r.n.devices[r.n.memory[k]]
		e.Elements = append(e.Elements, d.el.ID)
		if !slices.Contains(e.Parts, d.el.Part) {
			e.Parts = append(e.Parts, d.el.Part)
		}
	}
	return e
}
