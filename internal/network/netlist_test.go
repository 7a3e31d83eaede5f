package network

import (
	"math"
	"strconv"
	"strings"
	"testing"

	"gloamwright/internal/circuit"
)

// read makes a netlist from lines "ID model net net … name=value …"; nets stand in
// the order of the model's pins, "0" is net 0, "-" leaves an optional pin out. A
// value may carry a tolerance, "ohm=100~0.05". "by=K1" is the Control.
func read(t testing.TB, text string) *circuit.Netlist {
	t.Helper()
	nl := &circuit.Netlist{Nets: []string{"0"}}
	index := map[string]int{"0": 0}
	for _, line := range strings.Split(text, "\n") {
		w := strings.Fields(line)
		if len(w) == 0 || strings.HasPrefix(w[0], "#") {
			continue
		}
		m := modelOf(w[1])
		if m == nil {
			t.Fatalf("no model %q", w[1])
		}
		el := &circuit.Element{ID: w[0], Part: "part " + w[0], Model: w[1]}
		pin := 0
		for _, s := range w[2:] {
			name, value, isParam := strings.Cut(s, "=")
			switch {
			case isParam && name == "by":
				el.Control = value
			case isParam:
				number, tol, _ := strings.Cut(value, "~")
				p := circuit.Param{Name: name, Value: number64(t, number)}
				if tol != "" {
					p.Tol = number64(t, tol)
				}
				el.Params = append(el.Params, p)
			case s == "-":
				pin++
			default:
				k, ok := index[s]
				if !ok {
					k = len(nl.Nets)
					index[s] = k
					nl.Nets = append(nl.Nets, s)
				}
				if pin >= len(m.Pins) {
					t.Fatalf("%s: too many nets", line)
				}
				el.Pins = append(el.Pins, circuit.ElementPin{Name: m.Pins[pin].Name, Net: k})
				pin++
			}
		}
		nl.Elements = append(nl.Elements, el)
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

func number64(t testing.TB, s string) float64 {
	t.Helper()
	v, err := strconv.ParseFloat(s, 64)
	if err != nil {
		t.Fatal(err)
	}
	return v
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
