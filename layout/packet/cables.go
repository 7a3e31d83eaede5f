package packet

import (
	"fmt"

	"gloamwright/internal/circuit"
)

// cables is the list of cables from place to place, one row each. Here the names of
// places stand in full.
func (b *book) cables() *section {
	if len(b.d.Circuit.Cables) == 0 {
		return nil
	}
	s := &section{key: keyCables, title: "Cable list", document: "Cable list", letter: "Q", label: "Before",
		purpose: "Use this sheet to lay out the ways, to pull the cables and to write what each one took.",
		note:    fmt.Sprintf("%s has the ends of every core. Look for gentle bends and closed glands.", b.upperSheets(keyWires))}
	unit := b.lengths.Symbol()
	t := &table{st: denseText, min: plainRow, cols: []column{{head: "Cable", w: 15}, {head: "Cores and size", w: 25}, {head: "From", w: 32}, {head: "To", w: 39},
		{head: "Planned " + unit, w: 16, a: endAnchor}, {head: "Taken " + unit, w: 20, a: midAnchor}, {head: "Pulled", w: 11, a: midAnchor},
		{head: "Flags", w: 11, a: midAnchor}, {head: "Ends", w: 11, a: midAnchor}}}
	head := t.head(0)
	s.heads = &head
	first := true
	group := func(title, remark string, list []*circuit.Cable) {
		if len(list) == 0 {
			return
		}
		s.blocks = append(s.blocks, b.band(title, remark, groupGap(first)))
		first = false
		var rows []block
		for _, c := range list {
			from, to := b.cableEnds(c)
			rows = append(rows, t.line(b, 0, row{changed: b.touched(c.Designation), marks: []string{"cable " + c.Designation}, cells: []cell{
				txt(bold(c.Designation)), txt(fmt.Sprintf("%d × %v", len(c.Cores), c.Size)), txt(from), txt(to),
				txt(b.lengths.Column(c.Length)), writeIn(), tickBox(), tickBox(), tickBox()}}))
		}
		s.blocks = append(s.blocks, together(rows)...)
	}
	var system []*circuit.Cable
	byCircuit := map[string][]*circuit.Cable{}
	for _, c := range b.d.Circuit.Cables {
		if c.Circuit == "" {
			system = append(system, c)
		} else {
			byCircuit[c.Circuit] = append(byCircuit[c.Circuit], c)
		}
	}
	group("Between enclosures", "", system)
	for _, bd := range b.d.Circuit.Boards {
		for _, w := range bd.Ways {
			if l := w.Lighting; l != nil {
				group(l.Name, fmt.Sprintf("%s, place %d, fuse %s", bd.Title, w.Number, w.Fuse.Designation), byCircuit[l.Name])
			}
		}
	}
	return s
}

// cableEnds names the two places of a cable; a luminaire stands for its own place.
func (b *book) cableEnds(c *circuit.Cable) (from, to string) {
	end := func(pl *circuit.Place, p *circuit.Pin) string {
		if pl != nil {
			return pl.Name
		}
		if l := b.lamp(p.Part); l != nil && l.Point.Place != "" {
			return p.Part.Designation + ", " + l.Point.Place
		}
		return p.Part.Designation
	}
	if len(c.Cores) == 0 {
		return "", ""
	}
	return end(c.From, c.Cores[0].From), end(c.To, c.Cores[0].To)
}
