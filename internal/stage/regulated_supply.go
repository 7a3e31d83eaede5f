package stage

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// regulatedSupply returns the kind: a packaged mains supply with a regulated DC output and a
// current limit. It tells a relay that mains is on.
func regulatedSupply() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "regulated-supply",
			Doc:  "Packaged mains supply with a regulated DC output. It holds a relay in while mains is on.",
			Ports: []describe.Port{
				{Name: "out", Doc: "regulated plus", Auxiliary: true},
			},
			Fields: fields(
				describe.Field{Name: "rated", Type: describe.VoltAmp, Doc: "Output voltage and current; without it the nominal voltage and the next standard current.", Min: "1 V 1 mA", Max: "60 V 100 A"},
				describe.Field{Name: "mains", Type: describe.Mains, Required: true, Doc: "Mains voltage and its tolerance."},
				describe.Field{Name: "accuracy", Type: describe.Percent, Default: "1 %", Min: "0 %", Max: "20 %", Doc: "Tolerance of the output voltage, both ways."},
			),
		},
		Class: SupplyClass, Rank: 0, Heading: "Supply",
		Expand: func(b *Build, s *describe.Stage) {
			t := b.Part("supply", circuit.Supply, "Mains supply, regulated", "L", "N", "PE", "+", "-")
			b.Element(t, "", "supply", "+", "+", "-", "-")
			b.sketch(24, "tells the relay", "that mains is on")
			b.mains(t, []string{"L", "N", "PE"}, 7, 27, 29, 31)
			b.converter(t, 11, 29, 3, []string{"L", "N", "PE"}, []string{"+", "-"}, []int{-2, 0, 2}, []int{-2, 2}, false)
			plus := b.lead(circuit.OpUp, "plus", t.Pin("+"), b.outRail(s, "out"), 15, 27, 20, 27, 20, upEnd)
			minus := b.lead(circuit.OpDown, "minus", t.Pin("-"), Minus, 15, 31, 20, 31, 20, downEnd)
			b.point(b.TestPoint("output", b.cur.Heading+" output", t.Pin("+")), 20, 15, "W")
			b.number(plus, 20, 22)
			b.number(minus, 20, 42)
		},
		Steps: []Step{{Supplying, sizeSupply}},
	}
}

// outRail returns the rail key of the stage's own source port; a port that nobody
// takes from gets a rail of its own all the same, so that its lead has an end.
func (b *Build) outRail(s *describe.Stage, port string) string {
	key := s.Name.Val + "." + port
	if b.rails[key] == nil {
		r := &circuit.Rail{Key: key, Name: "P+", Positive: true}
		b.rails[key] = r
		b.C.Rails = append(b.C.Rails, r)
	}
	return key
}

// sizeSupply chooses or checks the supply's rating: what it feeds, with a quarter in
// reserve, and the next standard current.
func sizeSupply(p *Plan, s *describe.Stage) {
	t := p.part(s, "supply")
	rated, given := describe.Get[quantity.Rating](s.Fields, "rated")
	load := p.drawn(s.Name.Val)
	if !given {
		rated.Val.Volt = p.Site.Duty.Nominal.Val
		stock := p.ratings(s.Kind.Val, rated.Val.Volt, catalogue.SupplyCurrents)
		c, w, err := sizing.SupplyCurrent(sizing.SupplyInput{Load: load, Stock: stock})
		if err != nil {
			p.block(t.Designation, t.At, w.Source, err)
			c = stock[len(stock)-1]
		}
		p.work(t.Designation, "", w)
		if rated.Val.Ampere = c; err == nil {
			rated.Val.Ampere = p.cheapestRating(t, s.Kind.Val, rated.Val.Volt, c, 0)
		}
	}
	acc := must[quantity.Ratio](s, "accuracy")
	mains := must[quantity.Toleranced[quantity.Volt]](s, "mains")
	set(t, "rating", rated.Val.String(), float64(rated.Val.Ampere), "A", true, given)
	set(t, "mains", mains.String(), float64(mains.Nominal), "V", false, true)
	params(t, "", circuit.Param{Name: "volt", Value: float64(rated.Val.Volt), Tol: float64(acc)},
		circuit.Param{Name: "limit_ampere", Value: float64(rated.Val.Ampere), Tol: powerTol})
	p.F.Supplies = append(p.F.Supplies, &facts.Supply{Part: t, Volt: rated.Val.Volt, Rated: rated.Val.Ampere, Current: load, Mains: mains, Pinned: given})
}
