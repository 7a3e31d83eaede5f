package facts

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
)

// Bill is what is bought, with the firm's prices.
type Bill struct {
	Currency string      // as the firm names it; may be empty
	Lines    []*BillLine // parts in their order, enclosures, cables, wires, spares
	Total    float64     // of the lines that have a price
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
	Quantity float64           // to buy: pieces, battery blocks, or metres to draw
	Unit     string            // "pc" or "m"
	Each     float64           // price of one
	Priced   bool
	Cost     float64 // rounded to a hundredth; 0 without a price
}

// Unpriced is a thing that the firm gives no price for and that was therefore chosen as
// without prices.
type Unpriced struct {
	Name string
	At   describe.Span // of what asked for it
}
