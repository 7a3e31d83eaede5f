package design_test

import (
	"math"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
	"gloamwright/internal/facts"
	"gloamwright/internal/network"
)

type designCondition = facts.Condition

// again solves a condition of a design once more, from its own positions.
func again(t *testing.T, d *design.Design, c *facts.Condition) *network.Solution {
	t.Helper()
	n, err := network.New(d.Netlist)
	if err != nil {
		t.Fatal(err)
	}
	s, err := n.Solve(environment(c), positions(n, c))
	if err != nil {
		t.Fatalf("%s: %v", c.Key, err)
	}
	for i, v := range c.Volts {
		if math.Abs(float64(v)-s.Volts[i]) > 1e-6 {
			t.Fatalf("%s, net %s: %v recorded, %v solved again", c.Key, d.Netlist.Nets[i], v, s.Volts[i])
		}
	}
	return s
}

// resistive holds the models whose power follows from Ohm's law and the voltages alone.
var resistive = map[string]bool{"conductor": true, "fuse": true, "resistor": true}

// What sources give, all else takes: in every condition of every example the powers
// add up to nothing. Those of wires, fuses and resistors come from U² ÷ R.
func TestPowerBalance(t *testing.T) {
	for _, name := range examples(t) {
		d, err := design.Make(load(t, name), nil)
		if err != nil {
			t.Fatal(err)
		}
		for _, c := range d.Conditions {
			s := again(t, d, c)
			given, taken := 0.0, 0.0
			for k, e := range d.Netlist.Elements {
				p := s.Power(e.ID)
				if resistive[e.Model] {
					u := float64(c.Volts[e.Pins[0].Net] - c.Volts[e.Pins[1].Net])
					p = u * u / value(d.Elements[k].Params, "ohm")
				}
				if p < 0 {
					given -= p
				} else {
					taken += p
				}
			}
			if given < 0.01 {
				t.Errorf("%s, %s: sources give %g W", name, c.Key, given)
			}
			if math.Abs(given-taken) > 1e-6*given {
				t.Errorf("%s, %s: %.9f W given, %.9f W taken", name, c.Key, given, taken)
			}
		}
	}
}

func value(params []circuit.Param, name string) float64 {
	for _, p := range params {
		if p.Name == name {
			return p.Value
		}
	}
	return math.NaN()
}

// minusSide returns the nets that minus conductors join to the reference.
func minusSide(d *design.Design) []bool {
	minus := make([]bool, len(d.Netlist.Nets))
	minus[0] = true
	positive := map[string]bool{}
	for _, w := range d.Circuit.Conductors {
		positive[w.Number] = w.Positive
	}
	for grown := true; grown; {
		grown = false
		for _, e := range d.Netlist.Elements {
			if e.Model != "conductor" || positive[e.ID] {
				continue
			}
			a, b := e.Pins[0].Net, e.Pins[1].Net
			if minus[a] != minus[b] {
				minus[a], minus[b], grown = true, true, true
			}
		}
	}
	return minus
}

// What the battery takes is what the charger and all loads leave: the currents of all
// other parts that stand between plus and minus add up to the battery's, the lamps
// with the currents that the design records for them.
func TestBatteryCurrentIsTheSumOfTheLoads(t *testing.T) {
	for _, name := range examples(t) {
		d, err := design.Make(load(t, name), nil)
		if err != nil {
			t.Fatal(err)
		}
		minus := minusSide(d)
		lamps := map[string]*facts.Luminaire{}
		for _, l := range d.Luminaires {
			lamps[l.Part.Designation] = l
		}
		for k, c := range d.Conditions {
			s := again(t, d, c)
			sum, lit := 0.0, 0.0
			for _, e := range d.Netlist.Elements {
				if e.ID == d.Battery.Part.Designation {
					continue
				}
				if l := lamps[e.ID]; l != nil {
					sum += float64(l.Amps[k])
					lit += float64(l.Amps[k])
					continue
				}
				for _, p := range e.Pins {
					if minus[p.Net] {
						sum -= s.PinCurrent(e.ID, p.Name)
					}
				}
			}
			if math.Abs(sum+float64(c.BatteryA)) > 1e-8 {
				t.Errorf("%s, %s: the loads sum to %.9f A, the battery gives %.9f A", name, c.Key, sum, -c.BatteryA)
			}
			if len(c.Lit) == len(d.Site.Circuits) && lit < 0.5*sum {
				t.Errorf("%s, %s: all circuits are lit, but of %.3f A the lamps take %.3f A", name, c.Key, sum, lit)
			}
		}
	}
}

// By hand on the small example: what the battery gives in the night is the lamps, and
// the own currents of charger (5 mA), cut-off (8 mA) and twilight module (10 mA).
func TestStandingCurrentByHand(t *testing.T) {
	d, err := design.Make(load(t, "juniper-flat"), nil)
	if err != nil {
		t.Fatal(err)
	}
	for k, c := range d.Conditions {
		if c.Key != "outage-night" {
			continue
		}
		want := 0.005 + 0.008 + 0.010
		for _, l := range d.Luminaires {
			want += float64(l.Amps[k])
		}
		if got := -float64(c.BatteryA); math.Abs(got-want) > 0.5e-3 {
			t.Errorf("the battery gives %.4f A, by hand %.4f A", got, want)
		}
	}
}
