package schematic

import (
	"fmt"
	"testing"

	"gloamwright/layout/ink"
	"gloamwright/layout/schematic/audit"
)

// damage is one way of spoiling a page: it says what it did, or nothing where it does
// not apply.
type damage struct {
	name  string
	apply func(p *audit.Page, i int) bool // i counts strokes, or groups for moves of symbols
}

// copyPage copies a page deep enough to be spoilt.
func copyPage(p *audit.Page) *audit.Page {
	q := *p
	q.Strokes = append([]audit.Stroke(nil), p.Strokes...)
	q.Texts = append([]audit.Text(nil), p.Texts...)
	groups := map[*audit.Group]*audit.Group{}
	q.Groups = nil
	for _, g := range p.Groups {
		c := *g
		c.Data = append([]ink.Attr(nil), g.Data...)
		c.Parent = groups[g.Parent]
		groups[g] = &c
		q.Groups = append(q.Groups, &c)
	}
	for i := range q.Strokes {
		q.Strokes[i].Group = groups[q.Strokes[i].Group]
	}
	for i := range q.Texts {
		q.Texts[i].Group = groups[q.Texts[i].Group]
	}
	return &q
}

func moved(s audit.Stroke, dx, dy float64) audit.Stroke {
	s.Path = s.Path.Map(func(p ink.Point) ink.Point { return ink.Point{X: p.X + dx, Y: p.Y + dy} })
	return s
}

func isWire(s audit.Stroke) bool { return s.Group.In(classWire) || s.Group.In(classRail) }
func isDot(s audit.Stroke) bool  { return s.Group.In(classDot) }

// line adds a line to a page, in the group of another.
func addLine(p *audit.Page, like audit.Stroke, a, z ink.Point) {
	p.Strokes = append(p.Strokes, audit.Stroke{Path: (&ink.Path{}).Polyline(a, z), Width: 0.25, Group: like.Group})
}

var damages = []damage{
	{"drop a line", func(p *audit.Page, i int) bool {
		if !isWire(p.Strokes[i]) {
			return false
		}
		p.Strokes = append(p.Strokes[:i:i], p.Strokes[i+1:]...)
		return true
	}},
	{"move a line sideways", func(p *audit.Page, i int) bool {
		if !isWire(p.Strokes[i]) {
			return false
		}
		p.Strokes[i] = moved(p.Strokes[i], module, 0)
		return true
	}},
	{"move a line down", func(p *audit.Page, i int) bool {
		if !isWire(p.Strokes[i]) {
			return false
		}
		p.Strokes[i] = moved(p.Strokes[i], 0, module)
		return true
	}},
	{"shorten a line", func(p *audit.Page, i int) bool { return stretch(p, i, -module) }},
	{"lengthen a line", func(p *audit.Page, i int) bool { return stretch(p, i, module) }},
	{"bridge to the right", func(p *audit.Page, i int) bool { return bridge(p, i, false) }},
	{"bridge to the right with dots", func(p *audit.Page, i int) bool { return bridge(p, i, true) }},
	{"drop a dot", func(p *audit.Page, i int) bool {
		if !isDot(p.Strokes[i]) {
			return false
		}
		p.Strokes = append(p.Strokes[:i:i], p.Strokes[i+1:]...)
		return true
	}},
	{"move a dot", func(p *audit.Page, i int) bool {
		if !isDot(p.Strokes[i]) {
			return false
		}
		p.Strokes[i] = moved(p.Strokes[i], 0, module)
		return true
	}},
	{"add a dot", func(p *audit.Page, i int) bool {
		s := p.Strokes[i]
		if !isWire(s) {
			return false
		}
		a, z := s.Path.Points[0], s.Path.Points[1]
		if abs(a.X-z.X)+abs(a.Y-z.Y) < 2*module {
			return false
		}
		at := ink.Point{X: a.X + module*sign(z.X-a.X), Y: a.Y + module*sign(z.Y-a.Y)}
		for _, d := range p.Strokes {
			if b := d.Path.Bounds(); isDot(d) && abs(b.X+b.W/2-at.X) < 0.1 && abs(b.Y+b.H/2-at.Y) < 0.1 {
				return false
			}
		}
		p.Strokes = append(p.Strokes, audit.Stroke{Path: (&ink.Path{}).Circle(at, dotRadius*module), Group: s.Group})
		return true
	}},
}

func abs(v float64) float64 { return max(v, -v) }

func sign(v float64) float64 {
	switch {
	case v > 0.01:
		return 1
	case v < -0.01:
		return -1
	}
	return 0
}

