package packet

import (
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"gloamwright/layout/ink"
	"gloamwright/layout/schematic"
	"gloamwright/templates"
)

// TestVocabulary: every condition that a text may name is answered, and no text that is
// printed names a value that the job has not.
func TestVocabulary(t *testing.T) {
	for _, name := range examples {
		b := newBook(example(t, name), nil)
		b.start()
		if err := b.readTexts(); err != nil {
			t.Fatal(err)
		}
		for _, c := range templates.Conditions {
			if _, ok := b.words.holds[c.Name]; !ok {
				t.Errorf("nothing says whether %q holds", c.Name)
			}
		}
		if len(b.words.holds) != len(templates.Conditions) || len(b.words.values) != len(templates.Values) {
			t.Errorf("%d conditions and %d values, the vocabulary has %d and %d", len(b.words.holds), len(b.words.values), len(templates.Conditions), len(templates.Values))
		}
		check := func(text string) {
			for _, m := range braces.FindAllStringSubmatch(text, -1) {
				if v, ok := b.words.values[m[1]]; ok && v == "" {
					t.Errorf("%s: {%s} is empty in %q", name, m[1], text)
				}
			}
		}
		for _, c := range b.words.texts.Cautions {
			if b.words.applies(c.When) {
				check(c.Head + c.At + c.Text)
			}
		}
		for _, x := range b.words.texts.Checklist {
			for _, l := range x.Lines {
				if b.words.applies(l.When) {
					check(l.Do + l.Expect)
				}
			}
		}
	}
}

// TestNotApplicable: a line that does not apply is printed with its reason and without
// boxes.
func TestNotApplicable(t *testing.T) {
	p := built(t, example(t, "juniper-flat"))
	text := textOf(p, keyChecklist)
	for _, want := range []string{"not applicable because both poles float; the plant has no electrode.", "not applicable because block D covers it."} {
		if !strings.Contains(text, want) {
			t.Errorf("the checklist does not say %q", want)
		}
	}
	if n := strings.Count(text, "STOP"); n != 4 {
		t.Errorf("%d hold points, want 4", n)
	}
}

// TestTextsOfAFirm: a firm's mistakes are reported with their place, its texts printed.
func TestTextsOfAFirm(t *testing.T) {
	dir := t.TempDir()
	file := filepath.Join(dir, "faults.yaml")
	d := example(t, "juniper-flat")
	d.Facts = copyFacts(d.Facts)
	site := *d.Site
	site.Practice.Texts.Val = dir
	d.Facts.Site = &site
	sheets, err := schematic.Sheets(d)
	if err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(file, []byte("remedies:\n  - {fault: dead, doo: x}\n"), 0o600); err != nil {
		t.Fatal(err)
	}
	if _, err := Make(d, sheets); err == nil || !strings.Contains(err.Error(), `faults.yaml:2:19: error: unknown key "doo"`) {
		t.Errorf("a mistake in a firm's texts: %v", err)
	}
	if err := os.WriteFile(file, []byte("remedies:\n  - {fault: dead, do: \"ring the firm for {part}\"}\n"), 0o600); err != nil {
		t.Fatal(err)
	}
	if text := textOf(built(t, d), keyFaults); !strings.Contains(text, "ring the firm for") {
		t.Error("the firm's own words are not printed")
	}
}

// TestColumnHeads: the heads of a table stand on each of its sheets, over a rule that is
// as long as the text is wide: the columns add up.
func TestColumnHeads(t *testing.T) {
	for _, name := range examples {
		p := built(t, example(t, name))
		for i, s := range p.plans {
			if s.s.heads == nil {
				continue
			}
			pg := a4
			if s.s.side {
				pg = a4Side
			}
			if name == "juniper-flat" {
				pg = letter
				if s.s.side {
					pg = letterSide
				}
			}
			at := pg.top() + s.s.heads.h
			found := false
			eachCall(p.recorders[i].Calls, func(c ink.Call) {
				if r, ok := c.(ink.Stroked); ok && r.Pen.Width == headLine {
					b := r.Path.Bounds()
					found = found || math.Abs(b.Y-at) < 0.01 && math.Abs(b.X-pg.l) < 0.01 && math.Abs(b.W-pg.width) < 0.01
				}
			})
			if !found {
				t.Errorf("%s sheet %d: no rule of %.1f mm under the column heads", name, i+1, pg.width)
			}
		}
	}
}

// TestScaleBarAndHorizon: the bar is 100 mm long, the half disc stands where the sheet
// stands in the packet.
func TestScaleBarAndHorizon(t *testing.T) {
	d := example(t, "bracken-reach")
	d.Issued = true
	p := built(t, d)
	for i, s := range p.plans {
		if s.s.drawing != nil || s.s.side {
			continue
		}
		bar, sun := false, s.s.key == keyCover
		eachCall(p.recorders[i].Calls, func(c ink.Call) {
			switch c := c.(type) {
			case ink.Stroked:
				b := c.Path.Bounds()
				bar = bar || math.Abs(b.Y-(a4.h-a4.bottom-2.2)) < 0.01 && math.Abs(b.W-100) < 0.05
			case ink.Filled:
				b := c.Path.Bounds()
				want := a4.l + 3 + (a4.width-6)*(float64(i+1)-0.5)/float64(len(p.plans))
				sun = sun || c.Color == ink.Dusk && math.Abs(b.W-4.6) < 0.01 && math.Abs(b.X+b.W/2-want) < 0.01
			}
		})
		if !bar || !sun {
			t.Errorf("sheet %d: scale bar %v, half disc %v", i+1, bar, sun)
		}
	}
}

// TestLinks: designations in the lists lead to the schematic, symbols to the lists.
func TestLinks(t *testing.T) {
	p := built(t, example(t, "bracken-reach"))
	there, back := 0, 0
	for i, r := range p.recorders {
		eachCall(r.Calls, func(c ink.Call) {
			l, ok := c.(ink.Linked)
			if !ok {
				return
			}
			to := l.Target.Sheet
			if to < 1 || to > len(p.plans) {
				t.Errorf("sheet %d links to sheet %d", i+1, to)
				return
			}
			from, at := p.plans[i].s.drawing != nil, p.plans[to-1].s.drawing != nil
			switch {
			case !from && at:
				there++
			case from && !at:
				back++
			}
		})
	}
	if there < 200 || back < 50 {
		t.Errorf("%d links to the schematic, %d from it", there, back)
	}
}
