package design

import (
	"errors"
	"fmt"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/network"
	"gloamwright/internal/quantity"
)

// Spreads of the battery's voltage in each state, as shares: what the charger's
// accuracy or an adjustable source leaves, or the spread among batteries at rest
// (common practice, no source).
const (
	restSpread   = 0.015
	sourceSpread = 0.002 // an adjustable source set with the meter
	emptySpread  = 0.03
	sourceOhm    = 0.001 // output resistance of an adjustable source
	cutOffBelow  = 0.97  // a cut-off has surely opened at this share of its setting
)

// conditions solves every operating condition, each from the one that it is reached
// from.
func (m *maker) conditions() error {
	specs := map[string]operating{}
	for _, o := range conditionsOfAnyJob {
		specs[o.key] = o
	}
	var list []operating
	for _, o := range conditionsOfAnyJob {
		if m.applies(o) {
			list = append(list, o)
		}
	}
	var solve func(o operating) error
	solve = func(o operating) error {
		if m.solved[o.key] != nil {
			return nil
		}
		var from network.State
		if o.from != "" {
			// A condition that the job cannot be in is passed over.
			before := specs[o.from]
			for !m.applies(before) && before.from != "" {
				before = specs[before.from]
			}
			if m.applies(before) {
				if err := solve(before); err != nil {
					return err
				}
				from = m.solved[before.key].State
			}
		}
		sol, err := m.net.Solve(m.environment(o), from)
		var restless *network.ChatterError
		if errors.As(err, &restless) {
			m.hold(o, restless, from)
			sol, err = m.net.Solve(m.environment(o), from)
		}
		if err != nil {
			return m.explain(o, err)
		}
		m.solved[o.key] = sol
		return nil
	}
	number := 0
	for _, o := range list {
		if err := solve(o); err != nil {
			return err
		}
		if o.shown {
			number++
		}
		m.envs = append(m.envs, m.environment(o))
		m.f.Conditions = append(m.f.Conditions, m.condition(o, number))
	}
	return nil
}

// hold keeps what never comes to rest in a condition where it was before, so that the
// condition has figures to show. Its finding is a stop.
func (m *maker) hold(o operating, e *network.ChatterError, from network.State) {
	rest := m.net.Rest()
	for _, id := range e.Elements {
		on, ok := from[id]
		if !ok {
			on = rest[id]
		}
		m.stuck[o.key] = append(m.stuck[o.key], network.Override{Element: id, Stuck: &on})
	}
}

// applies leaves out the conditions that the job cannot be in.
func (m *maker) applies(o operating) bool {
	switch o.battery {
	case cutOff:
		return m.f.CutOff != nil
	case recharging, floating:
		return m.f.Charger.Part != nil
	}
	return true
}

// environment is what stands around the circuit in a condition.
func (m *maker) environment(o operating) network.Environment {
	e := network.Environment{Name: o.name, Lux: dayLux, Charge: network.Float}
	if o.dark {
		e.Lux = nightLux
	}
	tol := m.mainsTolerance()
	switch o.mains {
	case 1:
		e.Mains = 1
	case 2:
		e.Mains = 1 + tol
	case 3:
		e.Mains = 1 - tol
	}
	if o.battery == recharging {
		e.Charge = network.Boost
	}
	if b := m.f.Battery.Part; b != nil {
		emf, ohm, tol := m.batteryState(o.battery)
		params := []circuit.Param{{Name: "emf", Value: float64(emf), Tol: tol}, {Name: "ohm", Value: float64(ohm), Tol: ohmSpread}}
		if over := m.plan.Float - m.plan.Full; o.battery == floating && over > 0 {
			takes := floatDraw * m.f.Battery.Capacity
			params = append(params, circuit.Param{Name: "charge_ohm", Value: float64(over) / float64(takes), Tol: floatSpread})
		}
		e = e.With(network.Override{Element: b.Designation, Params: params})
	}
	for _, h := range m.stuck[o.key] {
		e = e.With(h)
	}
	return e
}

// ohmSpread is the spread of a battery's resistance among products of a class.
const ohmSpread = 0.3

// A full battery at float takes about 1 mA for each ampere-hour (IEC 62485-2, table 1:
// typical float current; from memory), half as much or half as much again (common
// practice, no source). So the charger sets its voltage, not the battery.
const (
	floatDraw   = 1e-3
	floatSpread = 0.5
)

