package finding

import (
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
)

func TestPriceMissing(t *testing.T) {
	run(t, priceMissing, []limitCase{
		{"all there", func(f *facts.Facts) { f.Bill = &facts.Bill{} }, nil},
		{"two missing", func(f *facts.Facts) {
			f.Unpriced = []facts.Unpriced{{Name: "fuse blade 2 A", At: describe.Span{File: "site.yaml", Line: 30, Col: 5}}, {Name: "4 mm²"}}
		}, []string{
			`note practice.prices: Chosen without looking at prices, for theirs is missing: fuse blade 2 A, 4 mm² | Write their prices under practice.prices, such as "fuse blade 2 A": 1.50.`,
		}},
	})
}
