package network

import (
	"math"
	"slices"
)

// Limits of Newton's method.
const (
	// MaxResidual is the largest sum of currents at a net of any returned solution,
	// in amperes, and the largest error of a voltage law, in volts.
	MaxResidual = 1e-9

	goodResidual = 1e-11 // polishing stops here
	goodStep     = 1e-9  // last step of an unknown, relative to 1 V or 1 A or itself
	// A part of the circuit that only insulation ties to net 0 has its voltage
	// against it to rounding over insulation: steps up to idleStep volts there are
	// accepted when idleTurns steps in a row have left all laws fulfilled and were not
	// the smaller ones of a way that still leads somewhere: where a law begins flat, as
	// the current of a module without supply, each is half of the one before.
	idleStep    = 1e-2
	idleTurns   = 4
	shrinks     = 0.7
	warmSteps   = 16 // from a solution nearby; a cold start is better than many more
	plainSteps  = 60
	dampedSteps = 200
	polishSteps = 4
	dampVolt    = 4.0  // first largest step of a damped run
	dampEvery   = 15   // steps after which it is halved
	dampLeast   = 0.02 // its least value
)

// run is one condition being solved.
type run struct {
	n      *Network
	at     *Environment
	p      [][]float64
	tol    [][]float64
	given  [][]bool
	faults []*Override // open or short
	stuck  []*bool     // by memory
	on     []bool      // by memory
	x      []float64   // unknowns
	f      []float64   // what Kirchhoff's laws and the elements' own leave over
	old    []float64   // pin voltages at which the last tangents were taken
	known  bool        // old is filled
	shunt  float64     // continuation: extra conductance of every net to net 0, or to its anchor
	anchor []float64   // continuation: voltages of the nets a moment before; nil: zero
	drive  float64     // continuation: factor of all sources
	steps  int
	rules  []rule // lines that devices follow, by device
	cell   cell
}

// start makes a run for a condition from a state.
func (n *Network) start(at *Environment, from State) (*run, error) {
	// The elimination order serves every condition; the pivots are chosen anew in
	// each, so that a result never depends on what was solved before it.
	n.lu.ready = false
	r := &run{
		n: n, at: at, p: make([][]float64, len(n.devices)), tol: make([][]float64, len(n.devices)), given: make([][]bool, len(n.devices)),
		faults: make([]*Override, len(n.devices)), stuck: make([]*bool, len(n.memory)), on: make([]bool, len(n.memory)),
		x: make([]float64, n.size), f: make([]float64, n.size), drive: 1,
	}
	pins := 0
	for i, d := range n.devices {
		r.p[i], r.tol[i], r.given[i] = d.p, d.tol, d.given
		pins += len(d.m.Pins)
	}
	r.old = make([]float64, pins)
	own := make([]bool, len(n.devices)) // parameters copied
	for k := range at.Overrides {
		o := &at.Overrides[k]
		i, ok := n.byID[o.Element]
		if !ok {
			return nil, &ElementError{Element: o.Element, Problem: "condition \"" + at.Name + "\" changes it, but there is no such element"}
		}
		d := n.devices[i]
		if len(o.Params) > 0 {
			if !own[i] {
				own[i] = true
				r.p[i], r.tol[i], r.given[i] = slices.Clone(d.p), slices.Clone(d.tol), slices.Clone(d.given)
			}
			if err := setParams(d.el, d.m, o.Params, r.p[i], r.given[i], r.tol[i]); err != nil {
				return nil, err
			}
			if err := finishParams(d.el, d.m, r.p[i], r.given[i]); err != nil {
				return nil, err
			}
		}
		if o.Open || o.Short[0] != "" {
			if err := d.checkShort(o); err != nil {
				return nil, err
			}
			r.faults[i] = o
		}
		if o.Stuck != nil {
			if d.m.next == nil {
				return nil, fault(d.el, "it has no position that could stick")
			}
			r.stuck[d.memory] = o.Stuck
		}
	}
	for k, i := range n.memory {
		d := n.devices[i]
		r.on[k] = d.m.rest
		if v, ok := from[d.el.ID]; ok {
			r.on[k] = v
		}
		if r.stuck[k] != nil {
			r.on[k] = *r.stuck[k]
		}
	}
	return r, nil
}

// hold keeps every element with memory where it is.
func (r *run) hold() {
	for k := range r.stuck {
		on := r.on[k]
		r.stuck[k] = &on
	}
}

// position is the position that concerns d.
func (r *run) position(d *device) bool { return d.memory >= 0 && r.on[d.memory] }

// load evaluates device i into r.cell at the pin voltages that are there already.
func (r *run) load(i int, d *device) {
	c := &r.cell
	c.clear(len(d.at))
	c.at, c.on, c.p = r.at, r.position(d), r.p[i]
	if o := r.faults[i]; o != nil {
		d.broken(c, o)
		return
	}
	c.p = r.driven(i, d)
	d.m.evaluate(c)
}

