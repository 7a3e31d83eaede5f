package sizing

import (
	"fmt"

	"gloamwright/internal/quantity"
)

// shortages returns, by leg, how far its voltage stands below and its fault loop
// above the limit with the given sizes.
func (p *plan) shortages(sizes []*Option, r *TreeResult) (drop, loop []float64) {
	n := len(sizes)
	drop, loop = make([]float64, n), make([]float64, n)
	loops := p.t.loops(sizes)
	for i := range n {
		l := &p.t.Legs[i]
		if l.MinVolt > 0 && float64(l.MinVolt-r.Volts[i]) > voltSlack {
			drop[i] = float64(l.MinVolt - r.Volts[i])
		}
		if most := float64(l.Loop); most > 0 && loops[i] > most*(1+slack) {
			loop[i] = loops[i]/most - 1
		}
	}
	return drop, loop
}

// verdict names the limit that the sizes break most, in the first condition in which they
// break one; nil if they keep all. r is their state.
func (p *plan) verdict(sizes []*Option, r *TreeResult) error {
	err := p.verdictHere(sizes, r)
	for _, q := range p.also {
		if err == nil {
			err = q.verdictHere(sizes, q.result(sizes))
		}
	}
	return err
}

// verdictHere does so for one condition.
func (p *plan) verdictHere(sizes []*Option, r *TreeResult) error {
	for i, o := range sizes {
		l := &p.t.Legs[i]
		switch {
		case o.Ampacity < l.Carry*(1-slack):
			return &BlockedError{
				Limit: LimitAmpacity, Subject: fmt.Sprintf("what the %v cable of %s must carry", o.Size, l.Name),
				Value: float64(l.Carry), Bound: float64(o.Ampacity), Unit: "A", Frees: p.thicker(i, sizes),
			}
		case o.Size.Area < l.Least*(1-slack):
			return &BlockedError{
				Limit: LimitLeastSize, Subject: "the least area for " + l.Name, Value: float64(l.Least),
				Bound: float64(o.Size.Area), Unit: "mm²", Frees: p.thicker(i, sizes),
			}
		}
	}
	if len(r.Volts) > 0 && r.Volts[len(r.Volts)-1] == 0 || p.collapsed(sizes) {
		return &BlockedError{
			Limit: LimitCollapse, Subject: "the voltage at the far lamps", Bound: float64(p.t.Volts), Unit: "V",
			Frees: "the cables cannot carry the power at this voltage at all; shorten the runs or raise the system voltage",
		}
	}
	drop, loop := p.shortages(sizes, r)
	if i := worst(drop); i >= 0 {
		return &BlockedError{
			Limit: LimitDrop, Subject: "the voltage at the end of " + p.t.Legs[i].Name, Value: float64(r.Volts[i]),
			Bound: float64(p.t.Legs[i].MinVolt), Unit: "V", Frees: p.freesDrop(i, sizes),
		}
	}
	if i := worst(loop); i >= 0 {
		return &BlockedError{
			Limit: LimitClearing, Subject: "the fault loop to the end of " + p.t.Legs[i].Name, Value: p.t.loops(sizes)[i],
			Bound: float64(p.t.Legs[i].Loop), Unit: "Ω", Frees: p.freesLoop(i, sizes),
		}
	}
	return nil
}

func (p *plan) collapsed(sizes []*Option) bool {
	_, _, ok := p.t.Solve(sizes)
	return !ok
}

// blocked judges the thickest sizes allowed: what they break, nothing keeps.
func (p *plan) blocked() error {
	sizes := p.extreme(largest)
	if err := p.verdict(sizes, p.result(sizes)); err != nil {
		return err
	}
	return &BlockedError{
		Limit: LimitDrop, Subject: "the voltage at the lamps", Bound: float64(p.t.Volts), Unit: "V",
		Frees: "no set of sizes was found; pin the thickest sizes to see what is short",
	}
}

// path lists the legs from the root to leg i.
func (p *plan) path(i int) []int {
	var out []int
	for ; i >= 0; i = p.t.Legs[i].Parent {
		out = append(out, i)
	}
	return out
}

// thicker says which size on a pinned leg would keep that leg's own limits.
func (p *plan) thicker(i int, sizes []*Option) string {
	for k := range p.t.Options {
		if p.fits(i, &p.t.Options[k]) && p.t.Options[k].Size.Area > sizes[i].Size.Area {
			return fmt.Sprintf("%v would do", p.t.Options[k].Size)
		}
	}
	return "no listed size would do; use a smaller fuse"
}

// freesDrop finds the smallest change that lifts the voltage at leg i to its limit:
// a thicker size on the pinned legs before it, else a shorter run.
func (p *plan) freesDrop(i int, sizes []*Option) string {
	enough := func(t *Tree, s []*Option) bool {
		v, _, ok := t.Solve(s)
		return ok && float64(v[i]) >= float64(t.Legs[i].MinVolt)-voltSlack
	}
	if o := p.repin(i, sizes, enough); o != nil {
		return fmt.Sprintf("the given cable is too thin: %v would do", o.Size)
	}
	return p.shorter(i, sizes, enough) + p.area(i, sizes)
}

