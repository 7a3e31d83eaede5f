package design

import (
	"fmt"
	"math"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/network"
	"gloamwright/internal/quantity"
)

// expect says for every condition what is to be seen: lights, relay, cut-off, and the
// battery's current with its band.
func (m *maker) expect() error {
	for _, c := range m.f.Conditions {
		parts := []string{m.lights(c.Lit)}
		for _, s := range c.State {
			p := m.partOf(s.Element)
			switch {
			case p == nil:
			case p.Kind == circuit.Relay:
				parts = append(parts, p.Designation+" "+relayWord(s.Position == "picked up")+".")
			case p.Kind == circuit.CutOff:
				parts = append(parts, p.Designation+" "+s.Position+".")
			}
		}
		for _, e := range c.Either {
			parts = append(parts, "Or "+stateWords(e.Parts)+", with "+lower(m.lights(e.Lit)))
		}
		current, err := m.batteryCurrent(c)
		if err != nil {
			return err
		}
		if current != "" {
			parts = append(parts, current)
		}
		c.Expect = strings.Join(parts, " ")
	}
	return nil
}

func (m *maker) lights(lit []string) string {
	switch n := len(m.site.Circuits); len(lit) {
	case 0:
		return "None lit."
	case n:
		if n == 1 {
			return "The circuit lit."
		}
		return fmt.Sprintf("All %d circuits lit.", n)
	default:
		return fmt.Sprintf("%d of %d circuits lit.", len(lit), n)
	}
}

// lower is a sentence as it goes on in the middle of another.
func lower(s string) string { return strings.ToLower(s[:1]) + s[1:] }

func (m *maker) partOf(element string) *circuit.Part {
	for _, p := range m.f.Circuit.Parts {
		for _, e := range p.Elements {
			if e.ID == element {
				return p
			}
		}
	}
	return nil
}

// batteryCurrent says what the battery gives or takes, as a band.
func (m *maker) batteryCurrent(c *facts.Condition) (string, error) {
	b := m.f.Battery.Part
	if b == nil || c.Battery == floating {
		return "", nil
	}
	bands, err := m.solved[c.Key].Bands([]network.Output{network.Into(b.Designation)}, network.Linear)
	if err != nil {
		return "", fmt.Errorf("battery current in condition %q: %w", c.Name, err)
	}
	lo, hi := bands[0].Low, bands[0].High
	verb := "takes"
	if c.Battery == endOfDis || c.Battery == cutOff {
		verb = "gives" // an adjustable source stands in its place
	}
	if bands[0].Typical < 0 {
		verb = "gives"
		lo, hi = -hi, -lo
	}
	c.BatteryBand.Low, c.BatteryBand.High = quantity.Ampere(math.Max(lo, 0)), quantity.Ampere(hi)
	who := "Battery"
	if c.Battery == endOfDis || c.Battery == cutOff {
		who = "Source"
	}
	return fmt.Sprintf("%s %s %s to %s A.", who, verb, amps(math.Max(lo, 0), false), amps(hi, true)), nil
}

// amps prints a current to two decimals, three below 0.1 A, outward.
func amps(v float64, up bool) string {
	places := 2
	if math.Abs(v) < 0.1 {
		places = 3
	}
	k := math.Pow(10, float64(places))
	if up {
		v = math.Ceil(v*k-1e-9) / k
	} else {
		v = math.Floor(v*k+1e-9) / k
	}
	return fmt.Sprintf("%.*f", places, v)
}
