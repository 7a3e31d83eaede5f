package schematic

import (
	"fmt"

	"gloamwright/layout/ink"
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
		obj.add(&arrow{at: e.point(), turn: turn, out: out})
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

// arrow is the open chevron of an off-sheet reference on its lead of 1.2 modules.
type arrow struct {
	at   point
	turn byte
	out  bool
}

const (
	arrowLead = 1.2
	arrowTip  = 0.2 // an arriving tip stands this far from the wire's end
)

func (a *arrow) draw(p *painter) {
	dx, dy := 0.0, 0.0
	switch a.turn {
	case 'E':
		dx = 1
	case 'W':
		dx = -1
	case 'S':
		dy = 1
	case 'N':
		dy = -1
	}
	segment(normalPen, a.at.X, a.at.Y, a.at.X+dx*arrowLead, a.at.Y+dy*arrowLead).draw(p)
	tip, back := arrowLead, arrowLead-0.5
	if !a.out {
		tip, back = arrowTip, arrowTip+0.5
	}
	t := point{a.at.X + dx*tip, a.at.Y + dy*tip}
	u := point{a.at.X + dx*back, a.at.Y + dy*back}
	(&stroke{pts: []point{{u.X - dy*0.4, u.Y + dx*0.4}, t, {u.X + dy*0.4, u.Y - dx*0.4}}, pen: normalPen}).draw(p)
}