// area says which cross-section the whole way to leg i would need by the moment rule.
func (p *plan) area(i int, sizes []*Option) string {
	_, amps, ok := p.t.Solve(sizes)
	if !ok {
		return ""
	}
	in := LeastAreaInput{Drop: p.t.Volts - p.t.Legs[i].MinVolt}
	for _, j := range p.path(i) {
		in.Moment += float64(amps[j]) * float64(p.t.Legs[j].Length)
		in.Drop -= quantity.Volt(float64(amps[j]) * float64(p.t.Legs[j].Extra))
		in.Resistivity = max(in.Resistivity, float64(sizes[j].PerMetre)*float64(sizes[j].Size.Area))
	}
	if in.Drop <= 0 {
		return ""
	}
	s, _ := LeastArea(in)
	const shown = 2 // significant digits: the rule is a first estimate
	return fmt.Sprintf("; one cable all the way would need about %s", quantity.Format(s, shown))
}

// freesLoop does the same for a fault loop.
func (p *plan) freesLoop(i int, sizes []*Option) string {
	enough := func(t *Tree, s []*Option) bool { return t.loops(s)[i] <= float64(t.Legs[i].Loop) }
	if o := p.repin(i, sizes, enough); o != nil {
		return fmt.Sprintf("the given cable is too thin: %v would do, or a smaller fuse", o.Size)
	}
	return "fit a smaller fuse, or " + p.shorter(i, sizes, enough)
}

// repin returns the thinnest option that satisfies enough when it replaces the
// thinner pinned sizes before leg i; nil if there is none.
func (p *plan) repin(i int, sizes []*Option, enough func(*Tree, []*Option) bool) *Option {
	for k := range p.t.Options {
		o := &p.t.Options[k]
		try := append([]*Option(nil), sizes...)
		changed := false
		for _, j := range p.path(i) {
			if p.t.Legs[j].Pinned != nil && try[j].Size.Area < o.Size.Area {
				try[j], changed = o, true
			}
		}
		if changed && enough(p.t, try) {
			return o
		}
	}
	return nil
}

// shorter finds by bisection how much the legs of the circuit before leg i must be
// shortened.
func (p *plan) shorter(i int, sizes []*Option, enough func(*Tree, []*Option) bool) string {
	legs := p.t.Legs
	var total quantity.Metre
	circuit := legs[i].Circuit
	on := map[int]bool{}
	for _, j := range p.path(i) {
		if legs[j].Circuit == circuit {
			on[j] = true
			total += legs[j].Length
		}
	}
	with := func(f float64) bool {
		t := *p.t
		t.Legs = append([]Leg(nil), legs...)
		for j := range t.Legs {
			if on[j] {
				t.Legs[j].Length = legs[j].Length * quantity.Metre(f)
			}
		}
		return enough(&t, sizes)
	}
	if !with(0) {
		return "shortening this run alone does not help: what feeds it drops too much"
	}
	lo, hi := 0.0, 1.0
	const halvings = 20
	for range halvings {
		if mid := (lo + hi) / 2; with(mid) {
			lo = mid
		} else {
			hi = mid
		}
	}
	return fmt.Sprintf("shorten the run from %s to %s, or share its lamps over two circuits",
		p.t.Lengths.Format(total), p.t.Lengths.Format(p.t.Lengths.Down(quantity.Metre(float64(total)*lo))))
}

// relaxed chooses sizes with the limits dropped that even the thickest cannot keep.
func (p *plan) relaxed() *TreeResult {
	sizes := p.extreme(largest)
	drop, loop := p.shortages(sizes, p.result(sizes))
	loose := *p.t
	loose.Legs = append([]Leg(nil), p.t.Legs...)
	for i := range loose.Legs {
		if drop[i] > 0 {
			loose.Legs[i].MinVolt = collapsed * p.t.Volts
		}
		if loop[i] > 0 {
			loose.Legs[i].Loop = 0
		}
	}
	loose.Also = nil
	for k, q := range p.also {
		short, _ := q.shortages(sizes, q.result(sizes))
		c := Condition{Volts: q.t.Volts, MinVolt: append([]quantity.Volt(nil), p.t.Also[k].MinVolt...)}
		for i := range short {
			if short[i] > 0 {
				c.MinVolt[i] = collapsed * c.Volts
			}
		}
		loose.Also = append(loose.Also, c)
	}
	q, err := loose.plan()
	if err == nil {
		if s := q.seek(firstCap); s.best != nil {
			return p.result(s.best.Sizes)
		}
	}
	return p.result(sizes)
}
