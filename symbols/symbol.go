// Package symbols holds the graphical symbols of IEC 60617 that the circuit
// diagrams need, and a few of the project's own, as Go values that draw
// themselves on an ink.Canvas.
//
// Lengths are in modules of M = 2.5 mm, x to the right, y down, from the
// symbol's insertion point. Pins lie on whole modules; a part with two pins is
// four modules long, so that chains of them stay on the grid.
//
// Symbol numbers of the IEC 60617 database are given only where number and name
// were seen together in a published extract; all other shapes follow the
// standard as handbooks print it. Class letters are those of IEC 81346-2:2009, main
// classes (from memory).
package symbols

import "gloamwright/layout/ink"

// M is the module of the grid in millimetres.
const M = 2.5

// Dir is the way a wire leaves a pin.
type Dir uint8

// The four ways, counter-clockwise, so that each quarter turn adds one.
const (
	Up Dir = iota
	Left
	Down
	Right
)

// Step is the unit vector of d.
func (d Dir) Step() (dx, dy int) {
	switch d {
	case Up:
		return 0, -1
	case Left:
		return -1, 0
	case Down:
		return 0, 1
	}
	return 1, 0
}

// Turn is how a symbol stands on the sheet.
type Turn uint8

// The turns, each a quarter further counter-clockwise.
const (
	V  Turn = iota // as recorded: current runs downward, pin 1 above
	H              // pin 1 at the left: (x, y) becomes (y, -x)
	U              // upside down: (-x, -y)
	HU             // pin 1 at the right: (-y, x)
)

// Apply turns a point about the insertion point.
func (t Turn) Apply(p ink.Point) ink.Point {
	switch t {
	case H:
		return ink.Point{X: p.Y, Y: -p.X}
	case U:
		return ink.Point{X: -p.X, Y: -p.Y}
	case HU:
		return ink.Point{X: -p.Y, Y: p.X}
	}
	return p
}

// level reports whether the current runs across the sheet.
func (t Turn) level() bool { return t == H || t == HU }

// Turns says how a symbol may stand.
type Turns uint8

// The rules of turning.
const (
	Turnable Turns = iota // parts in a current path: all four turns
	Fixed                 // blocks: V only
	Node                  // joints, terminals, earths: all four turns
	Contact               // V and H only, so that contacts move to the right or up when actuated
)

// Allows reports whether a symbol may stand in turn t.
func (k Turns) Allows(t Turn) bool {
	switch k {
	case Fixed:
		return t == V
	case Contact:
		return t == V || t == H
	}
	return true
}

// Pin is a place where a wire meets the symbol, in modules.
type Pin struct {
	Name string
	X, Y int
	Dir  Dir // the way the wire leaves
}

// Symbol is one graphical symbol.
type Symbol struct {
	ID     string // unique, stable
	Name   string // what it stands for, for the legend
	Letter string // class letter of IEC 81346-2, first use; empty for what bears none or the letter of its device
	IEC    string // number in the IEC 60617 database, where certain
	Turns  Turns
	Pins   []Pin // in form V
	shapes []shape
}

// PinsAt is the pins in turn t, in the order of Pins.
func (s *Symbol) PinsAt(t Turn) []Pin {
	out := make([]Pin, len(s.Pins))
	for i, p := range s.Pins {
		q := t.Apply(ink.Point{X: float64(p.X), Y: float64(p.Y)})
		out[i] = Pin{p.Name, int(q.X), int(q.Y), (p.Dir + Dir(t)) % 4}
	}
	return out
}

// Bounds is the box around all lines of the symbol in turn t, in modules: leads
// count, text does not.
func (s *Symbol) Bounds(t Turn) ink.Rect { return s.box(t, false) }

// Body is Bounds without the straight leads to the pins; zero when nothing else
// is drawn.
func (s *Symbol) Body(t Turn) ink.Rect { return s.box(t, true) }

// Below is how far the symbol's own lettering stands below Bounds in turn t, in modules;
// 0 where it does not.
func (s *Symbol) Below(t Turn) float64 {
	r, most := s.Bounds(t), 0.0
	for _, sh := range s.shapes {
		if sh.path == nil && sh.shows(t) && !sh.slot {
			most = max(most, sh.textAt(t).Y-r.Y-r.H)
		}
	}
	return most
}

func (s *Symbol) box(t Turn, body bool) ink.Rect {
	var all ink.Path
	for _, sh := range s.shapes {
		if sh.path == nil || !sh.shows(t) || body && s.isLead(sh) {
			continue
		}
		p := sh.turned(t)
		all.Verbs = append(all.Verbs, p.Verbs...)
		all.Points = append(all.Points, p.Points...)
	}
	return all.Bounds()
}

// isLead reports whether sh is a single straight line that ends on a pin.
func (s *Symbol) isLead(sh shape) bool {
	if len(sh.path.Verbs) != 2 || sh.path.Verbs[1] != ink.LineTo {
		return false
	}
	for _, end := range sh.path.Points {
		for _, p := range s.Pins {
			if end.X == float64(p.X) && end.Y == float64(p.Y) {
				return true
			}
		}
	}
	return false
}

// Place is where and how a symbol is drawn.
type Place struct {
	At    ink.Point // insertion point, mm on the sheet
	Turn  Turn
	Scale float64 // 1 on circuit diagrams; smaller for figures in tables
}

// On is a place at full scale on module (x, y) of the sheet.
func On(x, y int, t Turn) Place {
	return Place{At: ink.Point{X: M * float64(x), Y: M * float64(y)}, Turn: t, Scale: 1}
}

// Line widths against the pen's, and the dashes of a mechanical link, in modules
// (ISO 128-2 line types; proportions from memory).
const (
	heavyFactor = 2
	linkDash    = 0.6
	linkGap     = 0.3
)

// Draw draws s. The pen gives colour and width of normal lines (0.25 mm on
// diagrams); heavy strokes are twice as wide. Mark is written into the symbol's
// own text slot, if it has one, such as the colour code of a signal lamp; empty
// leaves it out.
func (s *Symbol) Draw(c ink.Canvas, at Place, pen ink.Pen, mark string) {
	mm := func(p ink.Point) ink.Point {
		return ink.Point{X: at.At.X + p.X*M*at.Scale, Y: at.At.Y + p.Y*M*at.Scale}
	}
	for _, sh := range s.shapes {
		if !sh.shows(at.Turn) {
			continue
		}
		if sh.path == nil {
			written := sh.text
			if sh.slot {
				written = mark
			}
			if written != "" {
				f := ink.Lettering(ink.Regular, sh.height*M*at.Scale)
				c.Text(mm(sh.textAt(at.Turn)), written, f, sh.anchor, pen.Color, false)
			}
			continue
		}
		p := sh.turned(at.Turn).Map(mm)
		switch {
		case sh.fill:
			c.Fill(p, pen.Color)
		case sh.dash:
			scale := M * at.Scale
			c.Stroke(p, ink.Pen{Width: pen.Width, Color: pen.Color, Dash: p.FitDash(linkDash*scale, linkGap*scale)})
		case sh.bold:
			c.Stroke(p, ink.Pen{Width: heavyFactor * pen.Width, Color: pen.Color})
		default:
			c.Stroke(p, ink.Pen{Width: pen.Width, Color: pen.Color})
		}
	}
}
