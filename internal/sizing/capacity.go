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
	return best, best.fitted(w, in), nil
}

// fitted completes the working of the capacity that a battery of blocks has.
func (b Bank) fitted(w Working, in BankInput) Working {
	w.Value = float64(b.Capacity)
	w.Substituted = fmt.Sprintf("%s needed → %s × %d = %s", num(float64(in.Required), "Ah"), num(float64(b.Block.Capacity), "Ah"), b.Parallel, num(float64(b.Capacity), "Ah"))
	return w
}

// CheapestBank returns the battery of the least price that has the required capacity:
// of all blocks in stock and of any number of strings up to the pinned or the greatest
// one. What NextCapacity returns comes first: it is kept among equals, and where its
// block has no price (priced false).
func CheapestBank(in BankInput, currency string, price func(catalogue.Block) (float64, bool)) (bank Bank, ws []Working, priced bool, err error) {
	next, w, err := NextCapacity(in)
	if err != nil {
		return next, []Working{w}, false, err
	}
	banks := []Bank{next}
	first, most := max(in.Parallel, 1), in.Parallel
	if most == 0 {
		most = mostParallel
	}
	for n := first; n <= most; n++ {
		for _, b := range in.Class.Blocks {
			if in.Cells%b.Cells != 0 || len(in.Stock) > 0 && !slices.Contains(in.Stock, b.Capacity) {
				continue
			}
			x := Bank{Block: b, Series: in.Cells / b.Cells, Parallel: n, Capacity: b.Capacity * quantity.AmpereHour(n)}
			if x.Capacity >= in.Required && x != next {
				banks = append(banks, x)
			}
		}
	}
	list := make([]Candidate, len(banks))
	for i, b := range banks {
		each, ok := price(b.Block)
		n := b.Series * b.Parallel
		list[i] = Candidate{
			Name: fmt.Sprintf("%d of %v", n, b.Block.Capacity), Sum: fmt.Sprintf("%d × %s", n, num(each, "")), Price: float64(n) * each, Known: ok,
		}
	}
	pick, reason, known := Cheapest(list, currency)
	if !known {
		return next, []Working{w}, false, nil
	}
	w.Formula = "C_n ≥ C, blocks × strings in parallel of the least price"
	return banks[pick], []Working{banks[pick].fitted(w, in), reason}, true, nil
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