// batteryState returns electromotive force, resistance and spread of the battery.
func (m *maker) batteryState(state string) (quantity.Volt, quantity.Ohm, float64) {
	p := m.plan
	switch state {
	case restedFull:
		return p.Full, p.Internal, restSpread
	case endOfDis:
		return p.End, sourceOhm, sourceSpread
	case cutOff:
		return m.cutOffSource(), sourceOhm, sourceSpread
	case recharging:
		return p.Empty, p.Internal, emptySpread
	default: // floating: full, and what it takes in is little
		return p.Full, p.Internal, restSpread
	}
}

// cutOffSource is the voltage to which the source is set for the cut-off condition.
func (m *maker) cutOffSource() quantity.Volt {
	return quantity.Volt(float64(int(float64(m.f.CutOff.Opens)*cutOffBelow*10)) / 10)
}

// mainsTolerance is the widest tolerance of the mains that the description states.
func (m *maker) mainsTolerance() float64 {
	t := quantity.Ratio(0)
	t = max(t, m.f.Charger.Mains.Plus)
	if m.f.Supply != nil {
		t = max(t, m.f.Supply.Mains.Plus)
	}
	return float64(t)
}

// condition records a solved condition.
func (m *maker) condition(o operating, number int) *facts.Condition {
	sol := m.solved[o.key]
	env := m.environment(o)
	c := &facts.Condition{
		Key: o.key, Name: o.name, From: o.from, Dark: o.dark, Battery: o.battery, Shown: o.shown,
		Lux: quantity.Lux(env.Lux), Settled: len(m.stuck[o.key]) == 0, Residual: sol.Residual,
		MainsV: quantity.Volt(env.Mains * float64(m.mainsNominal())), Mains: env.Mains,
		Charge: map[network.ChargeStage]string{network.NoCharge: facts.Off, network.Float: facts.Float, network.Boost: facts.Boost}[env.Charge],
	}
	for _, h := range m.stuck[o.key] {
		c.Restless = append(c.Restless, h.Element)
	}
	for _, v := range env.Overrides {
		if v.Params == nil {
			continue
		}
		c.Values = append(c.Values, facts.ElementValues{Element: v.Element, Params: v.Params})
	}
	if o.shown {
		c.Number = number
	}
	switch {
	case strings.Contains(o.set, "%s") && o.battery == endOfDis:
		c.Set = fmt.Sprintf(o.set, quantity.Format(m.plan.Full, 3), quantity.Format(m.plan.End, 3))
	case strings.Contains(o.set, "%s"):
		c.Set = fmt.Sprintf(o.set, quantity.Format(m.cutOffSource(), 3))
	default:
		c.Set = o.set
	}
	for _, v := range sol.Volts {
		c.Volts = append(c.Volts, quantity.Volt(v))
	}
	if b := m.f.Battery.Part; b != nil {
		c.BatteryV = quantity.Volt(sol.Across(b.Pin("+").Net, b.Pin("-").Net))
		c.BatteryA = quantity.Ampere(sol.Current(b.Designation))
		c.BatterySoC = map[string]quantity.Ratio{floating: 1, restedFull: 1}[o.battery]
	}
	for _, e := range m.f.Netlist.Elements {
		if on, has := sol.State[e.ID]; has {
			yes, no := m.net.Positions(e.ID)
			if !on {
				yes = no
			}
			c.State = append(c.State, facts.State{Element: e.ID, Position: yes})
		}
	}
	return c
}

func (m *maker) mainsNominal() quantity.Volt {
	if v := m.f.Charger.Mains.Nominal; v > 0 {
		return v
	}
	if m.f.Supply != nil {
		return m.f.Supply.Mains.Nominal
	}
	return 0
}

// Unsolved says that a condition has no operating point or that none was found.
type Unsolved struct {
	Condition string
	Err       error
}

// Error names the condition and what stood in the way.
func (u *Unsolved) Error() string {
	return fmt.Sprintf("condition %q: %v", u.Condition, u.Err)
}

// Unwrap returns the cause.
func (u *Unsolved) Unwrap() error { return u.Err }

func (m *maker) explain(o operating, err error) error {
	var u *Unsolved
	if errors.As(err, &u) {
		return err
	}
	return &Unsolved{o.name, err}
}
