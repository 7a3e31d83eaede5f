package network

import (
	"fmt"
	"strings"
)

// ElementError is an element that cannot be used as it is.
type ElementError struct {
	Element, Part, Model string
	Problem              string
}

func (e *ElementError) Error() string {
	return fmt.Sprintf("%s: %s", named(e.Element, e.Part), e.Problem)
}

// FloatingError is a group of nets without any path to L−: their voltages against
// it do not exist.
type FloatingError struct {
	Nets     []string
	Elements []string
	Parts    []string // of the elements, without repeats
}

func (e *FloatingError) Error() string {
	return fmt.Sprintf("nothing connects %s to L−: its voltages cannot be told; connect it or leave it out (parts %s)",
		several(e.Nets), several(e.Parts))
}

// LoopError is a loop of parts without resistance: the current round it would be
// without limit, or could not be told.
type LoopError struct {
	Elements []string
	Parts    []string
}

func (e *LoopError) Error() string {
	return fmt.Sprintf("%s form a loop without any resistance: the current round it cannot be told; give one of them a resistance (parts %s)",
		several(e.Elements), several(e.Parts))
}

// ConvergenceError is a circuit for which no operating point was found.
type ConvergenceError struct {
	Condition string
	Net       string  // with the largest imbalance
	Ampere    float64 // the imbalance
	Element   string  // on that net, with the largest current
	Part      string
	Tried     string
}

func (e *ConvergenceError) Error() string {
	return fmt.Sprintf("condition %q: no operating point found (%s); worst at net %s, %.3g A out of balance, next to %s",
		e.Condition, e.Tried, e.Net, e.Ampere, named(e.Element, e.Part))
}

// ChatterError is a circuit whose relays or electronics never come to rest.
type ChatterError struct {
	Condition string
	Elements  []string // that keep moving
	Parts     []string
}

func (e *ChatterError) Error() string {
	return fmt.Sprintf("condition %q: %s never come to rest: each move makes the next (parts %s)",
		e.Condition, several(e.Elements), several(e.Parts))
}

// named is an element with its part, for a message.
func named(element, part string) string {
	if part == "" || part == element {
		return element
	}
	return element + " (" + part + ")"
}

// namesShown is the number of names that a message prints.
const namesShown = 8

func several(names []string) string {
	if len(names) > namesShown {
		return strings.Join(names[:namesShown], ", ") + fmt.Sprintf(" and %d more", len(names)-namesShown)
	}
	return strings.Join(names, ", ")
}
