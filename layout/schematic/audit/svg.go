package audit

import (
	"bytes"
	"encoding/xml"
	"errors"
	"fmt"
	"io"
	"strconv"
	"strings"

	"gloamwright/layout/ink"
)

// FromSVG reads a page from a written file.
func FromSVG(data []byte) (*Page, error) {
	p := &Page{}
	d := xml.NewDecoder(bytes.NewReader(data))
	var group *Group
	var open []*Group // one for every open element
	var text *Text
	title := false
	for {
		t, err := d.Token()
		if errors.Is(err, io.EOF) {
			return p, nil
		}
		if err != nil {
			return nil, err
		}
		switch t := t.(type) {
		case xml.StartElement:
			open = append(open, group)
			a := map[string]string{}
			for _, x := range t.Attr {
				a[x.Name.Local] = x.Value
			}
			switch t.Name.Local {
			case "svg":
				p.W, p.H = number(strings.TrimSuffix(a["width"], "mm")), number(strings.TrimSuffix(a["height"], "mm"))
			case "g":
				group = &Group{Object: objectOf(t.Attr), Parent: group}
				p.Groups = append(p.Groups, group)
			case "path":
				if err := p.path(a, group); err != nil {
					return nil, err
				}
			case "text":
				text = textOf(a, group)
			case "title":
				title = true
			}
		case xml.CharData:
			switch {
			case text != nil:
				text.S += string(t)
			case title && group != nil:
				group.Title += string(t)
			}
		case xml.EndElement:
			switch t.Name.Local {
			case "text":
				text.finish()
				p.Texts = append(p.Texts, *text)
				text = nil
			case "title":
				title = false
			}
			group, open = open[len(open)-1], open[:len(open)-1]
		}
	}
}

func number(s string) float64 {
	v, _ := strconv.ParseFloat(s, 64)
	return v
}

func objectOf(attrs []xml.Attr) ink.Object {
	o := ink.Object{}
	for _, a := range attrs {
		switch n := a.Name.Local; {
		case n == "id":
			o.ID = a.Value
		case n == "class":
			o.Class = a.Value
		case strings.HasPrefix(n, "data-"):
			o.Data = append(o.Data, ink.Attr{Name: strings.TrimPrefix(n, "data-"), Value: a.Value})
		}
	}
	return o
}

func (p *Page) path(a map[string]string, g *Group) error {
	switch a["class"] {
	case "link", "hit", "along": // not seen
		return nil
	}
	path, err := pathOf(a["d"])
	if err != nil {
		return err
	}
	s := Stroke{Path: path, Width: number(a["stroke-width"]), Dash: a["stroke-dasharray"] != "", Group: g}
	if a["stroke"] == "" {
		s.Width = 0
		s.White = a["fill"] == "#FFFFFF"
	}
	p.Strokes = append(p.Strokes, s)
	return nil
}

// pathOf reads the path data that the SVG back end writes: absolute M, L, C and Z.
func pathOf(d string) (*ink.Path, error) {
	p := &ink.Path{}
	var verb byte
	var nums []float64
	flush := func() error {
		at := func(i int) ink.Point { return ink.Point{X: nums[i], Y: nums[i+1]} }
		switch {
		case verb == 'M' && len(nums) == 2:
			p.Move(nums[0], nums[1])
		case verb == 'L' && len(nums) == 2:
			p.Line(nums[0], nums[1])
		case verb == 'C' && len(nums) == 6:
			p.Cubic(at(0), at(2), at(4))
		case verb == 'Z' && len(nums) == 0:
			p.Close()
		case verb != 0:
			return fmt.Errorf("path %q: %c with %d numbers", d, verb, len(nums))
		}
		nums = nums[:0]
		return nil
	}
	for i := 0; i < len(d); {
		switch c := d[i]; {
		case c == 'M' || c == 'L' || c == 'C' || c == 'Z':
			if err := flush(); err != nil {
				return nil, err
			}
			verb = c
			i++
		case c == ' ' || c == ',':
			i++
		default:
			j := i + 1
			for j < len(d) && (d[j] >= '0' && d[j] <= '9' || d[j] == '.') {
				j++
			}
			v, err := strconv.ParseFloat(d[i:j], 64)
			if err != nil {
				return nil, fmt.Errorf("path %q: %w", d, err)
			}
			nums = append(nums, v)
			i = j
		}
	}
	return p, flush()
}

func textOf(a map[string]string, g *Group) *Text {
	t := &Text{At: ink.Point{X: number(a["x"]), Y: number(a["y"])}, Turn: a["transform"] != "", White: a["fill"] == "#FFFFFF", Group: g}
	t.Font.Size = number(a["font-size"])
	family := a["font-family"]
	for _, f := range []ink.Face{ink.Regular, ink.Medium, ink.Bold, ink.Italic, ink.Mono, ink.MonoBold} {
		if strings.HasPrefix(family, "go-"+f.String()+"-") {
			t.Font.Face = f
		}
	}
	switch a["text-anchor"] {
	case "middle":
		t.anchor = ink.Middle
	case "end":
		t.anchor = ink.End
	}
	return t
}

func (t *Text) finish() { t.Box = ink.TextBox(t.At, t.S, t.Font, t.anchor, t.Turn) }
