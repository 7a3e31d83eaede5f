package audit

import (
	"math"

	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// Quality is how well a circuit sheet reads, in numbers.
type Quality struct {
	Sheet      int
	Crossings  int     // of lines, without those of a board's own L− bar
	InBars     int     // crossings of thick lines
	Lines      int     // lines between joints, pins and ends
	Bends      float64 // per line
	Length     float64 // of all lines, over half the perimeter of their pins' boxes
	Aligned    float64 // share of symbols that share a row with another of their kind
	Used       float64 // share of the field that the circuit's box takes
	References int     // without those of rails
	Texts      int
	Turned     float64 // share of turned texts
}

// Measure returns the numbers of every circuit sheet.
func Measure(sheets []Sheet) []Quality {
	var out []Quality
	for _, s := range sheets {
		if !s.Circuit {
			continue
		}
		r := newReader(s)
		r.circuit()
		out = append(out, r.measure())
	}
	return out
}

func (r *reader) measure() Quality {
	q := Quality{Sheet: r.sheet.Number}
	thick := func(p ink.Point) bool {
		for _, l := range r.lines {
			if l.width > 0.4 && l.on(p) {
				return true
			}
		}
		return false
	}
	for _, p := range r.crossed {
		if thick(p) {
			q.InBars++
		} else {
			q.Crossings++
		}
	}
	bends, length := 0, 0.0
	strokes := map[int]bool{}
	boxes := map[int]ink.Rect{}
	for _, l := range r.lines {
		if l.lead {
			continue
		}
		if strokes[l.stroke] {
			bends++
		}
		strokes[l.stroke] = true
		length += math.Abs(l.a.X-l.z.X) + math.Abs(l.a.Y-l.z.Y)
		root := r.root(r.node(l.a))
		for _, p := range []ink.Point{l.a, l.z} {
			if b, ok := boxes[root]; ok {
				boxes[root] = join(b, p)
			} else {
				boxes[root] = ink.Rect{X: p.X, Y: p.Y}
			}
		}
	}
	q.Lines = len(strokes)
	if q.Lines > 0 {
		q.Bends = float64(bends) / float64(q.Lines)
	}
	half := 0.0
	for _, b := range boxes {
		half += b.W + b.H
	}
	if half > 0 {
		q.Length = length / half
	}
	rows := map[string]map[int]int{}
	n, aligned := 0, 0
	var ink0 ink.Rect
	for i, x := range r.symbols {
		if i == 0 {
			ink0 = x.body
		}
		ink0 = join(join(ink0, ink.Point{X: x.body.X, Y: x.body.Y}), ink.Point{X: x.body.X + x.body.W, Y: x.body.Y + x.body.H})
		if x.sym == nil || x.sym == &symbols.ReferenceLeaving || x.sym == &symbols.ReferenceArriving {
			continue
		}
		if rows[x.sym.ID] == nil {
			rows[x.sym.ID] = map[int]int{}
		}
		rows[x.sym.ID][spotOf(x.at).y]++
		n++
	}
	for _, x := range r.symbols {
		if x.sym != nil && rows[x.sym.ID] != nil && (rows[x.sym.ID][spotOf(x.at).y] > 1 || total(rows[x.sym.ID]) == 1) {
			aligned++
		}
	}
	if n > 0 {
		q.Aligned = float64(aligned) / float64(n)
	}
	for _, l := range r.lines {
		ink0 = join(join(ink0, l.a), l.z)
	}
	for _, t := range r.page.Texts {
		if t.Group.In("table") || t.Group.In("notes") {
			ink0 = join(join(ink0, ink.Point{X: t.Box.X, Y: t.Box.Y}), ink.Point{X: t.Box.X + t.Box.W, Y: t.Box.Y + t.Box.H})
		}
		if !t.Group.In("frame") && !t.Group.In("title-block") {
			q.Texts++
			if t.Turn {
				q.Turned++
			}
		}
	}
	if q.Texts > 0 {
		q.Turned /= float64(q.Texts)
	}
	f := r.sheet.Format.Frame()
	field := f.W * (f.H - r.sheet.Format.TitleBlock().H)
	q.Used = ink0.W * ink0.H / field
	seen := map[*Group]bool{}
	for _, x := range r.refs {
		rail := false
		for _, l := range r.lines {
			rail = rail || l.width > 0.4 && l.on(x.x.at)
		}
		if !rail && !seen[x.x.group] {
			q.References++
		}
		seen[x.x.group] = true
	}
	return q
}

func join(b ink.Rect, p ink.Point) ink.Rect {
	x0, y0 := math.Min(b.X, p.X), math.Min(b.Y, p.Y)
	x1, y1 := math.Max(b.X+b.W, p.X), math.Max(b.Y+b.H, p.Y)
	return ink.Rect{X: x0, Y: y0, W: x1 - x0, H: y1 - y0}
}

func total(m map[int]int) int {
	n := 0
	for _, v := range m {
		n += v
	}
	return n
}
