package sheet

import (
	"math"
	"strings"
	"testing"

	"gloamwright/layout/ink"
)

var formats = []Format{A4, A3, Letter, Tabloid}

var block = TitleBlock{Owner: "Bracken Reach Trust", Title: "Standby lighting", Supplement: "Supply and battery", Status: "Draft",
	Type: "Circuit diagram", Language: "en", Creator: "A. Marlowe", Date: "2026-12-01", Revision: "A", ID: "BR-2041-E",
	Reference: "A. Marlowe", Class: "SELV", Sheet: 2, Of: 5}

// leaves lists strokes, fills and texts of a recording, groups opened, with the
// field that each belongs to.
func leaves(calls []ink.Call, field string, f func(c ink.Call, field string)) {
	for _, c := range calls {
		if g, ok := c.(ink.Grouped); ok {
			inner := field
			for _, a := range g.Object.Data {
				if a.Name == "field" {
					inner = a.Value
				}
			}
			leaves(g.Calls, inner, f)
			continue
		}
		f(c, field)
	}
}

func drawn(t *testing.T, f Format, b TitleBlock) *ink.Recorder {
	t.Helper()
	r := ink.NewRecorder(f.W, f.H, f.Name)
	f.Draw(r, b)
	if err := r.Err(); err != nil {
		t.Fatal(err)
	}
	return r
}

// TestZones: the zones of an A3 sheet as ISO 5457 counts them, and the rule that
// they change every 50 mm from the middle.
func TestZones(t *testing.T) {
	for _, c := range []struct {
		x, y float64
		want string
	}{{21, 11, "A1"}, {59.9, 48.4, "A1"}, {60.1, 48.6, "B2"}, {209, 148, "C4"}, {211, 149, "D5"}, {409, 286, "F8"}, {0, 0, "A1"}, {500, 500, "F8"}} {
		if got := A3.Zone(c.x, c.y); got != c.want {
			t.Errorf("Zone(%v, %v) = %s, want %s", c.x, c.y, got, c.want)
		}
	}
	for _, f := range formats {
		r := f.Frame()
		changes := 0
		last := f.Zone(r.X, r.Y)
		for x := math.Ceil(r.X*10) / 10; x < r.X+r.W; x += 0.1 {
			if z := f.Zone(x, r.Y); z != last {
				k := (x - f.W/2) / field
				if d := math.Abs(k-math.Round(k)) * field; d > 0.11 {
					t.Errorf("%s: zone changes %v mm off", f.Name, d)
				}
				changes, last = changes+1, z
			}
		}
		if changes+1 != f.columns || f.columns%2 != 0 || f.rows%2 != 0 {
			t.Errorf("%s: %d columns found, %d stated", f.Name, changes+1, f.columns)
		}
	}
}

// TestFrame: margins of 20 mm left and 10 mm elsewhere, one rectangle 0.7 mm
// wide, nothing in the outer 5 mm, four centring marks on the axes.
func TestFrame(t *testing.T) {
	for _, f := range formats {
		frames, marks := 0, 0
		want := ink.Rect{X: 20, Y: 10, W: f.W - 30, H: f.H - 20}
		leaves(drawn(t, f, block).Calls, "", func(c ink.Call, _ string) {
			var b ink.Rect
			switch c := c.(type) {
			case ink.Stroked:
				b = c.Path.Bounds()
				if c.Pen.Width != 0.7 && c.Pen.Width != 0.35 {
					t.Errorf("%s: line %v wide", f.Name, c.Pen.Width)
				}
				if c.Pen.Width == 0.7 && b == want {
					frames++
				}
				if c.Pen.Width == 0.7 && (b.W == 0 && b.X == f.W/2 || b.H == 0 && b.Y == f.H/2) && (b.W+b.H == 10 || f.upright && b.Y == f.H-10 && b.H == 5) {
					marks++
				}
			case ink.Filled:
				b = c.Path.Bounds()
			case ink.Written:
				b = ink.TextBox(c.At, c.Text, c.Font, c.Anchor, c.Turn)
			}
			if b.X < 5-1e-9 || b.Y < 5-1e-9 || b.X+b.W > f.W-5+1e-9 || b.Y+b.H > f.H-5+1e-9 {
				t.Errorf("%s: ink at %v, outside the zone band", f.Name, b)
			}
		})
		if frames != 1 || marks != 4 {
			t.Errorf("%s: %d frames, %d centring marks", f.Name, frames, marks)
		}
	}
}