// driven are the parameters of device i, its sources turned down while they are being
// brought up.
func (r *run) driven(i int, d *device) []float64 {
	p := r.p[i]
	if r.drive != 1 && d.m.drives != nil {
		p = slices.Clone(p)
		for _, k := range d.m.drives {
			p[k] *= r.drive
		}
	}
	return p
}

// assemble fills f and the matrix with the tangents at x, the lines being ruled. It
// reports whether some device took its tangent elsewhere.
func (r *run) assemble() (limited bool) {
	n, c := r.n, &r.cell
	val := n.matrix.val
	copy(val, n.base)
	clear(r.f)
	g := insulation + r.shunt
	for i := range n.self {
		r.f[i] += g * r.x[i]
		if r.anchor != nil {
			r.f[i] -= r.shunt * r.anchor[i]
		}
	}
	for i, d := range n.devices {
		if u := &r.rules[i]; u.follows {
			red, black, own := d.at[0], d.at[1], d.at[2]
			v, current := 0.0, r.x[own]
			if red >= 0 {
				v = r.x[red]
				r.f[red] += current
			}
			if black >= 0 {
				v -= r.x[black]
				r.f[black] -= current
			}
			r.f[own] += u.off(v, current)
			continue
		}
		k := len(d.at)
		for l, u := range d.at {
			c.v[l] = 0
			if u >= 0 {
				c.v[l] = r.x[u]
			}
		}
		moved := false
		if d.m.limit != nil && r.faults[i] == nil {
			c.at, c.on, c.p = r.at, r.position(d), r.p[i]
			old := r.old[d.old : d.old+len(d.m.Pins)]
			if r.known {
				moved = d.m.limit(c, old)
			}
			copy(old, c.v[:len(old)])
		}
		r.load(i, d)
		if moved {
			limited = true
			for l, u := range d.at[:len(d.m.Pins)] {
				if u < 0 {
					c.v[l] = 0 - c.v[l]
				} else {
					c.v[l] = r.x[u] - c.v[l]
				}
			}
			for a := range k {
				for b := range d.m.Pins {
					c.f[a] += c.j[a][b] * c.v[b]
				}
			}
		}
		for a, u := range d.at {
			if u >= 0 {
				r.f[u] += c.f[a]
			}
		}
		for a := range k {
			for b := range k {
				if p := d.places[a*k+b]; p >= 0 {
					val[p] += c.j[a][b]
				}
			}
		}
	}
	r.known = true
	return limited
}

// worst returns the largest |f| and where it is.
func (r *run) worst() (float64, int) {
	w, at := 0.0, 0
	for i, v := range r.f {
		if v = math.Abs(v); v > w || math.IsNaN(v) {
			w, at = v, i
		}
	}
	return w, at
}

// newton iterates from x. damped limits the step of voltages.
func (r *run) newton(steps int, damped bool) bool {
	r.known = false
	r.rule()
	idle, last := 0, 0.0
	for s := range steps {
		limited := r.assemble()
		r.steps++
		w, _ := r.worst()
		if math.IsNaN(w) || math.IsInf(w, 0) || r.n.lu.factor(r.n.matrix) >= 0 {
			return false
		}
		r.n.lu.solve(r.f)
		scale, settled := 1.0, true
		biggest := 0.0
		for i, dx := range r.f {
			if math.Abs(dx) > goodStep*(1+math.Abs(r.x[i])) {
				settled = false
			}
			if i < len(r.n.self) {
				biggest = max(biggest, math.Abs(dx))
			}
		}
		if damped {
			if top := max(dampVolt*math.Pow(0.5, float64(s/dampEvery)), dampLeast); biggest > top {
				scale = top / biggest
			}
		}
		for i, dx := range r.f {
			r.x[i] -= scale * dx
		}
		if limited || scale < 1 || w > goodResidual || biggest > idleStep || biggest < shrinks*last {
			idle = 0
		} else {
			idle++
		}
		last = biggest
		if !limited && settled && scale == 1 || idle == idleTurns {
			return r.polish()
		}
	}
	return false
}

// polish repeats undamped steps while they still better the residual, and leaves f
// evaluated at x.
func (r *run) polish() bool {
	best := append([]float64(nil), r.x...)
	least := math.Inf(1)
	for range polishSteps {
		r.known = false // tangents at x itself
		r.assemble()
		w, _ := r.worst()
		if w < least {
			least = w
			copy(best, r.x)
		} else {
			break
		}
		if w <= goodResidual {
			return true
		}
		if r.n.lu.factor(r.n.matrix) >= 0 {
			break
		}
		r.n.lu.solve(r.f)
		for i, dx := range r.f {
			r.x[i] -= dx
		}
		r.steps++
	}
	copy(r.x, best)
	r.known = false
	r.assemble()
	return least <= MaxResidual
}
