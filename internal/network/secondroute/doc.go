// Package secondroute solves a netlist by other means than package network, for
// tests: plain nodal analysis with a dense matrix, every law written again from the
// reference of the models, slopes by automatic differentiation, implicit laws by
// bisection. It shares no code with package network and is slow.
package secondroute

import "gloamwright/internal/circuit"

// Condition is what the laws need to know besides the voltages.
type Condition struct {
	Mains      float64 // fraction of nominal
	Lux        float64
	Charge     string          // "float", "boost" or ""
	LoadFactor float64         // of constant-power loads; 0 means 1
	Positions  map[string]bool // of elements with memory
	// Values returns all parameters of an element in this condition.
	Values func(element string) []circuit.Param
	// Open lists elements that carry no current.
	Open []string
}
