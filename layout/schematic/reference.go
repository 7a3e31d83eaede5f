package schematic

import (
	"fmt"

	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// place is where something stands on the sheets. It is filled in when the thing is
// drawn; a text that names it is printed afterwards.
type place struct {
	sheet  *Sheet
	at     point
	anchor string // object ID
}

// String is the reference to the place: "/3.B7".
func (p *place) String() string {
	if p == nil || p.sheet == nil {
		return ""
	}
	return fmt.Sprintf("/%d.%s", p.sheet.Number, p.sheet.Paper.Zone(p.at.X*module, p.at.Y*module))
}

// Sheet is the sheet of the place: "/3".
func (p *place) Sheet() string {
	if p == nil || p.sheet == nil {
		return ""
	}
	return fmt.Sprintf("/%d", p.sheet.Number)
}

// reference is a wire's end that goes on elsewhere. Both ends of a connection
// share one key; together they name one another's place.
type reference struct {
	key  string
	out  bool   // the energy leaves here
	ends []node // one wire, or the two cores of a cable
	turn byte   // side of the sheet: W, E; or N, S for cores that come from or go down
	here *place
}

// refer draws a reference's arrows and returns its place's mate, to be named by a
// text. The way of the arrows is the energy's.
func (b *book) refer(sh *Sheet, key, name string, out bool, turn byte, ends ...node) (obj *object, mate *place) {
	sc := sh.scene
	here, mate := b.referenceEnd(key, out), b.referenceEnd(key, !out)
	r := &reference{key: key, out: out, ends: ends, turn: turn, here: here}
	obj = sc.object(classReference, key+map[bool]string{true: "-out", false: "-in"}[out], "")
	obj.Data = []ink.Attr{{Name: "key", Value: key}, {Name: "net", Value: name}}
	here.sheet, here.at, here.anchor = sh, ends[0].point(), obj.ID
	for _, e := range ends {
		obj.add(&arrow{at: e, turn: turn, out: out})
	}
	sc.refs = append(sc.refs, r)
	return obj, mate
}

func (b *book) referenceEnd(key string, out bool) *place {
	if out {
		return b.place("out " + key)
	}
	return b.place("in " + key)
}

// place returns the place of that name, to be filled in when the thing is drawn.
func (b *book) place(name string) *place {
	p := b.places[name]
	if p == nil {
		p = &place{}
		b.places[name] = p
	}
	return p
}

// arrow is the open chevron of an off-sheet reference on its lead.
type arrow struct {
	at   node
	turn byte
	out  bool
}

// arrowLead is how far an arrow reaches beyond the wire's end.
const arrowLead = 1.2

func (a *arrow) draw(p *painter) {
	s, turn := &symbols.ReferenceArriving, symbols.V
	if a.out {
		s = &symbols.ReferenceLeaving
	}
	if a.turn == 'N' || a.turn == 'S' {
		turn = symbols.HU
	}
	s.Draw(p.c, symbols.On(a.at.X, a.at.Y, turn), normalPen, "")
}
