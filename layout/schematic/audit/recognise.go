package audit

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"
	"sync"

	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// recipe is a symbol in one turn as the strokes that it is drawn with.
type recipe struct {
	sym  *symbols.Symbol
	turn symbols.Turn
	sigs []signature // shape and place from the insertion point
	body ink.Rect    // mm, from the insertion point
}

// signature is the shape of a stroke and its place.
type signature struct {
	key  string
	path *ink.Path
	at   ink.Point // first point
}

// signatureOf writes a stroke's kind and coarse shape, by which equal strokes are
// found; equal decides.
func signatureOf(s Stroke) signature {
	var b strings.Builder
	o := s.Path.Points[0]
	fmt.Fprintf(&b, "%v %v ", math.Round(s.Width*100), s.Dash)
	k, curved := 0, false
	for _, v := range s.Path.Verbs {
		fmt.Fprintf(&b, "%d", v)
		k += map[ink.Verb]int{ink.MoveTo: 1, ink.LineTo: 1, ink.CubicTo: 3}[v]
		curved = curved || v == ink.CubicTo
		if p := s.Path.Points[k-1]; !curved {
			fmt.Fprintf(&b, " %d,%d ", coarse(p.X-o.X), coarse(p.Y-o.Y))
		}
	}
	return signature{b.String(), s.Path, o}
}

// coarse rounds to half a millimetre. Symbols' points are multiples of 0.0025 mm;
// the limits lie between them, so that rounding in a file cannot move a point over.
func coarse(v float64) int { return int(math.Floor(v/0.5 + 0.3125)) }

// equal reports whether two strokes have the same shape.
func (g signature) equal(h signature) bool {
	if g.key != h.key || len(g.path.Points) != len(h.path.Points) {
		return false
	}
	for i, p := range g.path.Points {
		q := h.path.Points[i]
		if math.Abs(p.X-g.at.X-q.X+h.at.X) > 2*near || math.Abs(p.Y-g.at.Y-q.Y+h.at.Y) > 2*near {
			return false
		}
	}
	return true
}

// recipes are all symbols in all turns, those of most strokes first.
var recipes = sync.OnceValue(func() []recipe {
	var out []recipe
	for _, s := range symbols.All() {
		turns := []symbols.Turn{symbols.V, symbols.H, symbols.U, symbols.HU}
		if s.Turns == symbols.Fixed {
			turns = turns[:1]
		}
		if s == &symbols.TestPoint || s == &symbols.Junction || s == &symbols.DoubleJunction || s == &symbols.Crossing ||
			s == &symbols.CableOval || s == &symbols.ScreenedCable || s == &symbols.TerminalStrip {
			continue // recognised by their own rules
		}
		for _, t := range turns {
			r := ink.NewRecorder(2*origin, 2*origin, "")
			s.Draw(r, symbols.Place{At: ink.Point{X: origin, Y: origin}, Turn: t, Scale: 1}, ink.Pen{Width: 0.25}, "")
			k := recipe{sym: s, turn: t}
			for _, st := range FromRecorder(r).Strokes {
				k.sigs = append(k.sigs, signatureOf(st))
			}
			b := s.Body(t)
			k.body = ink.Rect{X: b.X * module, Y: b.Y * module, W: b.W * module, H: b.H * module}
			if len(k.sigs) > 0 {
				out = append(out, k)
			}
		}
	}
	slices.SortStableFunc(out, func(a, b recipe) int { return cmp.Compare(len(b.sigs), len(a.sigs)) })
	return out
})

// instance is a symbol found on the page.
type instance struct {
	sym   *symbols.Symbol
	turn  symbols.Turn
	at    ink.Point
	body  ink.Rect
	group *Group
	pins  []pin
	uses  []int // strokes
}

// pin is a place where a symbol is connected.
type pin struct {
	own string // the symbol's name for it
	at  ink.Point
	dir ink.Point // the way the wire leaves
}

// find recognises the symbols of the page; used marks the strokes that are theirs.
func (r *reader) find() {
	r.sigs = make([]signature, len(r.page.Strokes))
	byKey := map[string][]int{}
	for i, s := range r.page.Strokes {
		if len(s.Path.Points) > 0 && !s.White {
			r.sigs[i] = signatureOf(s)
			byKey[r.sigs[i].key] = append(byKey[r.sigs[i].key], i)
		}
	}
	for _, k := range recipes() {
		first := 0
		for j, g := range k.sigs { // the rarest stroke leads
			if len(byKey[g.key]) < len(byKey[k.sigs[first].key]) {
				first = j
			}
		}
		for _, i := range byKey[k.sigs[first].key] {
			if r.used[i] || !r.sigs[i].equal(k.sigs[first]) {
				continue
			}
			o := r.sigs[i].at
			at := ink.Point{X: o.X - k.sigs[first].at.X + origin, Y: o.Y - k.sigs[first].at.Y + origin}
			if !onGrid(at.X) || !onGrid(at.Y) {
				continue
			}
			if uses := r.matches(k, at, byKey); uses != nil {
				r.take(k, at, uses)
			}
		}
	}
}

