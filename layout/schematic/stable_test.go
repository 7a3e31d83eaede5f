package schematic

import (
	"bytes"
	"fmt"
	"strings"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
	"gloamwright/internal/sitegen"
	"gloamwright/internal/stage"
	"gloamwright/layout/ink"
	"gloamwright/layout/schematic/audit"
)

// svgs are the files of all sheets.
func svgs(t *testing.T, d *design.Design) [][]byte {
	t.Helper()
	sheets, err := Sheets(d)
	if err != nil {
		t.Fatal(err)
	}
	var out [][]byte
	for _, s := range sheets {
		data, err := s.SVG()
		if err != nil {
			t.Fatal(err)
		}
		out = append(out, data)
	}
	return out
}

// same reports sheets that differ.
func same(t *testing.T, what string, a, b [][]byte) {
	t.Helper()
	if len(a) != len(b) {
		t.Errorf("%s: %d sheets became %d", what, len(a), len(b))
		return
	}
	for i := range a {
		if !bytes.Equal(a[i], b[i]) {
			t.Errorf("%s: sheet %d differs", what, i+1)
		}
	}
}

// The order in which a description names things does not show: the same bytes, with
// the keys of all mappings in any order.
func TestOrderOfTheFileDoesNotShow(t *testing.T) {
	list := samples(t)
	for i := range 12 {
		n, o := sitegen.Varied(i)
		list[fmt.Sprintf("site %d", i)] = sitegen.Site(n, o)
		o.Backwards = true
		same(t, fmt.Sprintf("site %d backwards", i), svgs(t, dressed(t, parsed(t, list[fmt.Sprintf("site %d", i)]))),
			svgs(t, dressed(t, parsed(t, sitegen.Site(n, o)))))
	}
	list["crowded"] = crowded()
	for name, src := range list {
		count := 20
		if strings.HasPrefix(name, "site") || name == "crowded" || testing.Short() {
			count = 3
		}
		want := svgs(t, dressed(t, parsed(t, src)))
		for seed := range count {
			same(t, fmt.Sprintf("%s, shuffled by %d", name, seed), want, svgs(t, dressed(t, parsed(t, sitegen.Shuffled(src, uint64(seed))))))
		}
	}
}

// strokesOf writes every stroke of a page outside tables, and where each text stands.
func strokesOf(p *audit.Page) (strokes []string, texts []string) {
	for _, s := range p.Strokes {
		if !s.Group.In(classTestPoint) && !s.Group.In("notes") {
			strokes = append(strokes, fmt.Sprint(s.Group.ID, s.Width, s.Path.Verbs, s.Path.Points))
		}
	}
	for _, t := range p.Texts {
		texts = append(texts, fmt.Sprintf("%s %.3f %q", t.Group.ID, t.At.Y, t.S))
	}
	return strokes, texts
}

// Changing a rating moves nothing; only its own text changes.
func TestRatingsMoveNothing(t *testing.T) {
	for name, src := range samples(t) {
		before := dressed(t, parsed(t, src))
		after := dressed(t, parsed(t, src))
		var changed string
		for _, p := range after.Circuit.Parts {
			if len(p.Values) > 0 && p.Designation == "-F1" {
				p.Values[0].Text, changed = "3 A", "3 A"
			}
		}
		a, b := drawn(t, before, false), drawn(t, after, false)
		if changed == "" || len(a) != len(b) {
			t.Fatalf("%s: %d and %d sheets", name, len(a), len(b))
		}
		differ := 0
		for i := range a {
			s1, t1 := strokesOf(a[i].Page)
			s2, t2 := strokesOf(b[i].Page)
			if strings.Join(s1, "\n") != strings.Join(s2, "\n") {
				t.Errorf("%s sheet %d: strokes moved", name, i+1)
			}
			for k := range t1 {
				if t1[k] != t2[k] {
					differ++
					if !strings.Contains(t2[k], changed) {
						t.Errorf("%s sheet %d: %s became %s", name, i+1, t1[k], t2[k])
					}
				}
			}
		}
		if differ == 0 {
			t.Errorf("%s: the new rating is not printed", name)
		}
	}
}

