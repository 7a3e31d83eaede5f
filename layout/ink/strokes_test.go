package ink_test

import (
	"bytes"
	"fmt"
	"math"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"
	"unicode/utf16"

	"gloamwright/layout/ink"
	"gloamwright/layout/sheet"
	"gloamwright/symbols"
)

// mark is one stroke, fill or text as read back from a finished file, in
// millimetres from the upper left corner of the sheet.
type mark struct {
	kind   string // "stroke", "fill", "text"
	width  float64
	color  string // rrggbb
	dash   []float64
	verbs  string
	points []ink.Point
	text   string
	size   float64
	turned bool
}

// familyName takes the face out of the name of an embedded subset.
var familyName = regexp.MustCompile(`^go-(.+)-[0-9a-f]{8},`)

// svgMarks reads the marks of a picture, with no help from the code that drew it.
func svgMarks(t *testing.T, file []byte) (list []mark) {
	t.Helper()
	num := func(s string) float64 {
		v, err := strconv.ParseFloat(s, 64)
		if err != nil {
			t.Fatal(err)
		}
		return v
	}
	for _, e := range parseXML(t, file) {
		switch {
		case e.name == "path" && e.attr["stroke"] != "", e.name == "path" && e.attr["fill"] != "":
			m := mark{kind: "fill", color: strings.ToLower(strings.TrimPrefix(e.attr["fill"], "#"))}
			if e.attr["stroke"] != "" {
				m = mark{kind: "stroke", width: num(e.attr["stroke-width"]), color: strings.ToLower(e.attr["stroke"][1:])}
				for _, d := range strings.Fields(e.attr["stroke-dasharray"]) {
					m.dash = append(m.dash, num(d))
				}
			}
			data := e.attr["d"]
			for _, letter := range "MLCZ" {
				data = strings.ReplaceAll(data, string(letter), " "+string(letter)+" ")
			}
			var xy []float64
			for _, f := range strings.Fields(data) {
				if strings.Contains("MLCZ", f) {
					m.verbs += f
					continue
				}
				xy = append(xy, num(f))
			}
			for i := 0; i+1 < len(xy); i += 2 {
				m.points = append(m.points, ink.Point{xy[i], xy[i+1]})
			}
			list = append(list, m)
		case e.name == "text":
			m := mark{kind: "text", text: e.text, size: num(e.attr["font-size"]), color: strings.ToLower(e.attr["fill"][1:]),
				turned: strings.HasPrefix(e.attr["transform"], "rotate(-90")}
			name := familyName.FindStringSubmatch(e.attr["font-family"])
			if name == nil {
				t.Fatalf("text %q in %q", e.text, e.attr["font-family"])
			}
			face := faces[slices.IndexFunc(faces, func(f ink.Face) bool { return f.String() == name[1] })]
			w := ink.Width(e.text, ink.Font{face, m.size})
			shift := map[string]float64{"": 0, "middle": w / 2, "end": w}[e.attr["text-anchor"]]
			at := ink.Point{num(e.attr["x"]), num(e.attr["y"])}
			if m.turned {
				at.Y += shift
			} else {
				at.X -= shift
			}
			m.points = []ink.Point{at}
			list = append(list, m)
		}
	}
	return list
}

// pdfMarks reads the marks of the nth uncompressed content stream.
func pdfMarks(t *testing.T, file []byte, n int, height float64) (list []mark) {
	t.Helper()
	const k = 72 / 25.4
	streams := bytes.Split(file, []byte("\nstream\n"))
	body, _, _ := bytes.Cut(streams[n], []byte("\nendstream"))
	var stack []float64
	var cur mark
	var matrix []float64 // of the text being turned
	stroke, fill, text, size, width := "000000", "000000", "", 0.0, 0.0
	var dash []float64
	var saved [][2]string // stroke and fill colours
	rgbText := func(v []float64) string {
		c := func(x float64) int { return int(math.Round(x * 255)) }
		if len(v) == 1 {
			v = []float64{v[0], v[0], v[0]}
		}
		return fmt.Sprintf("%02x%02x%02x", c(v[0]), c(v[1]), c(v[2]))
	}
	toMM := func(x, y float64) ink.Point { return ink.Point{x / k, height - y/k} }
	push := func(letter string) {
		cur.verbs += letter
		for i := 0; i+1 < len(stack); i += 2 {
			cur.points = append(cur.points, toMM(stack[i], stack[i+1]))
		}
	}
	for len(body) > 0 {
		if body[0] == '(' {
			var raw []byte
			i := 1
			for ; body[i] != ')'; i++ {
				if body[i] == '\\' {
					i++
					if body[i] == 'r' {
						raw = append(raw, '\r')
						continue
					}
				}
				raw = append(raw, body[i])
			}
			body = body[i+1:]
			var units []uint16
			for j := 0; j+1 < len(raw); j += 2 {
				units = append(units, uint16(raw[j])<<8|uint16(raw[j+1]))
			}
			text = string(utf16.Decode(units))
			continue
		}
		end := bytes.IndexAny(body, " \n[](")
		if end == 0 {
			if body[0] == '[' {
				stack = nil
			}
			body = body[1:]
			continue
		}
		if end < 0 {
			end = len(body)
		}
		word := string(body[:end])
		body = body[end:]
		if v, err := strconv.ParseFloat(word, 64); err == nil {
			stack = append(stack, v)
			continue
		}
		switch word {
		case "m":
			if cur.verbs == "" {
				cur = mark{}
			}
			push("M")
		case "l":
			push("L")
		case "c":
			push("C")
		case "h":
			push("Z")
		case "q":
			saved = append(saved, [2]string{stroke, fill})
		case "Q":
			stroke, fill = saved[len(saved)-1][0], saved[len(saved)-1][1]
			saved = saved[:len(saved)-1]
		case "w":
			width = stack[0] / k
		case "d":
			dash = nil
			for _, v := range stack[:len(stack)-1] {
				dash = append(dash, v/k)
			}
		case "G", "RG":
			stroke = rgbText(stack)
		case "g", "rg":
			fill = rgbText(stack)
		case "S", "f":
			cur.kind, cur.width, cur.color, cur.dash = "stroke", width, stroke, dash
			if word == "f" {
				cur.kind, cur.width, cur.color, cur.dash = "fill", 0, fill, nil
			}
			list = append(list, cur)
			cur = mark{}
		case "Tf":
			size = stack[len(stack)-1] / k
		case "cm":
			matrix = append([]float64(nil), stack...)
		case "Td":
			x, y := stack[0], stack[1]
			m := mark{kind: "text", size: size, color: fill, turned: matrix != nil}
			if matrix != nil {
				x, y = matrix[0]*x+matrix[2]*y+matrix[4], matrix[1]*x+matrix[3]*y+matrix[5]
				matrix = nil
			}
			m.points = []ink.Point{toMM(x, y)}
			cur = m
		case "Tj":
			cur.text = text
			list = append(list, cur)
			cur = mark{}
		}
		if !strings.HasPrefix(word, "/") {
			stack = nil
		}
	}
	return list
}

