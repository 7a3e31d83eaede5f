package network

import "math"

// Continuation steps.
const (
	shuntStart = 1.0  // S, every net to net 0: all devices rest
	shuntEnd   = 1e-9 // below this it is taken away
	shuntRatio = 10.0
	ratioLeast = 1.05
	driveFirst = 0.1
	driveLeast = 1e-4

	timeStart = 1.0   // S, capacitance over time step
	timeEnd   = 1e-13 // below this the step is without end
	timeMost  = 1e9   // a step this short that fails is given up
	timeSteps = 20    // Newton steps in one time step
	timeTurns = 2000  // time steps in all
)

// converge finds the operating point for fixed positions, from x when warm. Plain
// Newton comes first, then Newton with bounded steps, then a conductance to net 0
// that is taken away step by step, then all sources brought up from zero, and last
// the way the circuit itself would take with a capacitor at every net.
func (r *run) converge(warm bool) error {
	if warm {
		if r.newton(warmSteps, false) {
			return nil
		}
	}
	clear(r.x)
	if r.newton(plainSteps, false) {
		return nil
	}
	clear(r.x)
	if r.newton(dampedSteps, true) {
		return nil
	}
	if r.byConductance(false) || r.byConductance(true) || r.bySources(false) || r.bySources(true) || r.byTime() {
		return nil
	}
	r.shunt, r.drive = 0, 1
	r.known = false
	r.rule()
	r.assemble()
	return r.notConverged()
}

// byConductance starts with a large conductance from every net to net 0.
func (r *run) byConductance(damped bool) bool {
	defer func() { r.shunt = 0 }()
	clear(r.x)
	good := append([]float64(nil), r.x...)
	g, ratio := shuntStart, shuntRatio
	last := math.Inf(1)
	for {
		r.shunt = g
		if g < shuntEnd {
			r.shunt = 0
		}
		if r.newton(plainSteps, damped) {
			if r.shunt == 0 {
				return true
			}
			copy(good, r.x)
			last = g
			ratio = min(ratio*1.5, shuntRatio)
			g /= ratio
			continue
		}
		if math.IsInf(last, 1) {
			return false
		}
		copy(r.x, good)
		ratio = math.Sqrt(ratio)
		if ratio < ratioLeast {
			return false
		}
		g = last / ratio
	}
}

// bySources brings all sources up from zero.
func (r *run) bySources(damped bool) bool {
	defer func() { r.drive = 1 }()
	clear(r.x)
	good := append([]float64(nil), r.x...)
	done, step := 0.0, driveFirst
	for {
		r.drive = min(done+step, 1)
		if r.newton(plainSteps, damped) {
			if r.drive == 1 {
				return true
			}
			copy(good, r.x)
			done = r.drive
			step *= 2
			continue
		}
		copy(r.x, good)
		step /= 4
		if step < driveLeast {
			return false
		}
	}
}

// byTime follows the circuit from rest with a capacitor at every net, by implicit
// steps of time that grow as long as they succeed (C. T. Kelley, D. E. Keyes,
// "Convergence analysis of pseudo-transient continuation", SIAM J. Numer. Anal. 35,
// 1998).
func (r *run) byTime() bool {
	defer func() { r.shunt, r.anchor = 0, nil }()
	clear(r.x)
	r.anchor = make([]float64, len(r.n.self))
	good := append([]float64(nil), r.x...)
	g := timeStart
	for range timeTurns {
		r.shunt = g
		if g < timeEnd {
			r.shunt = 0
		}
		if r.newton(timeSteps, false) {
			if r.shunt == 0 {
				return true
			}
			copy(good, r.x)
			copy(r.anchor, r.x)
			g /= 2
			continue
		}
		copy(r.x, good)
		g *= 8
		if g > timeMost {
			return false
		}
	}
	return false
}

// notConverged names the worst net and the element on it with the largest current.
func (r *run) notConverged() error {
	e := &ConvergenceError{
		Condition: r.at.Name,
		Tried:     "plain and damped Newton steps, conductance, source and time continuation",
	}
	nets := len(r.n.self)
	worst := 0
	for i := range nets {
		if v := math.Abs(r.f[i]); v >= e.Ampere || math.IsNaN(v) {
			worst, e.Ampere = i, v
		}
	}
	if nets > 0 {
		e.Net = r.n.nets[worst+1]
	}
	most := -1.0
	for i, d := range r.n.devices {
		for k, u := range d.at[:len(d.m.Pins)] {
			if int(u) != worst {
				continue
			}
			r.exact(i, d)
			if v := math.Abs(r.cell.f[k]); v > most {
				most, e.Element, e.Part = v, d.el.ID, d.el.Part
			}
		}
	}
	return e
}

// exact evaluates device i at x.
func (r *run) exact(i int, d *device) {
	for l, u := range d.at {
		r.cell.v[l] = 0
		if u >= 0 {
			r.cell.v[l] = r.x[u]
		}
	}
	r.load(i, d)
}
