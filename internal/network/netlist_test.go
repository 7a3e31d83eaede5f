package network

import (
	"math"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/internal/network/nettext"
)

// read makes a netlist from text as package nettext reads it.
func read(t testing.TB, text string) *circuit.Netlist {
	t.Helper()
	nl, err := nettext.Read(text, func(model string) []string {
		m := modelOf(model)
		if m == nil {
			return nil
		}
		var names []string
		for _, p := range m.Pins {
			names = append(names, p.Name)
		}
		return names
	})
	if err != nil {
		t.Fatal(err)
	}
	return nl
}

func modelOf(name string) *Model {
	for _, m := range Models() {
		if m.Name == name {
			return m
		}
	}
	return nil
}

// circuitUnderTest is a network whose nets are known by name.
type circuitUnderTest struct {
	*Network
	t testing.TB
}

func compile(t testing.TB, text string) circuitUnderTest {
	t.Helper()
	n, err := New(read(t, text))
	if err != nil {
		t.Fatal(err)
	}
	return circuitUnderTest{n, t}
}

func (c circuitUnderTest) net(name string) int {
	c.t.Helper()
	for i, n := range c.nets {
		if n == name {
			return i
		}
	}
	c.t.Fatalf("no net %q", name)
	return 0
}

func (c circuitUnderTest) solve(at Environment, from State) *Solution {
	c.t.Helper()
	s, err := c.Solve(at, from)
	if err != nil {
		c.t.Fatal(err)
	}
	return s
}

func (c circuitUnderTest) volt(s *Solution, net string) float64 {
	c.t.Helper()
	return s.Volts[c.net(net)]
}

// near fails unless got is within tol of want.
func near(t testing.TB, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tol) {
		t.Errorf("%s: got %.9g, want %.9g ± %.2g", what, got, want, tol)
	}
}