// origin is where recipes are drawn to be read, mm both ways.
const origin = 50

// matches finds all strokes of a recipe at a place among those not used yet.
func (r *reader) matches(k recipe, at ink.Point, byKey map[string][]int) []int {
	var uses []int
	for _, g := range k.sigs {
		want := ink.Point{X: at.X + g.at.X - origin, Y: at.Y + g.at.Y - origin}
		found := -1
		for _, i := range byKey[g.key] {
			if !r.used[i] && samePoint(r.sigs[i].at, want) && r.sigs[i].equal(g) && !slices.Contains(uses, i) {
				found = i
				break
			}
		}
		if found < 0 {
			return nil
		}
		uses = append(uses, found)
	}
	return uses
}

func (r *reader) take(k recipe, at ink.Point, uses []int) {
	x := &instance{sym: k.sym, turn: k.turn, at: at, uses: uses, group: r.page.Strokes[uses[0]].Group}
	x.body = ink.Rect{X: at.X + k.body.X, Y: at.Y + k.body.Y, W: k.body.W, H: k.body.H}
	for _, i := range uses {
		r.used[i] = true
	}
	for _, p := range k.sym.PinsAt(k.turn) {
		dx, dy := p.Dir.Step()
		x.pins = append(x.pins, pin{p.Name, ink.Point{X: at.X + float64(p.X)*module, Y: at.Y + float64(p.Y)*module},
			ink.Point{X: float64(dx), Y: float64(dy)}})
	}
	r.symbols = append(r.symbols, x)
}

// findBlocks recognises devices drawn as a box: an unused rectangle of 0.25 mm in a
// part's group, with leads that leave it square for one module.
func (r *reader) findBlocks() {
	for i, s := range r.page.Strokes {
		b, ok := s.rectangle()
		if !ok || r.used[i] || s.Width != 0.25 || s.Dash || !s.Group.In("part") {
			continue
		}
		r.used[i] = true
		x := &instance{at: ink.Point{X: b.X + b.W/2, Y: b.Y + b.H/2}, body: b, group: s.Group, uses: []int{i}}
		for j, l := range r.page.Strokes {
			if r.used[j] || l.Group != s.Group || l.Width != 0.25 {
				continue
			}
			if l.Dash || !l.straight() || len(l.Path.Points) != 2 {
				if within(l.Path.Bounds(), b) {
					r.used[j] = true
					x.uses = append(x.uses, j)
				}
				continue
			}
			a, z := l.Path.Points[0], l.Path.Points[1]
			switch {
			case within(l.Path.Bounds(), b):
				r.used[j] = true
				x.uses = append(x.uses, j)
			case leaves(b, a, z):
				x.lead(r, j, z)
			case leaves(b, z, a):
				x.lead(r, j, a)
			}
		}
		r.symbols = append(r.symbols, x)
	}
}

// lead notes a lead of a block; one that ends inside at a contact stays a line.
func (x *instance) lead(r *reader, stroke int, outer ink.Point) {
	if !within(r.page.Strokes[stroke].Path.Bounds(), grow(x.body, module+near)) {
		return
	}
	p := r.page.Strokes[stroke].Path.Points
	inner := p[0]
	if samePoint(inner, outer) {
		inner = p[1]
	}
	if inside(inner, x.body) {
		r.inner[stroke] = true // goes on inside: read as a line
	} else {
		r.used[stroke] = true
		x.uses = append(x.uses, stroke)
	}
	d := ink.Point{}
	switch {
	case outer.X < x.body.X:
		d.X = -1
	case outer.X > x.body.X+x.body.W:
		d.X = 1
	case outer.Y < x.body.Y:
		d.Y = -1
	default:
		d.Y = 1
	}
	x.pins = append(x.pins, pin{at: outer, dir: d})
}

// leaves reports whether the line from a to z starts on or in the box and ends
// outside.
func leaves(b ink.Rect, a, z ink.Point) bool {
	return within(ink.Rect{X: a.X, Y: a.Y}, b) && !within(ink.Rect{X: z.X, Y: z.Y}, b)
}

func within(a, b ink.Rect) bool {
	return a.X >= b.X-near && a.Y >= b.Y-near && a.X+a.W <= b.X+b.W+near && a.Y+a.H <= b.Y+b.H+near
}

func inside(p ink.Point, b ink.Rect) bool {
	return p.X > b.X+near && p.X < b.X+b.W-near && p.Y > b.Y+near && p.Y < b.Y+b.H-near
}

func grow(b ink.Rect, d float64) ink.Rect {
	return ink.Rect{X: b.X - d, Y: b.Y - d, W: b.W + 2*d, H: b.H + 2*d}
}
