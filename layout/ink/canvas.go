// Package ink is the drawing surface that every sheet and page is drawn on. A
// drawing is made once, on the Canvas interface; its back ends (SVG, PDF, a
// recorder for tests) only translate.
//
// Lengths are millimetres, x to the right, y down, origin at the upper left
// corner of the trimmed sheet. Every call carries all the style it needs: a
// Canvas has no current colour, font or line width.
package ink

// Point is a place on the sheet in millimetres.
type Point struct{ X, Y float64 }

// Rect is an upright rectangle in millimetres; X, Y is its upper left corner.
type Rect struct{ X, Y, W, H float64 }

// Color is an opaque sRGB colour, 0xRRGGBB.
type Color uint32

// The ink of the project. Meaning never rests on colour alone.
const (
	Black Color = 0x000000
	White Color = 0xFFFFFF
	Dusk  Color = 0x54406B // accent: the horizon line and where the pen writes
	Tint  Color = 0xF0EDF3
	Mid   Color = 0x555555
	Rule  Color = 0x8C8C8C
)

// Pen is how a path is stroked. Butt ends and mitred joins.
type Pen struct {
	Width float64 // mm, > 0
	Color Color
	Dash  []float64 // mm on, off, …; nil for a solid line
}

// Face names one of the embedded type faces.
type Face uint8

// The faces, all of the Go family (x/image/font/gofont).
const (
	Regular Face = iota
	Medium
	Bold
	Italic
	Mono
	MonoBold
)

// Font is a face at a size. Size is the em in millimetres (1 pt = 0.3528 mm).
type Font struct {
	Face Face
	Size float64
}

// Anchor says which point of the text the given place is.
type Anchor uint8

// The anchors, all on the baseline.
const (
	Start Anchor = iota
	Middle
	End
)

// Object describes what a group of strokes stands for. In SVG it becomes a <g>
// with an id, a class, data attributes and a <title>; PDF draws the content only.
type Object struct {
	ID    string // unique on the sheet; empty for none
	Class string // "part", "wire", "dot", "testpoint", "frame", …
	Title string // what a pointer resting on it tells
	Data  []Attr // data-NAME attributes, in order
	// Hit is where a pointer meets the object besides its strokes, in SVG alone: the
	// inside of the path or, with Along, a band along it. It is never seen or printed.
	Hit   *Path
	Along bool
}

// Attr is one data attribute of an Object.
type Attr struct{ Name, Value string }

// Target is where a link leads.
type Target struct {
	File   string // another file of the output folder (SVG), empty within a PDF
	Sheet  int    // packet sheet number (PDF), counted from 1; 0 if unknown
	Anchor string // object ID there (SVG) or a place named by Canvas.Mark (either)
}

// Canvas is one sheet to draw on.
type Canvas interface {
	// Stroke draws the outline of p.
	Stroke(p *Path, pen Pen)
	// Fill fills p with c by the nonzero rule.
	Fill(p *Path, c Color)
	// Text writes s with the given point of its baseline at at. Lines are never
	// broken; upright only when turn is false, read from the right edge when true.
	Text(at Point, s string, f Font, a Anchor, c Color, turn bool)
	// Group calls draw and marks everything it draws as one object.
	Group(o Object, draw func())
	// Link makes r lead to t.
	Link(r Rect, t Target)
	// Mark names a place of this sheet so that links can lead to it.
	Mark(name string, at Point)
}

// Book collects sheets of one document.
type Book interface {
	// Sheet starts a sheet of w x h millimetres; title becomes its bookmark.
	Sheet(w, h float64, title string) Canvas
}
