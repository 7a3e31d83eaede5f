package circuit

import "sort"

// forest is a union-find over small integers with path halving.
type forest []int

func newForest(n int) forest {
	f := make(forest, n)
	for i := range f {
		f[i] = i
	}
	return f
}

func (f forest) find(i int) int {
	for f[i] != i {
		f[i] = f[f[i]]
		i = f[i]
	}
	return i
}

func (f forest) join(a, b int) { // the smaller root wins, so that results do not depend on order
	a, b = f.find(a), f.find(b)
	if a > b {
		a, b = b, a
	}
	f[b] = a
}

func (c *Circuit) indexPins() ([]*Pin, map[*Pin]int) {
	var pins []*Pin
	at := map[*Pin]int{}
	for _, p := range c.Parts {
		for _, n := range p.Pins {
			at[n] = len(pins)
			pins = append(pins, n)
		}
	}
	return pins, at
}

// Pieces returns, for every pin, the number of the piece it belongs to: pins
// joined by conductors and joins, not through terminals. It is what a drawing
// shows as connected.
func (c *Circuit) Pieces() map[*Pin]int {
	pins, at := c.indexPins()
	f := newForest(len(pins))
	for _, j := range c.Joins {
		f.join(at[j.A], at[j.B])
	}
	for _, w := range c.Conductors {
		f.join(at[w.From], at[w.To])
	}
	out := make(map[*Pin]int, len(pins))
	for i, p := range pins {
		out[p] = f.find(i)
	}
	return out
}

// Resolve numbers the nets, writes them to pins and element pins, and returns the
// netlist. Every conductor becomes an element of the model "conductor" with its
// resistance. Net 0 is the net of the black probe. Conductors that reach no
// element, such as those of a probe inside a packaged charger, are left out.
func (c *Circuit) Resolve() *Netlist {
	pins, at := c.indexPins()
	f := newForest(len(pins))
	for _, j := range c.Joins {
		f.join(at[j.A], at[j.B])
	}
	for _, p := range c.Parts {
		if p.Kind == Terminal {
			f.join(at[p.Pins[0]], at[p.Pins[1]])
		}
	}
	// Islands: nets reached from elements along conductors.
	g := newForest(len(pins))
	live := map[int]bool{}
	for _, p := range c.Parts {
		for _, e := range p.Elements {
			for i := range e.Pins {
				r := f.find(at[e.Pins[i].Pin])
				if i > 0 {
					g.join(r, f.find(at[e.Pins[0].Pin]))
				}
			}
		}
	}
	for _, w := range c.Conductors {
		g.join(f.find(at[w.From]), f.find(at[w.To]))
	}
	for _, p := range c.Parts {
		for _, e := range p.Elements {
			for i := range e.Pins {
				live[g.find(f.find(at[e.Pins[i].Pin]))] = true
			}
		}
	}

	nl := &Netlist{}
	number := map[int]int{}
	net := func(p *Pin) int {
		r := f.find(at[p])
		n, ok := number[r]
		if !ok {
			n = len(nl.Nets)
			number[r] = n
			nl.Nets = append(nl.Nets, pins[r].String())
		}
		return n
	}
	if c.Black != nil {
		c.Black.Net = net(c.Black)
	}
	for _, p := range c.Parts {
		for _, e := range p.Elements {
			for i := range e.Pins {
				e.Pins[i].Net = net(e.Pins[i].Pin)
			}
			nl.Elements = append(nl.Elements, e)
		}
	}
	for _, w := range c.Conductors {
		if !live[g.find(f.find(at[w.From]))] {
			continue
		}
		nl.Elements = append(nl.Elements, &Element{
			ID: w.Number, Part: w.Key, Model: "conductor",
			Pins:   []ElementPin{{Name: "1", Pin: w.From, Net: net(w.From)}, {Name: "2", Pin: w.To, Net: net(w.To)}},
			Params: []Param{{Name: "ohm", Value: float64(w.Ohm), Tol: ConductorTolerance}},
		})
	}
	for i, p := range pins {
		if n, ok := number[f.find(i)]; ok {
			p.Net = n
		} else {
			p.Net = -1
		}
	}
	return nl
}

// ConductorTolerance is the share by which a conductor may differ from its
// calculated resistance: it may run at another temperature and its length is
// measured on a drawing (common practice, no source).
const ConductorTolerance = 0.1

// SortedKeys returns the keys of a label map in order; printing must not depend on
// map order.
func SortedKeys[V any](m map[string]V) []string {
	out := make([]string, 0, len(m))
	for k := range m {
		out = append(out, k)
	}
	sort.Strings(out)
	return out
}
