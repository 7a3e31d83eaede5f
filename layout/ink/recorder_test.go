package ink_test

import (
	"bytes"
	"encoding/xml"
	"io"
	"math"
	"testing"

	"gloamwright/layout/ink"
	"pgregory.net/rapid"
)

// testSheet draws some of everything on c.
func testSheet(c ink.Canvas) {
	c.Group(ink.Object{ID: "outline", Class: "frame", Title: "Frame <1> & more"}, func() {
		c.Stroke(new(ink.Path).Rect(ink.Rect{20, 10, 390, 277}), ink.Pen{Width: 0.7, Color: ink.Black})
	})
	c.Group(ink.Object{ID: "F12", Class: "part", Title: `-F12 "fuse"`, Data: []ink.Attr{{"net", "L+ & <x>"}, {"value", "2 A"}}}, func() {
		c.Stroke(new(ink.Path).Rect(ink.Rect{100, 50, 2.5, 7.5}), ink.Pen{Width: 0.25, Color: ink.Black})
		c.Stroke(new(ink.Path).Move(101.25, 47.5).Line(101.25, 60), ink.Pen{Width: 0.25, Color: ink.Dusk, Dash: []float64{1.5, 0.75}})
		c.Group(ink.Object{Class: "text"}, func() {
			c.Text(ink.Point{98, 53}, "−F12  2 A <&>", ink.Lettering(ink.Medium, 2.5), ink.End, ink.Black, false)
		})
		c.Mark("F12-place", ink.Point{100, 50})
	})
	c.Fill(new(ink.Path).Circle(ink.Point{101.25, 60}, 0.5), ink.Black)
	c.Fill(new(ink.Path).RoundRect(ink.Rect{120, 60, 9, 4}, 0.6), ink.Black)
	c.Text(ink.Point{124.5, 63.2}, "TP1", ink.Lettering(ink.Bold, 2.5), ink.Middle, ink.White, false)
	c.Text(ink.Point{15, 148.5}, "upward Ω µ ² °", ink.Lettering(ink.Regular, 3.5), ink.Middle, ink.Mid, true)
	c.Text(ink.Point{200, 100}, "W3+ 31", ink.Lettering(ink.Mono, 2.5), ink.Start, ink.Black, false)
	c.Stroke(new(ink.Path).Move(150, 100).Arc(ink.Point{160, 100}, 5, true, false), ink.Pen{Width: 0.35, Color: ink.Rule})
	c.Stroke(new(ink.Path).Ellipse(ink.Point{200, 150}, 9.25, 1.125), ink.Pen{Width: 0.25, Color: ink.Black})
}

func TestRecorderFaults(t *testing.T) {
	r := ink.NewRecorder(100, 100, "A")
	r.Stroke(new(ink.Path).Move(math.NaN(), 0).Line(1, 1), ink.Pen{Width: 1})
	r.Stroke(new(ink.Path).Move(0, 0).Line(1, 1), ink.Pen{})
	r.Stroke(new(ink.Path).Line(1, 1), ink.Pen{Width: 1})
	r.Stroke(new(ink.Path).Move(0, 0).Line(1, 1), ink.Pen{Width: 1, Dash: []float64{0, 0}})
	r.Text(ink.Point{1, 1}, "done ✓", ink.Font{ink.Regular, 3}, ink.Start, ink.Black, false)
	r.Text(ink.Point{math.Inf(1), 1}, "far", ink.Font{ink.Regular, 3}, ink.Start, ink.Black, false)
	r.Group(ink.Object{ID: "x"}, func() {})
	r.Group(ink.Object{ID: "x"}, func() {})
	r.Mark("m", ink.Point{})
	r.Mark("m", ink.Point{})
	r.Link(ink.Rect{0, 0, -1, 1}, ink.Target{Sheet: 1})
	if got := len(r.Err().(interface{ Unwrap() []error }).Unwrap()); got != 9 {
		t.Errorf("%d faults, want 9: %v", got, r.Err())
	}
	ok := ink.NewRecorder(420, 297, "B")
	testSheet(ok)
	ok.Stroke(nil, ink.Pen{})
	ok.Stroke(new(ink.Path), ink.Pen{})
	ok.Text(ink.Point{}, "", ink.Font{}, ink.Start, ink.Black, false)
	if err := ok.Err(); err != nil {
		t.Error(err)
	}
}

func TestReplayRepeats(t *testing.T) {
	a := ink.NewRecorder(420, 297, "B")
	testSheet(a)
	b := ink.NewRecorder(420, 297, "B")
	a.Replay(b)
	if a.String() != b.String() {
		t.Errorf("replayed:\n%s\nwant:\n%s", b, a)
	}
}

// TestAnyText: whatever the text, both inks draw it or say why not.
func TestAnyText(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		text := rapid.OneOf(rapid.String(), rapid.Map(rapid.SliceOf(rapid.Byte()), func(b []byte) string { return string(b) })).Draw(t, "text")
		face := faces[rapid.IntRange(0, len(faces)-1).Draw(t, "face")]
		s := ink.NewSVG(100, 100, text, text)
		p := ink.NewPDF(ink.Info{Title: text})
		for _, c := range []ink.Canvas{s, p.Sheet(100, 100, text)} {
			c.Group(ink.Object{Title: text, Data: []ink.Attr{{Name: "v", Value: text}}}, func() {
				c.Text(ink.Point{X: 10, Y: 10}, text, ink.Font{Face: face, Size: 3}, ink.End, ink.Black, false)
			})
		}
		picture, errSVG := s.Output()
		document, errPDF := p.Output()
		if lost := ink.Missing(text, face); (len(lost) > 0) != (errSVG != nil) || (errSVG != nil) != (errPDF != nil) {
			t.Fatalf("missing %q, SVG says %v, PDF says %v", string(lost), errSVG, errPDF)
		}
		if errSVG != nil {
			return
		}
		if len(document) == 0 {
			t.Fatal("empty document")
		}
		for d := xml.NewDecoder(bytes.NewReader(picture)); ; {
			if _, err := d.Token(); err == io.EOF {
				break
			} else if err != nil {
				t.Fatalf("%q gives broken XML: %v", text, err)
			}
		}
	})
}
