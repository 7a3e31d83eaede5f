// Package design joins description, circuit, sizing, solution, endurance and
// findings into one value, the Design. Every document is a view of it.
package design

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/finding"
)

// Design is one resolved site. It is read-only.
type Design struct {
	*facts.Facts
	Findings []finding.Finding
	// Warnings are what the decoder found odd in the description without refusing it.
	Warnings describe.List
	// Labels is every label by its stable key.
	Labels circuit.Labels
	// Issued is set on documents that `issue` froze; otherwise they carry DRAFT.
	Issued bool
	// Changes is the change notice against the revision before; nil on a first one.
	Changes *Changes
}

// ForConstruction reports whether no stop finding stands.
func (d *Design) ForConstruction() bool {
	for _, f := range d.Findings {
		if f.Severity == finding.Stop {
			return false
		}
	}
	return true
}

// Count returns the number of findings of a severity.
func (d *Design) Count(s finding.Severity) int {
	n := 0
	for _, f := range d.Findings {
		if f.Severity == s {
			n++
		}
	}
	return n
}
