package results

import (
	"strconv"

	"gloamwright/internal/design"
)

// fuseMap is one row for each fuse place, spare ones too, in the order of the fuse map.
func fuseMap(d *design.Design) *Table {
	t := &Table{Name: "fuse-map.csv", Headings: []string{
		"designation", "board", "way", "rating A", "kind", "colour", "feeds", "load from A", "load to A", "design current A",
		"cable", "cable ampacity A", "short-circuit current A", "breaking capacity A", "far-end short A", "opens within s",
		"fuse before", "discriminates to A", "given",
	}}
	for _, f := range d.Fuses {
		board, way, feeds, rating := "", "", f.Feeds, cell(positive(f.Rating))
		if f.Board != nil {
			board = f.Board.Title
		}
		if f.Way != nil {
			way = strconv.Itoa(f.Way.Number)
			if f.Way.Spare() {
				feeds = "spare"
			}
		}
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
		t.Rows = append(t.Rows, []string{
			f.Part.Designation, board, way, rating, f.Style, f.Colour, feeds, cell(positive(f.LoadLow)), cell(positive(f.LoadHigh)), cell(positive(f.Design)),
			cable, cell(positive(f.CableAmpacity)), cell(positive(f.Prospective)), cell(positive(f.Breaking)), cell(positive(f.FarEnd)), opens,
			before, selective, given(f.Pinned),
		})
	}
	return t
}
