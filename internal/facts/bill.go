package facts

import (
	"strconv"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
)

// Bill is what is bought, with the firm's prices.
type Bill struct {
	Currency string      // as the firm names it; may be empty
	Lines    []*BillLine // parts in their order, enclosures, cables, wires, spares
	Total    float64     // of the lines that have a price, rounded once
	Without  []string    // names of what has none, each once
	// ByPart finds the line of a part.
	ByPart map[*circuit.Part]*BillLine
}

// BillLine is one thing that is bought in some number.
type BillLine struct {
	Name     string // as practice.prices names it
	Parts    []*circuit.Part
	Place    *circuit.Place    // of an enclosure
	Cores    int               // of a cable; 0: a wire
	Size     quantity.WireSize // of a cable or wire
	Colour   string            // of its cores
	Spare    *Fuse             // one of the fuses that a spare link is for
	Quantity float64           // to buy: pieces, battery blocks, or length to draw
	Unit     string            // "pc", or that of the job's lengths, "m" or "ft"
	Each     float64           // price of one
	Priced   bool
	Cost     float64 // rounded to a hundredth; 0 without a price
}

// Conductor finds the line of a cable or wire; nil if there is none.
func (b *Bill) Conductor(cores int, size quantity.WireSize, colour string) *BillLine {
	for _, l := range b.Lines {
		if l.Size.Area > 0 && l.Cores == cores && l.Size == size && l.Colour == colour {
			return l
		}
	}
	return nil
}

// Money prints an amount with two decimals, or more if it has more.
func Money(v float64) string {
	s := strconv.FormatFloat(v, 'f', -1, 64)
	if _, decimals, _ := strings.Cut(s, "."); len(decimals) > 2 {
		return s
	}
	return strconv.FormatFloat(v, 'f', 2, 64)
}

// Sum prints an amount of the bill with its currency.
func (b *Bill) Sum(v float64) string { return strings.TrimSpace(Money(v) + " " + b.Currency) }

// Unpriced is a thing that the firm gives no price for and that was therefore chosen as
// without prices.
type Unpriced struct {
	Name string
	At   describe.Span // of what asked for it
}
