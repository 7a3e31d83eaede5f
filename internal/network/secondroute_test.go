package network

import (
	"errors"
	"math"
	"math/rand/v2"
	"slices"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/internal/network/secondroute"
)

// secondRoute checks a solution by the second route: its currents sum to zero by laws
// written again, and a dense root finder that starts a little off comes back to it.
func secondRoute(t *testing.T, nl *circuit.Netlist, at Environment, s *Solution) {
	t.Helper()
	c := &secondroute.Condition{
		Mains: at.Mains, Lux: at.Lux, Charge: map[ChargeStage]string{Float: "float", Boost: "boost"}[at.Charge],
		LoadFactor: at.LoadFactor, Positions: s.State,
		Values: s.Values,
	}
	for _, o := range at.Overrides {
		if o.Open {
			c.Open = append(c.Open, o.Element)
		}
	}
	sums, err := secondroute.Sums(nl, c, s.Volts)
	if err != nil {
		t.Fatal(err)
	}
	for i, f := range sums {
		if !(math.Abs(f) < 1e-8) {
			t.Errorf("condition %q, net %s: %g A out of balance by the second route", at.Name, nl.Nets[i], f)
		}
	}
	start := slices.Clone(s.Volts)
	rng := rand.New(rand.NewPCG(41, 42))
	for i := 1; i < len(start); i++ {
		start[i] += 0.05 * (2*rng.Float64() - 1)
	}
	root, err := secondroute.Root(nl, c, start)
	if err != nil {
		t.Errorf("condition %q: %v", at.Name, err)
		return
	}
	for i, v := range root {
		near(t, "condition "+at.Name+", net "+nl.Nets[i]+" by the second route", s.Volts[i], v, 1e-6)
	}
}

func TestSecondRouteOnSites(t *testing.T) {
	for _, text := range []string{site, banded, comparatorCell, linearCharger(0.33, 12.5), linearCharger(0.2, 13.6)} {
		nl := read(t, text)
		n, err := New(nl)
		if err != nil {
			t.Fatal(err)
		}
		for _, at := range []Environment{
			{Name: "outage"}, {Name: "outage by day", Lux: 1000}, {Name: "float", Mains: 1, Charge: Float, Lux: 1000},
			{Name: "boost at night", Mains: 1.1, Charge: Boost}, {Name: "low mains", Mains: 0.6, Charge: Float},
		} {
			s, err := n.Solve(at, nil)
			if err != nil {
				t.Fatal(err)
			}
			secondRoute(t, nl, at, s)
		}
	}
}

// On random circuits the sums alone are compared: many of them have several
// operating points.
func TestSecondRouteSumsOnRandomCircuits(t *testing.T) {
	rng := rand.New(rand.NewPCG(43, 44))
	compared := 0
	for range 500 {
		nl := read(t, randomCircuit(rng))
		n, err := New(nl)
		if err != nil {
			continue
		}
		at := Environment{Mains: 1, Lux: 20, Charge: Float}
		s, err := n.Solve(at, nil)
		var chatter *ChatterError
		if errors.As(err, &chatter) {
			continue
		}
		if err != nil {
			t.Fatal(err)
		}
		sums, err := secondroute.Sums(nl, &secondroute.Condition{Mains: 1, Lux: 20, Charge: "float", Positions: s.State, Values: n.Values}, s.Volts)
		if err != nil {
			t.Fatal(err)
		}
		compared++
		biggest := 0.0
		for _, d := range n.devices {
			biggest = max(biggest, math.Abs(s.Current(d.el.ID)))
		}
		for i, f := range sums {
			if !(math.Abs(f) < 1e-8*(1+biggest)) {
				t.Errorf("net %s: %g A out of balance", nl.Nets[i], f)
			}
		}
	}
	if compared < 400 {
		t.Errorf("only %d circuits compared", compared)
	}
}
