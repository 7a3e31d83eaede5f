package ink_test

import (
	"bytes"
	"encoding/xml"
	"io"
	"math"
	"strings"
	"testing"

	"gloamwright/layout/ink"
)

func testSVG(t *testing.T) []byte {
	t.Helper()
	s := ink.NewSVG(420, 297, "Supply <&> battery", "A sheet with some of everything & \"more\"")
	testSheet(s)
	s.Link(ink.Rect{10, 10, 20, 5}, ink.Target{File: "schematic-2.svg", Anchor: "F 1"})
	s.Link(ink.Rect{10, 20, 20, 5}, ink.Target{Anchor: "F12"})
	s.Link(ink.Rect{10, 30, 20, 5}, ink.Target{Sheet: 12, Anchor: "row-9"})
	out, err := s.Output()
	if err != nil {
		t.Fatal(err)
	}
	return out
}

// element is one XML element of a picture.
type element struct {
	name string
	attr map[string]string
	text string
	up   *element
}

func parseXML(t *testing.T, file []byte) (list []*element) {
	t.Helper()
	d := xml.NewDecoder(bytes.NewReader(file))
	var open *element
	for {
		tok, err := d.Token()
		if err == io.EOF {
			return list
		}
		if err != nil {
			t.Fatal(err)
		}
		switch tok := tok.(type) {
		case xml.StartElement:
			e := &element{tok.Name.Local, map[string]string{}, "", open}
			for _, a := range tok.Attr {
				if _, twice := e.attr[a.Name.Local]; twice && a.Name.Space == "" {
					t.Errorf("<%s> has two attributes %s", e.name, a.Name.Local)
				}
				e.attr[a.Name.Local] = a.Value
			}
			list, open = append(list, e), e
		case xml.CharData:
			if open != nil {
				open.text += string(tok)
			}
		case xml.EndElement:
			open = open.up
		}
	}
}

func TestSVGStructure(t *testing.T) {
	out := testSVG(t)
	list := parseXML(t, out)
	root := list[0]
	for name, want := range map[string]string{"width": "420mm", "height": "297mm", "viewBox": "0 0 420 297", "role": "img"} {
		if root.attr[name] != want {
			t.Errorf("%s = %q, want %q", name, root.attr[name], want)
		}
	}
	if list[1].name != "title" || list[1].text != "Supply <&> battery" || list[2].name != "desc" {
		t.Errorf("picture named %q %q", list[1].name, list[1].text)
	}
	byID := map[string]*element{}
	links := map[string]bool{}
	for _, e := range list {
		if id := e.attr["id"]; id != "" {
			byID[id] = e
		}
		if e.name == "a" {
			links[e.attr["href"]] = true
		}
		if e.name == "script" || e.name == "image" {
			t.Errorf("<%s> in a picture", e.name)
		}
	}
	fuse := byID["F12"]
	if fuse == nil || fuse.attr["class"] != "part" || fuse.attr["data-net"] != "L+ & <x>" || fuse.attr["data-value"] != "2 A" {
		t.Fatalf("fuse %+v", fuse)
	}
	titled := false
	for _, e := range list {
		titled = titled || e.name == "title" && e.up == fuse && e.text == `-F12 "fuse"`
	}
	if !titled {
		t.Error("fuse without its title")
	}
	if byID["F12-place"] == nil {
		t.Error("mark without an element")
	}
	if len(links) != 2 || !links["schematic-2.svg#F%201"] || !links["#F12"] {
		t.Errorf("links %v", links)
	}
	for _, bad := range []string{"-0.00", "NaN", "Inf", " -0 ", "\"-0\""} {
		if bytes.Contains(out, []byte(bad)) {
			t.Errorf("%q in the picture", bad)
		}
	}
	if n := bytes.Count(out, []byte("http")); n != 2 { // the two name spaces
		t.Errorf("%d addresses in the picture, want the name spaces only", n)
	}
	if !bytes.Equal(out, testSVG(t)) {
		t.Error("second drawing differs")
	}
	if strings.Contains(string(out), "]]>]]>") {
		t.Error("style ends early")
	}
}

