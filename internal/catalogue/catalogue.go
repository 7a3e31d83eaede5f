// Package catalogue holds the published tables that the program computes with:
// conductors, ampacities, fuses, preferred values, battery classes, standard
// ratings, device classes, colours. One file holds one table.
//
// Every table says where its figures come from: an Evidence names the
// publication and whether its figures were read there (or on a page that
// reproduces it) or set down from memory. Where only memory serves, the more
// cautious of two figures is held, and the local code prevails.
//
// Tables are variables that nothing may write to; callers that need to change one
// copy it first.
package catalogue

// Evidence says where a figure comes from.
type Evidence struct {
	Source string // the publication, with table or clause
	Seen   bool   // false: set down from memory
	Note   string // what a careful reader should know; often empty
}

// String returns the source with its remark, ready to print.
func (e Evidence) String() string {
	if e.Seen || e.Source == "" || e.Source == CommonPractice.Source {
		return e.Source
	}
	return e.Source + " (from memory)"
}

// CommonPractice is the evidence of figures that the trade uses and no
// publication states.
var CommonPractice = Evidence{Source: "common practice, no source"}
