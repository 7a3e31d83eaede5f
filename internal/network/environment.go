package network

import "gloamwright/internal/circuit"

// ChargeStage is what a charger does.
type ChargeStage int

// The stages of charging.
const (
	NoCharge ChargeStage = iota // the charger is off even with mains on
	Float
	Boost
)

// Environment is the operating condition in which the circuit is solved. Its zero
// value is an outage in the dark.
type Environment struct {
	Name   string  // of the condition, for messages
	Mains  float64 // mains voltage as a fraction of nominal; 0 is an outage
	Lux    float64 // daylight on every sensor, lx
	Charge ChargeStage
	// Overrides change single elements: a battery's state, a part's fault. A later
	// one wins over an earlier one.
	Overrides []Override
	// LoadFactor scales all constant-power loads; 0 means 1.
	LoadFactor float64
}

func (e *Environment) loadFactor() float64 {
	if e.LoadFactor == 0 {
		return 1
	}
	return e.LoadFactor
}

// Override changes one element for one condition.
type Override struct {
	Element string
	// Params replace the element's parameters of the same names, tolerances included.
	Params []circuit.Param
	// Open takes the element out: no current flows through it.
	Open bool
	// Short names two pins that ShortOhm joins, besides what the element does itself;
	// an element with its own current (fuse, conductor, battery …) is replaced by it.
	Short [2]string
	// Stuck holds a relay coil, cut-off, twilight switch or comparator in the given
	// position, whatever it sees; nil leaves it free.
	Stuck *bool
}

// ShortOhm is the resistance of a bolted short (assumed: two clamped joints).
const ShortOhm = 1e-3

// Set returns e with one parameter of one element replaced by an exact value.
func (e Environment) Set(element, param string, value float64) Environment {
	return e.With(Override{Element: element, Params: []circuit.Param{{Name: param, Value: value}}})
}

// With returns e with one more override.
func (e Environment) With(o Override) Environment {
	e.Overrides = append(e.Overrides[:len(e.Overrides):len(e.Overrides)], o)
	return e
}

// State holds the position of every element with memory, by element identity: true
// for the first word of its model's Memory, such as picked up, closed, light.
// An element that is missing starts at rest.
type State map[string]bool
