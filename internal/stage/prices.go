package stage

import (
	"fmt"
	"slices"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// Prices take part in a choice by one rule. What would be chosen without prices is
// found first. If the firm gives a price for it, every other thing that fits and has a
// price is weighed against it and the cheapest is taken. If it gives none, that thing
// is taken all the same and a note names the missing price; where the firm prices
// nothing of that sort, nothing is said.

// readPrices puts the firm's prices where they are looked up by name.
func (p *Plan) readPrices() {
	p.prices, p.sells = map[string]float64{}, map[string]bool{}
	for _, x := range p.Site.Practice.Prices {
		p.prices[x.Of.Val] = x.Cost.Val
		p.sells[x.Word] = true
	}
}

// price returns what the firm pays for the thing of that name.
func (p *Plan) price(name string) (float64, bool) {
	v, ok := p.prices[name]
	return v, ok
}

// lacks notes that a choice was made without the price of a thing.
func (p *Plan) lacks(name string, at describe.Span) {
	if !slices.ContainsFunc(p.F.Unpriced, func(m facts.Unpriced) bool { return m.Name == name }) {
		p.F.Unpriced = append(p.F.Unpriced, facts.Unpriced{Name: name, At: at})
	}
}

// currency is the unit of prices in workings.
func (p *Plan) currency() string { return p.Site.Practice.Currency.Val }

// ratings returns a list of standard ratings with those added that the firm has a price
// for: by current alone if volt is 0.
func (p *Plan) ratings(word string, volt quantity.Volt, standard []quantity.Ampere) []quantity.Ampere {
	out := slices.Clone(standard)
	for _, x := range p.Site.Practice.Prices {
		if x.Word == word && x.Rating.Volt == volt && x.Rating.Ampere > 0 && !slices.Contains(out, x.Rating.Ampere) {
			out = append(out, x.Rating.Ampere)
		}
	}
	slices.Sort(out)
	return out
}

// ratedName names a unit by its rating; volt is 0 where its current alone says it.
func ratedName(word string, volt quantity.Volt, a quantity.Ampere) string {
	if volt == 0 {
		return describe.PriceName(word, a)
	}
	return describe.PriceName(word, quantity.Rating{Volt: volt, Ampere: a})
}

// cheapestRating returns the rating of the least price from the least one that fits up
// to most; 0: without end.
func (p *Plan) cheapestRating(part *circuit.Part, word string, volt quantity.Volt, least, most quantity.Ampere) quantity.Ampere {
	if !p.sells[word] {
		return least
	}
	var fits []quantity.Ampere
	var list []sizing.Candidate
	for _, r := range p.ratings(word, volt, []quantity.Ampere{least}) {
		if r < least || most > 0 && r > most && r != least {
			continue
		}
		v, ok := p.price(ratedName(word, volt, r))
		fits, list = append(fits, r), append(list, sizing.Candidate{Name: r.String(), Price: v, Known: ok})
	}
	pick, w, known := sizing.Cheapest(list, p.currency())
	switch {
	case !known:
		p.lacks(ratedName(word, volt, least), part.At)
	case len(list) > 1:
		p.work(part.Designation, "", w)
	}
	return fits[pick]
}

// pricedRating returns the rated current for a load: the next standard one, or the
// cheapest from there on. The word is that of the unit's prices.
func (p *Plan) pricedRating(part *circuit.Part, word string, standard []quantity.Ampere, load quantity.Ampere) quantity.Ampere {
	r, ok := p.nextRating(part, "rated current", p.ratings(word, 0, standard), load)
	if !ok {
		return r
	}
	return p.cheapestRating(part, word, 0, r, 0)
}

// bank builds the battery of blocks, the cheapest where blocks have prices, and records
// why.
func (p *Plan) bank(g *circuit.Part, in sizing.BankInput) (sizing.Bank, error) {
	var bank sizing.Bank
	var ws []sizing.Working
	var err error
	if p.sells["block"] {
		var priced bool
		bank, ws, priced, err = sizing.CheapestBank(in, p.currency(), func(b catalogue.Block) (float64, bool) { return p.price(blockName(p.Class, b)) })
		if err == nil && !priced {
			p.lacks(blockName(p.Class, bank.Block), g.At)
		}
	} else {
		var w sizing.Working
		bank, w, err = sizing.NextCapacity(in)
		ws = append(ws, w)
	}
	for _, w := range ws {
		p.work(g.Designation, "", w, g.Designation+": required capacity")
	}
	return bank, err
}

func blockName(class *catalogue.BatteryClass, b catalogue.Block) string {
	return describe.PriceName("block", describe.BlockName(class, b))
}

// terminalFor returns the cheapest terminal in the firm's prices that takes a size.
func (p *Plan) terminalFor(size quantity.WireSize) (name string, cost float64, ok bool) {
	for _, x := range p.Site.Practice.Prices {
		if x.Word == "terminal" && x.Size.Area >= size.Area-areaSlack && (!ok || x.Cost.Val < cost) {
			name, cost, ok = x.Of.Val, x.Cost.Val, true
		}
	}
	if !ok {
		name = describe.PriceName("terminal", size)
	}
	return name, cost, ok
}

// fuseName names a fuse with its holder.
func fuseName(class *catalogue.FuseClass, rating quantity.Ampere) string {
	return describe.PriceName("fuse", class.Name, rating)
}

// money prints an amount in a working.
func money(v float64) string { return sizing.Digits(v) }

// lengths is the unit that conductors are priced by: that of the job's lengths.
func (p *Plan) lengths() quantity.LengthUnit { return p.Site.Practice.LengthUnit() }

// lengthAt returns what a length costs at a price, and prints it for a working.
func (p *Plan) lengthAt(l quantity.Metre, each float64) (cost float64, text string) {
	n := p.lengths().Of(l)
	return n * each, fmt.Sprintf("%s %s × %s", sizing.Digits(n), p.lengths().Symbol(), money(each))
}
