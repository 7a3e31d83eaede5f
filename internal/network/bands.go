package network

import (
	"fmt"
	"math"
	"slices"
)

// Output is a quantity that is read: a voltage between two nets, or the current
// into the first pin of an element.
type Output struct {
	Red, Black int
	Element    string // when it is a current
}

// Between is the voltage of net red against net black.
func Between(red, black int) Output { return Output{Red: red, Black: black} }

// Into is the current into the first pin of an element.
func Into(element string) Output { return Output{Element: element} }

// Band is the range of an output over the tolerances of all parameters.
type Band struct {
	Output  Output
	Typical float64
	Low     float64 // worst case
	High    float64
	// Linear is the half-width of the worst case by sensitivities alone, the sum of
	// all effects; RSS is their root of the sum of squares.
	Linear, RSS float64
	// Effects are the parameters that act on it most, the strongest first.
	Effects []Effect
	// Corners is set when Low and High come from solutions at the worst corners.
	Corners bool
	// Doubtful names the elements with memory that would move at a corner: within
	// the tolerances they may be in either position.
	Doubtful []string
}

// Effect is the influence of one toleranced parameter on an output.
type Effect struct {
	Element, Part, Param string
	Slope                float64 // change of the output per unit of the parameter
	Half                 float64 // half-width of the parameter
	Change               float64 // |Slope|·Half
}

// Method chooses how worst cases are found.
type Method int

// The methods.
const (
	// Linear adds up the sensitivities at the operating point.
	Linear Method = iota
	// Corners solves the circuit again with every parameter at the end of its
	// tolerance that its sensitivity points to, and once more with the signs found
	// there if they differ.
	Corners
)

// effectsKept is the number of effects that a Band lists.
const effectsKept = 24

// cornerTurns bounds how often the signs are followed to another corner.
const cornerTurns = 3

// paramStep is the relative step of a parameter for the slope of a law.
const paramStep = 1e-6

// influence is the effect of one parameter on the equations.
type influence struct {
	device, param int
	half          float64
	f             [maxLocal]float64 // change of the local equations per unit
}

// Bands finds the range of every output over all parameters that have a tolerance,
// positions of relays held. Sensitivities come from one transposed solution for
// each output (the adjoint network: S. W. Director, R. A. Rohrer, "The generalized
// adjoint network and network sensitivities", IEEE Trans. Circuit Theory 16, 1969).
func (s *Solution) Bands(outputs []Output, method Method) ([]Band, error) {
	r := s.run
	for _, o := range outputs {
		if o.Element != "" {
			if _, ok := r.n.byID[o.Element]; !ok {
				return nil, &ElementError{Element: o.Element, Problem: "a band is asked of it, but there is no such element"}
			}
		} else if o.Red < 0 || o.Red >= len(s.Volts) || o.Black < 0 || o.Black >= len(s.Volts) {
			return nil, fmt.Errorf("a band is asked between nets %d and %d, which are not both there", o.Red, o.Black)
		}
	}
	inf, err := r.influences()
	if err != nil {
		return nil, err
	}
	bands := make([]Band, len(outputs))
	slopes := make([][]float64, len(outputs))
	for k, o := range outputs {
		slopes[k] = r.slopes(o, inf)
		b := Band{Output: o, Typical: r.value(o)}
		var most []int // of inf, the strongest first
		change := func(j int) float64 { return math.Abs(slopes[k][j]) * inf[j].half }
		for j := range inf {
			c := change(j)
			b.Linear += c
			b.RSS += c * c
			if c == 0 || len(most) == effectsKept && c <= change(most[effectsKept-1]) {
				continue
			}
			at, _ := slices.BinarySearchFunc(most, c, func(m int, c float64) int {
				if change(m) >= c {
					return -1
				}
				return 1
			})
			most = slices.Insert(most, at, j)[:min(len(most)+1, effectsKept)]
		}
		b.RSS = math.Sqrt(b.RSS)
		b.Low, b.High = b.Typical-b.Linear, b.Typical+b.Linear
		for _, j := range most {
			d := r.n.devices[inf[j].device]
			b.Effects = append(b.Effects, Effect{
				Element: d.el.ID, Part: d.el.Part, Param: d.m.Params[inf[j].param].Name,
				Slope: slopes[k][j], Half: inf[j].half, Change: change(j),
			})
		}
		bands[k] = b
	}
	if method == Corners {
		for k := range bands {
			if err := r.corners(&bands[k], inf, slopes[k]); err != nil {
				return nil, err
			}
		}
	}
	return bands, nil
}