// A way added at the end of a board moves nothing that was there.
func TestAWayAtTheEndMovesNothing(t *testing.T) {
	src := samples(t)["bracken-reach"]
	more := bytes.Replace(src, []byte("ways: 4"), []byte("ways: 5"), 1)
	if bytes.Equal(src, more) {
		t.Fatal("the example has no board of 4 ways")
	}
	a, b := drawn(t, dressed(t, parsed(t, src)), false), drawn(t, dressed(t, parsed(t, more)), false)
	if len(a) != len(b) {
		t.Fatalf("%d sheets became %d", len(a), len(b))
	}
	for i := range a {
		was, is := objects(a[i].Page), objects(b[i].Page)
		for id, at := range was {
			if now, ok := is[id]; !ok || now != at {
				t.Errorf("sheet %d: %s moved from %s to %s", i+1, id, at, now)
			}
		}
	}
}

// A circuit added on a board, with the labels that were given before, moves nothing on
// the sheets of stages and of other boards.
func TestACircuitOnABoardMovesNothingElsewhere(t *testing.T) {
	src := samples(t)["bracken-reach"]
	more := append(bytes.TrimRight(src, "\n"), "\n  - {name: Wash house, board: annex, lit: outage-night, points: [4 m corridor, 3 m corridor]}\n"...)
	kept := stage.Expand(parsed(t, src)).Label(nil)
	a, b := drawn(t, dressed(t, parsed(t, src)), false), drawn(t, dressedWith(t, parsed(t, more), kept), false)
	if len(a) != len(b) {
		t.Fatalf("%d sheets became %d", len(a), len(b))
	}
	fresh := 0
	for i := range a {
		was, is := objects(a[i].Page), objects(b[i].Page)
		_, here := is["part-F201"] // the sheet of the board that the circuit is added on
		for id := range is {
			if _, ok := was[id]; !ok {
				fresh++
				if !here {
					t.Errorf("sheet %d: %s is new", i+1, id)
				}
			}
		}
		for id, at := range was {
			if now, ok := is[id]; (!ok || now != at) && !here {
				t.Errorf("sheet %d: %s moved from %s to %s", i+1, id, at, now)
			}
		}
	}
	if fresh == 0 {
		t.Error("the circuit is not drawn")
	}
}

// A part that is renamed moves nothing.
func TestARenamedPartMovesNothing(t *testing.T) {
	for name, src := range samples(t) {
		before, after := dressed(t, parsed(t, src)), dressed(t, parsed(t, src))
		was := ""
		for _, p := range after.Circuit.Parts {
			if p.Kind == circuit.Fuse && p.Designation == "-F2" {
				was, p.Designation = p.Designation, "-F9"
			}
		}
		if was == "" {
			t.Fatalf("%s has no -F2", name)
		}
		a, b := drawn(t, before, false), drawn(t, after, false)
		renamed := 0
		for i := range a {
			for k, s := range a[i].Page.Strokes {
				if n := b[i].Page.Strokes[k]; fmt.Sprint(s.Width, s.Path) != fmt.Sprint(n.Width, n.Path) {
					t.Errorf("%s sheet %d: %s moved", name, i+1, s.Group.ID)
				}
			}
			for k, x := range a[i].Page.Texts {
				n := b[i].Page.Texts[k]
				if x.S != n.S {
					renamed++
					if strings.ReplaceAll(x.S, was, "-F9") != n.S {
						t.Errorf("%s sheet %d: %q became %q", name, i+1, x.S, n.S)
					}
				}
			}
		}
		if renamed == 0 {
			t.Errorf("%s: -F9 is nowhere", name)
		}
	}
}

// objects are the places of all parts, terminals, test points and cables by ID.
func objects(p *audit.Page) map[string]string {
	out := map[string]string{}
	for _, s := range p.Strokes {
		if c := s.Group.Class; c == classPart || c == classTestPoint || c == classCable {
			out[s.Group.ID] += fmt.Sprint(s.Path.Points[0])
		}
	}
	return out
}

