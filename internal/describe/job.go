package describe

import (
	"fmt"
	"strings"
	"time"

	"gopkg.in/yaml.v3"
)

// version is the version of the description language that this program reads.
const version = "1"

// description reads the top of the file. Names are resolved afterwards, so that the
// order of its keys does not matter.
func (d *decoder) description(top *yaml.Node) {
	d.mapping(top, d.src.start(), "A description", d.topFields())
}

func (d *decoder) topFields() []field {
	return []field{
		{"gloamwright", true, d.readVersion},
		{"job", true, d.readJob},
		{"practice", false, d.readPractice},
		{"duty", true, d.readDuty},
		{"stages", true, d.readStages},
		{"luminaires", true, d.readLuminaires},
		{"circuits", true, d.readCircuits},
		{"parts", false, d.readParts},
		{"test_points", false, d.readTestPoints},
	}
}

func (d *decoder) readVersion(e entry) {
	v, ok := d.scalar(e.val, "gloamwright")
	if ok && v != version {
		d.report(codeVersion, "unknown version", d.src.of(e.val),
			fmt.Sprintf("This program reads version %s of the description language: write gloamwright: %s.", version, version))
	}
}

func (d *decoder) readJob(e entry) { d.mapping(e.val, e.at, "job", d.jobFields()) }

func (d *decoder) jobFields() []field {
	j := &d.site.Job
	return []field{
		{"number", true, d.text(&j.Number, checkJobNumber)},
		{"title", true, d.text(&j.Title, title)},
		{"client", false, d.text(&j.Client, title)},
		{"site", false, d.text(&j.Site, title)},
		{"prepared", false, d.text(&j.Prepared, title)},
		{"revision", false, d.text(&j.Revision, checkRevision)},
		{"date", false, d.text(&j.Date, checkDate)},
	}
}

// maxTitle is how many characters of a line fit the title block.
const maxTitle = 120

func title(s string) error { return checkText(s, maxTitle) }

// text reads a single value that check accepts.
func (d *decoder) text(dst *At[string], check func(string) error) func(entry) {
	return func(e entry) {
		if s, ok := d.scalar(e.val, e.key); ok {
			d.put(dst, e, s, check)
		}
	}
}

func (d *decoder) put(dst *At[string], e entry, s string, check func(string) error) {
	at := d.src.of(e.val)
	if err := check(s); err != nil {
		d.fail(at, err)
		return
	}
	*dst = At[string]{Val: s, Pos: at, Given: true}
}

// fail reports an error of reading one value.
func (d *decoder) fail(at Span, err error) {
	code, summary, detail := diagnose(err)
	d.report(code, summary, at, detail)
}

// checkRevision accepts one or two capital letters without I and O, which are taken
// for digits (ISO 7200 leaves the mark to the firm; the two letters are left out by
// common practice).
func checkRevision(s string) error {
	bad := func(why string) error {
		return &valueError{codeText, "bad revision", fmt.Sprintf("%q %s. A revision is a capital letter, A to Z without I and O, or two of them.", clip(s), why)}
	}
	if len(s) == 0 || len(s) > 2 {
		return bad("is no revision")
	}
	for _, c := range s {
		switch {
		case c == 'I' || c == 'O':
			return bad(fmt.Sprintf("has the letter %c, which is taken for a digit", c))
		case c >= 'a' && c <= 'z':
			return bad("is not in capitals")
		case c < 'A' || c > 'Z':
			return bad("is no revision")
		}
	}
	return nil
}

// checkDate accepts a date of ISO 8601 in its extended form.
func checkDate(s string) error {
	if _, err := time.Parse(time.DateOnly, s); err == nil {
		return nil
	}
	detail := fmt.Sprintf("%q is not a date: write year-month-day, such as 2026-12-01.", clip(s))
	if strings.Count(s, "-") == 2 && len(s) == len(time.DateOnly) && strings.Trim(s, "0123456789-") == "" {
		detail = fmt.Sprintf("%q is not in the calendar: write year-month-day, such as 2026-12-01.", s)
	}
	return &valueError{codeText, "bad date", detail}
}
