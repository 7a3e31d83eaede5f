package ink

import (
	"fmt"
	"strings"
	"sync"
	"unicode"
	"unicode/utf8"

	"golang.org/x/image/font"
	"golang.org/x/image/font/gofont/gobold"
	"golang.org/x/image/font/gofont/goitalic"
	"golang.org/x/image/font/gofont/gomedium"
	"golang.org/x/image/font/gofont/gomono"
	"golang.org/x/image/font/gofont/gomonobold"
	"golang.org/x/image/font/gofont/goregular"
	"golang.org/x/image/font/sfnt"
	"golang.org/x/image/math/fixed"
	"golang.org/x/text/unicode/norm"
)

// unitsPerEm and capHeight are the head and OS/2 entries of every Go face.
const (
	unitsPerEm = 2048
	capHeight  = 1480
)

// faceNames name the faces in documents, in the order of the Face constants.
var faceNames = [...]string{"regular", "medium", "bold", "italic", "mono", "mono-bold"}

// String is the name of the face, such as "mono-bold".
func (f Face) String() string {
	if int(f) < len(faceNames) {
		return faceNames[f]
	}
	return fmt.Sprintf("face %d", uint8(f))
}

// Lettering is the font of the face whose capitals are height mm high, the way
// lettering is measured on drawings (ISO 3098).
func Lettering(face Face, height float64) Font {
	return Font{Face: face, Size: height * unitsPerEm / capHeight}
}

// CapHeight is the height of capitals in mm.
func CapHeight(f Font) float64 { return f.Size * capHeight / unitsPerEm }

// Width is the advance of text in mm: the sum of the advances of its glyphs. The
// Go faces have no kerning, so this is what every back end draws. The text is
// measured as Clean leaves it; a rune without a glyph counts as U+FFFD.
func Width(text string, f Font) float64 {
	m := metrics(f.Face)
	sum := 0
	for _, r := range Clean(text) {
		sum += int(m.glyphs[m.index(r)].advance)
	}
	return float64(sum) * f.Size / unitsPerEm
}

// TextBox is the box of the ink of text written at at, as Canvas.Text writes it.
// It is empty at the place of the text when nothing would be seen.
func TextBox(at Point, text string, f Font, a Anchor, turn bool) Rect {
	m := metrics(f.Face)
	scale := f.Size / unitsPerEm
	var x float64
	var left, top, right, bottom float64
	seen := false
	for _, r := range Clean(text) {
		g := m.glyphs[m.index(r)]
		if g.right > g.left {
			l, r := x+float64(g.left), x+float64(g.right)
			t, b := float64(g.top), float64(g.bottom)
			if !seen {
				left, right, top, bottom, seen = l, r, t, b, true
			}
			left, right, top, bottom = min(left, l), max(right, r), min(top, t), max(bottom, b)
		}
		x += float64(g.advance)
	}
	if !seen {
		return Rect{X: at.X, Y: at.Y}
	}
	shift := anchorShift(a, x)
	left, right = (left-shift)*scale, (right-shift)*scale
	top, bottom = top*scale, bottom*scale
	if turn { // along the text is up the page, up the letters is to the left
		return Rect{at.X + top, at.Y - right, bottom - top, right - left}
	}
	return Rect{at.X + left, at.Y + top, right - left, bottom - top}
}

// anchorShift is how far before its anchor a text of the given width begins.
func anchorShift(a Anchor, width float64) float64 {
	switch a {
	case Middle:
		return width / 2
	case End:
		return width
	}
	return 0
}

// Missing lists the runes of text, each once and in order, that the face has no
// glyph for. Text is judged as Clean leaves it.
func Missing(text string, face Face) []rune {
	m := metrics(face)
	var out []rune
	for _, r := range Clean(text) {
		if m.cmap[r] == 0 && !containsRune(out, r) {
			out = append(out, r)
		}
	}
	return out
}

func containsRune(list []rune, r rune) bool {
	for _, x := range list {
		if x == r {
			return true
		}
	}
	return false
}

// Clean makes text fit to be drawn and looked up:
//   - accents are composed and the ohm, kelvin and ångström signs become the
//     letters (Unicode normal form C);
//   - the Greek small mu becomes the micro sign, so that µ is always U+00B5;
//   - thin and narrow no-break spaces become no-break spaces, the no-break hyphen
//     a hyphen-minus, line ends and tabs a space;
//   - soft hyphens, zero-width and control characters are dropped;
//   - broken UTF-8 and runes above U+FFFF become U+FFFD: no face holds them.
//
// Every back end draws text as Clean leaves it.
func Clean(text string) string {
	if plain(text) {
		return text
	}
	var b strings.Builder
	for _, r := range norm.NFC.String(strings.ToValidUTF8(text, "\uFFFD")) {
		switch {
		case r == 'μ':
			r = 'µ'
		case r == '\u2009' || r == '\u202F':
			r = '\u00A0'
		case r == '\u2010' || r == '\u2011':
			r = '-'
		case r == '\n' || r == '\r' || r == '\t' || r == '\u2028' || r == '\u2029':
			r = ' '
		case r == '\u00AD' || unicode.IsControl(r) || unicode.Is(unicode.Cf, r):
			continue
		case r > 0xFFFF:
			r = utf8.RuneError
		}
		b.WriteRune(r)
	}
	return b.String()
}

