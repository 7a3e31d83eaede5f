package packet

import (
	"cmp"
	"slices"
	"strconv"

	"gloamwright/internal/circuit"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// cut is one line of the cutting list: a size of cable or of wire in one colour.
type cut struct {
	size   quantity.WireSize
	cores  int // 0: a single wire
	colour string
	pieces int
	length quantity.Metre // of the pieces together
	total  quantity.Metre // to draw from the store
	names  []string
}

// inStore prints a length to draw, in the job's unit.
func (b *book) inStore(m quantity.Metre) string {
	return strconv.FormatFloat(b.lengths.Of(m), 'f', 1, 64)
}

// cuttingList adds up the conductors by size and colour: cables first, thick before
// thin.
func (b *book) cuttingList() []cut {
	var out []cut
	find := func(size quantity.WireSize, cores int, colour string) *cut {
		for i := range out {
			if out[i].size == size && out[i].cores == cores && out[i].colour == colour {
				return &out[i]
			}
		}
		out = append(out, cut{size: size, cores: cores, colour: colour})
		return &out[len(out)-1]
	}
	for _, c := range b.d.Circuit.Cables {
		x := find(c.Size, len(c.Cores), coreColours(c))
		x.pieces++
		x.length += c.Length
		x.names = append(x.names, c.Designation)
	}
	for _, c := range b.d.Circuit.Conductors {
		if c.Cable != nil {
			continue
		}
		x := find(c.Size, 0, c.Colour)
		x.pieces++
		x.length += c.Length
		x.names = append(x.names, c.Number)
	}
	for i := range out {
		out[i].total = sizing.Drawn(out[i].length, b.lengths)
	}
	slices.SortStableFunc(out, func(a, z cut) int {
		single := func(c cut) int { return min(1, c.cores) }
		return cmp.Or(cmp.Compare(single(z), single(a)), cmp.Compare(z.size.Area, a.size.Area))
	})
	return out
}

// coreColours names the colours of a cable's cores.
func coreColours(c *circuit.Cable) string {
	s := ""
	for i, k := range c.Cores {
		if i > 0 {
			s += " "
		}
		s += k.Colour
	}
	return s
}

// cuttingTable is the cutting list, cables at the left, wires at the right.
func (b *book) cuttingTable() []block {
	const w = 87.5
	shift := b.pg.width - w
	cols := []column{{head: "Size", w: 34}, {head: "Colour", w: 18}, {head: "Pieces", w: 13, a: endAnchor}, {head: "Total " + b.lengths.Symbol(), w: 13, a: endAnchor}, {head: "Drawn", w: 9.5, a: midAnchor}}
	t := &table{cols: cols, st: tableText, min: plainRow}
	var left, right []cut
	for _, c := range b.cuttingList() {
		if c.cores > 0 {
			left = append(left, c)
		} else {
			right = append(right, c)
		}
	}
	head := b.head(0, b.pg.width, "Cutting list, whole job", "cut long pieces first; 3 % allowed, rounded up to "+b.lengths.Format(b.lengths.Metres(sizing.CuttingStep(b.lengths))))
	head.marks = []string{"cutting list"}
	out := []block{head}
	heads := beside(t.head(0), t.head(shift))
	out = append(out, heads)
	line := func(list []cut, i int, x float64) block {
		if i >= len(list) {
			return block{}
		}
		c := list[i]
		what := "Wire " + c.size.String()
		if c.cores > 0 {
			what = "Cable " + strconv.Itoa(c.cores) + " × " + c.size.String()
		}
		return t.line(b, x, row{cells: []cell{txt(what), txt(c.colour), txt(strconv.Itoa(c.pieces)), fat(b.inStore(c.total)), tickBox()}})
	}
	var rows []block
	for i := range max(len(left), len(right)) {
		rows = append(rows, beside(line(left, i, 0), line(right, i, shift)))
	}
	return append(out, together(rows)...)
}
