package packet

import (
	"bytes"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"gloamwright/internal/design"
	"gloamwright/internal/finding"
	"gloamwright/internal/release"
	"gloamwright/internal/stage"
)

// revised designs bracken-reach again with some text of its description replaced, as
// revision B, and compares it with the first.
func revised(t *testing.T, replace ...string) *design.Design {
	t.Helper()
	path := filepath.Join("..", "..", "examples", "bracken-reach.yaml")
	src, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	was := made(t, path, src)
	for i := 0; i < len(replace); i += 2 {
		if !bytes.Contains(src, []byte(replace[i])) {
			t.Fatalf("the description has no %q", replace[i])
		}
		src = bytes.ReplaceAll(src, []byte(replace[i]), []byte(replace[i+1]))
	}
	is := made(t, path, src)
	if is.Changes, err = release.Between(was, is, stage.Schema()); err != nil {
		t.Fatal(err)
	}
	is.Issued = true
	return is
}

// stopped is a design with a stop finding.
func stopped(t *testing.T) *design.Design {
	t.Helper()
	d := example(t, "bracken-reach")
	d.Findings = append([]finding.Finding{{Severity: finding.Stop, Check: "lamp-drop", Subject: "-E32", Message: "-E32, Boathouse: drop 6 %, limit 5 %", Value: 6, Limit: 5, Unit: "%"}}, d.Findings...)
	return d
}

// The notice prints every change, every piece of work and everything that stays.
func TestChangeNotice(t *testing.T) {
	d := revised(t, "along: 28 m", "along: 42 m", "revision: A", "revision: B")
	p := built(t, d)
	text := textOf(p, keyChange)
	if text == "" {
		t.Fatal("there is no change notice")
	}
	say := func(s string) {
		if s = strings.Join(strings.Fields(strings.ReplaceAll(s, noBreak, " ")), " "); !strings.Contains(text, s) {
			t.Errorf("the notice does not say %q", s)
		}
	}
	c := d.Changes
	if len(c.Values) == 0 || len(c.Work) == 0 || len(c.Stays) == 0 {
		t.Fatalf("nothing to print: %d values, %d pieces of work, %d that stay", len(c.Values), len(c.Work), len(c.Stays))
	}
	for _, v := range c.Values {
		say(v.Was)
		say(v.Is)
	}
	for _, s := range c.Stays {
		say(s.Text)
	}
	say("42 m")
	say("What stays")
	if first := p.plans[1].s.key; first != keyChange {
		t.Errorf("the notice does not follow the cover: sheet 2 is %q", first)
	}
}

// A table of work that runs on has its column heads on each sheet.
func TestNoticeRepeatsHeads(t *testing.T) {
	p := built(t, revised(t, "along: 28 m", "along: 42 m", "power: 6 W", "power: 8 W", "revision: A", "revision: B"))
	list := sheetsOf(p, keyChange)
	if len(list) < 2 {
		t.Fatalf("the notice has %d sheet: nothing runs on", len(list))
	}
	for i, r := range list {
		texts := map[string]bool{}
		for _, w := range writtenOn(r) {
			texts[w.Text] = true
		}
		for _, tool := range design.Tools {
			if texts[upper(tool)] && !(texts["Done"] && texts["Initials"]) {
				t.Errorf("sheet %d of the notice has %q without column heads", i+1, upper(tool))
			}
		}
	}
}

// A first revision has no change notice, and no sheet speaks of one.
func TestNoNoticeOnFirstRevision(t *testing.T) {
	p := built(t, example(t, "bracken-reach"))
	if n := len(sheetsOf(p, keyChange)); n != 0 {
		t.Errorf("%d sheets of a change notice on a first revision", n)
	}
}

// Text of a packet with a change notice stays inside the margins and apart.
func TestNoticeIsClean(t *testing.T) {
	p := built(t, revised(t, "along: 28 m", "along: 42 m", "power: 6 W", "power: 8 W", "revision: A", "revision: B"))
	checkSheets(t, p, a4, a4Side)
}
