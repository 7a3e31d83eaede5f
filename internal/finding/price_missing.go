package finding

import (
	"fmt"
	"strings"

	"gloamwright/internal/facts"
)

// priceMissing names the prices without which something was chosen as without prices.
var priceMissing = &Check{
	Name:  "price-missing",
	Title: "price missing for a choice",
	Doc: "Where the firm has prices of a sort of thing, the cheapest that fits is taken. If the one that would be taken without prices has none, " +
		"nothing can be weighed against it: it is taken, and this note names its price. The total leaves it out too.",
	Source: "the firm's prices",
	Run: func(f *facts.Facts, report func(Finding)) {
		if len(f.Unpriced) == 0 {
			return
		}
		var names []string
		for _, m := range f.Unpriced {
			names = append(names, m.Name)
		}
		report(Finding{
			Severity: Note, Subject: "practice.prices", At: f.Unpriced[0].At,
			Message: fmt.Sprintf("Chosen without looking at prices, for theirs is missing: %s", strings.Join(names, ", ")),
			Remedy:  fmt.Sprintf("Write their prices under practice.prices, such as %q: 1.50.", names[0]),
			Value:   float64(len(names)), Limit: 0, Unit: "prices",
		})
	},
}