func TestSVGRefuses(t *testing.T) {
	for want, draw := range map[string]func(ink.Canvas){
		"leads nowhere":  func(c ink.Canvas) { c.Link(ink.Rect{0, 0, 1, 1}, ink.Target{Anchor: "gone"}) },
		"has a space":    func(c ink.Canvas) { c.Group(ink.Object{ID: "a b"}, func() {}) },
		"data attribute": func(c ink.Canvas) { c.Group(ink.Object{Data: []ink.Attr{{"a=b", ""}}}, func() {}) },
		"no sign":        func(c ink.Canvas) { c.Text(ink.Point{1, 1}, "☐", ink.Font{ink.Mono, 3}, ink.Start, ink.Black, false) },
	} {
		s := ink.NewSVG(10, 10, "S", "")
		draw(s)
		if _, err := s.Output(); err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("error %v, want one with %q", err, want)
		}
	}
}

// TestDarkContrast: what can be read on paper can be read on a dark screen. The
// ratio is that of WCAG 2.2, which asks for 4.5 in text.
func TestDarkContrast(t *testing.T) {
	luminance := func(c ink.Color) float64 {
		part := func(v ink.Color) float64 {
			s := float64(v&0xFF) / 255
			if s <= 0.04045 {
				return s / 12.92
			}
			return math.Pow((s+0.055)/1.055, 2.4)
		}
		return 0.2126*part(c>>16) + 0.7152*part(c>>8) + 0.0722*part(c)
	}
	ratio := func(a, b ink.Color) float64 {
		x, y := luminance(a)+0.05, luminance(b)+0.05
		return max(x, y) / min(x, y)
	}
	if r := ratio(ink.Black, ink.White); math.Abs(r-21) > 1e-9 {
		t.Errorf("black on white %v, the standard says 21", r)
	}
	for _, c := range []ink.Color{ink.Black, ink.Dusk, ink.Mid} {
		if r := ratio(ink.Dark(c), ink.Dark(ink.White)); r < 4.5 {
			t.Errorf("%06X becomes %06X: contrast %.1f", uint32(c), uint32(ink.Dark(c)), r)
		}
		if r := ratio(ink.Dark(c), ink.Dark(ink.Tint)); r < 4.5 {
			t.Errorf("%06X on tint: contrast %.1f", uint32(c), r)
		}
	}
	if d := ink.Dark(ink.Black); d>>16 != d>>8&0xFF || d>>16 != d&0xFF {
		t.Errorf("black becomes %06X, not a grey", uint32(d))
	}
}

// On paper the file has its real size, in a window it fits, and it says its language.
func TestSVGSizeAndLanguage(t *testing.T) {
	file := string(testSVG(t))
	for _, want := range []string{`width="420mm"`, `height="297mm"`, `@page{size:420mm 297mm;margin:0}`,
		`@media screen{svg:root{max-width:100%;height:auto}}`, `xml:lang="en"`, `role="img"`} {
		if !strings.Contains(file, want) {
			t.Errorf("no %s", want)
		}
	}
}

// A hit area is in the SVG file alone, and nothing there could be seen.
func TestHitAreas(t *testing.T) {
	s := ink.NewSVG(100, 100, "", "")
	o := ink.Object{ID: "a", Hit: new(ink.Path).Rect(ink.Rect{X: 1, Y: 2, W: 3, H: 4})}
	s.Group(o, func() {})
	s.Group(ink.Object{ID: "b", Hit: new(ink.Path).Move(1, 1).Line(9, 1), Along: true}, func() {})
	out, err := s.Output()
	if err != nil {
		t.Fatal(err)
	}
	found := 0
	for _, e := range parseXML(t, out) {
		switch e.attr["class"] {
		case "hit", "along":
			found++
			if len(e.attr) != 2 || e.attr["d"] == "" {
				t.Errorf("a hit area with %v", e.attr)
			}
		}
	}
	if found != 2 {
		t.Errorf("%d hit areas, want 2", found)
	}
	if !strings.Contains(string(out), ".hit{fill:none;pointer-events:all}") {
		t.Error("a pointer would not meet the hit area")
	}
}
