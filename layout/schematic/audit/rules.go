package audit

import (
	"fmt"

	"gloamwright/layout/ink"
	"gloamwright/layout/sheet"
)

// Rule is one rule of the audit.
type Rule string

// The rules.
const (
	RuleUnknown   Rule = "G1"
	RuleGrid      Rule = "G2"
	RuleSquare    Rule = "G3"
	RuleWidth     Rule = "G4"
	RuleField     Rule = "G5"
	RuleOverlap   Rule = "L1"
	RuleEnd       Rule = "L2"
	RuleDot       Rule = "L3"
	RuleFour      Rule = "L4"
	RuleBody      Rule = "L5"
	RuleCrossing  Rule = "L6"
	RuleLoop      Rule = "L7"
	RuleText      Rule = "T1"
	RuleHeight    Rule = "T2"
	RuleName      Rule = "T3"
	RulePins      Rule = "N1"
	RuleNet       Rule = "N2"
	RuleProbe     Rule = "N3"
	RuleReference Rule = "R1"
	RuleContact   Rule = "R2"
)

// Rules says what each rule asks for (drawing practice).
var Rules = []struct {
	Rule Rule
	What string
}{
	{RuleUnknown, "every stroke is a symbol, a line, a dot, a frame or a text"},
	{RuleGrid, "pins, ends, bends and dots lie on the module grid"},
	{RuleSquare, "lines run level or upright"},
	{RuleWidth, "line widths are 0.18, 0.25, 0.35, 0.5 or 0.7 mm"},
	{RuleField, "nothing outside the frame, nothing in the title block"},
	{RuleOverlap, "no two lines lie on one another"},
	{RuleEnd, "every end is a pin, a joint, a reference or a test point"},
	{RuleDot, "a dot where three directions meet, and only there"},
	{RuleFour, "no joint of four directions"},
	{RuleBody, "no line through a symbol's body or past a foreign pin"},
	{RuleCrossing, "crossings are square, a module or more from dots, bends and pins"},
	{RuleLoop, "no ring of lines: one way only from pin to pin"},
	{RuleText, "texts clear of one another, of lines and of symbols"},
	{RuleHeight, "no text of the circuit under 2.5 mm"},
	{RuleName, "every symbol bears its designation, nearer than any other"},
	{RulePins, "every pin of the circuit that is drawn is drawn once"},
	{RuleNet, "connected on paper exactly what the circuit connects"},
	{RuleProbe, "test points on the potential that they stand for"},
	{RuleReference, "references come in pairs and name one another's place"},
	{RuleContact, "contacts and coils name one another's place"},
}

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

	Moved int // labels that do not stand in their first place, as the drawing says
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
