package stage

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// fusedWay is a way with its fuse and the legs that the fuse protects.
type fusedWay struct {
	proposed *wayFuse
	fuse     *facts.Fuse // what was made of it
	legs     []int
	behind   []int // of a feeder: ways behind it, by their place in the list
	given    bool
	most     quantity.Ampere // rating that a given fuse before it allows; 0: none is given
}

// choose returns the sizes of the least copper. Where the firm prices conductors and
// has a price for every size that these take, the sizes of the least cost with their
// terminals, wires and fuses take their place.
func (t *tree) choose() (*sizing.TreeResult, error) {
	p := t.p
	copper, err := t.Choose()
	if err != nil || !p.sells[""] {
		return copper, err
	}
	taken := t.taken(copper)
	for _, size := range taken {
		if _, ok := p.price(size.String()); !ok {
			p.lacks(size.String(), p.C.Boards[0].At)
			taken = nil
		}
	}
	if taken == nil {
		return copper, nil
	}
	all := t.Options
	e := t.ends(taken)
	t.pricedOptions(e)
	ways := t.fuseOptions()
	res, picks, err := t.ChooseFused(ways, discriminationRatio)
	if err != nil { // cannot be: what the least copper takes is among the options
		t.Options = all
		return copper, nil
	}
	for i, k := range picks {
		f := &t.fused[i]
		before := f.fuse.Rating
		if t.paid += ways[i].Fuses[k].Price; ways[i].Fuses[k].Rating != before {
			p.refuse(f.fuse, ways[i].Fuses[:k+1])
		}
		cost := t.costOf(f, res, e, f.fuse.Rating)
		p.work(cost.For, "", cost)
		if least := t.costOf(f, copper, e, before); least.Value > cost.Value {
			least.Name = "cost with the least copper and the smallest fuse"
			p.work(least.For, "", least)
		}
	}
	return res, nil
}

// taken lists the sizes that a result chose, each once.
func (t *tree) taken(r *sizing.TreeResult) []quantity.WireSize {
	var out []quantity.WireSize
	for i, o := range r.Sizes {
		if t.Legs[i].Pinned == nil && !slices.Contains(out, o.Size) {
			out = append(out, o.Size)
		}
	}
	return out
}

// ends is what of the price of a way's two ends is weighed with its cable.
type ends struct{ terminals, wires bool }

// ends finds what the firm prices for every size that the least copper takes.
func (t *tree) ends(taken []quantity.WireSize) ends {
	p := t.p
	e := ends{p.sells["terminal"], p.sells["wire"]}
	for _, size := range taken {
		if name, _, ok := p.terminalFor(size); !ok && p.sells["terminal"] {
			p.lacks(name, p.C.Boards[0].At)
			e.terminals = false
		}
		if _, ok := p.price(describe.PriceName("wire", size)); !ok && p.sells["wire"] {
			p.lacks(describe.PriceName("wire", size), p.C.Boards[0].At)
			e.wires = false
		}
	}
	return e
}

// pricedOptions leaves the options that have a price, with all that is weighed, and
// gives each way's first leg the price of its ends.
func (t *tree) pricedOptions(e ends) {
	p := t.p
	var out []sizing.Option
	for _, o := range t.Options {
		each, ok := p.price(o.Size.String())
		if !ok {
			continue
		}
		o.Price, _ = p.lengthAt(1, each)
		if _, _, ok := p.terminalFor(o.Size); e.terminals && !ok {
			continue
		}
		if _, ok := p.price(describe.PriceName("wire", o.Size)); e.wires && !ok {
			continue
		}
		out = append(out, o)
	}
	t.Options = out
	for _, f := range t.fused {
		n, wire := endsOf(f.fuse.Way)
		t.Legs[f.legs[0]].Ends = func(o *sizing.Option) float64 {
			sum := 0.0
			if e.terminals {
				_, each, _ := p.terminalFor(o.Size)
				sum += float64(n) * each
			}
			if e.wires {
				each, _ := p.price(describe.PriceName("wire", o.Size))
				cost, _ := p.lengthAt(wire, each)
				sum += cost
			}
			return sum
		}
	}
}

// endsOf returns how many terminals hold the first leg of a way, and the length of the
// wires that take its size: from fuse and bar to the terminals, and for a feeder from
// its far terminals to the bars.
func endsOf(w *circuit.Way) (terminals int, wires quantity.Metre) {
	if w.Feeds != nil {
		return 4, 2 * (boardLead + bridgeLength)
	}
	return 2, 2 * boardLead
}

