package release

import (
	"bytes"
	"encoding/json"
	"fmt"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/design"
)

// Notice compares an issued revision with a design made with the register's labels.
// It fails if the revision is not as it was issued. A nil base yields no notice.
func (p *Project) Notice(base *Issued, d *design.Design, schema *describe.Schema) (*design.Changes, error) {
	if base == nil {
		return nil, nil
	}
	old, err := base.record()
	if err != nil {
		return nil, err
	}
	was, err := base.site(schema)
	if err != nil {
		return nil, err
	}
	now, err := recordOf(d)
	if err != nil {
		return nil, err
	}
	found := compareDesign(old, was, now, d, schema)
	found.attribute(p.Register, was, d)
	c := found.notice()
	c.Revisions, err = p.revisions(c, d)
	return c, err
}

// mostRanges bounds the designations that are named beside a value of a luminaire type.
const mostRanges = 3

// nameLamps says beside each value of a luminaire type which lights are of that type.
func nameLamps(values []design.ValueChange, scopes []scope, now *record) {
	for i, s := range scopes {
		if s.lamp == "" {
			continue
		}
		var labels []string
		for _, l := range now.Luminaires {
			if l.Type == s.lamp {
				labels = append(labels, l.Designation)
			}
		}
		switch text := together(labels); {
		case len(labels) == 0:
		case strings.Count(text, ",") < mostRanges:
			values[i].What += ", " + text
		default:
			values[i].What += fmt.Sprintf(", %d lights", len(labels))
		}
	}
}

// revisions lists the issued revisions up to the one that c leads to.
func (p *Project) revisions(c *design.Changes, d *design.Design) ([]design.Revision, error) {
	var out []design.Revision
	for _, r := range p.Issued {
		if compareRevisions(r.Revision, c.To) >= 0 {
			break
		}
		rec, err := r.record()
		if err != nil {
			return nil, err
		}
		why := firstIssue
		if r.Revision != NextRevision("") {
			n, err := r.notice()
			if err != nil {
				return nil, err
			}
			why = n.Why
		}
		out = append(out, design.Revision{Index: r.Revision, Issued: rec.Job.Date, Why: why, By: rec.Job.Prepared})
	}
	j := d.Site.Job
	return append(out, design.Revision{Index: c.To, Issued: j.Date.Val, Why: why(c), By: j.Prepared.Val}), nil
}

const firstIssue = "First issue"

// mostReasons bounds the values that the line of a revision names.
const mostReasons = 3

// why says in one line what a revision changes.
func why(c *design.Changes) string {
	var parts []string
	for i, v := range c.Values {
		if i == mostReasons {
			parts = append(parts, fmt.Sprintf("and %d more", len(c.Values)-i))
			break
		}
		text := v.What + ": "
		switch {
		case v.Was == "":
			text += v.Is + " added"
		case v.Is == "":
			text += "taken away"
		default:
			text += v.Was + " to " + v.Is
		}
		if v.Why != "" {
			text += " (" + v.Why + ")"
		}
		parts = append(parts, text)
	}
	if len(parts) == 0 {
		return "Computed anew; no value changed"
	}
	return strings.Join(parts, "; ")
}

// Unchanged reports whether a notice has nothing to say.
func Unchanged(c *design.Changes) bool {
	return len(c.Values) == 0 && len(c.Work) == 0 && len(c.Rows) == 0 && len(c.Readings) == 0 && len(c.Raised) == 0 && len(c.Cleared) == 0
}

// noticeDocument is changes.json. Its keys stand in this order.
type noticeDocument struct {
	Gloamwright int             `json:"gloamwright"`
	From        string          `json:"from"`
	To          string          `json:"to"`
	Why         string          `json:"why"`
	Values      []noticeValue   `json:"values"`
	Work        []noticeWork    `json:"work"`
	Labels      noticeLabels    `json:"labels"`
	Readings    []noticeReading `json:"readings"`
	Findings    noticeFindings  `json:"findings"`
	Figures     []string        `json:"figures_moved"`
	Stays       []noticeStay    `json:"stays"`
}

type noticeValue struct {
	Number int    `json:"number"`
	Path   string `json:"path"`
	What   string `json:"what"`
	Was    string `json:"was"`
	Is     string `json:"is"`
	Why    string `json:"why"`
}

type noticeWork struct {
	Tool   string   `json:"tool"`
	What   string   `json:"what"`
	Labels []string `json:"labels"`
	Do     string   `json:"do"`
	Was    string   `json:"was"`
	Is     string   `json:"is"`
	From   []int    `json:"from"`
	Test   string   `json:"test,omitempty"`
}

type noticeLabels struct {
	Print  []string `json:"print"`
	Remove []string `json:"remove"`
}

type noticeReading struct {
	Point     string `json:"point"`
	Condition string `json:"condition"`
	Was       string `json:"was"`
	Is        string `json:"is"`
}

type noticeFindings struct {
	New  []noticeFinding `json:"new"`
	Gone []noticeFinding `json:"gone"`
}

type noticeFinding struct {
	Severity string `json:"severity"`
	Subject  string `json:"subject"`
	Message  string `json:"message"`
}

type noticeStay struct {
	Things string `json:"things"`
	Count  int    `json:"count"`
	Of     int    `json:"of"`
	Text   string `json:"text"`
}

// NoticeJSON writes a change notice as data. The same notice gives the same bytes.
func NoticeJSON(c *design.Changes) ([]byte, error) {
	out := noticeDocument{
		Gloamwright: resultsVersion, From: c.From, To: c.To, Why: why(c),
		Values: []noticeValue{}, Work: []noticeWork{}, Readings: []noticeReading{}, Stays: []noticeStay{},
		Labels:   noticeLabels{Print: listOf(c.New.All()), Remove: listOf(c.Gone.All())},
		Findings: noticeFindings{New: findingsOf(c.Raised), Gone: findingsOf(c.Cleared)},
		Figures:  listOf(circuit.SortedKeys(c.Rows)),
	}
	for _, v := range c.Values {
		out.Values = append(out.Values, noticeValue(v))
	}
	for _, w := range c.Work {
		out.Work = append(out.Work, noticeWork{Tool: w.Tool, What: w.What, Labels: listOf(w.Labels), Do: w.Do, Was: w.Was, Is: w.Is, From: listOf(w.Causes), Test: w.Test})
	}
	for _, r := range c.Readings {
		out.Readings = append(out.Readings, noticeReading(r))
	}
	for _, s := range c.Stays {
		out.Stays = append(out.Stays, noticeStay{Things: s.Things, Count: s.Count, Of: s.Of, Text: s.Text})
	}
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	e.SetIndent("", " ")
	if err := e.Encode(out); err != nil {
		return nil, fmt.Errorf("%s: %w", noticeFile, err)
	}
	return b.Bytes(), nil
}

func findingsOf(list []design.FindingChange) []noticeFinding {
	out := []noticeFinding{}
	for _, f := range list {
		out = append(out, noticeFinding(f))
	}
	return out
}

func listOf[T any](s []T) []T {
	if s == nil {
		return []T{}
	}
	return s
}

// notice returns the change notice that was issued with a revision.
func (r *Issued) notice() (*noticeDocument, error) {
	data, err := r.checked(noticeFile)
	if err != nil {
		return nil, err
	}
	var n noticeDocument
	if err := json.Unmarshal(data, &n); err != nil {
		return nil, damaged("The change notice of revision %s cannot be read: %v.", r.Revision, err)
	}
	return &n, nil
}
