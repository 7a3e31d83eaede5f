package ink

import (
	"bytes"
	"encoding/base64"
	"image"
	"image/png"
	"strings"
	"testing"
	"time"
)

// dots is a PNG of 3 x 2 dots.
func dots(t *testing.T) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := png.Encode(&b, image.NewNRGBA(image.Rect(0, 0, 3, 2))); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

func TestPictureFits(t *testing.T) {
	for _, c := range []struct{ w, h, boxW, boxH, wantW, wantH float64 }{{120, 60, 20, 7, 14, 7}, {200, 10, 20, 7, 20, 1}, {1, 1, 20, 7, 7, 7}} {
		if w, h := (&Picture{W: c.w, H: c.h}).Fit(c.boxW, c.boxH); w != c.wantW || h != c.wantH {
			t.Errorf("%v x %v in %v x %v: %v x %v", c.w, c.h, c.boxW, c.boxH, w, h)
		}
	}
}

func TestShapesOfAPictureAreStretched(t *testing.T) {
	r := NewRecorder(100, 100, "x")
	p := &Picture{W: 10, H: 5, Shapes: []Shape{{new(Path).Rect(Rect{X: 5, Y: 0, W: 5, H: 5}), Dusk}}}
	p.Draw(r, Rect{X: 20, Y: 30, W: 20, H: 10})
	f, ok := r.Calls[0].(Filled)
	if !ok || f.Color != Dusk || f.Path.Bounds() != (Rect{X: 30, Y: 30, W: 10, H: 10}) {
		t.Errorf("drew %+v", r.Calls)
	}
}

// A PNG stands in the SVG as it is, and in the PDF once however often it is shown.
func TestPNGInBothBackEnds(t *testing.T) {
	src := dots(t)
	p := &Picture{W: 3, H: 2, PNG: src}
	s := NewSVG(50, 50, "x", "")
	p.Draw(s, Rect{X: 1, Y: 2, W: 30, H: 20})
	out, err := s.Output()
	if err != nil {
		t.Fatal(err)
	}
	if want := `<image x="1" y="2" width="30" height="20" preserveAspectRatio="none" xlink:href="data:image/png;base64,` + base64.StdEncoding.EncodeToString(src); !strings.Contains(string(out), want) {
		t.Errorf("the SVG does not hold %s", want)
	}
	make := func() []byte {
		d := NewPDF(Info{Title: "x", Date: time.Unix(0, 0)})
		for range 2 {
			c := d.Sheet(50, 50, "s")
			p.Draw(c, Rect{X: 1, Y: 2, W: 30, H: 20})
		}
		out, err := d.Output()
		if err != nil {
			t.Fatal(err)
		}
		return out
	}
	pdf := make()
	if n := bytes.Count(pdf, []byte("/Subtype /Image")); n != 2 { // the dots and their transparency
		t.Errorf("%d pictures in the PDF, want 2", n)
	}
	if !bytes.Equal(pdf, make()) {
		t.Error("a second document differs")
	}
	d := NewPDF(Info{Title: "x"})
	(&Picture{W: 3, H: 2, PNG: []byte("no PNG")}).Draw(d.Sheet(50, 50, "s"), Rect{W: 3, H: 2})
	if _, err := d.Output(); err == nil || !strings.Contains(err.Error(), "picture") {
		t.Errorf("a damaged picture: %v", err)
	}
}