// fuseOptions lists for each way the fuses that may stand before it: the chosen or
// given one, and larger ones that have a price and leave the main fuse above them.
func (t *tree) fuseOptions() []sizing.FusedWay {
	p := t.p
	weighed := p.sells["fuse"]
	var main quantity.Ampere
	for _, f := range p.F.Fuses {
		if f.Part == p.part(p.battery(), "fuse") {
			main = f.Rating
		}
	}
	for _, f := range t.fused {
		name := fuseName(f.fuse.Class, f.fuse.Rating)
		if _, ok := p.price(name); !ok && !f.given && p.sells["fuse"] {
			p.lacks(name, f.fuse.Part.At)
			weighed = false
		}
	}
	var out []sizing.FusedWay
	for _, f := range t.fused {
		w := sizing.FusedWay{Legs: f.legs, Behind: f.behind, Given: f.given || f.outgrown(t)}
		first, _ := p.price(fuseName(f.fuse.Class, f.fuse.Rating))
		least, _ := t.asks(f.fuse.Class, f.fuse.Rating) // an error is reported already
		least.Price = first
		w.Fuses = append(w.Fuses, least)
		most := main / discriminationRatio
		if f.most > 0 {
			most = min(most, f.most)
		}
		for _, r := range p.stocked(f.fuse.Class) {
			v, ok := p.price(fuseName(f.fuse.Class, r))
			if !weighed || w.Given || r <= f.fuse.Rating || r > most || !ok {
				continue
			}
			if larger, err := t.asks(f.fuse.Class, r); err == nil {
				larger.Price = v
				w.Fuses = append(w.Fuses, larger)
			}
		}
		if !weighed {
			w.Fuses[0].Price = 0
		}
		out = append(out, w)
	}
	return out
}

// outgrown reports whether the fuse of a feeder is below what those behind it ask: the
// largest of its class, where even that did not suffice.
func (f *fusedWay) outgrown(t *tree) bool {
	return slices.ContainsFunc(f.behind, func(k int) bool { return f.fuse.Rating < t.fused[k].fuse.Rating*discriminationRatio })
}

// refuse puts the last of the options in place of a chosen fuse, for its price.
func (p *Plan) refuse(f *facts.Fuse, options []sizing.FuseOption) {
	last := options[len(options)-1]
	p.link(f, f.Class, last.Rating)
	var names, prices []string
	for _, o := range options {
		names, prices = append(names, o.Rating.String()), append(prices, money(o.Price))
	}
	p.work(f.Part.Designation, "fuse rating by price", sizing.Working{
		Formula:     "the least price of cable, terminals and fuse together; the fuse alone: " + strings.Join(names, "; "),
		Substituted: "min(" + strings.Join(prices, " ; ") + ")", Value: last.Price, Unit: p.currency(), Source: sizing.FirmPrices,
	}, f.Part.Designation+": fuse rating")
}

// costOf sums what a way costs with the sizes of a result and a fuse.
func (t *tree) costOf(f *fusedWay, r *sizing.TreeResult, e ends, rating quantity.Ampere) sizing.Working {
	p := t.p
	w := sizing.Working{
		For: f.fuse.Feeds, Name: "cost of cable", Formula: "Σ L × p", Unit: p.currency(), Source: sizing.FirmPrices,
	}
	if f.fuse.Way.Feeds != nil {
		w.For = f.fuse.Way.Feeds.Feeder.Designation
	}
	var order []quantity.WireSize
	length := map[quantity.WireSize]quantity.Metre{}
	for _, i := range f.legs {
		size := r.Sizes[i].Size
		if length[size] == 0 {
			order = append(order, size)
		}
		length[size] += t.Legs[i].Length
	}
	var terms, with []string
	for _, size := range order {
		each, ok := p.price(size.String())
		if !ok { // given, and without a price
			w.Formula = "Σ L × p of what has a price"
			continue
		}
		cost, term := p.lengthAt(length[size], each)
		terms = append(terms, term)
		w.Value += cost
	}
	first := r.Sizes[f.legs[0]].Size
	n, wire := endsOf(f.fuse.Way)
	if name, each, ok := p.terminalFor(first); e.terminals && ok {
		terms, with = append(terms, fmt.Sprintf("%d × %s", n, money(each))), append(with, name)
		w.Value += float64(n) * each
	}
	if each, ok := p.price(describe.PriceName("wire", first)); e.wires && ok {
		cost, term := p.lengthAt(wire, each)
		terms, with = append(terms, term), append(with, describe.PriceName("wire", first))
		w.Value += cost
	}
	if each, ok := p.price(fuseName(f.fuse.Class, rating)); ok {
		terms, with = append(terms, money(each)), append(with, fuseName(f.fuse.Class, rating))
		w.Value += each
	}
	for _, name := range with {
		w.Formula += " + " + name
	}
	w.Substituted = strings.Join(terms, " + ")
	if len(terms) == 0 {
		w.Substituted = "0"
	}
	return w
}