// plain reports whether text holds nothing but runes that Clean leaves as they are,
// as most texts do: printable ASCII, Latin letters and signs that are whole in Unicode
// normal form C, and the signs of formulas.
func plain(text string) bool {
	for _, r := range text {
		switch {
		case r >= ' ' && r <= '~':
		case r >= '\u00A0' && r < '\u0300' && r != '\u00AD':
		case r == 'Ω', r == 'Δ', r == 'Σ', r == 'η', r == 'θ', r == 'ρ', r == 'τ':
		case r == '–', r == '—', r == '…', r == '−', r == '≤', r == '≥', r == '√', r == '₀', r == '₁', r == '₂':
		default:
			return false
		}
	}
	return true
}

// glyph is the advance and the ink box of one glyph in font units, y down.
type glyph struct{ advance, left, top, right, bottom int16 }

// faceMetrics holds what measuring needs of a face.
type faceMetrics struct {
	cmap   [0x10000]uint16 // glyph of each rune, 0 if none
	glyphs []glyph
}

// index is the glyph of r, or that of U+FFFD.
func (m *faceMetrics) index(r rune) uint16 {
	if g := m.cmap[r]; g != 0 {
		return g
	}
	return m.cmap[utf8.RuneError]
}

// fontFile is the TrueType file of a face. It is shared by everything that runs
// in the process: callers only read it.
func fontFile(f Face) []byte {
	switch f {
	case Medium:
		return gomedium.TTF
	case Bold:
		return gobold.TTF
	case Italic:
		return goitalic.TTF
	case Mono:
		return gomono.TTF
	case MonoBold:
		return gomonobold.TTF
	}
	return goregular.TTF
}

var loadMetrics = func() (load [len(faceNames)]func() *faceMetrics) {
	for i := range load {
		load[i] = sync.OnceValue(func() *faceMetrics { return readMetrics(fontFile(Face(i))) })
	}
	return load
}()

func metrics(f Face) *faceMetrics {
	if int(f) >= len(loadMetrics) {
		f = Regular
	}
	return loadMetrics[f]()
}

// readMetrics reads a font that is part of the program; a fault in it is a fault
// of the build, which the tests of this package would show.
func readMetrics(file []byte) *faceMetrics {
	parsed, err := sfnt.Parse(file)
	if err != nil {
		panic("ink: embedded font: " + err.Error())
	}
	m := &faceMetrics{glyphs: make([]glyph, parsed.NumGlyphs())}
	var buf sfnt.Buffer
	for r := range rune(len(m.cmap)) {
		if g, err := parsed.GlyphIndex(&buf, r); err == nil {
			m.cmap[r] = uint16(g)
		}
	}
	const ppem = fixed.Int26_6(unitsPerEm) // one unit of the result is 1/2048 em
	for i := range m.glyphs {
		box, advance, err := parsed.GlyphBounds(&buf, sfnt.GlyphIndex(i), ppem, font.HintingNone)
		if err != nil {
			panic("ink: embedded font: " + err.Error())
		}
		m.glyphs[i] = glyph{int16(advance), int16(box.Min.X), int16(box.Min.Y), int16(box.Max.X), int16(box.Max.Y)}
	}
	return m
}

// Wrap breaks text into lines of at most width mm, at spaces; no-break spaces
// hold. A word wider than a line is broken between letters. Empty text is no
// line at all.
func Wrap(text string, f Font, width float64) []string {
	var lines []string
	line := ""
	for _, word := range strings.FieldsFunc(Clean(text), func(r rune) bool { return r == ' ' }) {
		if line != "" && Width(line+" "+word, f) <= width {
			line += " " + word
			continue
		}
		if line != "" {
			lines = append(lines, line)
		}
		line = ""
		for _, r := range word {
			if line != "" && Width(line+string(r), f) > width {
				lines = append(lines, line)
				line = ""
			}
			line += string(r)
		}
	}
	if line != "" {
		lines = append(lines, line)
	}
	return lines
}

// Cut is text, or as much of its beginning as stands within width mm with an
// ellipsis behind it.
func Cut(text string, f Font, width float64) string {
	text = Clean(text)
	if Width(text, f) <= width {
		return text
	}
	runes := []rune(text)
	for n := len(runes) - 1; n > 0; n-- {
		if s := strings.TrimRight(string(runes[:n]), " \u00A0") + "…"; Width(s, f) <= width {
			return s
		}
	}
	return "…"
}
