package secondroute

import (
	"errors"
	"math"

	"gonum.org/v1/gonum/mat"
	"gonum.org/v1/gonum/num/dual"

	"gloamwright/internal/circuit"
)

// insulation of every net to net 0, in siemens.
const insulation = 1e-12

// Search of the root.
const (
	rounds   = 200
	halvings = 40
	fineVolt = 1e-10
)

// Sums returns the sum of the currents out of every net into its elements.
func Sums(nl *circuit.Netlist, c *Condition, volts []float64) ([]float64, error) {
	f, _, err := equations(nl, c, volts, false)
	return f, err
}

// Root finds voltages at which all sums are zero, from a start, by Newton's method
// with step halving on a dense matrix.
func Root(nl *circuit.Netlist, c *Condition, start []float64) ([]float64, error) {
	n := len(nl.Nets) - 1
	x := append([]float64(nil), start...)
	for range rounds {
		f, j, err := equations(nl, c, x, true)
		if err != nil {
			return nil, err
		}
		var lu mat.LU
		lu.Factorize(j)
		var dx mat.VecDense
		if err := lu.SolveVecTo(&dx, false, mat.NewVecDense(n, f[1:])); err != nil {
			var ill mat.Condition
			if !errors.As(err, &ill) || math.IsInf(float64(ill), 1) {
				return nil, err
			}
		}
		if mat.Norm(&dx, math.Inf(1)) < fineVolt {
			return x, nil
		}
		step, old := 1.0, size(f)
		for range halvings {
			y := append([]float64(nil), x...)
			for i := range n {
				y[i+1] -= step * dx.AtVec(i)
			}
			g, _, err := equations(nl, c, y, false)
			if err != nil {
				return nil, err
			}
			if s := size(g); s < old || s < 1e-12 {
				x = y
				break
			}
			step /= 2
		}
		if step < math.Pow(0.5, halvings-1) {
			return x, nil // no better voltages in this direction: rounding
		}
	}
	return nil, errors.New("secondroute: no root found")
}

func size(f []float64) float64 {
	s := 0.0
	for _, v := range f {
		s += v * v
	}
	return math.Sqrt(s)
}

// equations returns the sums and their slopes to the voltages.
func equations(nl *circuit.Netlist, c *Condition, x []float64, slopes bool) ([]float64, *mat.Dense, error) {
	n := len(nl.Nets)
	f := make([]float64, n)
	var j *mat.Dense
	if slopes {
		j = mat.NewDense(n-1, n-1, nil)
	}
	for i := 1; i < n; i++ {
		f[i] = insulation * x[i]
		if slopes {
			j.Set(i-1, i-1, insulation)
		}
	}
	for _, el := range nl.Elements {
		nets := map[string]int{}
		for _, p := range el.Pins {
			nets[p.Name] = p.Net
		}
		for k, seed := range el.Pins {
			v := map[string]dual.Number{}
			for _, p := range el.Pins {
				v[p.Name] = dual.Number{Real: x[p.Net]}
				if p.Name == seed.Name {
					v[p.Name] = dual.Number{Real: x[p.Net], Emag: 1}
				}
			}
			currents, err := law(el, c, v)
			if err != nil {
				return nil, nil, err
			}
			for _, p := range el.Pins {
				i := currents[p.Name]
				if k == 0 {
					f[p.Net] += i.Real
				}
				if slopes && p.Net > 0 && seed.Net > 0 {
					j.Set(p.Net-1, seed.Net-1, j.At(p.Net-1, seed.Net-1)+i.Emag)
				}
			}
			if !slopes {
				break
			}
		}
	}
	f[0] = 0
	return f, j, nil
}
