package schematic

import (
	"gloamwright/layout/ink"
)

// Size of the filled triangle that marks what a revision changes, in modules.
const (
	deltaWidth  = 0.9
	deltaHeight = 1.0
	deltaGap    = 0.3
)

// delta is a filled triangle standing on its base; at is the left end of the base.
type delta struct{ at point }

func (d *delta) draw(p *painter) {
	p.c.Fill((&ink.Path{}).Polygon(mm(d.at), mm(point{d.at.X + deltaWidth, d.at.Y}), mm(point{d.at.X + deltaWidth/2, d.at.Y - deltaHeight})), ink.Black)
}

func (d *delta) box() ink.Rect {
	return ink.Rect{X: d.at.X, Y: d.at.Y - deltaHeight, W: deltaWidth, H: deltaHeight}
}

// markChanged puts a triangle beside every designation, wire number and test point tag
// at which the revision changes something, left or right of it or over it, where there is room.
// It reports whether it marked any.
func (s *scene) markChanged(touched map[string]bool) bool {
	var texts []ink.Rect
	for _, o := range s.objects {
		for _, d := range o.items {
			switch d := d.(type) {
			case *line:
				texts = append(texts, d.box())
			case *probe:
				texts = append(texts, d.box())
			}
		}
	}
	any := false
	for _, o := range s.objects {
		label := labelOf(o)
		if label == "" || !touched[label] {
			continue
		}
		for _, d := range o.items {
			var b ink.Rect
			switch d := d.(type) {
			case *line:
				b = d.box()
				b.H = textHeight
			case *probe:
				b = d.box()
				b.Y, b.H = b.Y+(b.H-textHeight)/2, textHeight
			default:
				continue
			}
			base := b.Y + textHeight
			for _, at := range []point{{b.X - deltaGap - deltaWidth, base}, {b.X + b.W + deltaGap, base}, {b.X, b.Y - deltaGap}} {
				if m := (&delta{at}); s.clear(m.box(), texts, b) {
					o.add(m)
					any = true
					break
				}
			}
			break
		}
	}
	return any
}

// labelOf is the label that an object bears, as the register knows it.
func labelOf(o *object) string {
	keys := map[string]string{classPart: "part", classTerminal: "part", classTestPoint: "testpoint", classWire: "conductor", classCable: "cable"}
	for _, a := range o.Data {
		if a.Name == keys[o.Class] {
			return a.Value
		}
	}
	return ""
}

// clear reports whether a box stands off all texts but one, and off all wires and
// symbols.
func (s *scene) clear(b ink.Rect, texts []ink.Rect, own ink.Rect) bool {
	const gap = 0.22
	g := ink.Rect{X: b.X - gap, Y: b.Y - gap, W: b.W + 2*gap, H: b.H + 2*gap}
	hits := func(o ink.Rect) bool {
		return o.X < g.X+g.W && g.X < o.X+o.W && o.Y < g.Y+g.H && g.Y < o.Y+o.H
	}
	for _, t := range texts {
		if t.X == own.X && t.W == own.W && t.Y <= own.Y && own.Y <= t.Y+t.H {
			continue
		}
		if hits(t) {
			return false
		}
	}
	for _, w := range s.wires {
		for i := 1; i < len(w.pts); i++ {
			a, z := w.pts[i-1], w.pts[i]
			if hits(ink.Rect{X: float64(min(a.X, z.X)), Y: float64(min(a.Y, z.Y)), W: float64(max(a.X, z.X) - min(a.X, z.X)), H: float64(max(a.Y, z.Y) - min(a.Y, z.Y))}) {
				return false
			}
		}
	}
	for _, y := range s.symbols {
		if y.sym == nil {
			continue
		}
		r := y.sym.Bounds(y.turn)
		if hits(ink.Rect{X: float64(y.at.X) + r.X, Y: float64(y.at.Y) + r.Y, W: r.W, H: r.H}) {
			return false
		}
	}
	for _, o := range s.objects {
		if o.Class != classBoundary && o.Class != classGuide {
			continue
		}
		for _, d := range o.items {
			if k, ok := d.(*stroke); ok && len(k.pts) == 2 {
				a, z := k.pts[0], k.pts[1]
				if hits(ink.Rect{X: min(a.X, z.X), Y: min(a.Y, z.Y), W: max(a.X, z.X) - min(a.X, z.X), H: max(a.Y, z.Y) - min(a.Y, z.Y)}) {
					return false
				}
			}
		}
	}
	return true
}
