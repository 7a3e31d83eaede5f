package templates

import (
	"bytes"
	"image"
	"image/color"
	"image/png"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"gloamwright/layout/ink"
)

// folder writes files into a folder of texts.
func folder(t *testing.T, files map[string]string) string {
	t.Helper()
	dir := t.TempDir()
	for name, text := range files {
		if err := os.WriteFile(filepath.Join(dir, name), []byte(text), 0o600); err != nil {
			t.Fatal(err)
		}
	}
	return dir
}

func pngOf(t *testing.T, m image.Image) string {
	t.Helper()
	var b bytes.Buffer
	if err := png.Encode(&b, m); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

// The box of a path is its outline's in the units of the drawing: a half circle of
// radius 40 on the line y = 50, a cubic, and relative commands written without spaces.
func TestFirmWithDrawnLogo(t *testing.T) {
	dir := folder(t, map[string]string{
		"firm.yaml": "name: Hollow and Hill\nlogo: mark.svg\n",
		"mark.svg": `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 120 60"><title>Mark</title>
<g fill="#54406B"><path d="M10 50A40 40 0 0 1 90 50z"/></g>
<path d="m0 52h120v4H0zM100-.5q10 0 10 10"/>
<path fill="none" d="M0 0L1 1"/><rect style="fill:#fff" x="1" y="2" width="3" height="4"/>
<polygon points="0,0 10,0 10,10"/><circle cx="5" cy="5" r="2"/></svg>`})
	texts, list, sources := Load(dir)
	if len(list) > 0 {
		t.Fatal(list.Render(sources))
	}
	if texts.Firm.Name != "Hollow and Hill" {
		t.Errorf("name %q", texts.Firm.Name)
	}
	logo := texts.Firm.Logo
	if logo == nil || logo.W != 120 || logo.H != 60 {
		t.Fatalf("logo %+v", logo)
	}
	want := []struct {
		box   ink.Rect
		color ink.Color
	}{{ink.Rect{X: 10, Y: 10, W: 80, H: 40}, 0x54406B}, {ink.Rect{X: 0, Y: -0.5, W: 120, H: 56.5}, ink.Black},
		{ink.Rect{X: 1, Y: 2, W: 3, H: 4}, ink.White}, {ink.Rect{X: 0, Y: 0, W: 10, H: 10}, ink.Black}, {ink.Rect{X: 3, Y: 3, W: 4, H: 4}, ink.Black}}
	if len(logo.Shapes) != len(want) {
		t.Fatalf("%d shapes, want %d", len(logo.Shapes), len(want))
	}
	const near = 0.02 // a circle's cubics leave its radius by 0.03 %
	for i, w := range want {
		s := logo.Shapes[i]
		b := s.Path.Bounds()
		if s.Color != w.color || math.Abs(b.X-w.box.X) > near || math.Abs(b.Y-w.box.Y) > near || math.Abs(b.W-w.box.W) > near || math.Abs(b.H-w.box.H) > near {
			t.Errorf("shape %d: %06X %+v, want %06X %+v", i, s.Color, b, w.color, w.box)
		}
	}
}

// A PNG of any kind is written anew with eight bits a colour; its dots stay.
func TestFirmWithPNG(t *testing.T) {
	m := image.NewNRGBA64(image.Rect(0, 0, 4, 2))
	m.Set(3, 1, color.NRGBA{R: 0x54, G: 0x40, B: 0x6B, A: 0xFF})
	dir := folder(t, map[string]string{"firm.yaml": "logo: mark.PNG\n", "mark.PNG": pngOf(t, m)})
	texts, list, sources := Load(dir)
	if len(list) > 0 {
		t.Fatal(list.Render(sources))
	}
	logo := texts.Firm.Logo
	if logo == nil || logo.W != 4 || logo.H != 2 {
		t.Fatalf("logo %+v", logo)
	}
	got, err := png.Decode(bytes.NewReader(logo.PNG))
	if err != nil {
		t.Fatal(err)
	}
	if _, ok := got.(*image.NRGBA); !ok {
		t.Errorf("kind %T", got)
	}
	if c := color.NRGBAModel.Convert(got.At(3, 1)); c != (color.NRGBA{R: 0x54, G: 0x40, B: 0x6B, A: 0xFF}) {
		t.Errorf("dot %v", c)
	}
}

func TestMistakesOfAFirmsLogo(t *testing.T) {
	const firm = "name: X\nlogo: mark.svg\n"
	svg := func(body string) map[string]string {
		return map[string]string{"firm.yaml": firm, "mark.svg": "<svg viewBox=\"0 0 9 9\">\n" + body + "\n</svg>"}
	}
	large := pngOf(t, image.NewGray(image.Rect(0, 0, 1001, 1)))
	for _, c := range []struct {
		files map[string]string
		want  string
	}{
		{map[string]string{"firm.yaml": "nam: X\n"}, `firm.yaml:1:1: error: unknown key "nam"`},
		{map[string]string{"firm.yaml": "name: \"\"\n"}, `firm.yaml:1:7: error: a firm without a name`},
		{map[string]string{"firm.yaml": firm}, `firm.yaml:2:7: error: the logo "mark.svg" cannot be read`},
		{map[string]string{"firm.yaml": "logo: ../mark.svg\n"}, `firm.yaml:1:7: error: the logo "../mark.svg" is outside the folder of texts`},
		{map[string]string{"firm.yaml": "logo: mark.gif\n", "mark.gif": "GIF"}, `firm.yaml:1:7: error: the logo "mark.gif" is neither SVG nor PNG`},
		{map[string]string{"firm.yaml": "logo: mark.png\n", "mark.png": "text"}, `firm.yaml:1:7: error: the logo "mark.png" is no PNG`},
		{map[string]string{"firm.yaml": "logo: mark.png\n", "mark.png": large}, `firm.yaml:1:7: error: the logo "mark.png" has 1001 × 1 dots`},
		{svg(`<path d="M1 1 L2"/>`), `mark.svg:2:1: error: path: expected a number`},
		{svg(`<path d="L1 1"/>`), `mark.svg:2:1: error: path: it does not begin with M`},
		{svg(`<path d="M0 0 X"/>`), `mark.svg:2:1: error: path: unknown command "X"`},
		{svg(`<path d="M0 0 A4 2 0 0 1 3 3"/>`), `mark.svg:2:1: error: path: arcs of ellipses are not drawn`},
		{svg(`<path stroke="black" d="M0 0h1v1z"/>`), `mark.svg:2:1: error: outlines are not drawn in a logo`},
		{svg(`<g transform="scale(2)"><path d="M0 0h1v1z"/></g>`), `mark.svg:2:1: error: "transform" is not drawn in a logo`},
		{svg(`<path fill="mauve" d="M0 0h1v1z"/>`), `mark.svg:2:1: error: colour "mauve" is not known`},
		{svg(`<text>X</text>`), `mark.svg:2:1: error: a logo cannot hold <text>`},
		{svg(`<path fill="none" d="M0 0h1v1z"/>`), `error: the drawing holds no filled shape`},
		{svg(`<path d="M0 0h1v1z">`), `error: the drawing is not well-formed`},
		{map[string]string{"firm.yaml": firm, "mark.svg": "<svg><path d=\"M0 0h1v1z\"/></svg>"}, `mark.svg:1:1: error: the drawing has no size`},
	} {
		_, list, sources := Load(folder(t, c.files))
		if out := list.Render(sources); !strings.Contains(out, c.want) {
			t.Errorf("not reported: %s\n%s", c.want, out)
		}
	}
}

// FuzzPathData: no path data brings the reader down or keeps it for ever.
func FuzzPathData(f *testing.F) {
	for _, s := range []string{"M0 0L1 1z", "m1-1.5.5e3h3V2c1,2 3,4 5,6s1 1 2 2q1 1 2 2t1 1a2 2 0 01 3 3zz", "M", "1", "M0 0A0 0 0 0 0 0 0", "MzM0"} {
		f.Add(s)
	}
	f.Fuzz(func(t *testing.T, s string) {
		p := &pathText{text: s}
		if out := p.path(); p.err == nil && len(out.Verbs) > 0 && out.Verbs[0] != ink.MoveTo {
			t.Errorf("%q begins with %v", s, out.Verbs[0])
		}
	})
}
