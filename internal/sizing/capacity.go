package sizing

import (
	"fmt"
	"slices"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// BankInput states the battery to build.
type BankInput struct {
	Class    *catalogue.BatteryClass
	Required quantity.AmpereHour
	Cells    int                   // in series
	Stock    []quantity.AmpereHour // block capacities to choose from; empty: all standard ones
	Parallel int                   // pinned number of strings; 0: as few as possible
}

// Bank is a battery built of standard blocks.
type Bank struct {
	Block    catalogue.Block
	Series   int // blocks in a string
	Parallel int // strings
	Capacity quantity.AmpereHour
}

// mostParallel bounds the strings that are put in parallel without being asked:
// IEEE 485 and the makers advise few, for currents do not share evenly.
const mostParallel = 4

// NextCapacity returns the smallest battery of standard blocks that has the required
// capacity: one string if any block suffices, else as few as possible, and of those
// the one with the least capacity. Blocks whose cells do not divide the string are
// left out.
func NextCapacity(in BankInput) (Bank, Working, error) {
	w := Working{
		Name: "capacity fitted", Formula: "C_n ≥ C, next standard block × strings in parallel",
		Unit: "Ah", Source: "common practice for standard blocks",
	}
	var best Bank
	var largest quantity.AmpereHour
	most := in.Parallel
	first := max(in.Parallel, 1)
	if most == 0 {
		most = mostParallel
	}
	for n := first; n <= most && best.Parallel == 0; n++ {
		for _, b := range in.Class.Blocks {
			if in.Cells%b.Cells != 0 || len(in.Stock) > 0 && !slices.Contains(in.Stock, b.Capacity) {
				continue
			}
			total := b.Capacity * quantity.AmpereHour(n)
			largest = max(largest, total)
			if total >= in.Required && (best.Parallel == 0 || total < best.Capacity) {
				best = Bank{Block: b, Series: in.Cells / b.Cells, Parallel: n, Capacity: total}
			}
		}
	}
	if best.Parallel == 0 {
		return best, w, &BlockedError{
			Limit: LimitCapacity, Subject: "the capacity needed", Value: float64(in.Required), Bound: float64(largest), Unit: "Ah",
			Frees: fmt.Sprintf("lower the load or the hours to what %v holds, or split the site over two batteries", largest),
		}
	}
	w.Value = float64(best.Capacity)
	w.Substituted = fmt.Sprintf("%s needed → %s × %d = %s", num(float64(in.Required), "Ah"), num(float64(best.Block.Capacity), "Ah"), best.Parallel, num(float64(best.Capacity), "Ah"))
	return best, w, nil
}

// Internal returns the resistance of a battery of n cells in series with a capacity
// c (all strings together): ohmAh is resistance times capacity of a cell, one of the
// figures of the class's spread.
func Internal(ohmAh float64, n int, c quantity.AmpereHour) (quantity.Ohm, Working) {
	v := ohmAh * float64(n) / float64(c)
	return quantity.Ohm(v), Working{
		Name: "internal resistance", Formula: "R_B = (r × C) × n ÷ C",
		Substituted: fmt.Sprintf("%s × %d ÷ %s", num(ohmAh, "Ω·Ah"), n, num(float64(c), "Ah")),
		Value:       v, Unit: "Ω", Source: "resistance of a cell goes as 1 ÷ C (typical datasheets)",
	}
}
