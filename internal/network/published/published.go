// Package published holds circuits that other people have solved and printed, each
// with the published constants. The tests solve every one by package network; docs/
// lists them.
package published

import (
	"fmt"
	"slices"

	"gloamwright/internal/circuit"
	"gloamwright/internal/network"
	"gloamwright/internal/network/nettext"
)

// Example is one circuit and what was printed about it.
type Example struct {
	Source string // publication, with what tells the example apart
	Seen   string // checks.Read, checks.Archive or checks.Memory
	Text   string // the circuit, as package nettext reads it
	Reads  []Printed
}

// Printed is one printed figure.
type Printed struct {
	What      string
	reads     reader
	Value     float64
	Tolerance float64 // what the printed digits and the example's own roundings leave
}

// Unit returns the unit of the figure.
func (p Printed) Unit() string { return p.reads.unit }

// Ours returns the program's figure.
func (p Printed) Ours(r Result) float64 { return p.reads.of(r) }

// Result is an example, solved.
type Result struct {
	*network.Solution
	Netlist *circuit.Netlist
}

// reader takes a figure from a result.
type reader struct {
	unit string
	of   func(r Result) float64
}

func (r Result) volt(net string) float64 { return r.Volts[slices.Index(r.Netlist.Nets, net)] }

func volts(red, black string) reader {
	return reader{"V", func(r Result) float64 { return r.volt(red) - r.volt(black) }}
}

func amps(element string) reader {
	return reader{"A", func(r Result) float64 { return r.Current(element) }}
}

func watts(element string) reader {
	return reader{"W", func(r Result) float64 { return r.Power(element) }}
}

// All returns every example.
func All() []Example {
	return slices.Concat(sources, distributors, diodes, zeners, transistors, regulators, filaments)
}

// Solve solves the example.
func (e Example) Solve() (Result, error) {
	nl, err := nettext.Read(e.Text, pins)
	if err != nil {
		return Result{}, err
	}
	n, err := network.New(nl)
	if err != nil {
		return Result{}, err
	}
	s, err := n.Solve(network.Environment{Name: e.Source}, nil)
	if err != nil {
		return Result{}, fmt.Errorf("%s: %w", e.Source, err)
	}
	return Result{s, nl}, nil
}

// pins names the pins of a model in order.
func pins(model string) []string {
	for _, m := range network.Models() {
		if m.Name == model {
			var names []string
			for _, p := range m.Pins {
				names = append(names, p.Name)
			}
			return names
		}
	}
	return nil
}
