package packet

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
)

// wireColumns are the columns of the wire run table, mm: cable or wire, end A, end B, core, length, cut,
// end A, end B, tug, note.
func wireColumns(lengths quantity.LengthUnit) []column {
	return []column{{head: "Cable or wire", w: 26}, {head: "End A, from", w: 27}, {head: "End B, to", w: 27}, {head: "Core", w: 16},
		{head: "Length " + lengths.Symbol(), w: 14, a: endAnchor}, {head: "Cut", w: 11, a: midAnchor}, {head: "End A", w: 11, a: midAnchor}, {head: "End B", w: 11, a: midAnchor},
		{head: "Tug", w: 11, a: midAnchor}, {head: "Note", w: 26, indent: 3}}
}

// wireGroup is the wires between two places, or inside one.
type wireGroup struct {
	title string
	key   string
	list  []*facts.Conductor
}

// wires is the table of wire runs, sorted by enclosure, with the cutting list.
func (b *book) wires() *section {
	s := &section{key: keyWires, title: "Wire runs", document: "Wire run table", letter: "W", label: "Before",
		purpose: "Use this sheet to cut, pull, end and tug-test every wire, one row at a time.",
		note:    fmt.Sprintf("%s: all parts on site. Battery not connected. All fuses out.", b.upperSheets(keyParts))}
	t := &table{cols: wireColumns(b.lengths), st: denseText, min: tickRow}
	head := t.head(0)
	s.heads = &head
	for i, g := range b.wireGroups() {
		var rows []block
		for k := 0; k < len(g.list); {
			c := g.list[k].Conductor
			if c.Cable == nil {
				rows = append(rows, b.wireRow(t, c))
				k++
				continue
			}
			rows = append(rows, b.cableRows(t, c.Cable))
			for k < len(g.list) && g.list[k].Conductor.Cable == c.Cable {
				k++
			}
		}
		s.blocks = append(s.blocks, b.band(g.title, b.wireRemark(g), groupGap(i == 0)))
		s.blocks = append(s.blocks, together(rows)...)
	}
	s.blocks = append(s.blocks, b.cuttingTable()...)
	return s
}

// wireGroups sorts the conductors: for each enclosure the wires inside it, then what
// leaves it.
func (b *book) wireGroups() []wireGroup {
	var out []wireGroup
	add := func(key, title string, c *facts.Conductor) {
		for i := range out {
			if out[i].key == key {
				out[i].list = append(out[i].list, c)
				return
			}
		}
		out = append(out, wireGroup{title: title, key: key, list: []*facts.Conductor{c}})
	}
	placeRank := map[*circuit.Place]int{}
	for i, p := range b.d.Circuit.Places {
		placeRank[p] = i
	}
	type keyed struct {
		rank       [3]int
		key, title string
		c          *facts.Conductor
	}
	var all []keyed
	for _, c := range b.d.Conductors {
		from, to := b.ends(c.Conductor)
		k := keyed{c: c}
		switch {
		case from == nil: // between lamps: with the board that feeds the circuit
			home := b.homeOf(c.Conductor)
			k.rank = [3]int{placeRank[home], 2, 0}
			k.key, k.title = "field "+home.Name, home.Name+" to field"
		case from == to:
			k.rank = [3]int{placeRank[from], 0, 0}
			k.key, k.title = "in "+from.Name, "Inside "+from.Name
		case to == nil:
			k.rank = [3]int{placeRank[from], 2, 0}
			k.key, k.title = "field "+from.Name, from.Name+" to field"
		default:
			a, z := from, to
			if placeRank[z] < placeRank[a] {
				a, z = z, a
			}
			k.rank = [3]int{placeRank[a], 1, placeRank[z]}
			k.key, k.title = "between "+a.Name+" "+z.Name, a.Name+" to "+z.Name
		}
		all = append(all, k)
	}
	slices.SortStableFunc(all, func(a, z keyed) int { return slices.Compare(a.rank[:], z.rank[:]) })
	for _, k := range all {
		add(k.key, k.title, k.c)
	}
	return out
}

// ends are the places of a conductor's ends; nil at a luminaire. A known end comes
// first.
func (b *book) ends(c *circuit.Conductor) (from, to *circuit.Place) {
	from, to = c.From.Part.Place, c.To.Part.Place
	if from == nil {
		from, to = to, from
	}
	return from, to
}

