package schematic

import (
	"fmt"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// conductor returns the object of a conductor.
func (s *scene) conductor(b *book, c *circuit.Conductor) *object {
	t := c.Number
	if c.Cable != nil {
		t += " of " + c.Cable.Designation
	}
	if c.Size.Area > 0 {
		t += ", " + c.Size.String()
	}
	if c.Colour != "" {
		t += " " + c.Colour
	}
	t += fmt.Sprintf(", %s, %s to %s", b.lengths.Format(c.Length), c.From, c.To)
	if f := b.current[c]; f != nil && f.Current > 0 {
		t += ", " + f.Current.String() + " at most"
	}
	if v := b.typicalAt(c.From); v != "" {
		t += ", " + v
	}
	data := []ink.Attr{{Name: "conductor", Value: c.Number}, {Name: "from", Value: c.From.String()}, {Name: "to", Value: c.To.String()}}
	if c.Circuit != "" {
		data = append(data, ink.Attr{Name: "circuit", Value: c.Circuit})
	}
	return s.object(classWire, c.Number+" "+c.Key, t, data...)
}

// cable returns the object of a cable's mark.
func (s *scene) cable(c *circuit.Cable) *object {
	t := c.Designation + ", " + s.lengths.Format(c.Length)
	if s := coresAndSize(c); s != "" {
		t += ", " + s
	}
	return s.object(classCable, c.Designation, t, ink.Attr{Name: "cable", Value: c.Designation})
}

// coresAndSize is "2×1.5 mm²", empty while the size is not known.
func coresAndSize(c *circuit.Cable) string {
	if c.Size.Area == 0 {
		return ""
	}
	return fmt.Sprintf("%d×%s", len(c.Cores), c.Size)
}

// part returns the object of a part's symbol; role tells apart several symbols of
// one part.
func (s *scene) part(p *circuit.Part, role string) *object {
	data := []ink.Attr{{Name: "part", Value: p.Designation}, {Name: "kind", Value: string(p.Kind)}}
	if p.Stage != "" {
		data = append(data, ink.Attr{Name: "stage", Value: p.Stage})
	}
	if p.Circuit != "" {
		data = append(data, ink.Attr{Name: "circuit", Value: p.Circuit})
	}
	if role != "" {
		data = append(data, ink.Attr{Name: "role", Value: role})
	}
	return s.object(classPart, strings.TrimSpace(p.Designation+" "+role), title(p), data...)
}

// number writes a conductor's number into its object.
func (s *scene) number(c *circuit.Conductor, l *line) {
	s.numbers = append(s.numbers, wireNumber{c, l})
}

// wireNumber is the printed number of a conductor.
type wireNumber struct {
	c *circuit.Conductor
	l *line
}

// ring places a terminal.
func (s *scene) ring(t *circuit.Part, at node, level bool) {
	turn := symbols.V
	if level {
		turn = symbols.H
	}
	o := s.terminalObject(t)
	s.symbols = append(s.symbols, &symbol{sym: &symbols.Terminal, at: at, turn: turn, part: t, pins: ringPins(t, level), obj: o})
	s.rings = append(s.rings, ringAt{t, at, level})
}

// ringPins says which pin of a terminal is on which side: a terminal of the upper
// row has its rail above it, one of the lower row below it. In a level wire the
// side is found from the wires; see settleRings.
func ringPins(t *circuit.Part, level bool) map[string]string {
	if !level && !t.Lower {
		return map[string]string{"1": "out", "2": "in"}
	}
	return map[string]string{"1": "in", "2": "out"}
}

// probe draws a test point: a dot on the wire, a stub, a ring for the tip of the
// probe, and its black tag.
func (b *book) probe(sh *Sheet, tp *circuit.TestPoint, at node, side string) {
	t := tp.Label + " " + tp.Shows
	data := []ink.Attr{{Name: "testpoint", Value: tp.Label}, {Name: "terminal", Value: tp.Red.String()}}
	if r := b.reading[tp]; r != nil {
		for i, c := range b.d.Conditions {
			if c.Shown && i < len(r.Bands) {
				t += "; " + c.Name + ": " + volts(r.Bands[i].Typical)
			}
		}
	}
	o := sh.scene.object(classTestPoint, tp.Label, t, data...)
	pl := b.place("tp " + tp.Label)
	pl.sheet, pl.at, pl.anchor = sh, at.point(), o.ID
	sh.scene.points = append(sh.scene.points, &probe{at: at, side: side, label: tp.Label, obj: o})
}

// farEnd is how far a core goes on below the last luminaire to its test point.
const farEnd = 3.0

// bareEnd is the same at a wire that ends in a test point elsewhere.
const bareEnd = 1.5

// tagGap is from the middle of a test point's ring to its tag.
const tagGap = 0.6

func (p *probe) draw(q *painter) {
	d := map[string]symbols.Dir{"N": symbols.Up, "S": symbols.Down, "E": symbols.Right, "W": symbols.Left, "F": symbols.Down}[p.side]
	if !p.bare && p.side != "F" {
		symbols.Probe(q.c, mm(p.at.point()), d, normalPen, p.label)
		return
	}
	// The wire itself goes on to the ring: no joint, so no dot.
	dx, dy := d.Step()
	reach := farEnd
	if p.side != "F" {
		reach = bareEnd
	}
	x, y := float64(p.at.X), float64(p.at.Y)
	rx, ry := x+reach*float64(dx), y+reach*float64(dy)
	segment(normalPen, x, y, rx-ringRadius*float64(dx), ry-ringRadius*float64(dy)).draw(q)
	(&ring{point{rx, ry}, ringRadius}).draw(q)
	at, anchor := point{rx + tagGap, ry}, ink.Start
	if p.side == "W" {
		at, anchor = point{rx - tagGap, ry}, ink.End
	}
	symbols.Tag(q.c, mm(at), p.label, anchor)
}

// box is the room of a test point's ring and tag.
func (p *probe) box() ink.Rect {
	d := map[string]symbols.Dir{"N": symbols.Up, "S": symbols.Down, "E": symbols.Right, "W": symbols.Left, "F": symbols.Down}[p.side]
	at := p.at.point()
	if p.side == "F" {
		at.Y += farEnd - 1.7
	}
	b := symbols.ProbeBox(mm(at), d, p.label)
	return ink.Rect{X: b.X / module, Y: b.Y / module, W: b.W / module, H: b.H / module}
}
