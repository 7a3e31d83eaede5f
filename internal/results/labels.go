package results

import (
	"strconv"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
)

// labels is one row for each kind of sticker or sleeve to print: how many, and where
// they go. The order is that of mounting: enclosures, devices, terminals, wires,
// cables, test points.
func labels(d *design.Design) *Table {
	t := &Table{Name: "labels.csv", Headings: []string{"kind", "text", "second line", "count", "place", "at"}}
	row := func(kind, text, second string, count int, place, at string) {
		t.Rows = append(t.Rows, []string{kind, text, second, strconv.Itoa(count), place, at})
	}
	c := d.Circuit
	for _, p := range c.Places {
		row("enclosure plate", p.Designation, p.Name, 1, placeText(p), "")
	}
	for _, p := range c.Parts {
		switch p.Kind {
		case circuit.Terminal, circuit.BusBar, circuit.MainsConnection:
			continue
		}
		var shown []string
		for _, v := range p.Values {
			if v.Show {
				shown = append(shown, v.Text)
			}
		}
		second := strings.Join(shown, ", ")
		if second == "" {
			second = p.Description
		}
		row("device plate", p.Designation, second, 1, placeText(p.Place), "")
	}
	for _, p := range c.Parts {
		if p.Kind == circuit.Terminal {
			strip, number, _ := strings.Cut(p.Designation, ":")
			row("terminal tag", number, "", 1, placeText(p.Place), strip)
		}
	}
	const ends = 2
	for _, w := range c.Conductors {
		row("wire sleeve", w.Number, "", ends, pinPlace(w.From), w.From.String()+" and "+w.To.String())
	}
	for _, w := range c.Cables {
		second := w.Size.String()
		if w.Circuit != "" {
			second = w.Circuit + ", " + second
		}
		row("cable flag", w.Designation, second, ends, placeText(w.From), cableEnds(w))
	}
	for _, p := range c.TestPoints {
		row("test point dot", p.Label, p.Shows, 1, pinPlace(p.Red), p.Red.String())
	}
	return t
}

// cableEnds names where the first core of a cable begins and ends.
func cableEnds(w *circuit.Cable) string {
	if len(w.Cores) == 0 {
		return ""
	}
	return w.Cores[0].From.String() + " and " + w.Cores[0].To.String()
}
