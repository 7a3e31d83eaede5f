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
	r.known = false
	r.rule()
	r.assemble()
	r.n.lu.ready = false
	if r.n.lu.factor(r.n.matrix) >= 0 {
		return nil, r.notConverged()
	}
	inf := r.influences(nil)
	bands := make([]Band, len(outputs))
	slopes := make([][]float64, len(outputs))
	for k, o := range outputs {
		slopes[k] = r.slopes(o, inf, nil)
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
		if err := r.corners(bands, inf, slopes); err != nil {
			return nil, err
		}
	}
	return bands, nil
}

// influences evaluates at x what every toleranced parameter does to the equations. The
// room of a list that is no longer needed may be given.
func (r *run) influences(room []influence) []influence {
	out := room[:0]
	for i, d := range r.n.devices {
		for k, tol := range r.tol[i] {
			half := math.Abs(r.p[i][k]) * tol
			if half == 0 {
				continue
			}
			out = append(out, influence{device: i, param: k, half: half, f: r.paramSlope(i, d, k)})
		}
	}
	return out
}

// paramSlope is the slope of the local equations of device i to its parameter k.
func (r *run) paramSlope(i int, d *device, k int) [maxLocal]float64 {
	keep := r.p[i]
	h := paramStep * math.Abs(keep[k])
	if r.plain(i, k) { // the resistance of a line
		v, current := r.through(d)
		up, down := line{ohm: keep[k] + h}, line{ohm: keep[k] - h}
		return [maxLocal]float64{2: (up.off(v, current) - down.off(v, current)) / (2 * h)}
	}
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
	r.p[i] = keep
	for a := range up {
		up[a] = (up[a] - down[a]) / (2 * h)
	}
	return up
}

// slopes returns the slope of an output to every parameter, the matrix being
// factorised at x. The room of slopes that are no longer needed may be given.
func (r *run) slopes(o Output, inf []influence, room []float64) []float64 {
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
	out := slices.Grow(room[:0], len(inf))
	for j := range inf {
		in := &inf[j]
		s := 0.0
		for l, u := range r.n.devices[in.device].at {
			if u >= 0 {
				s -= c[u] * in.f[l]
			}
		}
		if in.device == direct {
			s += in.f[0]
		}
		out = append(out, s)
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
