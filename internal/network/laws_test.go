package network

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"gonum.org/v1/gonum/mat"
)

func pow(x, y float64) float64 { return math.Pow(x, y) }

// mesh is a random connected linear network of n nets besides net 0, every net with
// a path to it; g is its conductance matrix.
func mesh(rng *rand.Rand, n int) (text string, g *mat.SymDense) {
	var b strings.Builder
	g = mat.NewSymDense(n, nil)
	add := func(k, i, j int, ohm float64) {
		name := func(i int) string {
			if i < 0 {
				return "0"
			}
			return fmt.Sprintf("n%d", i)
		}
		fmt.Fprintf(&b, "R%d resistor %s %s ohm=%.17g\n", k, name(i), name(j), ohm)
		for _, p := range []int{i, j} {
			if p >= 0 {
				g.SetSym(p, p, g.At(p, p)+1/ohm)
			}
		}
		if i >= 0 && j >= 0 {
			g.SetSym(i, j, g.At(i, j)-1/ohm)
		}
	}
	ohm := func() float64 { return math.Pow(10, 4*rng.Float64()-2) } // 10 mΩ to 100 Ω
	k := 0
	for i := range n {
		add(k, i, rng.IntN(i+1)-1, ohm())
		k++
	}
	for range n {
		i, j := rng.IntN(n), rng.IntN(n)
		if i != j {
			add(k, i, j, ohm())
			k++
		}
	}
	return b.String(), g
}

// injectOhm is the resistance behind which inject drives a net.
const injectOhm = 10.0

// inject drives a net with the source that Norton's theorem makes of a current.
func inject(k, net int, ampere float64) string {
	return fmt.Sprintf("J%d source j%d 0 volt=%.17g\nX%d resistor j%d n%d ohm=%g\n", k, k, ampere*injectOhm, k, k, net, injectOhm)
}

// Random linear networks against gonum's dense solution of the nodal equations that
// were set up on the side.
func TestLinearAgainstDense(t *testing.T) {
	rng := rand.New(rand.NewPCG(21, 22))
	for trial := range 60 {
		n := 2 + rng.IntN(60)
		text, g := mesh(rng, n)
		rhs := mat.NewVecDense(n, nil)
		for k := range 1 + rng.IntN(4) {
			net, amp := rng.IntN(n), 10*rng.NormFloat64()
			text += inject(k, net, amp)
			g.SetSym(net, net, g.At(net, net)+1/injectOhm)
			rhs.SetVec(net, rhs.AtVec(net)+amp)
		}
		for i := range n {
			g.SetSym(i, i, g.At(i, i)+insulation)
		}
		c := compile(t, text)
		s := c.solve(Environment{}, nil)
		var want mat.VecDense
		if err := want.SolveVec(g, rhs); err != nil {
			t.Fatal(err)
		}
		for i := range n {
			near(t, fmt.Sprintf("trial %d, net %d", trial, i), c.volt(s, fmt.Sprintf("n%d", i)), want.AtVec(i), 1e-9*(1+mat.Norm(&want, 2)))
		}
		if s.Residual > MaxResidual {
			t.Errorf("trial %d: residual %g", trial, s.Residual)
		}
	}
}

// Superposition: the voltages of two sources together are the sum of those of each.
func TestSuperposition(t *testing.T) {
	rng := rand.New(rand.NewPCG(23, 24))
	for range 30 {
		n := 2 + rng.IntN(30)
		text, _ := mesh(rng, n)
		text += inject(0, rng.IntN(n), 1) + inject(1, rng.IntN(n), 1)
		c := compile(t, text)
		with := func(a, b float64) *Solution {
			return c.solve(Environment{}.Set("J0", "volt", a).Set("J1", "volt", b), nil)
		}
		both, one, two := with(30, -70), with(30, 0), with(0, -70)
		for i := range both.Volts {
			near(t, "superposition", both.Volts[i], one.Volts[i]+two.Volts[i], 1e-7*(1+math.Abs(both.Volts[i])))
		}
	}
}

// Reciprocity: what a current into one net does at another is what the same current
// there does here.
func TestReciprocity(t *testing.T) {
	rng := rand.New(rand.NewPCG(25, 26))
	for range 30 {
		n := 3 + rng.IntN(30)
		text, _ := mesh(rng, n)
		a, b := rng.IntN(n), rng.IntN(n)
		c := compile(t, text+inject(0, a, 1)+inject(1, b, 1))
		ab := c.solve(Environment{}.Set("J1", "volt", 0), nil)
		ba := c.solve(Environment{}.Set("J0", "volt", 0), nil)
		x, y := c.volt(ab, fmt.Sprintf("n%d", b)), c.volt(ba, fmt.Sprintf("n%d", a))
		near(t, "transfer resistance", x, y, 1e-8*(1+math.Abs(x)))
	}
}

// Power balance: what all elements take sums to zero (Tellegen), insulation aside.
func TestPowerBalance(t *testing.T) {
	texts := []string{site, comparatorCell, linearCharger(0.33, 12.5), benchTree(400)}
	conditions := []Environment{{}, {Lux: 1000}, {Mains: 1, Charge: Float}, {Mains: 1.1, Charge: Boost, Lux: 50}}
	for _, text := range texts {
		c := compile(t, text)
		for _, at := range conditions {
			s := c.solve(at, nil)
			sum, size := 0.0, 0.0
			for _, d := range c.devices {
				p := s.Power(d.el.ID)
				sum += p
				size += math.Abs(p)
			}
			near(t, "power balance", sum, 0, 1e-9*(1+size)+float64(len(c.nets))*insulation*1000)
		}
	}
	rng := rand.New(rand.NewPCG(27, 28))
	for range 300 {
		n, err := New(read(t, randomCircuit(rng)))
		if err != nil {
			continue
		}
		s, err := n.Solve(Environment{Mains: 1, Lux: 10, Charge: Float}, nil)
		if err != nil {
			continue
		}
		sum, size := 0.0, 0.0
		for _, d := range n.devices {
			p := s.Power(d.el.ID)
			sum += p
			size += math.Abs(p)
		}
		top := 0.0
		for _, v := range s.Volts {
			top = max(top, v*v)
		}
		near(t, "power balance", sum, 0, 1e-9*(1+size)+float64(len(n.nets))*insulation*2*top)
	}
}

// The same condition gives the same bits whatever was solved before it.
func TestSolutionsDoNotDependOnHistory(t *testing.T) {
	at := Environment{Mains: 1, Charge: Float, Lux: 3}
	fresh := compile(t, site).solve(at, nil)
	c := compile(t, site)
	for k := range 20 {
		c.solve(Environment{Lux: float64(k)}.Set("G1", "emf", 20+float64(k)/3), nil)
	}
	used := c.solve(at, nil)
	for i, v := range fresh.Volts {
		if v != used.Volts[i] {
			t.Errorf("net %d: %.17g V fresh, %.17g V used", i, v, used.Volts[i])
		}
	}
}
