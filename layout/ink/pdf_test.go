package ink_test

import (
	"bytes"
	"compress/zlib"
	"fmt"
	"io"
	"strings"
	"sync"
	"testing"
	"time"

	"gloamwright/layout/ink"
)

var testInfo = ink.Info{Title: "Standby lighting – Größe", Author: "A. Marlowe", Date: time.Date(2026, 12, 1, 0, 0, 0, 0, time.UTC)}

func testBook(t *testing.T, name string) []byte {
	t.Helper()
	p := ink.NewPDF(testInfo)
	first := p.Sheet(210, 297, "Cover")
	second := p.Sheet(420, 297, "Circuit "+name)
	third := p.Sheet(297, 210, "Readings")
	testSheet(second)
	for _, face := range faces {
		first.Text(ink.Point{30, 30 + 8*float64(face)}, name+" "+face.String(), ink.Font{face, 5}, ink.Start, ink.Black, false)
	}
	first.Link(ink.Rect{30, 20, 50, 10}, ink.Target{Sheet: 2, Anchor: "F12-place"})
	first.Link(ink.Rect{30, 30, 50, 10}, ink.Target{Anchor: "TP1", File: "other.svg"})
	first.Link(ink.Rect{30, 40, 50, 10}, ink.Target{Sheet: 3})
	third.Mark("TP1", ink.Point{20, 60})
	out, err := p.Output()
	if err != nil {
		t.Fatal(err)
	}
	return out
}

// faces are all the type faces.
var faces = []ink.Face{ink.Regular, ink.Medium, ink.Bold, ink.Italic, ink.Mono, ink.MonoBold}

// inflated is a document with its streams unpacked, to be read only: its offsets
// no longer hold.
func inflated(t *testing.T, file []byte) []byte {
	t.Helper()
	parts := bytes.Split(file, []byte("\nstream\n"))
	out := parts[0]
	for _, part := range parts[1:] {
		data, rest, _ := bytes.Cut(part, []byte("\nendstream"))
		if z, err := zlib.NewReader(bytes.NewReader(data)); err == nil {
			if data, err = io.ReadAll(z); err != nil {
				t.Fatal(err)
			}
		}
		out = append(out, "\nstream\n"...)
		out = append(append(append(out, data...), "\nendstream"...), rest...)
	}
	return out
}

// TestSameBytesAfterOtherDocuments fails when the font bytes are shared between
// documents: gofpdf overwrites part of them.
func TestSameBytesAfterOtherDocuments(t *testing.T) {
	want := testBook(t, "x")
	for i := range 50 {
		testBook(t, fmt.Sprintf("other %d αβγ", i))
		if !bytes.Equal(testBook(t, "x"), want) {
			t.Fatalf("document %d differs", i)
		}
	}
	var wait sync.WaitGroup
	differs := make([]bool, 8)
	for i := range differs {
		wait.Add(1)
		go func() {
			defer wait.Done()
			differs[i] = !bytes.Equal(testBook(t, "x"), want)
		}()
	}
	wait.Wait()
	for i, d := range differs {
		if d {
			t.Errorf("document of goroutine %d differs", i)
		}
	}
}

func TestPDFContents(t *testing.T) {
	out := string(inflated(t, testBook(t, "x")))
	const k = 72 / 25.4
	for what, want := range map[string]string{
		"A4 page":                "/MediaBox [0 0 595.28 841.89]",
		"A3 page":                "/MediaBox [0 0 1190.55 841.89]",
		"A4 on its side":         "/MediaBox [0 0 841.89 595.28]",
		"date":                   "D:20261201000000",
		"link to a mark":         fmt.Sprintf("/Dest [5 0 R /XYZ 0 %.2f null]", (297-50)*k),
		"link by name only":      fmt.Sprintf("/Dest [7 0 R /XYZ 0 %.2f null]", (210-60)*k),
		"link to a sheet":        fmt.Sprintf("/Dest [7 0 R /XYZ 0 %.2f null]", 210*k),
		"bookmark on tall sheet": fmt.Sprintf("/Dest [3 0 R /XYZ 0 %.2f null]", 297*k),
		"frame line":             "1.98 w",
	} {
		if !strings.Contains(out, want) {
			t.Errorf("%s: no %q in the document", what, want)
		}
	}
	if n := strings.Count(out, "<</Title "); n != 3 {
		t.Errorf("%d bookmarks, want one a sheet", n)
	}
}

func TestPDFRefuses(t *testing.T) {
	if _, err := ink.NewPDF(testInfo).Output(); err == nil {
		t.Error("document without sheets accepted")
	}
	for name, draw := range map[string]func(ink.Canvas){
		"leads nowhere": func(c ink.Canvas) { c.Link(ink.Rect{0, 0, 1, 1}, ink.Target{Anchor: "gone"}) },
		"sheet 2":       func(c ink.Canvas) { c.Link(ink.Rect{0, 0, 1, 1}, ink.Target{Sheet: 2}) },
		"no sign": func(c ink.Canvas) {
			c.Text(ink.Point{1, 1}, "✓", ink.Font{ink.Regular, 3}, ink.Start, ink.Black, false)
		},
		"cannot be drawn": func(c ink.Canvas) { c.Fill(new(ink.Path).Line(1, 1), ink.Black) },
	} {
		p := ink.NewPDF(testInfo)
		draw(p.Sheet(100, 100, "S"))
		if _, err := p.Output(); err == nil || !strings.Contains(err.Error(), name) {
			t.Errorf("error %v, want one with %q", err, name)
		}
	}
}

func TestOutputTwice(t *testing.T) {
	p := ink.NewPDF(testInfo)
	testSheet(p.Sheet(420, 297, "A"))
	a, err := p.Output()
	if err != nil || len(a) == 0 {
		t.Fatal(len(a), err)
	}
	b, err := p.Output()
	if err != nil || !bytes.Equal(a, b) {
		t.Errorf("second output: %d bytes, %v", len(b), err)
	}
}

func TestNoClock(t *testing.T) {
	p := ink.NewPDF(ink.Info{})
	p.Sheet(100, 100, "A")
	out, err := p.Output()
	if err != nil || bytes.Count(out, []byte("D:19700101000000")) != 2 {
		t.Errorf("dates of an undated document: %v", err)
	}
}
