package results

import (
	"fmt"
	"strconv"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// partsList is what must be bought: like parts in one row with their number, then the
// length of cable and wire by size and colour.
func partsList(d *design.Design) *Table {
	lengths := d.Site.Practice.LengthUnit()
	t := &Table{Name: "parts.csv", Headings: []string{"item", "quantity", "unit", "description", "values", "requirement", "designations", "places", "buy", "each", "cost"}}
	type line struct {
		quantity                         float64
		unit, description, values, needs string
		designations, places             []string
		bill                             *facts.BillLine // nil: there are no prices
	}
	var lines []*line
	at := map[string]*line{}
	find := func(unit, description, values, needs string, bill *facts.BillLine) *line {
		k := strings.Join([]string{unit, description, values, needs}, "\x00")
		if bill != nil {
			k += "\x00" + bill.Name
		}
		l, ok := at[k]
		if !ok {
			l = &line{unit: unit, description: description, values: values, needs: needs, bill: bill}
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
		bill := billed(d.Bill, p)
		if bill != nil && p.Kind == circuit.Terminal {
			values = append(values, "to "+strings.TrimPrefix(bill.Name, "terminal "))
		}
		l := find("piece", p.Description, strings.Join(values, ", "), p.Note, bill)
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
		l := find(lengths.Symbol(), "Cable", strconv.Itoa(len(c.Cores))+" × "+c.Cores[0].Size.String()+", "+strings.Join(colours, " "), "",
			drawn(d.Bill, len(c.Cores), c.Size, strings.Join(colours, " ")))
		l.quantity += lengths.Of(c.Length)
		l.designations = append(l.designations, c.Designation)
		l.places = addNew(l.places, placeText(c.From))
		l.places = addNew(l.places, placeText(c.To))
	}
	for _, w := range d.Circuit.Conductors {
		if inCable[w] {
			continue
		}
		l := find(lengths.Symbol(), "Wire", w.Size.String()+", "+w.Colour, "", drawn(d.Bill, 0, w.Size, w.Colour))
		l.quantity += lengths.Of(w.Length)
		l.designations = append(l.designations, w.Number)
		l.places = addNew(l.places, pinPlace(w.From))
	}
	if d.Bill != nil {
		for _, b := range d.Bill.Lines {
			switch {
			case b.Place != nil:
				l := find("piece", "Enclosure", "", "", b)
				l.quantity++
				l.places = addNew(l.places, placeText(b.Place))
			case b.Spare != nil:
				find("piece", b.Spare.Class.Title+", spare link", b.Spare.Rating.String(), "", b).quantity = b.Quantity
			case b.Parts != nil && b.Parts[0].Kind == circuit.BusBar:
				l := find("piece", "Bars of a board", fmt.Sprintf("%d ways", len(b.Parts[0].Pins)-1), "", b)
				for _, p := range b.Parts {
					l.quantity++
					l.places = addNew(l.places, placeText(p.Place))
				}
			}
		}
	}
	for i, l := range lines {
		row := []string{
			strconv.Itoa(i + 1), cell(figure(l.quantity)), l.unit, l.description, l.values, l.needs,
			strings.Join(l.designations, " "), strings.Join(l.places, "; "), "", "", "",
		}
		if b := l.bill; b != nil {
			buy := l.quantity
			if b.Cores > 0 || b.Size.Area > 0 || len(b.Parts) == 1 { // length to draw, blocks of a battery
				buy = b.Quantity
			}
			row[8] = cell(figure(buy))
			if b.Priced {
				row[9], row[10] = cell(money(b.Each)), cell(money(sizing.LineCost(b.Each, buy)))
			}
		}
		t.Rows = append(t.Rows, row)
	}
	return t
}

// billed returns the line of a part in the bill; nil without prices.
func billed(b *facts.Bill, p *circuit.Part) *facts.BillLine {
	if b == nil {
		return nil
	}
	return b.ByPart[p]
}

// drawn returns the line of a conductor in the bill; nil without prices.
func drawn(b *facts.Bill, cores int, size quantity.WireSize, colour string) *facts.BillLine {
	if b == nil {
		return nil
	}
	return b.Conductor(cores, size, colour)
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
