package network

import (
	"fmt"
	"math"
	"slices"

	"gloamwright/internal/circuit"
)

// insulation is the conductance of every net to net 0: 1 TΩ (assumed; see the
// package comment).
const insulation = 1e-12

// Network is a circuit made ready to be solved in any number of conditions. It
// keeps work space between solutions: one goroutine at a time. Apart gives another its
// own.
type Network struct {
	nets    []string
	devices []*device
	byID    map[string]int
	memory  []int // devices with memory
	matrix  *matrix
	base    []float64 // what the straight laws of the run at hand put into the matrix
	lu      *lu
	size    int     // unknowns
	self    []int32 // place of the diagonal of each net's row
	// Unreferenced lists the groups of passive parts that nothing connects to L−:
	// no current flows there and their nets have no voltage.
	Unreferenced []*FloatingError
}

// device is an element with its places in the equations.
type device struct {
	el     *circuit.Element
	m      *Model
	at     []int32 // unknown of each local one: pins, then own currents; −1 is net 0
	places []int32 // place in the matrix of each local pair, −1 if none
	p      []float64
	given  []bool
	tol    []float64
	memory int // its own place in Network.memory or that of its mover; −1
	old    int // start of its local voltages in run.old
}

// New makes a netlist ready. The errors are *ElementError, *FloatingError or
// *LoopError. It keeps pointers to the netlist's elements but never changes them.
func New(nl *circuit.Netlist) (*Network, error) {
	n := &Network{nets: nl.Nets, byID: map[string]int{}}
	models := map[string]*Model{}
	for _, m := range Models() {
		models[m.Name] = m
	}
	n.size = len(nl.Nets) - 1
	if n.size < 0 {
		n.size = 0
	}
	for i, el := range nl.Elements {
		if _, twice := n.byID[el.ID]; twice {
			return nil, fault(el, "its identity is used twice")
		}
		m := models[el.Model]
		if m == nil {
			return nil, fault(el, fmt.Sprintf("there is no model %q", el.Model))
		}
		d, err := newDevice(el, m, len(nl.Nets))
		if err != nil {
			return nil, err
		}
		for range m.branches {
			d.at = append(d.at, int32(n.size))
			n.size++
		}
		if m.next != nil {
			d.memory = len(n.memory)
			n.memory = append(n.memory, i)
		}
		n.byID[el.ID] = i
		n.devices = append(n.devices, d)
	}
	for _, d := range n.devices {
		if !d.m.moved {
			continue
		}
		k, ok := n.byID[d.el.Control]
		if !ok || n.devices[k].m.next == nil {
			return nil, fault(d.el, fmt.Sprintf("no coil %q moves this contact", d.el.Control))
		}
		d.memory = n.devices[k].memory
	}
	if err := n.checkFloating(); err != nil {
		return nil, err
	}
	n.layOut()
	r, err := n.start(&Environment{}, nil)
	if err != nil {
		return nil, err
	}
	if err := r.checkLoops(); err != nil {
		return nil, err
	}
	return n, nil
}

func fault(el *circuit.Element, problem string) *ElementError {
	return &ElementError{Element: el.ID, Part: el.Part, Model: el.Model, Problem: problem}
}

func newDevice(el *circuit.Element, m *Model, nets int) (*device, error) {
	d := &device{el: el, m: m, memory: -1}
	for _, mp := range m.Pins {
		k := slices.IndexFunc(el.Pins, func(p circuit.ElementPin) bool { return p.Name == mp.Name })
		switch {
		case k >= 0:
			if net := el.Pins[k].Net; net < 0 || net >= nets {
				return nil, fault(el, fmt.Sprintf("pin %s is on net %d, which does not exist", mp.Name, net))
			}
			d.at = append(d.at, int32(el.Pins[k].Net)-1)
		case mp.Optional: // joined to the model's second pin
			d.at = append(d.at, d.at[1])
		default:
			return nil, fault(el, fmt.Sprintf("pin %q of model %s is missing", mp.Name, m.Name))
		}
	}
	for _, p := range el.Pins {
		if !slices.ContainsFunc(m.Pins, func(mp ModelPin) bool { return mp.Name == p.Name }) {
			return nil, fault(el, fmt.Sprintf("model %s has no pin %q", m.Name, p.Name))
		}
	}
	n := len(m.Params)
	d.p, d.given, d.tol = make([]float64, n), make([]bool, n), make([]float64, n)
	for i, s := range m.Params {
		d.p[i] = s.Default
	}
	if err := setParams(el, m, el.Params, d.p, d.given, d.tol); err != nil {
		return nil, err
	}
	for i, s := range m.Params {
		if s.Required && !d.given[i] {
			return nil, fault(el, fmt.Sprintf("parameter %q of model %s is missing", s.Name, m.Name))
		}
	}
	return d, finishParams(el, m, d.p, d.given)
}

