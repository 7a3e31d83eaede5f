package schematic

import (
	"bytes"
	"encoding/xml"
	"io"
	"strings"
	"testing"
)

// told is a group of an SVG file with what a pointer finds in it.
type told struct {
	id, class, title string
	data             map[string]string
	hits, texts      int
}

// groupsOf reads the groups of an SVG file.
func groupsOf(t *testing.T, file []byte) []*told {
	t.Helper()
	var out []*told
	open := []*told{nil}
	d := xml.NewDecoder(bytes.NewReader(file))
	inTitle := false
	for {
		tok, err := d.Token()
		if err == io.EOF {
			return out
		}
		if err != nil {
			t.Fatal(err)
		}
		switch tok := tok.(type) {
		case xml.StartElement:
			g := open[len(open)-1]
			switch tok.Name.Local {
			case "g":
				g = &told{data: map[string]string{}}
				for _, a := range tok.Attr {
					switch n := a.Name.Local; {
					case n == "id":
						g.id = a.Value
					case n == "class":
						g.class = a.Value
					case strings.HasPrefix(n, "data-"):
						g.data[strings.TrimPrefix(n, "data-")] = a.Value
					}
				}
				out = append(out, g)
			case "title":
				inTitle = true
			case "text":
				if g != nil {
					g.texts++
				}
			case "path":
				for _, a := range tok.Attr {
					if g != nil && a.Name.Local == "class" && (a.Value == "hit" || a.Value == "along") {
						g.hits++
					}
					if a.Name.Local == "class" && (a.Value == "hit" || a.Value == "along") && len(tok.Attr) != 2 {
						t.Errorf("a hit area with %v: it could be seen", tok.Attr)
					}
				}
			}
			open = append(open, g)
		case xml.EndElement:
			open = open[:len(open)-1]
			inTitle = false
		case xml.CharData:
			if g := open[len(open)-1]; g != nil && inTitle {
				g.title += string(tok)
			}
		}
	}
}

// A pointer finds every part, pin, terminal, conductor, junction and test point, and
// is told what it is; a pin tells its wire and the voltage to expect.
func TestPointersFindThings(t *testing.T) {
	for name, src := range samples(t) {
		d := designed(t, src)
		sheets, err := Sheets(d)
		if err != nil {
			t.Fatal(err)
		}
		wired, pins, ids := 0, 0, map[string]bool{}
		for _, s := range sheets {
			file, err := s.SVG()
			if err != nil {
				t.Fatal(err)
			}
			clear(ids)
			for _, g := range groupsOf(t, file) {
				if g.id != "" && ids[g.id] {
					t.Errorf("%s sheet %d: two groups %s", name, s.Number, g.id)
				}
				ids[g.id] = true
				switch g.class {
				case classPart, classTerminal, classTestPoint, classWire, classRail, classDot, "pin":
				default:
					continue
				}
				boxed := g.class == classPart && g.data["symbol"] == "" // a frame around parts of its own
				named := g.class == classRail && g.texts > 0            // a rail's name by itself
				if g.id == "" || g.title == "" || g.hits == 0 && !boxed && !named {
					t.Errorf("%s sheet %d: %s %q has title %q, %d hit areas", name, s.Number, g.class, g.id, g.title, g.hits)
				}
				if g.class != "pin" {
					continue
				}
				pins++
				if g.data["part"] == "" || g.data["pin"] == "" {
					t.Errorf("%s sheet %d: pin %s has data %v", name, s.Number, g.id, g.data)
				}
				if g.data["conductor"] != "" && g.data["net"] != "" && strings.Contains(g.title, " V with ") {
					wired++
				}
			}
		}
		if wired < pins/3 {
			t.Errorf("%s: %d of %d pins tell wire, net and voltage", name, wired, pins)
		}
	}
}
