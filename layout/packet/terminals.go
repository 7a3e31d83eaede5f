package packet

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
)

// strip is one terminal strip: its terminals as they stand on the rail.
type strip struct {
	name  string // "-X1"
	place *circuit.Place
	list  []*circuit.Part
	bars  []*circuit.Part
}

// strips lists the strips with their terminals in the order of their numbers.
func (b *book) strips() []*strip {
	var out []*strip
	find := func(p *circuit.Part) *strip {
		name, _, _ := strings.Cut(p.Designation, ":")
		for _, s := range out {
			if s.name == name {
				return s
			}
		}
		s := &strip{name: name, place: p.Place}
		out = append(out, s)
		return s
	}
	for _, p := range b.d.Circuit.Parts {
		switch p.Kind {
		case circuit.Terminal:
			s := find(p)
			s.list = append(s.list, p)
		case circuit.BusBar:
			s := find(p)
			s.bars = append(s.bars, p)
		}
	}
	for _, s := range out {
		slices.SortStableFunc(s.list, func(a, z *circuit.Part) int { return terminalNumber(a) - terminalNumber(z) })
	}
	slices.SortStableFunc(out, func(a, z *strip) int { return stripNumber(a.name) - stripNumber(z.name) })
	return out
}

// terminalNumber is the number of a terminal on its strip.
func terminalNumber(p *circuit.Part) int {
	_, n, _ := strings.Cut(p.Designation, ":")
	v, err := strconv.Atoi(n)
	if err != nil {
		return 0
	}
	return v
}

func stripNumber(name string) int {
	n, err := strconv.Atoi(strings.TrimLeft(name, "-X"))
	if err != nil {
		return 0
	}
	return n
}

// terminalEnds is what ends on a terminal.
type terminalEnds struct {
	inside, field []*circuit.Conductor
	rail          string
}

// endsOn lists the conductors of a terminal: single wires, cores of cables, and the
// rail that bridges it to others.
func (b *book) endsOn(p *circuit.Part) terminalEnds {
	var e terminalEnds
	for _, c := range b.d.Circuit.Conductors {
		if c.From.Part != p && c.To.Part != p {
			continue
		}
		switch {
		case c.Rail != "":
			e.rail = c.Rail
		case c.Cable != nil:
			e.field = append(e.field, c)
		default:
			e.inside = append(e.inside, c)
		}
	}
	if e.rail == "" { // alone on its rail
		for _, r := range b.d.Circuit.Rails {
			for _, n := range r.Pins {
				if n.Part == p {
					e.rail = r.Name
				}
			}
		}
	}
	return e
}

// farSide is the other end of a conductor on a part.
func farSide(c *circuit.Conductor, p *circuit.Part) *circuit.Pin {
	if c.From.Part == p {
		return c.To
	}
	return c.From
}

// Measures of the bridge column, mm.
const (
	bridgeColumn = 2
	laneFirst    = 2.4
	lanePitch    = 2.6
)

// terminals is the plan of every strip, drawn like the strip itself.
func (b *book) terminals() *section {
	s := &section{key: keyTerminals, title: "Terminal plans", document: "Terminal plan", letter: "T", label: "Before",
		purpose: "Use this sheet to land every wire on its terminal, and to find a terminal again.",
		note:    "The top row is the left end of the rail. Tick In and Out when the wire holds a tug.",
		sub:     func(topics []string) string { return listed(topics) }}
	t := &table{st: denseText, min: tickRow, cols: []column{{head: "Inside, to", w: 32}, {head: "Wire", w: 15}, {head: "Bridge", w: 16}, {head: "Terminal", w: 22},
		{head: "Cable", w: 16}, {head: "Core", w: 13}, {head: "Field, to", w: 30}, {head: "In", w: 10, a: ink.Middle}, {head: "Out", w: 10, a: ink.Middle}, {head: "Rail", w: 16, indent: 2}}}
	head := t.head(0)
	s.heads = &head
	for i, x := range b.strips() {
		band := b.band(stripTitle(x), fmt.Sprintf("%s, left to right as on the rail", counted(len(x.list), "terminal")), groupGap(i == 0))
		band.topic = x.name
		s.blocks = append(s.blocks, band)
		var rows []block
		lanes := b.bridges(x)
		for k, p := range x.list {
			rows = append(rows, b.terminalRow(t, p, lanes[k]))
		}
		for _, p := range x.bars {
			rows = append(rows, b.barRow(t, p))
		}
		for k := range rows {
			rows[k].topic = x.name
		}
		s.blocks = append(s.blocks, together(rows)...)
	}
	if len(s.blocks) == 0 {
		return nil
	}
	s.blocks = append(s.blocks, b.paragraph("A dot with a line is a bridge of the rail named at the right: its wires stand in the wire run table. Terminals that nothing ends on are spare.", noteText, 1))
	return s
}