// stretch moves the last point of a line along its last piece.
func stretch(p *audit.Page, i int, by float64) bool {
	s := p.Strokes[i]
	if !isWire(s) {
		return false
	}
	n := len(s.Path.Points) - 1
	a, z := s.Path.Points[n-1], s.Path.Points[n]
	if abs(a.X-z.X)+abs(a.Y-z.Y) <= module+0.01 {
		return false
	}
	q := s.Path.Map(func(p ink.Point) ink.Point { return p })
	q.Points[n] = ink.Point{X: z.X + by*sign(z.X-a.X), Y: z.Y + by*sign(z.Y-a.Y)}
	p.Strokes[i].Path = q
	return true
}

// bridge joins an upright line to the next one right of it by a level line.
func bridge(p *audit.Page, i int, dots bool) bool {
	s := p.Strokes[i]
	if !isWire(s) || len(s.Path.Points) < 2 {
		return false
	}
	a, z := s.Path.Points[0], s.Path.Points[1]
	if abs(a.X-z.X) > 0.01 || abs(a.Y-z.Y) < 2*module {
		return false
	}
	y := min(a.Y, z.Y) + module
	to := 1e9
	for _, o := range p.Strokes {
		if !isWire(o) {
			continue
		}
		for k := 1; k < len(o.Path.Points); k++ {
			b, c := o.Path.Points[k-1], o.Path.Points[k]
			if abs(b.X-c.X) < 0.01 && b.X > a.X+1 && min(b.Y, c.Y) < y-1 && max(b.Y, c.Y) > y+1 {
				to = min(to, b.X)
			}
		}
	}
	if to > 1e8 {
		return false
	}
	addLine(p, s, ink.Point{X: a.X, Y: y}, ink.Point{X: to, Y: y})
	if dots {
		for _, x := range []float64{a.X, to} {
			p.Strokes = append(p.Strokes, audit.Stroke{Path: (&ink.Path{}).Circle(ink.Point{X: x, Y: y}, dotRadius*module), Group: s.Group})
		}
	}
	return true
}

// moveSymbol moves a part or terminal with all its strokes, and with the places that
// its pins state, by one module.
func moveSymbol(p *audit.Page, g int) bool {
	o := p.Groups[g]
	if o.Class != classPart && o.Class != classTerminal {
		return false
	}
	for i, s := range p.Strokes {
		if s.Group == o {
			p.Strokes[i] = moved(s, module, 0)
		}
	}
	for _, c := range p.Groups {
		if c.Parent != o || c.Class != "pin" {
			continue
		}
		for k, a := range c.Data {
			if a.Name == "x" {
				var x float64
				fmt.Sscan(a.Value, &x)
				c.Data[k].Value = fmt.Sprint(x + module)
			}
		}
	}
	return true
}

// swapReferences exchanges the printed places of two references.
func swapReferences(p *audit.Page, g int) bool {
	first := -1
	for i, t := range p.Texts {
		if t.Group == nil || t.Group.Class != classReference || len(t.S) == 0 || t.S[0] != '/' {
			continue
		}
		if t.Group == p.Groups[g] {
			first = i
		} else if first >= 0 && p.Texts[first].S != t.S {
			p.Texts[first].S, p.Texts[i].S = t.S, p.Texts[first].S
			return true
		}
	}
	return false
}

// Every damaged copy of the sheets is found out.
func TestAuditFindsDamage(t *testing.T) {
	stride := 4
	if testing.Short() {
		stride = 40
	}
	total := 0
	all := samples(t)
	for _, name := range []string{"bracken-reach", "house-12v"} {
		d := designed(t, all[name])
		sheets := drawn(t, d, false)
		want := audit.FromCircuit(d.Circuit)
		if f := audit.Judge(sheets, want); len(f) > 0 {
			t.Fatalf("%s: %d faults before any damage, such as %v", name, len(f), f[0])
		}
		try := func(n int, what string, apply func(p *audit.Page) bool) {
			page := copyPage(sheets[n].Page)
			if !apply(page) {
				return
			}
			total++
			spoilt := append([]audit.Sheet(nil), sheets...)
			spoilt[n].Page = page
			if len(audit.Judge(spoilt, want)) == 0 {
				t.Errorf("%s sheet %d: not found: %s", name, n+1, what)
			}
		}
		for n, s := range sheets {
			if !s.Circuit {
				continue
			}
			for k, m := range damages {
				for i := k % stride; i < len(s.Page.Strokes); i += stride {
					try(n, fmt.Sprintf("%s, stroke %d of %s", m.name, i, s.Page.Strokes[i].Group.ID), func(p *audit.Page) bool { return m.apply(p, i) })
				}
			}
			for i := 0; i < len(s.Page.Groups); i += stride {
				try(n, "move symbol "+s.Page.Groups[i].ID, func(p *audit.Page) bool { return moveSymbol(p, i) })
				try(n, "swap references at "+s.Page.Groups[i].ID, func(p *audit.Page) bool { return swapReferences(p, i) })
			}
		}
	}
	t.Logf("%d damaged copies, all found", total)
	if !testing.Short() && total < 500 {
		t.Errorf("only %d damaged copies", total)
	}
}
