package finding

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
)

// priceUnmatched tells of prices for things that only a job can name, where this job
// has none of that name.
var priceUnmatched = &Check{
	Name:  "price-unmatched",
	Title: "price that meets nothing",
	Doc: "A price of a luminaire type or of an enclosure stands in the description, and the job has no type or place of that name: a slip of the pen, or what is left of a lamp that is gone. " +
		"Prices in a shared practice file serve many jobs and are not held against one; nor are those of sizes and ratings, which may only be weighed.",
	Source: "the firm's prices",
	Run: func(f *facts.Facts, report func(Finding)) {
		here := map[string][]string{}
		for _, l := range f.Site.Luminaires {
			here["luminaire"] = append(here["luminaire"], describe.PriceName("luminaire", l.Name.Val))
		}
		for _, p := range f.Circuit.Places {
			here["enclosure"] = append(here["enclosure"], describe.PriceName("enclosure", p.Name))
		}
		for _, p := range f.Site.Practice.Prices {
			names, named := here[p.Word]
			if !named && p.Word != "luminaire" && p.Word != "enclosure" || p.Of.Pos.File != f.Site.File || slices.Contains(names, p.Of.Val) {
				continue
			}
			report(Finding{
				Severity: Note, Subject: "practice.prices", At: p.Of.Pos,
				Message: fmt.Sprintf("The price of %s meets nothing in this job", p.Of.Val),
				Remedy:  strings.TrimSpace("Remove it, or correct its name. " + describe.DidYouMean(p.Of.Val, "Names here", names)),
			})
		}
	},
}
