package design_test

import (
	"encoding/json"
	"math"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
	"gloamwright/internal/network"
	"gloamwright/internal/network/secondroute"
	"gloamwright/internal/results"
)

// examples returns the names of the descriptions that ship with the program.
func examples(tb testing.TB) []string {
	tb.Helper()
	files, err := filepath.Glob("../../examples/*.yaml")
	if err != nil || len(files) < 2 {
		tb.Fatalf("examples: %v, %v", files, err)
	}
	for i, f := range files {
		files[i] = strings.TrimSuffix(filepath.Base(f), ".yaml")
	}
	return files
}

// published is what results.json says about the network, read as a stranger would.
type published struct {
	Reference string
	Network   []struct {
		Element, Part, Model, Control string
		Pins                          map[string]string
		Values                        map[string]float64
	}
	Conditions []struct {
		Name       string
		Mains      float64
		DaylightLx float64 `json:"daylight_lx"`
		Charge     string
		BatteryA   float64 `json:"battery_a"`
		ResidualA  float64 `json:"residual_a"`
		State      map[string]string
		Values     map[string]map[string]float64
		Volts      map[string]float64
	}
}

func publish(t *testing.T, d *design.Design) published {
	t.Helper()
	text, err := results.JSON(d)
	if err != nil {
		t.Fatal(err)
	}
	var p published
	if err := json.Unmarshal(text, &p); err != nil {
		t.Fatal(err)
	}
	return p
}

// netlist builds the netlist of results.json again; nets stand in the order of their
// names behind the reference.
func (p *published) netlist() *circuit.Netlist {
	nl := &circuit.Netlist{Nets: []string{p.Reference}}
	var names []string
	for n := range p.Conditions[0].Volts {
		if n != p.Reference {
			names = append(names, n)
		}
	}
	slices.Sort(names)
	nl.Nets = append(nl.Nets, names...)
	at := map[string]int{}
	for i, n := range nl.Nets {
		at[n] = i
	}
	for _, e := range p.Network {
		x := &circuit.Element{ID: e.Element, Part: e.Part, Model: e.Model, Control: e.Control}
		var pins []string
		for n := range e.Pins {
			pins = append(pins, n)
		}
		slices.Sort(pins)
		for _, n := range pins {
			x.Pins = append(x.Pins, circuit.ElementPin{Name: n, Net: at[e.Pins[n]]})
		}
		nl.Elements = append(nl.Elements, x)
	}
	return nl
}

// condition makes the k-th condition ready for the second route.
func (p *published) condition(t *testing.T, k int) *secondroute.Condition {
	t.Helper()
	c := p.Conditions[k]
	values := map[string][]circuit.Param{}
	positions := map[string]bool{}
	for _, e := range p.Network {
		for name, v := range e.Values {
			if other, ok := c.Values[e.Element][name]; ok {
				v = other
			}
			values[e.Element] = append(values[e.Element], circuit.Param{Name: name, Value: v})
		}
		if word, ok := c.State[e.Element]; ok {
			positions[e.Element] = on(t, e.Model, word)
		}
	}
	charge := c.Charge
	if charge == "off" {
		charge = ""
	}
	return &secondroute.Condition{Mains: c.Mains, Lux: c.DaylightLx, Charge: charge, Positions: positions,
		Values: func(id string) []circuit.Param { return values[id] }}
}

// on reads the word for a position by the reference of the models.
func on(t *testing.T, model, word string) bool {
	t.Helper()
	for _, m := range network.Models() {
		if m.Name == model {
			if word+"/" == m.Memory[:min(len(word)+1, len(m.Memory))] {
				return true
			}
			if "/"+word == m.Memory[max(0, len(m.Memory)-len(word)-1):] {
				return false
			}
		}
	}
	t.Fatalf("%q is no position of the model %s", word, model)
	return false
}

// Limits of the second route: what may be left over at a net, and how far the two
// solutions may be apart.
const (
	nanoAmpere = 1e-9
	apart      = 1e-6 // V
)

// Every condition of every example is solved again by a dense root finder, with the
// laws written a second time, from results.json alone.
func TestSecondRouteFromTheResults(t *testing.T) {
	for _, name := range examples(t) {
		t.Run(name, func(t *testing.T) {
			d, err := design.Make(load(t, name), nil)
			if err != nil {
				t.Fatal(err)
			}
			p := publish(t, d)
			nl := p.netlist()
			for k, c := range p.Conditions {
				if c.ResidualA >= nanoAmpere {
					t.Errorf("%s: %g A left over by the program's own account", c.Name, c.ResidualA)
				}
				volts := make([]float64, len(nl.Nets))
				for i, n := range nl.Nets {
					volts[i] = c.Volts[n]
				}
				at := p.condition(t, k)
				sums, err := secondroute.Sums(nl, at, volts)
				if err != nil {
					t.Fatal(err)
				}
				worst := 0.0
				for i, s := range sums {
					worst = math.Max(worst, math.Abs(s))
					if !(math.Abs(s) < nanoAmpere) {
						t.Errorf("%s, net %s: %g A left over", c.Name, nl.Nets[i], s)
					}
				}
				// The start is off by more than any reading's band, so that the root
				// finder has to come back by itself.
				start := slices.Clone(volts)
				for i := 1; i < len(start); i++ {
					start[i] += 0.2 * math.Sin(float64(i*i))
				}
				root, err := secondroute.Root(nl, at, start)
				if err != nil {
					t.Errorf("%s: %v", c.Name, err)
					continue
				}
				far := 0.0
				for i, v := range root {
					far = math.Max(far, math.Abs(v-volts[i]))
					if !(math.Abs(v-volts[i]) < apart) {
						t.Errorf("%s, net %s: %.9f V by the program, %.9f V by the second route", c.Name, nl.Nets[i], volts[i], v)
					}
				}
				t.Logf("%-16s %d nets: %.1e A left over, %.1e V apart", c.Name, len(nl.Nets), worst, far)
			}
		})
	}
}
