package results

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
)

// wireRuns is one row for each wire or core, in the order of the wire run table.
func wireRuns(d *design.Design) *Table {
	lengths := d.Site.Practice.LengthUnit()
	t := &Table{Name: "wire-runs.csv", Headings: []string{
		"number", "run", "circuit", "from place", "from", "to place", "to", "size", "area mm²", "colour", "colour in words",
		"length " + lengths.Symbol(), "resistance Ω", "current A", "ampacity A", "fuse", "given",
	}}
	for _, o := range d.Conductors {
		c := o.Conductor
		run, pinned := "", false
		if c.Cable != nil {
			run, pinned = c.Cable.Designation, c.Cable.Pinned
		}
		word, _ := catalogue.ColourWord(c.Colour)
		t.Rows = append(t.Rows, []string{
			c.Number, run, c.Circuit, pinPlace(c.From), c.From.String(), pinPlace(c.To), c.To.String(), c.Size.String(), cell(figure(c.Size.Area)),
			c.Colour, word, cell(figure(lengths.Of(c.Length))), cell(figure(c.Ohm)), cell(figure(o.Current)), cell(positive(o.Ampacity)), o.Fuse, given(pinned),
		})
	}
	return t
}

func pinPlace(p *circuit.Pin) string { return placeText(p.Part.Place) }
