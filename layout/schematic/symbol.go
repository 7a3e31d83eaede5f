package schematic

import (
	"strconv"

	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// turnOf is the turn that a sketch's letter means; B is a block's only one.
func turnOf(s string) symbols.Turn {
	switch s {
	case "H":
		return symbols.H
	case "U":
		return symbols.U
	case "HU":
		return symbols.HU
	}
	return symbols.V
}

// large names the blocks of six modules, whose lettering stands a reduction.
var large = map[string]string{"regulator3": "regulator_large", "comparator": "comparator_large", "photoswitch": "photoswitch_large"}

// symbolNamed returns the symbol that a sketch names.
func symbolNamed(name string) *symbols.Symbol {
	if n, ok := large[name]; ok {
		name = n
	}
	if s := symbols.ByID(name); s != nil {
		return s
	}
	panic("schematic: no symbol " + name)
}

// symbol places a symbol of a part that has only one.
func (s *scene) symbol(name string, p *circuit.Part, at node, turn string, pins map[string]string) *object {
	o := s.part(p, "")
	s.symbols = append(s.symbols, &symbol{sym: symbolNamed(name), at: at, turn: turnOf(turn), part: p, pins: pins, obj: o})
	return o
}

// terminal places a terminal's ring; first and second are its pins above and below,
// or left and right.
func (s *scene) terminal(t *circuit.Part, at node, turn, first, second string) *object {
	o := s.terminalObject(t)
	s.symbols = append(s.symbols, &symbol{sym: &symbols.Terminal, at: at, turn: turnOf(turn), part: t,
		pins: map[string]string{"1": first, "2": second}, obj: o})
	return o
}

func (s *scene) terminalObject(t *circuit.Part) *object {
	return s.object(classTerminal, t.Designation, t.Designation+" "+t.Description,
		ink.Attr{Name: "part", Value: t.Designation}, ink.Attr{Name: "kind", Value: string(t.Kind)})
}

// pinAt is a drawn pin of a part.
type pinAt struct {
	at   node
	part *circuit.Part
	name string // of the part; empty for the free side of a mains ring
	own  string // the symbol's name for it
}

// pinsAt are the pins of a placed symbol on the sheet.
func (y *symbol) pinsAt() []pinAt {
	if y.fixed != nil {
		return y.fixed
	}
	var out []pinAt
	for _, p := range y.sym.PinsAt(y.turn) {
		name := p.Name
		if n, ok := y.pins[name]; ok {
			name = n
		}
		out = append(out, pinAt{node{y.at.X + p.X, y.at.Y + p.Y}, y.part, name, p.Name})
	}
	return out
}

// A pointer meets a pin within half a module, a joint a little nearer, a symbol a
// little beyond its strokes.
const (
	pinReach   = 0.45
	jointReach = 0.35
	hitMargin  = 0.2
)

// draw adds the symbol and its pins to its object.
func (y *symbol) draw(s *scene, b *book) {
	if y.fixed == nil {
		y.obj.add(&symbolMark{y.sym, y.at, y.turn, y.mark})
		y.obj.Data = append(y.obj.Data, ink.Attr{Name: "symbol", Value: y.sym.ID})
		r := y.sym.Bounds(y.turn)
		y.obj.hit(ink.Rect{X: float64(y.at.X) + r.X - hitMargin, Y: float64(y.at.Y) + r.Y - hitMargin, W: r.W + 2*hitMargin, H: r.H + 2*hitMargin})
	}
	for _, p := range y.pinsAt() {
		if p.name == "" || p.part == nil {
			continue
		}
		id := p.part.Designation + ":" + p.name
		if p.part.Kind == circuit.MainsConnection {
			id = p.part.Key + ":" + p.name
		}
		o := object{Object: ink.Object{ID: s.id("pin-" + id), Class: "pin", Title: id,
			Data: []ink.Attr{{Name: "pin", Value: id}, {Name: "part", Value: partName(p.part)}, {Name: "name", Value: p.name}, {Name: "own", Value: p.own},
				{Name: "x", Value: decimal(p.at.X)}, {Name: "y", Value: decimal(p.at.Y)}}}}
		b.tellPin(&o, p.part.Pin(p.name))
		o.hit(around(p.at.point(), pinReach))
		y.obj.add(&pinMark{o.Object})
	}
}

// symbolMark draws a symbol.
type symbolMark struct {
	s    *symbols.Symbol
	at   node
	turn symbols.Turn
	mark string
}

func (m *symbolMark) draw(p *painter) {
	m.s.Draw(p.c, symbols.On(m.at.X, m.at.Y, m.turn), normalPen, m.mark)
}

// pinMark is an empty group that names a pin's place.
type pinMark struct{ ink.Object }

func (m *pinMark) draw(p *painter) { p.c.Group(m.Object, func() {}) }

func (f *contactFigure) draw(p *painter) {
	symbols.ByID(f.name).Draw(p.c, symbols.Place{At: mm(f.at), Turn: symbols.H, Scale: 0.6}, thinFigurePen, "")
}

// half is how far a symbol reaches from its insertion point to the four sides.
type half struct{ left, right, top, bottom float64 }

func reach(s *symbols.Symbol, turn symbols.Turn) half {
	r := s.Body(turn)
	return half{-r.X, r.X + r.W, -r.Y, r.Y + r.H}
}

// decimal is a grid coordinate in millimetres, for data attributes.
func decimal(n int) string { return strconv.FormatFloat(float64(n)*module, 'f', -1, 64) }
