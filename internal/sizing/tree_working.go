package sizing

import (
	"cmp"
	"slices"
	"strings"

	"gloamwright/internal/quantity"
)

// CopperWorking is the conductor volume of a choice in cm³, size by size: metres times
// mm², both conductors. Lengths stand in the unit of the job.
func (t *Tree) CopperWorking(sizes []*Option) Working {
	type run struct {
		area   quantity.SquareMM
		length quantity.Metre
	}
	var runs []run
	for i, o := range sizes {
		at := slices.IndexFunc(runs, func(r run) bool { return r.area == o.Size.Area })
		if at < 0 {
			at = len(runs)
			runs = append(runs, run{area: o.Size.Area})
		}
		runs[at].length += t.Legs[i].Length
	}
	slices.SortFunc(runs, func(a, b run) int { return cmp.Compare(a.area, b.area) })
	var terms []string
	for _, r := range runs {
		if r.length > 0 {
			terms = append(terms, "2 × "+num(t.Lengths.Of(r.length), t.Lengths.Symbol())+" × "+num(float64(r.area), "mm²"))
		}
	}
	w := Working{
		Name:    "copper of all cables",
		Formula: "V = Σ 2 × l × S", Substituted: strings.Join(terms, " + "), Value: t.Copper(sizes), Unit: "cm³",
		Source: "a metre of one square millimetre is a cubic centimetre; both conductors",
	}
	if t.Lengths == quantity.InFeet {
		per := plain(float64(t.Lengths.Metres(1)))
		w.Formula, w.Substituted = "V = "+per+" × Σ 2 × l × S", per+" × ("+w.Substituted+")"
		w.Source += "; " + per + " metres a foot"
	}
	return w
}

// BoundWorking says how near a choice stands to the least that any choice of sizes which
// keeps every limit needs: the bound of the search as a share of what is chosen, in %.
func BoundWorking(chosen, bound float64, unit string, proven bool) Working {
	says := "; none smaller keeps every limit"
	if !proven {
		says = "; whether a smaller one exists is not known"
	}
	return Working{
		Name:    "least that any sizes need",
		Formula: "100 × least that any choice needs ÷ chosen", Substituted: "100 × " + num(bound, unit) + " ÷ " + num(chosen, unit),
		Value: 100 * bound / chosen, Unit: "%", Source: "dynamic programming (Bellman, 1957), branch and bound (Land and Doig, 1960)" + says,
	}
}
