package design

// Changes is what a revision makes a technician redo.
type Changes struct {
	From, To string // revision letters
	Values   []ValueChange
	Work     []WorkItem // in the order in which it is done
	Stays    []Stay
	// Touched holds the labels of everything at which something is to be done; their
	// rows and symbols are marked as changed.
	Touched map[string]bool
	// Rows holds the labels of things that stay as they are, but whose printed figures
	// differ: a fuse with another load, a wire with another current.
	Rows      map[string]bool
	Readings  []ReadingChange
	New, Gone LabelList
	// Raised and Cleared are the findings that only the new revision has, and only the
	// old one.
	Raised, Cleared []FindingChange
	Revisions       []Revision // this one last
}

// LabelList is what to print or to take off, each list in order.
type LabelList struct{ Parts, Cables, Wires, Points []string }

// All returns every label of l.
func (l LabelList) All() []string {
	var out []string
	for _, list := range [][]string{l.Parts, l.Cables, l.Wires, l.Points} {
		out = append(out, list...)
	}
	return out
}

// Moved reports whether the band of a reading differs from the revision before: it is
// to be taken again. condition is the condition's key.
func (c *Changes) Moved(point, condition string) bool {
	for _, r := range c.Readings {
		if r.Point == point && r.Condition == condition {
			return true
		}
	}
	return false
}

// Revision is one line of the revision table.
type Revision struct{ Index, Issued, Why, Sheets, By string }

// ValueChange is one value of the description that changed.
type ValueChange struct {
	Number int
	Path   string // "stages.annex.along", "circuits.Hall.points.2"
	What   string // in words
	Was    string // "" if it was not there
	Is     string // "" if it is gone
	Why    string // the remark that stands behind it in the description
}

// The tools of work items, in the order in which a technician takes them up.
const (
	ReCut       = "re-cut"
	Replace     = "replace"
	ReTerminate = "re-terminate"
	ReFuse      = "re-fuse"
	Adjust      = "adjust"
	Relabel     = "relabel"
	TestAgain   = "test again"
)

// Tools lists the tools in that order.
var Tools = []string{ReCut, Replace, ReTerminate, ReFuse, Adjust, Relabel, TestAgain}

// WorkItem is one thing to do because of it.
type WorkItem struct {
	Tool    string   // one of Tools
	What    string   // designations, put together: "-E13…-E15"
	Labels  []string // the same, one by one
	Do      string
	Was, Is string
	From    int   // number of the ValueChange, 0 if several force it
	Causes  []int // numbers of all that can force it
	// Test names the kind of test of an item to test again: one of Tests.
	Test string
}

// The kinds of tests that are repeated.
const (
	TestLoop      = "loop"      // resistance of a run, far end joined
	TestInsulate  = "insulate"  // between the cores and to earth
	TestPolarity  = "polarity"  // at lamps and boards
	TestFuse      = "fuse"      // rating in its place against the fuse map
	TestLoad      = "load"      // current of a circuit
	TestSetting   = "setting"   // of a charger, cut-off, sensor
	TestFunction  = "function"  // what is lit when
	TestEndurance = "endurance" // discharge to the end
	TestReadings  = "readings"  // at test points
)

// Stay is a kind of thing that needs no touching.
type Stay struct {
	Count, Of int
	Things    string
	Text      string
}

// ReadingChange is a band that moved, as it is printed.
type ReadingChange struct {
	Point, Condition string // "TP3", key of the condition
	Was, Is          string // "23.9 to 24.6 V"; Was is "" for a new test point
}

// FindingChange is a finding that one revision has and the other has not.
type FindingChange struct{ Severity, Subject, Message string }
