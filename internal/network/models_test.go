package network

import (
	"fmt"
	"math"
	"math/rand/v2"
	"testing"
)

// lawful returns parameters of a model that pass its own checks.
func lawful(t *testing.T, m *Model) []float64 {
	t.Helper()
	p := make([]float64, len(m.Params))
	given := make([]bool, len(p))
	values := map[string]float64{
		"volt": 12, "emf": 12, "ohm": 0.5, "float_volt": 13.7, "boost_volt": 14.4, "limit_ampere": 2, "rated_volt": 12,
		"rated_ampere": 0.5, "open_volt": 19, "pickup_volt": 9, "dropout_volt": 1.2, "opens_volt": 10.5, "recloses_volt": 12.5,
		"dark_below_lx": 10, "light_above_lx": 14, "watt": 6, "low_volt": 9, "high_volt": 16, "ampere": 0.02,
		"forward_volt": 3.1, "series": 3, "rated_watt": 10, "vz": 12, "own_ampere": 0.01,
	}
	for i, s := range m.Params {
		p[i] = s.Default
		if v, ok := values[s.Name]; ok && (s.Required || s.Name == "own_ampere") {
			p[i], given[i] = v, true
		}
	}
	if m.derive != nil {
		m.derive(p, given)
	}
	if m.check != nil {
		if msg := m.check(p); msg != "" {
			t.Fatalf("%s: %s", m.Name, msg)
		}
	}
	return p
}

// Every slope that a law states must be the slope of what it states, and the
// currents into all pins of an element must sum to zero.
func TestSlopesMatchLaws(t *testing.T) {
	const h = 1e-6
	rng := rand.New(rand.NewPCG(1, 2))
	conditions := []Environment{
		{}, {Mains: 1, Charge: Float, Lux: 50}, {Mains: 0.8, Charge: Boost, Lux: 3}, {Mains: 1.1},
	}
	for _, m := range Models() {
		p := lawful(t, m)
		n := len(m.Pins) + m.branches
		for trial := range 400 {
			c := cell{p: p, on: trial%2 == 0, at: &conditions[trial%4]}
			span := []float64{0.6, 3, 20}[trial%3]
			for k := range n {
				c.v[k] = span * (2*rng.Float64() - 1)
			}
			base := c
			m.evaluate(&base)
			sum, size := 0.0, 1e-12
			for k := range m.Pins {
				sum += base.f[k]
				size += math.Abs(base.f[k])
			}
			if math.IsNaN(sum) || math.Abs(sum) > 1e-12*size {
				t.Fatalf("%s at %v: currents sum to %g", m.Name, c.v[:n], sum)
			}
			for k := range n {
				up, down := c, c
				up.v[k] += h
				down.v[k] -= h
				m.evaluate(&up)
				m.evaluate(&down)
				for r := range n {
					got := base.j[r][k]
					left, right := (base.f[r]-down.f[r])/h, (up.f[r]-base.f[r])/h
					mid := (left + right) / 2
					// At the end of a rounded corner the slope turns within h.
					tol := math.Abs(right-left) + 1e-5*math.Abs(got) + 1e-6 + 1e-15/h*math.Abs(base.f[r])*100
					if math.Abs(got-mid) > tol {
						t.Fatalf("%s, on %v, at %v: slope of equation %d to unknown %d is %g, its law says %g",
							m.Name, c.on, c.v[:n], r, k, got, mid)
					}
				}
			}
		}
	}
}

// A passive two-pin element takes power at every voltage.
func TestLoadsTakePower(t *testing.T) {
	for _, m := range []*Model{resistorModel, ldrModel, diodeModel, schottkyModel, ledModel, zenerModel, suppressorModel,
		powerModel, currentModel, ledStringModel, filamentModel} {
		c := cell{p: lawful(t, m), at: &Environment{Lux: 10}}
		for v := -30.0; v <= 30; v += 0.37 {
			c.clear(maxLocal)
			c.v = [maxLocal]float64{v, 0}
			if m.branches == 1 {
				continue
			}
			m.evaluate(&c)
			if c.f[0]*v < 0 {
				t.Errorf("%s at %g V takes %g A", m.Name, v, c.f[0])
			}
		}
	}
}

func TestModelsAreDocumented(t *testing.T) {
	seen := map[string]bool{}
	for _, m := range Models() {
		if m.Doc == "" || m.Law == "" || m.Source == "" || len(m.Pins) == 0 || seen[m.Name] {
			t.Errorf("model %q: doc, law, source, pins missing or name used twice", m.Name)
		}
		seen[m.Name] = true
		if len(m.Pins)+m.branches > maxLocal {
			t.Errorf("model %q has too many unknowns", m.Name)
		}
		if (m.Memory != "") != (m.next != nil) {
			t.Errorf("model %q: positions and their law do not go together", m.Name)
		}
		names := map[string]bool{}
		for _, p := range m.Params {
			if p.Doc == "" || names[p.Name] {
				t.Errorf("model %q: parameter %q has no doc or is there twice", m.Name, p.Name)
			}
			names[p.Name] = true
		}
	}
}

func ExampleModels() {
	for _, m := range Models()[:2] {
		fmt.Println(m.Name+":", m.Law)
	}
	// Output:
	// resistor: i(1→2) = (v1 − v2)/ohm
	// conductor: i(1→2) = (v1 − v2)/ohm
}