// TestTitleBlock: at the lower right corner, at most 180 mm wide, over the whole
// width on A4; every field there, inside its cell, at 1.8 mm or more.
func TestTitleBlock(t *testing.T) {
	long := block
	long.Owner = strings.Repeat("Long Owner of Many Words ", 8)
	long.Title = strings.Repeat("Standby lighting ", 9)
	long.Status = "Not for construction"
	long.Warning = "NOT FOR CONSTRUCTION"
	long.Approved = "B. Fen"
	for _, f := range formats {
		r, fr := f.TitleBlock(), f.Frame()
		if r.W > 180 || r.X+r.W != fr.X+fr.W || r.Y+r.H != fr.Y+fr.H {
			t.Errorf("%s: title block %v in frame %v", f.Name, r, fr)
		}
		for _, b := range []TitleBlock{block, long} {
			seen := map[string]string{}
			var lines []ink.Rect
			var texts []ink.Rect
			leaves(drawn(t, f, b).Calls, "", func(c ink.Call, field string) {
				switch c := c.(type) {
				case ink.Written:
					box := ink.TextBox(c.At, c.Text, c.Font, c.Anchor, c.Turn)
					if field != "" {
						seen[field] = c.Text
					}
					if ink.CapHeight(c.Font) < 1.8-1e-9 {
						t.Errorf("%q is %v mm high", c.Text, ink.CapHeight(c.Font))
					}
					texts = append(texts, box)
				case ink.Stroked:
					p := c.Path.Points
					for i := 1; i < len(p); i++ {
						lines = append(lines, ink.Rect{X: min(p[i-1].X, p[i].X), Y: min(p[i-1].Y, p[i].Y), W: math.Abs(p[i].X - p[i-1].X), H: math.Abs(p[i].Y - p[i-1].Y)})
					}
				}
			})
			for _, x := range texts {
				for _, l := range lines {
					if x.X < l.X+l.W && l.X < x.X+x.W && x.Y < l.Y+l.H && l.Y < x.Y+x.H ||
						l.W == 0 && l.X > x.X && l.X < x.X+x.W && l.Y < x.Y+x.H && l.Y+l.H > x.Y ||
						l.H == 0 && l.Y > x.Y && l.Y < x.Y+x.H && l.X < x.X+x.W && l.X+l.W > x.X {
						t.Errorf("%s: text at %v crosses the line %v", f.Name, x, l)
					}
				}
			}
			want := 14 // all but the signature, left blank
			if b.Approved != "" {
				want = 15
			}
			if len(seen) != want || seen["sheet"] != "2 / 5" || seen["size"] != f.Name || seen["id"] != "BR-2041-E" {
				t.Errorf("%s: fields %v", f.Name, seen)
			}
			if b.Warning != "" && !strings.HasSuffix(seen["owner"], "…") {
				t.Errorf("owner written as %q", seen["owner"])
			}
		}
	}
}

// TestScaleBar: the bar is 100 mm long on every format.
func TestScaleBar(t *testing.T) {
	for _, f := range formats {
		found := false
		r := ink.NewRecorder(f.W, f.H, f.Name)
		f.DrawScaleBar(r)
		leaves(r.Calls, "", func(c ink.Call, _ string) {
			if s, ok := c.(ink.Stroked); ok {
				found = found || s.Path.Bounds().W == 100
			}
		})
		if !found {
			t.Errorf("%s: no bar of 100 mm", f.Name)
		}
	}
}