// busySheet is a full sheet: frame, notes, every symbol, some of everything.
func busySheet(c ink.Canvas) {
	testSheet(c)
	sheet.A3.Draw(c, sheet.TitleBlock{Owner: "Bracken Reach Trust", Title: "Größe & <more>", Sheet: 2, Of: 5, Warning: "NOT FOR CONSTRUCTION"})
	if _, err := sheet.A3.DrawNotes(c, []sheet.Caution{{Word: "DANGER", Text: "230 V inside."}}, []string{"A note."}); err != nil {
		panic(err)
	}
	turns := []symbols.Turn{symbols.V, symbols.H, symbols.U, symbols.HU}
	for i, s := range symbols.All() {
		t := turns[i%4]
		if !s.Turns.Allows(t) {
			t = symbols.V
		}
		s.Draw(c, symbols.On(20+i%10*12, 25+i/10*8, t), ink.Pen{Width: 0.25, Color: ink.Black}, "GN")
	}
	symbols.Probe(c, ink.Point{X: 200, Y: 250}, symbols.Left, ink.Pen{Width: 0.25, Color: ink.Black}, "TP9")
}

// TestBothInksAlike reads both files back and compares every mark, in order.
func TestBothInksAlike(t *testing.T) {
	count := 0
	counter := ink.NewRecorder(420, 297, "S")
	busySheet(counter)
	var walk func(calls []ink.Call)
	walk = func(calls []ink.Call) {
		for _, c := range calls {
			switch c := c.(type) {
			case ink.Grouped:
				walk(c.Calls)
			case ink.Stroked, ink.Filled, ink.Written:
				count++
			}
		}
	}
	walk(counter.Calls)
	s := ink.NewSVG(420, 297, "S", "")
	busySheet(s)
	picture, err := s.Output()
	if err != nil {
		t.Fatal(err)
	}
	p := ink.NewPDF(testInfo)
	busySheet(p.Sheet(420, 297, "S"))
	document, err := p.Output()
	if err != nil {
		t.Fatal(err)
	}
	a, b := svgMarks(t, picture), pdfMarks(t, inflated(t, document), 1, 297)
	if len(a) != len(b) || len(a) != count || count < 300 {
		t.Fatalf("%d marks in SVG, %d in PDF, %d drawn", len(a), len(b), count)
	}
	for i := range a {
		if err := alike(a[i], b[i]); err != nil {
			t.Errorf("mark %d: %v\nSVG %+v\nPDF %+v", i, err, a[i], b[i])
		}
	}
}

func alike(a, b mark) error {
	const tolerance = 0.01 // mm
	if a.kind != b.kind || a.color != b.color || a.verbs != b.verbs || a.text != b.text || a.turned != b.turned {
		return fmt.Errorf("not the same kind of mark")
	}
	if len(a.points) != len(b.points) || len(a.dash) != len(b.dash) || len(a.points) == 0 {
		return fmt.Errorf("not the same count of points or dashes")
	}
	if math.Abs(a.width-b.width) > tolerance || math.Abs(a.size-b.size) > tolerance {
		return fmt.Errorf("not the same width or size")
	}
	for i := range a.points {
		if math.Hypot(a.points[i].X-b.points[i].X, a.points[i].Y-b.points[i].Y) > tolerance {
			return fmt.Errorf("point %d off", i)
		}
	}
	for i := range a.dash {
		if math.Abs(a.dash[i]-b.dash[i]) > tolerance {
			return fmt.Errorf("dash %d off", i)
		}
	}
	return nil
}
