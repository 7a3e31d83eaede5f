package templates

import (
	"bytes"
	"encoding/xml"
	"errors"
	"fmt"
	"io"
	"math"
	"strconv"
	"strings"

	"gloamwright/layout/ink"
)

// drawing reads the filled shapes of an SVG file (W3C, Scalable Vector Graphics 1.1):
// paths, polygons, rectangles, circles and ellipses in groups. What it cannot draw as
// it stands, it reports.
type drawing struct {
	text   []byte
	faults []fault
	out    ink.Picture
	line   int
	col    int
}

// fault is a mistake in a drawing, with its place.
type fault struct {
	line, col  int
	what, help string
}

func (d *drawing) fault(help, format string, args ...any) {
	d.faults = append(d.faults, fault{d.line, d.col, fmt.Sprintf(format, args...), help})
}

// inherited is what a group hands down.
type inherited struct {
	fill string
}

func (d *drawing) read() *ink.Picture {
	x := xml.NewDecoder(bytes.NewReader(d.text))
	stack := []inherited{{"black"}}
	seen := false
	for {
		d.line, d.col = x.InputPos()
		t, err := x.Token()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			d.line, d.col = x.InputPos()
			d.fault("", "the drawing is not well-formed: %v", err)
			return nil
		}
		switch e := t.(type) {
		case xml.StartElement:
			now := stack[len(stack)-1]
			a := attributes(e, &now)
			switch e.Name.Local {
			case "svg":
				if seen {
					d.fault("", "a drawing within the drawing")
				}
				seen = true
				d.size(a)
			case "g":
				d.plain(a)
			case "title", "desc", "metadata", "defs", "namedview":
				if err := x.Skip(); err != nil {
					d.fault("", "the drawing is not well-formed: %v", err)
					return nil
				}
				continue
			case "path", "polygon", "rect", "circle", "ellipse":
				d.plain(a)
				d.shape(e.Name.Local, a, now.fill)
			default:
				d.fault("A logo is made of path, polygon, rect, circle and ellipse, in groups.", "a logo cannot hold <%s>", e.Name.Local)
			}
			stack = append(stack, now)
		case xml.EndElement:
			stack = stack[:len(stack)-1]
		}
	}
	if !seen {
		d.fault("", "the file holds no <svg>")
	} else if len(d.out.Shapes) == 0 && len(d.faults) == 0 {
		d.fault("", "the drawing holds no filled shape")
	}
	return &d.out
}

// attributes reads attributes and the declarations of "style", which count more.
func attributes(e xml.StartElement, now *inherited) map[string]string {
	a := map[string]string{}
	for _, x := range e.Attr {
		if x.Name.Space == "" {
			a[x.Name.Local] = strings.TrimSpace(x.Value)
		}
	}
	for _, s := range strings.Split(a["style"], ";") {
		if k, v, ok := strings.Cut(s, ":"); ok {
			a[strings.TrimSpace(k)] = strings.TrimSpace(v)
		}
	}
	if f := a["fill"]; f != "" && f != "inherit" {
		now.fill = f
	}
	return a
}

// plain reports what would change the look and is not drawn.
func (d *drawing) plain(a map[string]string) {
	const help = "Turn it into plain filled paths in the drawing program."
	for _, k := range []string{"transform", "clip-path", "mask", "filter"} {
		if a[k] != "" && a[k] != "none" {
			d.fault(help, "%q is not drawn in a logo", k)
		}
	}
	if s := a["stroke"]; s != "" && s != "none" {
		d.fault(help, "outlines are not drawn in a logo")
	}
	if a["fill-rule"] == "evenodd" {
		d.fault("Use nonzero.", "fill-rule evenodd is not drawn in a logo")
	}
	for _, k := range []string{"opacity", "fill-opacity"} {
		if v := a[k]; v != "" {
			if n, err := strconv.ParseFloat(v, 64); err != nil || n != 1 {
				d.fault(help, "a logo is opaque")
			}
		}
	}
}

// size reads viewBox, or width and height. Shapes are moved so that the box begins at
// zero.
func (d *drawing) size(a map[string]string) {
	box := []float64{0, 0, 0, 0}
	if v := strings.FieldsFunc(a["viewBox"], func(r rune) bool { return r == ' ' || r == ',' }); len(v) == 4 {
		for i := range v {
			box[i], _ = strconv.ParseFloat(v[i], 64)
		}
	} else {
		for i, k := range []string{"width", "height"} {
			box[2+i], _ = strconv.ParseFloat(strings.TrimRight(a[k], "pxmct"), 64)
		}
	}
	if !(box[2] > 0 && box[3] > 0) || math.IsInf(box[2]+box[3], 0) {
		d.fault(`Give it a viewBox such as "0 0 120 40".`, "the drawing has no size")
		box[2], box[3] = 1, 1
	}
	d.out.W, d.out.H = box[2], box[3]
	d.origin(box[0], box[1])
}

func (d *drawing) origin(x, y float64) {
	if x != 0 || y != 0 {
		d.fault(`Begin the viewBox with "0 0".`, "the drawing does not begin at 0 0")
	}
}

// shape adds one filled shape.
func (d *drawing) shape(kind string, a map[string]string, fill string) {
	if fill == "none" {
		return
	}
	c, ok := cssColor(fill)
	if !ok {
		d.fault("Colours are #rrggbb, #rgb, black or white.", "colour %q is not known", fill)
		return
	}
	number := func(key string) float64 {
		s := a[key]
		if s == "" {
			return 0
		}
		v, err := strconv.ParseFloat(s, 64)
		if err != nil || math.IsInf(v, 0) || math.IsNaN(v) {
			d.fault("", "%s=%q is no number", key, s)
		}
		return v
	}
	p := &ink.Path{}
	switch kind {
	case "rect":
		p.Rect(ink.Rect{X: number("x"), Y: number("y"), W: number("width"), H: number("height")})
		if a["rx"] != "" || a["ry"] != "" {
			d.fault("Turn it into a path.", "rounded rectangles are not drawn in a logo")
		}
	case "circle":
		p.Circle(ink.Point{X: number("cx"), Y: number("cy")}, number("r"))
	case "ellipse":
		p.Ellipse(ink.Point{X: number("cx"), Y: number("cy")}, number("rx"), number("ry"))
	case "polygon":
		s := &pathText{text: a["points"]}
		var pts []ink.Point
		for !s.done() && s.err == nil {
			x := s.number()
			pts = append(pts, ink.Point{X: x, Y: s.number()})
		}
		if s.err != nil || len(pts) < 3 {
			d.fault("", "polygon with bad points")
			return
		}
		p.Polygon(pts...)
	case "path":
		s := &pathText{text: a["d"]}
		p = s.path()
		if s.err != nil {
			d.fault("", "path: %v", s.err)
			return
		}
	}
	if len(p.Verbs) > 0 {
		d.out.Shapes = append(d.out.Shapes, ink.Shape{Path: p, Color: c})
	}
}

// cssColor reads a colour of CSS: hexadecimal, black or white.
func cssColor(s string) (ink.Color, bool) {
	switch s = strings.ToLower(s); s {
	case "black", "currentcolor":
		return ink.Black, true
	case "white":
		return ink.White, true
	}
	h, ok := strings.CutPrefix(s, "#")
	if ok && len(h) == 3 {
		h = string([]byte{h[0], h[0], h[1], h[1], h[2], h[2]})
	}
	v, err := strconv.ParseUint(h, 16, 24)
	return ink.Color(v), ok && len(h) == 6 && err == nil
}
