package results

import (
	"strconv"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
	"gloamwright/internal/facts"
)

// fuseMap is one row for each fuse place: the fuses outside the boards, then board by
// board every way, spare ones too.
func fuseMap(d *design.Design) *Table {
	t := &Table{Name: "fuse-map.csv", Headings: []string{
		"designation", "board", "way", "rating A", "kind", "colour", "feeds", "load from A", "load to A", "design current A",
		"cable", "cable ampacity A", "short-circuit current A", "breaking capacity A", "far-end short A", "opens within s",
		"fuse before", "discriminates to A", "given",
	}}
	inWay := map[*circuit.Way]*facts.Fuse{}
	for _, f := range d.Fuses {
		if f.Way != nil {
			inWay[f.Way] = f
			continue
		}
		t.Rows = append(t.Rows, fuseRow(f, "", ""))
	}
	for _, b := range d.Circuit.Boards {
		for _, w := range b.Ways {
			way := strconv.Itoa(w.Number)
			if f := inWay[w]; f != nil && !w.Spare() {
				t.Rows = append(t.Rows, fuseRow(f, b.Title, way))
				continue
			}
			row := make([]string, len(t.Headings))
			row[0], row[1], row[2], row[6] = w.Fuse.Designation, b.Title, way, "spare"
			t.Rows = append(t.Rows, row)
		}
	}
	return t
}

func fuseRow(f *facts.Fuse, board, way string) []string {
	opens, before, selective, cable := "", "", "", ""
	if f.Opens {
		opens = cell(figure(f.OpensWithin))
	}
	if f.Before != nil {
		before, selective = f.Before.Part.Designation, cell(figure(f.DiscriminatesTo))
	}
	if f.CableSize.Area > 0 {
		cable = f.CableSize.String()
	}
	return []string{
		f.Part.Designation, board, way, cell(positive(f.Rating)), f.Style, f.Colour, f.Feeds, cell(positive(f.LoadLow)), cell(positive(f.LoadHigh)),
		cell(positive(f.Design)), cable, cell(positive(f.CableAmpacity)), cell(positive(f.Prospective)), cell(positive(f.Breaking)),
		cell(positive(f.FarEnd)), opens, before, selective, given(f.Pinned),
	}
}
