// Package finding judges the facts of a site: one check a file. A finding says what
// must not be built, what needs care and what is worth knowing.
package finding

import (
	"cmp"
	"slices"

	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
)

// Severity ranks findings.
type Severity uint8

// The severities. The zero value is invalid, so that a forgotten one shows.
const (
	Stop    Severity = iota + 1 // must not be built
	Caution                     // needs care
	Note                        // worth knowing
)

// String returns the word that documents print.
func (s Severity) String() string {
	switch s {
	case Stop:
		return "stop"
	case Caution:
		return "caution"
	case Note:
		return "note"
	}
	return "invalid"
}

// Finding is the result of one check.
type Finding struct {
	Severity Severity
	Check    string // name of the check
	Subject  string // "-E15", "Boathouse"
	At       describe.Span
	Message  string // "-E15, Workshop: drop 4.95 %, limit 5 %"
	Remedy   string // with its own figure
	Value    float64
	Limit    float64
	Unit     string
	Source   string
	Over     bool // the limit is a lower one: Value should be at least Limit
}

// Check is one check. It keeps no state.
type Check struct {
	Name   string // stable, "lamp-drop"
	Title  string // lower case, no full stop
	Doc    string // what is checked and why
	Source string // standard and clause that the limit comes from
	Run    func(f *facts.Facts, report func(Finding))
}

// Judge runs all checks and returns the findings, gravest first; among equals what could
// not be sized at all, because much of the rest follows from it, then by the place in the
// file.
func Judge(f *facts.Facts) []Finding {
	var out []Finding
	for _, c := range All() {
		c.Run(f, func(x Finding) {
			x.Check = c.Name
			if x.Source == "" {
				x.Source = c.Source
			}
			out = append(out, x)
		})
	}
	slices.SortStableFunc(out, func(a, b Finding) int {
		return cmp.Or(cmp.Compare(a.Severity, b.Severity), cmp.Compare(follows(a), follows(b)), cmp.Compare(a.At.File, b.At.File), cmp.Compare(a.At.Line, b.At.Line),
			cmp.Compare(a.At.Col, b.At.Col), cmp.Compare(a.Check, b.Check), cmp.Compare(a.Subject, b.Subject))
	})
	return out
}

// NothingFits reports whether the finding is a step of sizing for which nothing fits, from
// which others may follow.
func (f Finding) NothingFits() bool { return f.Check == blocked.Name }

// follows is 0 for a step of sizing for which nothing fits, 1 for all else.
func follows(f Finding) int {
	if f.NothingFits() {
		return 0
	}
	return 1
}

// Entry is one line of the reference of checks.
type Entry struct{ Name, Title, Doc, Source string }

// Reference returns what docs/ prints about the checks, by name.
func Reference() []Entry {
	var out []Entry
	for _, c := range All() {
		out = append(out, Entry{c.Name, c.Title, c.Doc, c.Source})
	}
	return out
}
