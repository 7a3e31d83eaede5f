package commission_test

import (
	"bytes"
	"fmt"
	"os"
	"strings"
	"testing"

	"gloamwright/internal/commission"
	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/sitegen"
	"gloamwright/internal/stage"
)

func example(t *testing.T, name string) *design.Design {
	t.Helper()
	file := name + ".yaml"
	src, err := os.ReadFile("../../examples/" + file)
	if err != nil {
		t.Fatal(err)
	}
	site, list := describe.Parse(file, src, stage.Schema())
	if list.HasErrors() {
		t.Fatal(list)
	}
	d, err := design.Make(site, nil)
	if err != nil {
		t.Fatal(err)
	}
	return d
}

// fill writes readings into a sheet: what value returns, empty for not taken.
func fill(d *design.Design, value func(l commission.Line) string) []byte {
	text := string(commission.YAML(d))
	var out []string
	i := 0
	lines := commission.Lines(d)
	for _, row := range strings.Split(text, "\n") {
		if strings.Contains(row, "measured: }") {
			row = strings.Replace(row, "measured: }", "measured: "+value(lines[i])+"}", 1)
			i++
		}
		out = append(out, row)
	}
	return []byte(strings.Join(out, "\n"))
}

func typical(l commission.Line) string { return fmt.Sprintf("%.2f V", l.Typical) }