// homeOf is the place of the board that feeds a conductor's circuit.
func (b *book) homeOf(c *circuit.Conductor) *circuit.Place {
	for _, bd := range b.d.Circuit.Boards {
		for _, w := range bd.Ways {
			if w.Lighting != nil && w.Lighting.Name == c.Circuit {
				return bd.Place
			}
		}
	}
	return b.d.Circuit.Places[0]
}

// wireRemark is what holds for all rows of a group.
func (b *book) wireRemark(g wireGroup) string {
	var sizes []string
	cables := 0
	for _, c := range g.list {
		if c.Conductor.Cable != nil {
			cables++
		}
		if s := c.Conductor.Size.String(); !slices.Contains(sizes, s) {
			sizes = append(sizes, s)
		}
	}
	kind := "single wires"
	switch {
	case cables == len(g.list):
		kind = "cables"
	case cables > 0:
		kind = "cables and wires"
	}
	if len(sizes) == 1 {
		kind += ", " + sizes[0]
	}
	return kind + "; ferrules; torque as the terminal says"
}

// runMark names the row of a wire or cable in the wire run table.
func runMark(name string) string { return "run " + name }

// wireRow is a single wire.
func (b *book) wireRow(t *table, c *circuit.Conductor) block {
	note := c.Size.String()
	if c.Rail != "" {
		note += ", " + c.Rail
	}
	return t.line(b, 0, row{changed: b.touched(c.Number), marks: []string{rowMark("wire " + c.Number), runMark(c.Number)}, cells: []cell{
		txt(c.Number), txt(pinName(c.From)), txt(pinName(c.To)), txt(c.Colour), txt(b.lengths.Column(c.Length)),
		tickBox(), tickBox(), tickBox(), tickBox(), upTo(txt(note), 2)}})
}

// cableRows is a cable: one block of a row for each core, with one length and one box
// for the cut.
func (b *book) cableRows(t *table, c *circuit.Cable) block {
	x := make([]float64, len(t.cols)+1)
	for i, k := range t.cols {
		x[i+1] = x[i] + k.w
	}
	name := wrap(bold(c.Designation), t.st, t.cols[0].w-padding)
	size := wrap(fmt.Sprintf("%d × %v", len(c.Cores), c.Size), t.st, t.cols[0].w-padding)
	text := c.Circuit
	if n := b.placeNote(c); n != "" {
		text = strings.TrimPrefix(text+", "+n, ", ")
	}
	n := len(c.Cores)
	high := tickRow
	note, short := cutLines(text, noteText, t.cols[9].w-3, max(2, int(float64(n)*high/noteText.lead)))
	if short {
		b.noteCut(text)
	}
	return block{h: float64(n) * high, marks: []string{rowMark(c.Designation), runMark(c.Designation)}, draw: func(p *pad, y, h float64) {
		l := p.pg.l
		base := func(i int) float64 { return y + float64(i)*high + (high-t.st.lead)/2 + rise*t.st.lead }
		p.text(l, base(0), name[0], ink.Start)
		p.text(l, base(min(1, n-1)), size[0], ink.Start)
		for i, k := range c.Cores {
			p.write(l+x[1], base(i), pinName(k.From), t.st, ink.Start)
			p.write(l+x[2], base(i), pinName(k.To), t.st, ink.Start)
			p.write(l+x[3], base(i), fmt.Sprint(i+1), t.st, ink.Start)
			p.write(l+x[3]+5, base(i), k.Colour, t.st, ink.Start)
			mid := y + (float64(i)+0.5)*high
			for col := 6; col <= 8; col++ {
				p.tick(l+(x[col]+x[col+1])/2, mid)
			}
			if i > 0 {
				at := y + float64(i)*high
				p.rule(l+x[1], at, x[4]-x[1], hairline, ink.Rule)
				p.rule(l+x[6], at, x[9]-x[6], hairline, ink.Rule)
			}
		}
		p.write(l+x[5]-padding, base(0), b.lengths.Column(c.Length), t.st, ink.End)
		p.tick(l+(x[5]+x[6])/2, y+high/2)
		p.lines(l+x[9]+3, y+(high-noteText.lead)/2+rise*noteText.lead, note, noteText.lead)
		p.rule(l, y+h, t.width(), cardLine, ink.Black)
		if b.touched(c.Designation) {
			p.changed(y, h)
		}
	}}
}

// placeNote names the place of the lamp at a cable's end.
func (b *book) placeNote(c *circuit.Cable) string {
	for _, l := range b.d.Luminaires {
		if l.Point.Leg == c {
			return l.Point.Place
		}
	}
	return ""
}
