package audit

import (
	"cmp"
	"math"
	"slices"
	"strings"

	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// Clearances of texts (common practice, no source): to one another and to bodies,
// and to lines.
const (
	clearText = 0.3
	clearLine = 0.5
	leastText = 2.5 // height of capitals in a circuit
	beside    = 4.2 // modules from a symbol to its designation, three lines of ratings between
)

// texts checks that every text of the sheet stands clear. Texts on a table's rules
// have their rows; they are held against other texts only.
func (r *reader) texts() {
	f := r.sheet.Format.Frame()
	list := make([]Text, 0, len(r.page.Texts))
	for _, t := range r.page.Texts {
		if strings.TrimSpace(t.S) == "" || t.Group.In("frame") || t.Group.In("title-block") {
			continue
		}
		list = append(list, t)
		if h := ink.CapHeight(t.Font); h < leastText-near {
			r.fault(RuleHeight, t.At, "%q is %.2f mm high", t.S, h)
		}
		if !within(t.Box, f) {
			r.fault(RuleField, t.At, "%q outside the frame", t.S)
		}
		if b := r.sheet.Format.TitleBlock(); apart(t.Box, b) < clearText {
			r.fault(RuleField, t.At, "%q in the title block", t.S)
		}
	}
	slices.SortStableFunc(list, func(a, b Text) int { return cmp.Compare(a.Box.Y, b.Box.Y) })
	for i, t := range list {
		for j := i + 1; j < len(list) && list[j].Box.Y < t.Box.Y+t.Box.H+clearText; j++ {
			if apart(t.Box, list[j].Box) < clearText-near {
				r.fault(RuleText, t.At, "%q touches %q", t.S, list[j].S)
			}
		}
	}
	for i := range r.page.Strokes {
		s := &r.page.Strokes[i]
		if s.White || len(s.Path.Points) == 0 || s.Group.In("frame") && s.Width >= 0.35 {
			continue
		}
		for _, t := range list {
			r.textOver(t, s)
		}
	}
}

// textOver holds one text against one stroke.
func (r *reader) textOver(t Text, s *Stroke) {
	need := clearText
	if s.Group.In("wire") || s.Group.In("rail") {
		need = clearLine
	}
	if s.Width == 0 {
		if t.White && s.Group == t.Group && within(t.Box, s.Path.Bounds()) {
			return // a tag and its letters
		}
		if apart(t.Box, s.Path.Bounds()) < need-near {
			r.fault(RuleText, t.At, "%q touches a filled mark", t.S)
		}
		return
	}
	if b := s.Path.Bounds(); apart(t.Box, grow(b, s.Width/2)) >= need {
		return
	}
	d := math.Inf(1)
	for _, p := range flatten(s.Path) {
		d = math.Min(d, toBox(p[0], p[1], t.Box))
	}
	if d-s.Width/2 < need-near {
		r.fault(RuleText, t.At, "%q is %.2f mm from a line", t.S, math.Max(0, d-s.Width/2))
	}
}

// apart is the distance of two boxes, 0 where they touch or overlap.
func apart(a, b ink.Rect) float64 {
	dx := math.Max(0, math.Max(a.X-b.X-b.W, b.X-a.X-a.W))
	dy := math.Max(0, math.Max(a.Y-b.Y-b.H, b.Y-a.Y-a.H))
	return math.Hypot(dx, dy)
}

// flatten turns a path into straight pieces.
func flatten(p *ink.Path) [][2]ink.Point {
	var out [][2]ink.Point
	var start, at ink.Point
	k := 0
	for _, v := range p.Verbs {
		switch v {
		case ink.MoveTo:
			start, at = p.Points[k], p.Points[k]
			k++
		case ink.LineTo:
			out = append(out, [2]ink.Point{at, p.Points[k]})
			at = p.Points[k]
			k++
		case ink.CubicTo:
			a, b, c, d := at, p.Points[k], p.Points[k+1], p.Points[k+2]
			const n = 8
			for i := 1; i <= n; i++ {
				q := bezier(a, b, c, d, float64(i)/n)
				out = append(out, [2]ink.Point{at, q})
				at = q
			}
			k += 3
		case ink.Close:
			out = append(out, [2]ink.Point{at, start})
			at = start
		}
	}
	return out
}

func bezier(a, b, c, d ink.Point, t float64) ink.Point {
	u := 1 - t
	k0, k1, k2, k3 := u*u*u, 3*u*u*t, 3*u*t*t, t*t*t
	return ink.Point{X: k0*a.X + k1*b.X + k2*c.X + k3*d.X, Y: k0*a.Y + k1*b.Y + k2*c.Y + k3*d.Y}
}

// toBox is the distance of a straight piece from a box, by halving: exact enough
// for clearances, 0 inside.
func toBox(a, z ink.Point, b ink.Rect) float64 {
	at := func(t float64) float64 {
		p := ink.Point{X: a.X + (z.X-a.X)*t, Y: a.Y + (z.Y-a.Y)*t}
		return apart(ink.Rect{X: p.X, Y: p.Y}, b)
	}
	lo, hi := 0.0, 1.0 // the distance from a convex box is convex along the line
	for range 40 {
		m1, m2 := lo+(hi-lo)/3, hi-(hi-lo)/3
		if at(m1) <= at(m2) {
			hi = m2
		} else {
			lo = m1
		}
	}
	return at((lo + hi) / 2)
}

// names checks that every symbol of a part bears its designation, and that no other
// symbol is nearer to it.
func (r *reader) names() {
	for _, x := range r.symbols {
		if x.group == nil || !x.group.In("part") || x.sym == &symbols.UndervoltageRelease {
			continue
		}
		if x.sym != nil && x.onlyInside(r) {
			continue
		}
		want := x.group.Get("part")
		best := math.Inf(1)
		var at ink.Rect
		for _, t := range r.page.Texts {
			if t.S == want {
				if d := apart(t.Box, x.body); d < best {
					best, at = d, t.Box
				}
			}
		}
		if best > beside*module {
			r.fault(RuleName, x.at, "symbol without its designation %s beside it (%.1f mm)", want, best)
			continue
		}
		for _, y := range r.symbols {
			if y != x && y.group != nil && y.group.In("part") && y.group.Get("part") != want && apart(at, y.body) < best-near {
				r.fault(RuleName, x.at, "designation %s stands nearer to %s", want, y.group.Get("part"))
			}
		}
	}
}

// onlyInside reports whether the symbol stands inside a box of its own part.
func (x *instance) onlyInside(r *reader) bool {
	for _, y := range r.symbols {
		if y.sym == nil && y.group == x.group && within(x.body, y.body) {
			return true
		}
	}
	return false
}