// TestNotes: notes stay between frame and title block and clear of the scale bar;
// too many are refused.
func TestNotes(t *testing.T) {
	cautions := []Caution{{"DANGER", "230 V inside the frames marked Mains.\nLicensed persons only: off, locked, tested dead."}}
	notes := []string{"Every contact is shown with its coil dead.", "Wires on the photocell card have no number; those between terminals have.",
		"Set -R6 so that -K1 lets go at 10 lx; see the commissioning checklist."}
	for _, f := range formats {
		r := ink.NewRecorder(f.W, f.H, f.Name)
		box, err := f.DrawNotes(r, cautions, notes)
		if err != nil {
			t.Errorf("%s: %v", f.Name, err)
			continue
		}
		bar := ink.NewRecorder(f.W, f.H, f.Name)
		f.DrawScaleBar(bar)
		warned := block
		warned.Warning = "NOT FOR CONSTRUCTION"
		f.DrawTitleBlock(bar, warned)
		var taken []ink.Rect
		leaves(bar.Calls, "", func(c ink.Call, _ string) {
			switch c := c.(type) {
			case ink.Stroked:
				taken = append(taken, c.Path.Bounds())
			case ink.Filled:
				if !f.upright {
					return // the warning lies beside the notes
				}
				taken = append(taken, c.Path.Bounds())
			case ink.Written:
				taken = append(taken, ink.TextBox(c.At, c.Text, c.Font, c.Anchor, c.Turn))
			}
		})
		words := 0
		leaves(r.Calls, "", func(c ink.Call, _ string) {
			w := c.(ink.Written)
			words++
			b := ink.TextBox(w.At, w.Text, w.Font, w.Anchor, w.Turn)
			for _, o := range taken {
				if b.X < o.X+o.W+0.3 && o.X < b.X+b.W+0.3 && b.Y < o.Y+o.H+0.3 && o.Y < b.Y+b.H+0.3 {
					t.Errorf("%s: note %q at %v, taken %v", f.Name, w.Text, b, o)
				}
			}
			if b.X < box.X || b.X+b.W > box.X+box.W || b.Y < box.Y-0.3 || b.Y+b.H > box.Y+box.H+1 {
				t.Errorf("%s: note %q at %v outside %v", f.Name, w.Text, b, box)
			}
		})
		if words < 10 {
			t.Errorf("%s: %d texts", f.Name, words)
		}
		if _, err := f.DrawNotes(r, cautions, append(notes, notes...)); err == nil {
			t.Errorf("%s: nine notes accepted", f.Name)
		}
		if box, err := f.DrawNotes(r, nil, nil); err != nil || box != (ink.Rect{}) {
			t.Errorf("no notes: %v, %v", box, err)
		}
	}
}

// The firm stands with who drew the sheet; its mark keeps its proportions and stays
// clear of the words.
func TestFirmInTitleBlock(t *testing.T) {
	c := ink.NewRecorder(420, 297, "x")
	mark := &ink.Picture{W: 2, H: 1, Shapes: []ink.Shape{{Path: new(ink.Path).Rect(ink.Rect{W: 2, H: 1}), Color: ink.Dusk}}}
	A3.DrawTitleBlock(c, TitleBlock{Creator: "A. Marlowe", Firm: Firm{Name: "Hollow and Hill", Logo: mark}})
	var box, words ink.Rect
	var walk func(calls []ink.Call)
	walk = func(calls []ink.Call) {
		for _, x := range calls {
			switch x := x.(type) {
			case ink.Grouped:
				walk(x.Calls)
			case ink.Filled:
				box = x.Path.Bounds()
			case ink.Written:
				if x.Text == "A. Marlowe, Hollow and Hill" {
					words = ink.TextBox(x.At, x.Text, x.Font, x.Anchor, x.Turn)
				}
			}
		}
	}
	walk(c.Calls)
	if words.W == 0 || box.W == 0 || box.W != 2*box.H {
		t.Fatalf("words %+v, mark %+v", words, box)
	}
	if words.X+words.W > box.X || box.X+box.W > A3.TitleBlock().X+60 {
		t.Errorf("words %+v, mark %+v overlap or leave the field", words, box)
	}
}
