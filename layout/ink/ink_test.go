package ink

import (
	"math"
	"strings"
	"testing"

	"golang.org/x/image/font/sfnt"
	"pgregory.net/rapid"
)

func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if math.IsNaN(got) || math.Abs(got-want) > tolerance {
		t.Errorf("%s = %v, want %v ± %v", what, got, want, tolerance)
	}
}

// TestWidth compares with figures read off the Go fonts' tables: every digit of
// the proportional faces is 1139 of 2048 wide, every glyph of Go Mono 1229.
func TestWidth(t *testing.T) {
	near(t, "ten digits", Width("0123456789", Font{Regular, 10}), 10*10*1139.0/2048, 1e-9)
	near(t, "mono", Width("W3+µΩ", Font{Mono, 4}), 5*4*1229.0/2048, 1e-9)
	near(t, "nothing", Width("", Font{Bold, 4}), 0, 0)
	near(t, "capitals", CapHeight(Lettering(Bold, 2.5)), 2.5, 1e-12)
	near(t, "size", Lettering(Regular, 2.5).Size, 3.459, 0.001)
}

// TestTextBox: a capital H stands on the baseline and is as high as capitals are.
func TestTextBox(t *testing.T) {
	f := Lettering(Regular, 2.5)
	b := TextBox(Point{100, 50}, "H", f, Start, false)
	near(t, "top", b.Y, 47.5, 0.01)
	near(t, "bottom", b.Y+b.H, 50, 0.01)
	if b.X <= 100 || b.X+b.W >= 100+Width("H", f) {
		t.Errorf("H reaches outside its advance: %v", b)
	}
	if g := TextBox(Point{100, 50}, "g", f, Start, false); g.Y+g.H < 50.5 {
		t.Errorf("g does not reach below the line: %v", g)
	}
	m := TextBox(Point{100, 50}, "HH", f, Middle, false)
	near(t, "middle", m.X+m.W/2, 100, 0.02)
	e := TextBox(Point{100, 50}, "HH", f, End, false)
	near(t, "end", e.X+e.W, m.X+m.W-Width("HH", f)/2, 1e-9)
	turned := TextBox(Point{100, 50}, "H", f, Start, true)
	near(t, "turned right side", turned.X+turned.W, 100, 0.01)
	near(t, "turned left side", turned.X, 97.5, 0.01)
	if turned.Y+turned.H > 50 {
		t.Errorf("turned text must run up the page: %v", turned)
	}
	if s := TextBox(Point{1, 2}, "   ", f, Start, false); s != (Rect{X: 1, Y: 2}) {
		t.Errorf("spaces: %v", s)
	}
}

func TestClean(t *testing.T) {
	for in, want := range map[string]string{
		"plain text":         "plain text",
		"10 \u2126":          "10 Ω",
		"5 \u03bcF":          "5 µF",
		"5 \u212b, 2 \u212a": "5 Å, 2 K",
		"Mu\u0308ller":       "Müller",
		"a\xe2b":             "a\uFFFDb",
		"a\U0001F600b":       "a\uFFFDb",
		"1\u2009000\u202fV":  "1\u00a0000\u00a0V",
		"a\u2011b":           "a-b",
		"a\tb\nc":            "a b c",
		"soft\u00adhyphen":   "softhyphen",
		"\u200bzero\x00":     "zero",
		"2 mm²":              "2 mm²",
	} {
		if got := Clean(in); got != want {
			t.Errorf("Clean(%q) = %q, want %q", in, got, want)
		}
		if Clean(want) != want {
			t.Errorf("Clean changes its own result %q", want)
		}
	}
}

func TestMissing(t *testing.T) {
	if got := string(Missing("✓ ok ☐ ✓ Ω µ ° ² √ ≤ ≥ ± × → − □", Regular)); got != "✓☐" {
		t.Errorf("missing %q, want the tick and the box", got)
	}
	if got := Missing("a\U0001F600\xff", Mono); len(got) != 0 {
		t.Errorf("replaced signs count as missing: %q", string(got))
	}
}

// TestFacesAgreeWithLibrary: the tables hold the library's own answers.
func TestFacesAgreeWithLibrary(t *testing.T) {
	for f := range Face(len(faceNames)) {
		parsed, err := sfnt.Parse(fontFile(f))
		if err != nil {
			t.Fatal(err)
		}
		if parsed.UnitsPerEm() != unitsPerEm {
			t.Errorf("%v: %d units an em", f, parsed.UnitsPerEm())
		}
		var buf sfnt.Buffer
		m, err := parsed.Metrics(&buf, unitsPerEm, 0)
		if err != nil {
			t.Fatal(err)
		}
		if m.CapHeight != capHeight {
			t.Errorf("%v: capitals %v of 2048", f, m.CapHeight)
		}
		if metrics(f).cmap['\uFFFD'] == 0 {
			t.Errorf("%v has no replacement sign", f)
		}
	}
}