// stripTitle names a strip and where it is.
func stripTitle(s *strip) string {
	if s.place == nil {
		return s.name
	}
	return s.name + ", " + s.place.Name
}

// lane is what of one bridge a row shows.
type lane struct {
	n        int
	dot      bool
	up, down bool // the line goes on above, below
}

// bridges draws each rail that joins terminals of a strip in a lane of its own; lanes
// are used again where bridges do not overlap.
func (b *book) bridges(s *strip) [][]lane {
	out := make([][]lane, len(s.list))
	type bridge struct{ rows []int }
	var list []bridge
	for _, r := range b.d.Circuit.Rails {
		var g bridge
		for i, p := range s.list {
			for _, n := range r.Pins {
				if n.Part == p && !slices.Contains(g.rows, i) {
					g.rows = append(g.rows, i)
				}
			}
		}
		if len(g.rows) > 1 {
			list = append(list, g)
		}
	}
	slices.SortStableFunc(list, func(a, z bridge) int { return a.rows[0] - z.rows[0] })
	var ends []int // last row of what each lane holds
	for _, g := range list {
		first, last := g.rows[0], g.rows[len(g.rows)-1]
		n := 0
		for n < len(ends) && ends[n] >= first {
			n++
		}
		if n == len(ends) {
			ends = append(ends, 0)
		}
		ends[n] = last
		for i := first; i <= last; i++ {
			out[i] = append(out[i], lane{n: n, dot: slices.Contains(g.rows, i), up: i > first, down: i < last})
		}
	}
	return out
}

func (b *book) terminalRow(t *table, p *circuit.Part, lanes []lane) block {
	e := b.endsOn(p)
	var to, wires, cables, cores, field []string
	changed := b.touched(p.Designation)
	for _, c := range e.inside {
		to = append(to, pinName(farSide(c, p)))
		wires = append(wires, c.Number)
		changed = changed || b.touched(c.Number)
	}
	for _, c := range e.field {
		cables = append(cables, c.Cable.Designation)
		cores = append(cores, c.Colour)
		field = append(field, pinName(farSide(c, p)))
		changed = changed || b.touched(c.Cable.Designation)
	}
	in, out := none(), none()
	if len(e.inside) > 0 {
		in = tickBox()
	}
	if len(e.field) > 0 {
		out = tickBox()
	}
	rail := e.rail
	if rail == "" && len(e.inside)+len(e.field) == 0 || b.spareTerminal(p) {
		rail = "spare"
	}
	r := t.line(b, 0, row{changed: changed, marks: []string{rowMark(p.Designation)}, cells: []cell{
		txt(join(to)), txt(join(wires)), none(), fat(p.Designation), txt(join(cables)), txt(join(cores)), txt(join(field)), in, out, txt(rail)}})
	draw := r.draw
	left := 0.0
	for _, c := range t.cols[:bridgeColumn] {
		left += c.w
	}
	r.draw = func(pd *pad, y, h float64) {
		draw(pd, y, h)
		for _, l := range lanes {
			x := pd.pg.l + left + laneFirst + lanePitch*float64(l.n)
			mid := y + h/2
			if l.up {
				pd.stroke(x, y, x, mid, headLine, ink.Black)
			}
			if l.down {
				pd.stroke(x, mid, x, y+h, headLine, ink.Black)
			}
			if l.dot {
				pd.disc(x, mid, 0.9, ink.Black)
			}
		}
	}
	return r
}

// join writes several ends of one cell below each other.
func join(list []string) string { return strings.Join(list, " ") }

// spareTerminal reports whether a terminal belongs to a spare way of a board.
func (b *book) spareTerminal(p *circuit.Part) bool {
	for _, bd := range b.d.Circuit.Boards {
		for _, w := range bd.Ways {
			if w.Spare() && (w.TermPlus == p || w.TermMinus == p) {
				return true
			}
		}
	}
	return false
}

// barRow is a bar of a board with the wires on it.
func (b *book) barRow(t *table, p *circuit.Part) block {
	var wires []string
	for _, c := range b.d.Circuit.Conductors {
		if c.From.Part == p || c.To.Part == p {
			wires = append(wires, c.Number)
		}
	}
	text := strings.Join(wires, ", ")
	switch {
	case len(wires) == 1:
		text = "wire " + text
	case len(wires) > 1:
		text = "wires " + text
	}
	return t.line(b, 0, row{marks: []string{rowMark(p.Designation)}, cells: []cell{over(txt(text), 2), fat(p.Designation), over(txt(p.Description), 2), none(), none(), none()}})
}