// Every drawn thing has an identifier, data and a title; links lead to sheets that
// exist.
func TestObjectsTellWhatTheyAre(t *testing.T) {
	d := designed(t, samples(t)["bracken-reach"])
	sheets, err := Sheets(d)
	if err != nil {
		t.Fatal(err)
	}
	parts := map[string]bool{}
	links := 0
	for _, s := range sheets {
		r := recorded(t, s)
		page := audit.FromRecorder(r)
		for _, g := range page.Groups {
			switch g.Class {
			case classPart, classTerminal, classTestPoint, classWire, classRail, classDot, "pin":
				if g.ID == "" || g.Title == "" || len(g.Data) == 0 && g.Class != classWire && g.Class != classRail {
					t.Errorf("sheet %d: %s %q has title %q and %d data", s.Number, g.Class, g.ID, g.Title, len(g.Data))
				}
			}
			if g.Class == classPart || g.Class == classTerminal {
				parts[g.Get("part")] = true
			}
		}
		links += countLinks(t, r.Calls, len(sheets))
	}
	for _, p := range d.Circuit.Parts {
		if !parts[partName(p)] && p.Kind != "busbar" {
			t.Errorf("%s is on no sheet", p.Designation)
		}
	}
	if links < 20 {
		t.Errorf("only %d links", links)
	}
}

func countLinks(t *testing.T, calls []ink.Call, sheets int) int {
	n := 0
	for _, c := range calls {
		switch c := c.(type) {
		case ink.Linked:
			n++
			ok := false
			for k := 1; k <= sheets; k++ {
				ok = ok || c.Target.File == FileName(k)
			}
			if !ok {
				t.Errorf("a link to %q", c.Target.File)
			}
		case ink.Grouped:
			n += countLinks(t, c.Calls, sheets)
		}
	}
	return n
}

// BenchmarkThousand draws a site of a thousand luminaires, and for comparison replays
// the recorded calls into both back ends.
func BenchmarkThousand(b *testing.B) {
	d := dressed(b, parsed(b, sitegen.Site(1000, sitegen.Options{Seed: 1})))
	var recordings []*ink.Recorder
	b.Run("draw", func(b *testing.B) {
		for b.Loop() {
			sheets, err := Sheets(d)
			if err != nil {
				b.Fatal(err)
			}
			recordings = recordings[:0]
			for _, s := range sheets {
				r := ink.NewRecorder(s.Paper.W, s.Paper.H, s.Supplement)
				s.Draw(r, Options{Target: func(n int, object string) ink.Target {
					return ink.Target{File: FileName(n), Sheet: n, Anchor: object}
				}})
				recordings = append(recordings, r)
			}
		}
		b.ReportMetric(float64(len(recordings)), "sheets")
	})
	b.Run("replay", func(b *testing.B) {
		for b.Loop() {
			pdf := ink.NewPDF(ink.Info{})
			for _, r := range recordings {
				c := ink.NewSVG(r.W, r.H, r.Title, "")
				r.Replay(c)
				if _, err := c.Output(); err != nil {
					b.Fatal(err)
				}
				r.Replay(pdf.Sheet(r.W, r.H, r.Title))
			}
			if _, err := pdf.Output(); err != nil {
				b.Fatal(err)
			}
		}
	})
}

// The foot of a board stands in one of two places: a luminaire more moves it only when
// a way outgrows the short sheet.
func TestFootHasTwoPlaces(t *testing.T) {
	at := func(luminaires int) float64 {
		src := sitegen.Site(luminaires, sitegen.Options{Shape: sitegen.OneWay, Control: sitegen.Direct, Lamps: sitegen.Drivers})
		for _, s := range drawn(t, dressed(t, parsed(t, src)), false) {
			for _, x := range s.Page.Texts {
				if x.S == "Circuit" && x.Group.In(classTable) && s.Circuit {
					return x.At.Y
				}
			}
		}
		t.Fatal("no foot")
		return 0
	}
	short := at(1)
	for n := 2; n <= 4; n++ {
		if y := at(n); y != short {
			t.Errorf("%d luminaires: the foot stands at %.1f mm, with one at %.1f mm", n, y, short)
		}
	}
	if long := at(12); long <= short {
		t.Errorf("12 luminaires: the foot stands at %.1f mm, with one at %.1f mm", long, short)
	}
}