// onCircle checks points along every cubic of p against a circle.
func onCircle(t *testing.T, p *Path, c Point, r float64) {
	t.Helper()
	var from Point
	i := 0
	for _, v := range p.Verbs {
		switch v {
		case MoveTo, LineTo:
			from = p.Points[i]
			i++
		case CubicTo:
			a, b, e := p.Points[i], p.Points[i+1], p.Points[i+2]
			for k := 0.0; k <= 1; k += 0.05 {
				m := 1 - k
				x := m*m*m*from.X + 3*m*m*k*a.X + 3*m*k*k*b.X + k*k*k*e.X
				y := m*m*m*from.Y + 3*m*m*k*a.Y + 3*m*k*k*b.Y + k*k*k*e.Y
				near(t, "distance from the centre", math.Hypot(x-c.X, y-c.Y), r, r*0.0003)
			}
			from = e
			i += 3
		}
	}
}

func TestArcs(t *testing.T) {
	onCircle(t, new(Path).Circle(Point{3, 4}, 5), Point{3, 4}, 5)
	// From the top to the right side of a unit circle, the four ways.
	for _, c := range []struct {
		clockwise, large bool
		centre           Point
	}{{true, false, Point{0, 0}}, {false, true, Point{0, 0}}, {false, false, Point{1, -1}}, {true, true, Point{1, -1}}} {
		p := new(Path).Move(0, -1).Arc(Point{1, 0}, 1, c.clockwise, c.large)
		onCircle(t, p, c.centre, 1)
		if p.end() != (Point{1, 0}) {
			t.Errorf("ends at %v", p.end())
		}
		want := 1
		if c.large {
			want = 3
		}
		if n := len(p.Verbs) - 1; n != want {
			t.Errorf("clockwise %v large %v: %d quarters, want %d", c.clockwise, c.large, n, want)
		}
	}
	half := new(Path).Move(0, 0).Arc(Point{0, 2}, 0.5, true, false)
	onCircle(t, half, Point{0, 1}, 1) // radius raised to half the distance
	if half.Bounds().X+half.Bounds().W < 0.9 {
		t.Errorf("downward clockwise half circle must bulge right: %v", half.Bounds())
	}
}

func TestBoundsAndLength(t *testing.T) {
	c := new(Path).Circle(Point{10, 20}, 3)
	b := c.Bounds()
	for _, v := range []struct{ got, want float64 }{{b.X, 7}, {b.Y, 17}, {b.W, 6}, {b.H, 6}} {
		near(t, "circle's box", v.got, v.want, 1e-9)
	}
	near(t, "circumference", c.Length(), 6*math.Pi, 0.02)
	// An arch of 240 degrees: its top is inside a curve, its ends are below.
	arch := new(Path).Move(-math.Sqrt(3)/2, 0.5).Arc(Point{math.Sqrt(3) / 2, 0.5}, 1, true, true)
	b = arch.Bounds()
	near(t, "arch top", b.Y, -1, 0.0005)
	near(t, "arch bottom", b.Y+b.H, 0.5, 1e-9)
	near(t, "arch width", b.W, 2, 0.001)
	near(t, "rectangle", new(Path).Rect(Rect{0, 0, 3, 4}).Length(), 14, 1e-9)
	near(t, "quadratic", new(Path).Move(0, 0).Quad(Point{1, 1}, Point{2, 0}).Bounds().H, 0.5, 1e-9)
}

// TestFitDash: a line of 60 mm takes whole dashes at both ends.
func TestFitDash(t *testing.T) {
	p := new(Path).Move(0, 0).Line(60, 0)
	d := p.FitDash(6, 0.75, 0.125, 0.75)
	period := d[0] + d[1] + d[2] + d[3]
	n := (60 - d[0]) / period
	near(t, "periods before the last dash", n, math.Round(n), 1e-9)
	near(t, "dash", d[0], 6, 0.1)
	near(t, "proportion", d[1]/d[0], 0.125, 1e-12)
	r := new(Path).Circle(Point{}, 3)
	d = r.FitDash(1.5, 0.75)
	n = r.Length() / (d[0] + d[1])
	near(t, "periods round a circle", n, math.Round(n), 1e-9)
	if new(Path).FitDash(1, 1) != nil {
		t.Error("dashes on nothing")
	}
}

func TestWrapAndCut(t *testing.T) {
	f := Font{Regular, 3.5}
	rapid.Check(t, func(t *rapid.T) {
		text := rapid.StringMatching(`[a-z ]{0,80}`).Draw(t, "text")
		width := rapid.Float64Range(5, 60).Draw(t, "width")
		lines := Wrap(text, f, width)
		for _, l := range lines {
			if Width(l, f) > width || l == "" {
				t.Fatalf("line %q is %v wide, %v given", l, Width(l, f), width)
			}
		}
		if strings.ReplaceAll(strings.Join(lines, ""), " ", "") != strings.ReplaceAll(text, " ", "") {
			t.Fatalf("%q became %q", text, lines)
		}
		if c := Cut(text, f, width); Width(c, f) > width {
			t.Fatalf("%q cut to %q, %v wide", text, c, Width(c, f))
		}
	})
	if got := Wrap("one two\u00a0three", f, Width("one two", f)); len(got) < 2 || got[0] != "one" {
		t.Errorf("no-break space broken: %q", got)
	}
	if got := Cut("Bunkroom corridor", f, Width("Bunkroom…", f)); got != "Bunkroom…" {
		t.Errorf("cut to %q", got)
	}
}