// influences evaluates what every toleranced parameter does to the equations at x,
// and factorises the matrix there.
func (r *run) influences() ([]influence, error) {
	r.known = false
	r.rule()
	r.assemble()
	r.n.lu.ready = false
	if r.n.lu.factor(r.n.matrix) >= 0 {
		return nil, r.notConverged()
	}
	var out []influence
	for i, d := range r.n.devices {
		for k, tol := range r.tol[i] {
			half := math.Abs(r.p[i][k]) * tol
			if half == 0 {
				continue
			}
			in := influence{device: i, param: k, half: half}
			in.f = r.paramSlope(i, d, k)
			out = append(out, in)
		}
	}
	return out, nil
}

// paramSlope is the slope of the local equations of device i to its parameter k.
func (r *run) paramSlope(i int, d *device, k int) [maxLocal]float64 {
	keep := r.p[i]
	defer func() { r.p[i] = keep }()
	h := paramStep * math.Abs(keep[k])
	side := func(v float64) [maxLocal]float64 {
		p := slices.Clone(keep)
		p[k] = v
		if d.m.derive != nil {
			d.m.derive(p, r.given[i])
		}
		r.p[i] = p
		r.exact(i, d)
		return r.cell.f
	}
	up, down := side(keep[k]+h), side(keep[k]-h)
	for a := range up {
		up[a] = (up[a] - down[a]) / (2 * h)
	}
	return up
}

// slopes returns the slope of an output to every parameter, the matrix being
// factorised at x.
func (r *run) slopes(o Output, inf []influence) []float64 {
	c := make([]float64, r.n.size)
	direct := -1
	if o.Element == "" {
		if o.Red > 0 {
			c[o.Red-1]++
		}
		if o.Black > 0 {
			c[o.Black-1]--
		}
	} else {
		direct = r.n.byID[o.Element]
		d := r.n.devices[direct]
		r.exact(direct, d)
		for l, u := range d.at {
			if u >= 0 {
				c[u] += r.cell.j[0][l]
			}
		}
	}
	r.n.lu.solveTransposed(c)
	out := make([]float64, len(inf))
	for j, in := range inf {
		for l, u := range r.n.devices[in.device].at {
			if u >= 0 {
				out[j] -= c[u] * in.f[l]
			}
		}
		if in.device == direct {
			out[j] += in.f[0]
		}
	}
	return out
}

func (r *run) value(o Output) float64 {
	if o.Element != "" {
		i := r.n.byID[o.Element]
		r.exact(i, r.n.devices[i])
		return r.cell.f[0]
	}
	v := 0.0
	if o.Red > 0 {
		v = r.x[o.Red-1]
	}
	if o.Black > 0 {
		v -= r.x[o.Black-1]
	}
	return v
}

// corners replaces the linear limits of b by solutions at its worst corners.
func (r *run) corners(b *Band, inf []influence, slopes []float64) error {
	b.Corners = true
	b.Low, b.High = b.Typical, b.Typical
	for _, side := range []float64{-1, 1} {
		at := slopes
		for range cornerTurns {
			q := r.atCorner(inf, at, side)
			if err := q.converge(true); err != nil {
				return err
			}
			v := q.value(b.Output)
			b.Low, b.High = min(b.Low, v), max(b.High, v)
			for _, k := range q.wants() {
				if id := r.n.devices[r.n.memory[k]].el.ID; !slices.Contains(b.Doubtful, id) {
					b.Doubtful = append(b.Doubtful, id)
				}
			}
			there, err := q.influences()
			if err != nil {
				return err
			}
			next := q.slopes(b.Output, there)
			if len(next) != len(at) || !turned(at, next) {
				break
			}
			at = next
		}
	}
	return nil
}

// turned reports whether a slope has changed its sign.
func turned(a, b []float64) bool {
	for k := range a {
		if a[k]*b[k] < 0 {
			return true
		}
	}
	return false
}

// atCorner is r with every parameter at the end that its slope points to.
func (r *run) atCorner(inf []influence, slopes []float64, side float64) *run {
	q := *r
	q.p = slices.Clone(r.p)
	q.rules = nil
	q.x, q.f, q.old = slices.Clone(r.x), slices.Clone(r.f), slices.Clone(r.old)
	for j, in := range inf {
		if slopes[j] == 0 {
			continue
		}
		if &q.p[in.device][0] == &r.p[in.device][0] {
			q.p[in.device] = slices.Clone(r.p[in.device])
		}
		q.p[in.device][in.param] += math.Copysign(in.half, side*slopes[j])
	}
	for i, d := range r.n.devices {
		if d.m.derive != nil && &q.p[i][0] != &r.p[i][0] {
			d.m.derive(q.p[i], r.given[i])
		}
	}
	return &q
}
