package results

import (
	"strconv"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
)

// partsList is what must be bought: like parts in one row with their number, then the
// length of cable and wire by size and colour.
func partsList(d *design.Design) *Table {
	lengths := d.Site.Practice.LengthUnit()
	t := &Table{Name: "parts.csv", Headings: []string{"item", "quantity", "unit", "description", "values", "requirement", "designations", "places"}}
	type line struct {
		quantity                         float64
		unit, description, values, needs string
		designations, places             []string
	}
	var lines []*line
	at := map[string]*line{}
	find := func(unit, description, values, needs string) *line {
		k := strings.Join([]string{unit, description, values, needs}, "\x00")
		l, ok := at[k]
		if !ok {
			l = &line{unit: unit, description: description, values: values, needs: needs}
			at[k] = l
			lines = append(lines, l)
		}
		return l
	}
	for _, p := range d.Circuit.Parts {
		if p.Kind == circuit.MainsConnection || p.Kind == circuit.BusBar {
			continue // a boundary, and a part of its board
		}
		var values []string
		for _, v := range p.Values {
			values = append(values, v.Text)
		}
		l := find("piece", p.Description, strings.Join(values, ", "), p.Note)
		l.quantity++
		l.designations = append(l.designations, p.Designation)
		l.places = addNew(l.places, placeText(p.Place))
	}
	inCable := map[*circuit.Conductor]bool{}
	for _, c := range d.Circuit.Cables {
		var colours []string
		for _, w := range c.Cores {
			inCable[w] = true
			colours = append(colours, w.Colour)
		}
		if len(c.Cores) == 0 {
			continue
		}
		l := find(lengths.Symbol(), "Cable", strconv.Itoa(len(c.Cores))+" × "+c.Cores[0].Size.String()+", "+strings.Join(colours, " "), "")
		l.quantity += lengths.Of(c.Length)
		l.designations = append(l.designations, c.Designation)
		l.places = addNew(l.places, placeText(c.From))
		l.places = addNew(l.places, placeText(c.To))
	}
	for _, w := range d.Circuit.Conductors {
		if inCable[w] {
			continue
		}
		l := find(lengths.Symbol(), "Wire", w.Size.String()+", "+w.Colour, "")
		l.quantity += lengths.Of(w.Length)
		l.designations = append(l.designations, w.Number)
		l.places = addNew(l.places, pinPlace(w.From))
	}
	for i, l := range lines {
		t.Rows = append(t.Rows, []string{
			strconv.Itoa(i + 1), cell(figure(l.quantity)), l.unit, l.description, l.values, l.needs,
			strings.Join(l.designations, " "), strings.Join(l.places, "; "),
		})
	}
	return t
}

// addNew appends s unless it is empty or there already.
func addNew(to []string, s string) []string {
	for _, x := range to {
		if x == s {
			return to
		}
	}
	if s == "" {
		return to
	}
	return append(to, s)
}