func accept(t *testing.T, d *design.Design, src []byte) *commission.Record {
	t.Helper()
	f, list := commission.Read("site.readings.yaml", src)
	if list.HasErrors() {
		t.Fatal(list)
	}
	r, err := commission.Accept(d, f)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

func TestTypicalReadingsPass(t *testing.T) {
	for _, name := range []string{"bracken-reach", "juniper-flat"} {
		d := example(t, name)
		r := accept(t, d, fill(d, typical))
		if !r.Passed || r.Open != 0 {
			for _, j := range r.Judged {
				if j.Verdict != commission.Inside {
					t.Errorf("%s %s %s: %s of %.1f..%.1f is %s", name, j.Condition, j.Point, j.Text, j.Low, j.High, j.Verdict)
				}
			}
			t.Errorf("%s: typical readings must pass, %d open", name, r.Open)
		}
	}
}

// An empty sheet, and a sheet with one line taken out, must not pass.
func TestNothingPassesByBeingAbsent(t *testing.T) {
	d := example(t, "juniper-flat")
	r := accept(t, d, commission.YAML(d))
	if r.Passed || r.Open != len(commission.Lines(d)) {
		t.Errorf("an empty sheet: passed %v, %d open of %d", r.Passed, r.Open, len(commission.Lines(d)))
	}
	var kept []string
	for _, row := range strings.Split(string(fill(d, typical)), "\n") {
		if !strings.HasPrefix(strings.TrimSpace(row), "TP3:") {
			kept = append(kept, row)
		}
	}
	r = accept(t, d, []byte(strings.Join(kept, "\n")))
	missing := 0
	for _, j := range r.Judged {
		if j.Verdict == commission.Missing {
			missing++
			if j.Point != "TP3" {
				t.Errorf("%s counts as missing", j.Point)
			}
		}
	}
	if r.Passed || missing == 0 {
		t.Errorf("with TP3 taken out: passed %v, %d missing", r.Passed, missing)
	}
}

func TestSlips(t *testing.T) {
	d := example(t, "bracken-reach")
	at := func(point, condition, text string) commission.Judged {
		r := accept(t, d, fill(d, func(l commission.Line) string {
			if l.Point == point && l.Condition == condition {
				return text
			}
			return typical(l)
		}))
		for _, j := range r.Judged {
			if j.Point == point && j.Condition == condition {
				return j
			}
		}
		t.Fatalf("no %s in %s", point, condition)
		return commission.Judged{}
	}
	for _, c := range []struct {
		text string
		want commission.Verdict
	}{
		{"25.4 V", commission.Inside},
		{"25.4", commission.Inside}, // the column is in volts
		{"25400 mV", commission.Inside},
		{"25.4 mV", commission.UnitSlip},
		{"25400 V", commission.UnitSlip},
		{"-25.4 V", commission.Swapped},
		{"−25.4 V", commission.Swapped},
		{"19 V", commission.Outside},
		{"a lot", commission.Unreadable},
		{"25.4 A", commission.Unreadable},
	} {
		if got := at("TP3", "outage-night", c.text); got.Verdict != c.want {
			t.Errorf("%q: %s (%s), want %s", c.text, got.Verdict, got.Says, c.want)
		}
	}
}

// Readings taken from the fault study itself must lead back to that fault.
func TestFaultsAreFound(t *testing.T) {
	d := example(t, "bracken-reach")
	first, among := 0, 0
	tried := 0
	for _, f := range d.Faults {
		if len(f.Moved) == 0 {
			continue
		}
		tried++
		r := accept(t, d, fill(d, func(l commission.Line) string {
			for _, m := range f.Moved {
				if m.Point == l.Point && m.Condition == l.Condition {
					return fmt.Sprintf("%.3f V", float64(m.Volt))
				}
			}
			return typical(l)
		}))
		for i, l := range r.Likely {
			if l.What == f.What {
				among++
				if i == 0 {
					first++
				}
			}
		}
	}
	if tried < 20 {
		t.Fatalf("only %d faults move a reading", tried)
	}
	// Some faults move the same readings to the same values: an open fuse and the short
	// that blew it. They cannot be told apart by volts.
	if among < tried*9/10 || first < tried/2 {
		t.Errorf("of %d faults %d came first, %d among the likely", tried, first, among)
	}
	t.Logf("%d faults, %d first, %d among the likely", tried, first, among)
}

func TestAnotherDesignIsRefused(t *testing.T) {
	d := example(t, "bracken-reach")
	f, _ := commission.Read("x.yaml", commission.YAML(example(t, "juniper-flat")))
	if _, err := commission.Accept(d, f); err == nil {
		t.Error("readings of another job were accepted")
	}
	f, _ = commission.Read("x.yaml", []byte(strings.Replace(string(commission.YAML(d)), "sheet: ", "sheet: 0", 1)))
	if _, err := commission.Accept(d, f); err == nil {
		t.Error("readings against other bands were accepted")
	}
}

func TestCSVIsTheSameSheet(t *testing.T) {
	d := example(t, "juniper-flat")
	src, err := commission.CSV(d)
	if err != nil {
		t.Fatal(err)
	}
	rows := strings.Split(strings.TrimRight(string(src), "\n"), "\n")
	for i := 3; i < len(rows); i++ {
		rows[i] += fmt.Sprintf("%.2f", commission.Lines(d)[i-3].Typical)
	}
	f, list := commission.Read("site.readings.csv", []byte(strings.Join(rows, "\n")))
	if list.HasErrors() {
		t.Fatal(list)
	}
	r, err := commission.Accept(d, f)
	if err != nil {
		t.Fatal(err)
	}
	if !r.Passed {
		t.Errorf("%d open", r.Open)
	}
}

func TestBrokenSheets(t *testing.T) {
	for _, c := range []struct{ name, src, want string }{
		{"not YAML", "a: [b", "not readable"},
		{"a list", "- a\n- b\n", "not a readings sheet"},
		{"twice", "revision: A\nrevision: B\n", "repeated: revision"},
		{"no lines", "end: 3\n", "no readings under end"},
	} {
		_, list := commission.Read("x.yaml", []byte(c.src))
		if !list.HasErrors() || !strings.Contains(list[0].Summary, c.want) {
			t.Errorf("%s: %v, want %q", c.name, list, c.want)
		}
	}
}

// A relay that may stand either way: readings in either position pass, one between the
// two does not, and the sheet says both.
func TestEitherWayPasses(t *testing.T) {
	// A general-purpose relay picks up too late for the follower that holds it.
	src := bytes.Replace(sitegen.Site(10, sitegen.Options{Control: sitegen.Follower}), []byte("kind: changeover-relay,"), []byte("kind: changeover-relay, class: general,"), 1)
	site, list := describe.Parse("site.yaml", src, stage.Schema())
	if list.HasErrors() {
		t.Fatal(list)
	}
	d, err := design.Make(site, nil)
	if err != nil {
		t.Fatal(err)
	}
	both := 0
	for _, l := range commission.Lines(d) {
		both += len(l.Or)
	}
	if both == 0 {
		t.Fatal("no line has two bands")
	}
	if text := string(commission.YAML(d)); strings.Count(text, " V with -K1 let go") != both {
		t.Errorf("the sheet does not say %d times what -K1 let go gives", both)
	}
	in := func(pick func(l commission.Line) float64) int {
		r := accept(t, d, fill(d, func(l commission.Line) string { return fmt.Sprintf("%.2f V", pick(l)) }))
		return r.Open
	}
	if n := in(func(l commission.Line) float64 { return l.Typical }); n != 0 {
		t.Errorf("held in: %d open", n)
	}
	other := func(l commission.Line) float64 {
		if len(l.Or) > 0 {
			return (l.Or[0].Low + l.Or[0].High) / 2
		}
		return l.Typical
	}
	if n := in(other); n != 0 {
		t.Errorf("let go: %d open", n)
	}
	middle := func(l commission.Line) float64 {
		if len(l.Or) > 0 {
			return (l.High + l.Or[0].Low) / 2
		}
		return l.Typical
	}
	if n := in(middle); n != both {
		t.Errorf("between the two: %d open, want %d", n, both)
	}
}
