package packet

import (
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/sizing"
)

// Columns of the parts list, mm: without and with the firm's prices.
var (
	partColumns = []column{
		{head: "Pos", w: 8}, {head: "Qty", w: 12, a: endAnchor}, {head: "Unit", w: 8}, {head: "Designation", w: 39},
		{head: "What it is", w: 54}, {head: "A substitute must", w: 38, indent: 2}, {head: "Arrived", w: 11, a: midAnchor}, {head: "Fitted", w: 10, a: midAnchor}}
	pricedColumns = []column{
		{head: "Pos", w: 7}, {head: "Qty", w: 10, a: endAnchor}, {head: "Unit", w: 8}, {head: "Designation", w: 31},
		{head: "What it is", w: 46}, {head: "A substitute must", w: 31, indent: 2}, {head: "Each", w: 12, a: endAnchor}, {head: "Cost", w: 15, a: endAnchor},
		{head: "Arrived", w: 11, a: midAnchor}, {head: "Fitted", w: 9, a: midAnchor}}
)

// billed returns the line of a part in the bill; nil if it has none.
func (b *book) billed(p *circuit.Part) *facts.BillLine {
	if b.d.Bill == nil {
		return nil
	}
	return b.d.Bill.ByPart[p]
}

// spare returns the line of the spare links of a fuse; nil if there is none.
func (b *book) spare(f *facts.Fuse) *facts.BillLine {
	if b.d.Bill == nil {
		return nil
	}
	for _, l := range b.d.Bill.Lines {
		if s := l.Spare; s != nil && s.Class == f.Class && s.Rating == f.Rating {
			return l
		}
	}
	return nil
}

// price fills in what a number of things of a line cost.
func (it *item) price(l *facts.BillLine, quantity float64) {
	if l != nil && l.Priced {
		it.each, it.cost = facts.Money(l.Each), facts.Money(sizing.LineCost(l.Each, quantity))
	}
}

// enclosures are the enclosures that have a price; others stand with their places only.
func (b *book) enclosures() []item {
	if b.d.Bill == nil {
		return nil
	}
	var out []item
	for _, l := range b.d.Bill.Lines {
		if l.Place != nil {
			it := item{qty: "1", unit: "pc", names: []string{l.Place.Designation}, what: bold("Enclosure") + " " + l.Place.Name}
			it.price(l, 1)
			out = append(out, it)
		}
	}
	return out
}

// costBlocks are the total of the parts list and what has no price.
func (b *book) costBlocks(t *table) []block {
	bill := b.d.Bill
	if bill == nil {
		return nil
	}
	head := "Total"
	if bill.Currency != "" {
		head += ", " + bill.Currency
	}
	cells := make([]cell, len(t.cols)-1) // the sum takes the room of two
	for i := range cells {
		cells[i] = txt("")
	}
	cells[4], cells[6] = fat(head), over(fat(facts.Money(bill.Total)), 1)
	note := "Everything in this list has a price."
	if len(bill.Without) > 0 {
		note = "The total leaves out what has no price: " + strings.Join(bill.Without, "; ") + "."
	}
	return []block{t.line(b, 0, row{cells: cells}), b.paragraph(note+" Each line is rounded to a hundredth, the total once.", remarkText, 1)}
}
