package describe

import (
	"cmp"
	"slices"
)

// Severity says how bad a diagnostic is. The zero Severity is invalid.
type Severity uint8

// The severities.
const (
	Error   Severity = iota + 1 // the description cannot be used
	Warning                     // it can, but something in it looks wrong
)

// String returns "error" or "warning".
func (s Severity) String() string {
	switch s {
	case Error:
		return "error"
	case Warning:
		return "warning"
	}
	return "severity 0"
}

// Diagnostic is one problem of a description.
type Diagnostic struct {
	Severity Severity
	Code     string // stable, one of Codes
	Summary  string // a noun phrase without a full stop
	Detail   string // sentences: what was expected and what to write
	At       Span
	Related  []Related // other places that matter, such as the first definition
}

// Related is a further place of a diagnostic.
type Related struct {
	At      Span
	Message string // "first given here"
}

// List is a list of diagnostics.
type List []Diagnostic

// HasErrors reports whether any of l is an Error.
func (l List) HasErrors() bool {
	return slices.ContainsFunc(l, func(d Diagnostic) bool { return d.Severity == Error })
}

// Sort puts l in its one printing order: file, line, column, code, detail.
func (l List) Sort() { slices.SortStableFunc(l, compare) }

func compare(a, b Diagnostic) int {
	return cmp.Or(cmp.Compare(a.At.File, b.At.File), cmp.Compare(a.At.Line, b.At.Line), cmp.Compare(a.At.Col, b.At.Col),
		cmp.Compare(a.Code, b.Code), cmp.Compare(a.Summary, b.Summary), cmp.Compare(a.Detail, b.Detail))
}

// A mistake behind an anchor is met once for every alias; it is reported once.
func (l List) sorted() List {
	l.Sort()
	return slices.CompactFunc(l, func(a, b Diagnostic) bool { return compare(a, b) == 0 })
}
