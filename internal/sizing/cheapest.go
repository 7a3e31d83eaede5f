package sizing

import "strings"

// Candidate is one thing that fits, with the firm's price of it.
type Candidate struct {
	Name  string  // as a working lists it: "3 A"
	Sum   string  // how the price adds up: "2 × 140"; empty: the price alone
	Price float64 // of all that it takes
	Known bool    // false: the firm gives no price
}

// listedPrices is how many candidates a working lists besides the one taken.
const listedPrices = 5

// Cheapest chooses by price. The first candidate is the one that would be chosen
// without prices. If its price is not known, it is taken and known is false: a thing
// without a price is never weighed against one that has one. Else the cheapest of
// those with a price is taken, of equal ones the first.
func Cheapest(list []Candidate, currency string) (pick int, w Working, known bool) {
	if !list[0].Known {
		return 0, w, false
	}
	for i, c := range list {
		if c.Known && c.Price < list[pick].Price {
			pick = i
		}
	}
	var names, sums []string
	for i, c := range list {
		if !c.Known || len(names) > listedPrices && i != pick {
			continue
		}
		if c.Sum == "" {
			c.Sum = num(c.Price, "")
		}
		names, sums = append(names, c.Name), append(sums, c.Sum)
	}
	w = Working{
		Name: "least price", Formula: "least price of what fits: " + strings.Join(names, "; "),
		Substituted: "min(" + strings.Join(sums, " ; ") + ")", Value: list[pick].Price, Unit: currency, Source: FirmPrices,
	}
	return pick, w, true
}

// FirmPrices is the source of every price.
const FirmPrices = "the firm's prices (practice)"
