package network

import (
	"math"

	"gloamwright/internal/circuit"
)

// Solution is an operating point.
type Solution struct {
	Condition string
	Volts     []float64 // of every net against net 0
	State     State     // positions of all elements with memory
	// Residual is the largest sum of currents at a net, in amperes, or the largest
	// error of an element's own law; it is below MaxResidual.
	Residual float64
	Steps    int // Newton steps taken, all positions together
	// Starved lists the constant-power loads that have voltage but less than their
	// working range: they get less than their power.
	Starved []string

	run   *run
	stops []stop // operating points on the way, one for each set of positions
}

// stop is an operating point for a set of positions.
type stop struct {
	positions string
	x         []float64
}

// finish checks Kirchhoff's law independently of Newton's bookkeeping and returns
// the solution.
func (r *run) finish() (*Solution, error) {
	n := r.n
	s := &Solution{Condition: r.at.Name, Volts: make([]float64, max(len(n.nets), 1)), State: State{}, Steps: r.steps, run: r}
	copy(s.Volts[1:], r.x[:len(n.self)])
	for k, i := range n.memory {
		s.State[n.devices[i].el.ID] = r.on[k]
	}
	sum := make([]float64, n.size)
	for i, d := range n.devices {
		r.exact(i, d)
		for a, u := range d.at {
			if u >= 0 {
				sum[u] += r.cell.f[a]
			}
		}
		if d.m.works != nil && r.faults[i] == nil {
			if v := r.cell.across(0, 1); v > liveVolt && v < d.m.works(r.p[i]) {
				s.Starved = append(s.Starved, d.el.ID)
			}
		}
	}
	r.f = sum
	s.Residual, _ = r.worst()
	if !(s.Residual <= MaxResidual) {
		return nil, r.notConverged()
	}
	return s, nil
}

// Apart is s with the work space of n, which must be the network that found it or one
// apart from it.
func (s *Solution) Apart(n *Network) *Solution {
	c, r := *s, *s.run
	r.n, r.rules = n, nil
	c.run = &r
	return &c
}

// liveVolt is the voltage above which a load counts as connected.
const liveVolt = 0.5

// Current returns the current into the first pin of an element: into + of a battery,
// so that charge counts positive. It returns NaN for an element that does not exist.
func (s *Solution) Current(element string) float64 {
	i, ok := s.run.n.byID[element]
	if !ok {
		return math.NaN()
	}
	return s.pinCurrent(i, 0)
}

// PinCurrent returns the current into a pin of an element, NaN if there is none.
func (s *Solution) PinCurrent(element, pin string) float64 {
	i, ok := s.run.n.byID[element]
	if !ok {
		return math.NaN()
	}
	k := s.run.n.devices[i].pin(pin)
	if k < 0 {
		return math.NaN()
	}
	return s.pinCurrent(i, k)
}

func (s *Solution) pinCurrent(i, k int) float64 {
	s.run.exact(i, s.run.n.devices[i])
	return s.run.cell.f[k]
}

// Power returns the power that an element takes from the circuit, in watts; a source
// that feeds it counts negative. It returns NaN for an element that does not exist.
func (s *Solution) Power(element string) float64 {
	i, ok := s.run.n.byID[element]
	if !ok {
		return math.NaN()
	}
	d := s.run.n.devices[i]
	s.run.exact(i, d)
	p := 0.0
	for k := range d.m.Pins {
		p += s.run.cell.v[k] * s.run.cell.f[k]
	}
	return p
}

// Values returns all parameters of an element as they were in this condition, or nil
// if there is no such element.
func (s *Solution) Values(element string) []circuit.Param {
	i, ok := s.run.n.byID[element]
	if !ok {
		return nil
	}
	return listed(s.run.n.devices[i].m, s.run.p[i], s.run.tol[i])
}

// Across returns the voltage of one net against another.
func (s *Solution) Across(red, black int) float64 { return s.Volts[red] - s.Volts[black] }
