package finding

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// nextRated prints the least standard rating that carries a; a itself where none does.
func nextRated(list []quantity.Ampere, a quantity.Ampere) string {
	if r, ok := catalogue.NextRating(list, a); ok {
		return say(r)
	}
	return sayUp(a)
}
