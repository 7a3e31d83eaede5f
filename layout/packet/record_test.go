package packet

import (
	"fmt"
	"strings"
	"testing"

	"gloamwright/internal/commission"
	"gloamwright/internal/design"
)

// taken fills a readings sheet: what value returns for each line, empty for not taken.
func taken(t *testing.T, d *design.Design, value func(i int, l commission.Line) string) *commission.Record {
	t.Helper()
	lines := commission.Lines(d)
	f := &commission.Filled{Job: d.Site.Job.Number.Val, Revision: d.Site.Job.Revision.Val, Sheet: commission.Fingerprint(lines),
		Tester: "I. Rowan", Meter: "4417-09", Date: "2026-12-04"}
	for i, l := range lines {
		f.Readings = append(f.Readings, commission.Reading{Condition: l.Condition, Point: l.Point, Text: value(i, l)})
	}
	r, err := commission.Accept(d, f)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

func asTypical(_ int, l commission.Line) string { return fmt.Sprintf("%.1f V", l.Typical) }

func TestRecordPassed(t *testing.T) {
	for _, name := range examples {
		d := example(t, name)
		d.Issued = true
		r := taken(t, d, asTypical)
		p, err := buildRecord(d, r)
		if err != nil {
			t.Fatal(err)
		}
		text := textOf(p, keyRecord)
		for _, want := range []string{"PASSED", "Nothing is open", "I. Rowan", "4417-09", "2026-12-04", fmt.Sprint(len(r.Judged))} {
			if !strings.Contains(text, want) {
				t.Errorf("%s: the record does not say %q", name, want)
			}
		}
		points := 0
		for _, tp := range d.Circuit.TestPoints {
			points += countOf(p, keyRecord)[tp.Label]
		}
		if points != len(r.Judged) {
			t.Errorf("%s: %d readings are printed, %d were judged", name, points, len(r.Judged))
		}
	}
}

// Nothing passes by being absent: a reading that is outside, missing or turned round is
// listed, and the record says how many.
func TestRecordOpen(t *testing.T) {
	d := example(t, "bracken-reach")
	d.Issued = true
	live := 0
	r := taken(t, d, func(i int, l commission.Line) string {
		if l.Low <= 1 {
			return asTypical(i, l)
		}
		live++
		switch live {
		case 1:
			return fmt.Sprintf("%.1f V", l.Low-2)
		case 2:
			return ""
		case 3:
			return fmt.Sprintf("-%.1f V", l.Typical)
		}
		return asTypical(i, l)
	})
	if r.Open != 3 {
		t.Fatalf("%d open points, want 3", r.Open)
	}
	p, err := buildRecord(d, r)
	if err != nil {
		t.Fatal(err)
	}
	text := textOf(p, keyRecord)
	if strings.Contains(text, "PASSED") || !strings.Contains(text, "OPEN POINTS: 3") {
		t.Error("the status is not OPEN POINTS: 3")
	}
	for _, j := range r.Judged {
		line := fmt.Sprintf("%s, condition %d", j.Point, j.Number)
		if listed := strings.Contains(text, line+" "); listed != (j.Verdict != commission.Inside) {
			t.Errorf("%s is %s; listed as open: %v", line, j.Verdict, listed)
		}
	}
	if strings.Contains(text, "Nothing is open") {
		t.Error("the record says that nothing is open")
	}
}

// A plant that must not be built has no record without the black bar.
func TestRecordOfBlockedDesign(t *testing.T) {
	d := stopped(t)
	p, err := buildRecord(d, taken(t, d, asTypical))
	if err != nil {
		t.Fatal(err)
	}
	if text := textOf(p, keyRecord); !strings.Contains(text, notForConstruction) || strings.Contains(text, "PASSED") {
		t.Error("the record of a blocked design lacks the black bar, or says PASSED")
	}
}

// Text of a record stays inside the margins and apart, on both papers.
func TestRecordIsClean(t *testing.T) {
	for _, name := range examples {
		for _, paper := range []string{"iso", "ansi"} {
			d := example(t, name)
			site := *d.Site
			site.Practice.Paper.Val = paper
			d.Facts = copyFacts(d.Facts)
			d.Facts.Site = &site
			i := 0
			r := taken(t, d, func(k int, l commission.Line) string {
				i++
				switch {
				case l.Low > 1 && i%5 == 0:
					return fmt.Sprintf("%.1f V", l.Low-0.7)
				case l.Low > 1 && i%7 == 0:
					return fmt.Sprintf("-%.1f V", l.Typical)
				case i%11 == 0:
					return ""
				}
				return asTypical(k, l)
			})
			p, err := buildRecord(d, r)
			if err != nil {
				t.Fatal(err)
			}
			pg, side := pages(paper)
			checkSheets(t, p, pg, side)
		}
	}
}