// setParams puts named values into p.
func setParams(el *circuit.Element, m *Model, params []circuit.Param, p []float64, given []bool, tol []float64) error {
	for _, v := range params {
		k := slices.IndexFunc(m.Params, func(s ParamSpec) bool { return s.Name == v.Name })
		if k < 0 {
			return fault(el, fmt.Sprintf("model %s has no parameter %q", m.Name, v.Name))
		}
		s := m.Params[k]
		if math.IsNaN(v.Value) || math.IsInf(v.Value, 0) || (s.Min != 0 || s.Max != 0) && (v.Value < s.Min || v.Value > s.Max) {
			return fault(el, fmt.Sprintf("%s of %g %s is out of range", s.Name, v.Value, s.Unit))
		}
		p[k], given[k], tol[k] = v.Value, true, v.Tol
	}
	return nil
}

// finishParams derives what was left out and checks the parameters together. It
// returns an untyped nil when all is well.
func finishParams(el *circuit.Element, m *Model, p []float64, given []bool) error {
	if m.derive != nil {
		m.derive(p, given)
	}
	if m.check != nil {
		if problem := m.check(p); problem != "" {
			return fault(el, problem)
		}
	}
	return nil
}

// layOut makes the matrix, its elimination order and every device's places in it.
func (n *Network) layOut() {
	var entries []int32
	first := make([]bool, n.size)
	for _, d := range n.devices {
		for r, row := range d.at {
			for c, col := range d.at {
				if row >= 0 && col >= 0 && d.couples(r, c) {
					entries = append(entries, row, col)
				}
			}
		}
		// A current with a resistance of its own goes first: that is how the branch
		// equations fold into nodal ones. An ideal source has nothing to divide by.
		for _, b := range d.at[len(d.m.Pins):] {
			first[b] = d.m.direct == nil || !d.m.direct(d.p, true) && !d.m.direct(d.p, false)
		}
	}
	n.matrix = newMatrix(n.size, entries)
	n.base = make([]float64, len(n.matrix.val))
	n.lu = newLU(n.matrix, first)
	n.self = make([]int32, max(len(n.nets)-1, 0))
	for i := range n.self {
		n.self[i] = n.matrix.place(int32(i), int32(i))
	}
	old := 0
	for _, d := range n.devices {
		k := len(d.at)
		d.places = make([]int32, k*k)
		for r, row := range d.at {
			for c, col := range d.at {
				d.places[r*k+c] = -1
				if row >= 0 && col >= 0 && d.couples(r, c) {
					d.places[r*k+c] = n.matrix.place(row, col)
				}
			}
		}
		d.old = old
		old += len(d.m.Pins)
	}
}

// Apart is n with a work space of its own, for another goroutine. What it finds is the
// same to the last digit.
func (n *Network) Apart() *Network {
	c := *n
	c.matrix = &matrix{n: n.matrix.n, ptr: n.matrix.ptr, row: n.matrix.row, val: make([]float64, len(n.matrix.val))}
	c.base = make([]float64, len(n.base))
	c.lu = orderedLU(n.lu.order, n.lu.first)
	return &c
}

// couples reports whether local equation r can depend on local unknown c. Pins of a
// two-pin model with a current of its own act on each other only through it.
func (d *device) couples(r, c int) bool {
	return !d.series() || r == 2 || c == 2
}

// series reports whether the device is two pins and one current.
func (d *device) series() bool { return len(d.m.Pins) == 2 && d.m.branches == 1 }

// Rest returns the position of every element with memory at rest.
func (n *Network) Rest() State {
	s := State{}
	for _, k := range n.memory {
		s[n.devices[k].el.ID] = n.devices[k].m.rest
	}
	return s
}

// Positions returns the words for the positions of an element with memory, on first.
func (n *Network) Positions(element string) (on, off string) {
	k, ok := n.byID[element]
	if !ok {
		return "", ""
	}
	return n.devices[k].m.positions()
}

// Values returns all parameters of an element as they are used, defaults and derived
// ones included, or nil if there is no such element.
func (n *Network) Values(element string) []circuit.Param {
	i, ok := n.byID[element]
	if !ok {
		return nil
	}
	d := n.devices[i]
	return listed(d.m, d.p, d.tol)
}

func listed(m *Model, p, tol []float64) []circuit.Param {
	out := make([]circuit.Param, len(p))
	for k, s := range m.Params {
		out[k] = circuit.Param{Name: s.Name, Value: p[k], Tol: tol[k]}
	}
	return out
}
