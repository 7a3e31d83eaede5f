package finding

import (
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
)

func TestPriceUnmatched(t *testing.T) {
	price := func(file, word, name string) describe.Price {
		return describe.Price{Word: word, Of: describe.At[string]{Val: name, Pos: describe.Span{File: file, Line: 17, Col: 5}}}
	}
	with := func(list ...describe.Price) func(*facts.Facts) {
		return func(f *facts.Facts) {
			f.Site.File = "site.yaml"
			f.Site.Luminaires = []*describe.Luminaire{{Name: given("corridor", 40)}}
			f.Site.Practice.Prices = list
		}
	}
	run(t, priceUnmatched, []limitCase{
		{"its own name", with(price("site.yaml", "luminaire", "luminaire corridor")), nil},
		{"a shared file", with(price("house.yaml", "luminaire", "luminaire coridor")), nil},
		{"a rating that is only weighed", with(price("site.yaml", "fuse", "fuse blade 40 A")), nil},
		{"a slip of the pen", with(price("site.yaml", "luminaire", "luminaire coridor")), []string{
			"note practice.prices: The price of luminaire coridor meets nothing in this job | Remove it, or correct its name. Did you mean luminaire corridor?",
		}},
		{"no place at all", with(price("site.yaml", "enclosure", "enclosure Loft")), []string{
			"note practice.prices: The price of enclosure Loft meets nothing in this job | Remove it, or correct its name.",
		}},
	})
}
