package published_test

import (
	"math"
	"math/rand/v2"
	"slices"
	"testing"

	"gloamwright/internal/network/published"
	"gloamwright/internal/network/secondroute"
)

// Every printed figure comes out of the solver.
func TestPrintedFigures(t *testing.T) {
	for _, e := range published.All() {
		t.Run(e.Source, func(t *testing.T) {
			r, err := e.Solve()
			if err != nil {
				t.Fatal(err)
			}
			for _, p := range e.Reads {
				if got := p.Ours(r); !(math.Abs(got-p.Value) <= p.Tolerance) {
					t.Errorf("%s: got %.9g %s, printed %.9g ± %.2g", p.What, got, p.Unit(), p.Value, p.Tolerance)
				}
			}
		})
	}
}

// ideal reports whether an example has a source without resistance, which has no nodal
// equation.
func ideal(r published.Result) bool {
	for _, e := range r.Netlist.Elements {
		if e.Model == "source" || e.Model == "battery" {
			for _, p := range r.Values(e.ID) {
				if p.Name == "ohm" && p.Value == 0 {
					return true
				}
			}
		}
	}
	return false
}

// The same examples by the second route.
func TestSecondRoute(t *testing.T) {
	compared := 0
	for _, e := range published.All() {
		r, err := e.Solve()
		if err != nil {
			t.Fatal(err)
		}
		if ideal(r) {
			continue
		}
		compared++
		start := slices.Clone(r.Volts)
		rng := rand.New(rand.NewPCG(41, 42))
		for i := 1; i < len(start); i++ {
			start[i] += 0.05 * (2*rng.Float64() - 1)
		}
		root, err := secondroute.Root(r.Netlist, &secondroute.Condition{Values: r.Values}, start)
		if err != nil {
			t.Fatalf("%s: %v", e.Source, err)
		}
		for i, v := range root {
			if math.Abs(v-r.Volts[i]) > 1e-6 {
				t.Errorf("%s, net %s: %.9f V, %.9f V by the second route", e.Source, r.Netlist.Nets[i], r.Volts[i], v)
			}
		}
	}
	if compared < 4 {
		t.Errorf("only %d examples compared", compared)
	}
}
