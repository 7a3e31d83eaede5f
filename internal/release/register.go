package release

import (
	"cmp"
	"maps"
	"regexp"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
)

// Register is every label given to the things of one description, up to its last
// issued revision. A label never moves to another thing and is never used again.
type Register struct {
	Revisions []string // issued, in order
	// Texts holds, by revision, the checksum of the firm's texts that it was made with; a
	// revision without texts of the firm has none.
	Texts map[string]string
	// Labels holds the labels in use by stable key. A key begins with the sort of thing:
	// "part/store/battery", "terminal-X1/guard/terminal/cabinet/in".
	Labels  circuit.Labels
	Retired []Retired          // labels of things that are gone
	Ways    map[string]Way     // by lighting circuit
	Feeders map[string]Way     // by board that hangs on another
	Points  map[string][]Point // by lighting circuit, each after the one it hangs on
}

// Retired is a label that was given and whose thing is gone.
type Retired struct {
	Sort, Label string
	Last        string // the last revision that had it
}

// Way is a fused way of a board.
type Way struct {
	Board  string
	Number int
}

// sortOf splits a key of a label into the sort of thing and the rest.
func sortOf(id string) (sort, key string) {
	sort, key, _ = strings.Cut(id, "/")
	return sort, key
}

// labelForms says what a label of each sort looks like.
var labelForms = []struct {
	sort, form string
	re         *regexp.Regexp
}{
	{"part", "-F1", regexp.MustCompile(`^-[A-Z]{1,2}[1-9][0-9]*$`)},
	{"cable", "-W1", regexp.MustCompile(`^-W[1-9][0-9]*$`)},
	{"strip", "-X1", regexp.MustCompile(`^-X[1-9][0-9]*$`)},
	{"tp", "TP1", regexp.MustCompile(`^TP[1-9][0-9]*$`)},
	{"wire", "31", regexp.MustCompile(`^(?:[1-9][0-9]*|W?[1-9][0-9]*[+−]|(?:[1-9][0-9]*)?L[+−]\.[1-9][0-9]*|P[0-9]*\+\.[1-9][0-9]*)$`)},
	{"rail", "1L+", regexp.MustCompile(`^(?:[1-9][0-9]*L|P[0-9]*)\+$`)},
	{"place", "+A1", regexp.MustCompile(`^\+[A-Z][1-9][0-9]*$`)},
}

var stripForm = regexp.MustCompile(`^terminal(-X[1-9][0-9]*)$`)

// badLabel returns what a label of that sort looks like, if label does not; known is
// false if there is no such sort.
func badLabel(sort, label string) (like string, known bool) {
	if m := stripForm.FindStringSubmatch(sort); m != nil {
		number, ok := strings.CutPrefix(label, m[1]+":")
		if ok && regexp.MustCompile(`^[1-9][0-9]*$`).MatchString(number) {
			return "", true
		}
		return m[1] + ":1", true
	}
	for _, f := range labelForms {
		if f.sort == sort {
			if f.re.MatchString(label) {
				return "", true
			}
			return f.form, true
		}
	}
	return "", false
}

// Last returns the last issued revision, "" if there is none.
func (r *Register) Last() string {
	if r == nil || len(r.Revisions) == 0 {
		return ""
	}
	return r.Revisions[len(r.Revisions)-1]
}

// Next returns the register after revision was issued with the labels now given to
// the things of c. r may be nil: nothing was issued before.
func (r *Register) Next(revision string, labels circuit.Labels, site *describe.Site, c *circuit.Circuit) *Register {
	n := &Register{
		Labels: labels, Ways: map[string]Way{}, Feeders: map[string]Way{}, Points: map[string][]Point{},
	}
	if r != nil {
		n.Revisions = slices.Clone(r.Revisions)
		n.Texts = maps.Clone(r.Texts)
		n.Retired = slices.Clone(r.Retired)
		type given struct{ sort, label string }
		inUse := map[given]bool{}
		for _, id := range circuit.SortedKeys(labels) {
			sort, _ := sortOf(id)
			inUse[given{sort, labels[id]}] = true
		}
		for _, id := range circuit.SortedKeys(r.Labels) {
			if sort, _ := sortOf(id); !inUse[given{sort, r.Labels[id]}] {
				n.Retired = append(n.Retired, Retired{sort, r.Labels[id], r.Last()})
			}
		}
		slices.SortFunc(n.Retired, func(a, b Retired) int {
			return cmp.Or(cmp.Compare(a.Sort, b.Sort), compareLabels(a.Label, b.Label))
		})
	}
	n.Revisions = append(n.Revisions, revision)
	for _, b := range c.Boards {
		for _, w := range b.Ways {
			switch {
			case w.Lighting != nil:
				n.Ways[w.Lighting.Name] = Way{b.Name, w.Number}
			case w.Feeds != nil:
				n.Feeders[w.Feeds.Name] = Way{b.Name, w.Number}
			}
		}
	}
	for _, l := range site.Circuits {
		n.Points[l.Name.Val] = pointsOf(l)
	}
	return n
}

// compareLabels orders labels as people count: -W2 before -W10.
func compareLabels(a, b string) int {
	for a != "" && b != "" {
		x, y := digits(a), digits(b)
		if x > 0 && y > 0 {
			m, n := strings.TrimLeft(a[:x], "0"), strings.TrimLeft(b[:y], "0")
			if c := cmp.Or(cmp.Compare(len(m), len(n)), cmp.Compare(m, n)); c != 0 {
				return c
			}
			a, b = a[x:], b[y:]
			continue
		}
		if a[0] != b[0] {
			return cmp.Compare(a[0], b[0])
		}
		a, b = a[1:], b[1:]
	}
	return cmp.Compare(len(a), len(b))
}

// digits returns how many digits s starts with.
func digits(s string) int { return len(s) - len(strings.TrimLeft(s, "0123456789")) }
