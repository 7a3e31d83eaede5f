package audit

import (
	"fmt"

	"gloamwright/layout/ink"
	"gloamwright/layout/sheet"
)

// Rule is one rule of the audit.
type Rule string

// The rules, with the drawing practice that they follow.
const (
	RuleUnknown   Rule = "G1" // every stroke is a symbol, a line, a dot, a frame or a text
	RuleGrid      Rule = "G2" // pins, ends, bends and dots lie on the module grid
	RuleSquare    Rule = "G3" // lines run level or upright
	RuleWidth     Rule = "G4" // line widths are 0.18, 0.25, 0.35, 0.5 or 0.7 mm
	RuleField     Rule = "G5" // nothing outside the frame, nothing in the title block
	RuleOverlap   Rule = "L1" // no two lines lie on one another
	RuleEnd       Rule = "L2" // every end is a pin, a joint, a reference or a test point
	RuleDot       Rule = "L3" // a dot where three directions meet, and only there
	RuleFour      Rule = "L4" // no joint of four directions
	RuleBody      Rule = "L5" // no line through a symbol's body or past a foreign pin
	RuleCrossing  Rule = "L6" // crossings are square, a module or more from dots, bends and pins
	RuleLoop      Rule = "L7" // no ring of lines: one way only from pin to pin
	RuleText      Rule = "T1" // texts clear of one another, of lines and of symbols
	RuleHeight    Rule = "T2" // no text of the circuit under 2.5 mm
	RuleName      Rule = "T3" // every symbol bears its designation, nearer than any other
	RulePins      Rule = "N1" // every pin of the circuit that is drawn is drawn once
	RuleNet       Rule = "N2" // connected on paper exactly what the circuit connects
	RuleProbe     Rule = "N3" // test points on the potential that they stand for
	RuleReference Rule = "R1" // references come in pairs and name one another's place
	RuleContact   Rule = "R2" // contacts and coils name one another's place
)

// Fault is a breach of a rule at a place.
type Fault struct {
	Rule  Rule
	Sheet int
	Zone  string
	At    ink.Point
	What  string
}

// String is the fault as it is printed.
func (f Fault) String() string {
	return fmt.Sprintf("%s sheet %d zone %s: %s at (%.2f, %.2f)", f.Rule, f.Sheet, f.Zone, f.What, f.At.X, f.At.Y)
}

// Sheet is one page to judge.
type Sheet struct {
	Number  int
	Page    *Page
	Format  sheet.Format
	Circuit bool // a circuit diagram; an overview is judged for its texts only
}

// Want is what the circuit says that the set of sheets must show.
type Want struct {
	Pins   map[string]int // piece of every pin that must be drawn, by its name
	Probes map[string]int // piece of every test point, by label
}

// Judge reads the sheets and returns every fault, sheet by sheet. With a nil want
// only the drawing itself is judged.
func Judge(sheets []Sheet, want *Want) []Fault {
	var faults []Fault
	var readers []*reader
	for _, s := range sheets {
		r := newReader(s)
		r.texts()
		if s.Circuit {
			r.circuit()
			readers = append(readers, r)
		}
		faults = append(faults, r.faults...)
	}
	set := &set{readers: readers}
	set.references()
	if want != nil {
		set.compare(want)
	}
	return append(faults, set.faults...)
}
