package schematic

import (
	"strconv"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// module is the drawing module in millimetres (memory of IEC 60617's grid): pins,
// bends and joints lie on whole modules. All lengths of this package are modules
// unless they say otherwise.
const module = 2.5

// node is a place on the grid.
type node struct{ X, Y int }

// point is any place.
type point struct{ X, Y float64 }

func (n node) point() point { return point{float64(n.X), float64(n.Y)} }

// The classes of objects, in drawing order.
const (
	classBoundary  = "boundary"
	classGuide     = "guide"
	classWire      = "wire"
	classRail      = "rail"
	classDot       = "junction"
	classCable     = "cable"
	classPart      = "part"
	classTerminal  = "terminal"
	classTestPoint = "testpoint"
	classReference = "reference"
	classBlock     = "block"
	classTable     = "table"
	classNote      = "note"
)

// drawable is one thing of an object that is drawn.
type drawable interface{ draw(p *painter) }

// object is one thing that the drawing shows: its strokes and texts are drawn as
// one group.
type object struct {
	ink.Object
	items []drawable
}

func (o *object) add(d ...drawable) { o.items = append(o.items, d...) }

// hit adds a rectangle, in modules, in which a pointer meets the object.
func (o *object) hit(r ink.Rect) {
	if o.Hit == nil {
		o.Hit = &ink.Path{}
	}
	o.Hit.Rect(ink.Rect{X: r.X * module, Y: r.Y * module, W: r.W * module, H: r.H * module})
}

// along adds a line along which a pointer meets the object.
func (o *object) along(pts []node) {
	if o.Hit == nil {
		o.Hit, o.Along = &ink.Path{}, true
	}
	for i, n := range pts {
		at := mm(n.point())
		if i == 0 {
			o.Hit.Move(at.X, at.Y)
		} else {
			o.Hit.Line(at.X, at.Y)
		}
	}
}

// around is the square around a place.
func around(at point, half float64) ink.Rect {
	return ink.Rect{X: at.X - half, Y: at.Y - half, W: 2 * half, H: 2 * half}
}

// scene is one sheet's drawing before it meets a canvas.
type scene struct {
	objects []*object
	byKey   map[string]*object
	ids     map[string]int
	wires   []*wire
	symbols []*symbol
	points  []*probe
	refs    []*reference
	rings   []ringAt
	numbers []wireNumber
	moved   int // labels that found their first place taken
	lengths quantity.LengthUnit
}

// ringAt is a terminal's ring on a stage sheet, to be named when all are drawn.
type ringAt struct {
	term  *circuit.Part
	at    node
	level bool // in a level wire
}

func newScene(lengths quantity.LengthUnit) *scene {
	return &scene{byKey: map[string]*object{}, ids: map[string]int{}, lengths: lengths}
}

// object returns the object of that class and name, making it on first use.
func (s *scene) object(class, name, title string, data ...ink.Attr) *object {
	key := class + " " + name
	if o := s.byKey[key]; o != nil {
		return o
	}
	o := &object{Object: ink.Object{ID: s.id(class + "-" + name), Class: class, Title: title, Data: data}}
	s.byKey[key] = o
	s.objects = append(s.objects, o)
	return o
}

// id makes an identifier out of a name that is not yet taken on the sheet.
func (s *scene) id(name string) string {
	var b strings.Builder
	for _, r := range name {
		switch {
		case r >= 'a' && r <= 'z', r >= 'A' && r <= 'Z', r >= '0' && r <= '9':
			b.WriteRune(r)
		case r == '+':
			b.WriteString("plus")
		case r == '−':
			b.WriteString("minus")
		default:
			b.WriteByte('-')
		}
	}
	out := strings.Trim(b.String(), "-")
	for strings.Contains(out, "--") {
		out = strings.ReplaceAll(out, "--", "-")
	}
	s.ids[out]++
	if n := s.ids[out]; n > 1 {
		return s.id(out + "-" + strconv.Itoa(n))
	}
	return out
}

// wire is one polyline of right angles.
type wire struct {
	pts   []node
	rail  bool               // its strokes stay apart, one a conductor
	thick bool               // 0.5 mm
	cond  *circuit.Conductor // nil: a track, or a rail
	name  string             // groups the strokes of one rail or track
	owner *object            // set when it is drawn
}

func (s *scene) wire(c *circuit.Conductor, pts ...node) *wire {
	w := &wire{pts: pts, cond: c}
	s.wires = append(s.wires, w)
	return w
}

// symbol is one placed symbol.
type symbol struct {
	sym   *symbols.Symbol
	at    node
	turn  symbols.Turn
	part  *circuit.Part
	pins  map[string]string // symbol pin to part pin, where they differ
	obj   *object
	mark  string  // in the symbol's own text slot
	fixed []pinAt // pins of a block drawn by hand; no symbol is drawn
}

// probe is a test point's mark: a dot on the wire, a stub, a ring, a tag.
type probe struct {
	at    node
	side  string // N, E, S, W; F at the far end of a circuit
	bare  bool   // the wire ends here: no joint
	label string
	obj   *object
}
