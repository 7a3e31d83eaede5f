package stage

import (
	"container/heap"
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// protect finds for every fuse the currents of a short circuit before and behind it,
// when it opens, what its cable stands, and up to which current it discriminates.
func (p *Plan) protect() {
	g := p.battery()
	if g == nil {
		return
	}
	bat := p.part(g, "battery")
	plus, minus := p.distances(bat.Pin("+")), p.distances(bat.Pin("-"))
	ref := p.C.Black
	at := func(a, b *circuit.Pin) float64 { return plus[a] + minus[b] }
	var main *facts.Fuse
	feeders := map[*circuit.Board]*facts.Fuse{}
	for _, f := range p.F.Fuses {
		if f.Part == p.part(g, "fuse") {
			main = f
		}
		if f.Way != nil && f.Way.Feeds != nil {
			feeders[f.Way.Feeds] = f
		}
	}
	for _, f := range p.F.Fuses {
		if r, ok := p.sources[f.Part]; ok {
			p.clearRaw(f, r)
			continue
		}
		near, far := p.reach(f, ref, at)
		if f == main {
			// Its cable ends at the boards. Leads to the fuses of cards are thinner and short:
			// IEC 60364-4-43 clause 434.2.1 leaves them to the way they are laid.
			near = 0
			if len(p.C.Boards) > 0 {
				far = 0
			}
			for _, b := range p.C.Boards {
				if b.Parent == nil {
					far = max(far, at(b.Plus.Pin("in"), b.Minus.Pin("in")))
				}
			}
		}
		p.clear(f, near, far)
		switch {
		case f == main:
		case f.Way != nil && f.Board.Parent != nil:
			f.Before = feeders[f.Board]
		default:
			f.Before = main
		}
		if f.Before != nil {
			p.discriminate(f)
		}
	}
}

// reach returns the loop resistances from the battery's poles to a short right behind
// a fuse and at the farthest point that it protects.
func (p *Plan) reach(f *facts.Fuse, ref *circuit.Pin, at func(a, b *circuit.Pin) float64) (near, far float64) {
	switch {
	case f.Way == nil:
		a, b := f.Part.Pin("1"), f.Part.Pin("2")
		near = min(at(a, ref), at(b, ref))
		return near, max(at(a, ref), at(b, ref)) + leadOhm(p)
	case f.Way.Lighting != nil:
		near = at(f.Way.Fuse.Pin("1"), f.Board.Minus.Pin("in"))
		f.Way.Lighting.Walk(func(pt, _ *circuit.Point) {
			far = max(far, at(pt.Luminaire.Pin("+"), pt.Luminaire.Pin("-")))
		})
	default:
		near = at(f.Way.Fuse.Pin("1"), f.Board.Minus.Pin("in"))
		far = at(f.Way.Feeds.Plus.Pin("in"), f.Way.Feeds.Minus.Pin("in"))
	}
	return near, far
}

// leadOhm is the resistance of the two control wires behind a fuse of the cabinet.
func leadOhm(p *Plan) float64 {
	c, _ := catalogue.ConductorOf(p.controlSize())
	return 2 * float64(leadLength) * float64(sizing.PerMetre(c, p.running(c.Size)))
}

// clear fills in what a short circuit does at one fuse.
func (p *Plan) clear(f *facts.Fuse, near, far float64) {
	var w sizing.Working
	f.Prospective, w = sizing.Prospective(sizing.FaultInput{Source: p.Full, Internal: p.Internal, Loop: []sizing.Series{{Name: "loop", Ohm: quantity.Ohm(near)}}})
	if near > 0 {
		p.work(f.Part.Designation, "prospective current at the fuse", w)
	}
	f.FarEnd, w = sizing.LeastFault(sizing.FaultInput{Source: p.Empty, Internal: p.Internal * usedBattery, Loop: []sizing.Series{{Name: "loop", Ohm: quantity.Ohm(far)}}})
	p.work(f.Part.Designation, "current of a short at the far end", w)
	p.breaking(f, p.Highest)
	p.opens(f)
}

// breaking records what a fuse breaks; the finding on it judges.
func (p *Plan) breaking(f *facts.Fuse, highest quantity.Volt) {
	w, _ := sizing.Breaking(sizing.BreakingInput{Class: f.Class, Rating: f.Rating, System: highest, Prospective: f.Prospective})
	p.work(f.Part.Designation, "", w, f.Part.Designation+": prospective current at the fuse", p.F.Battery.Part.Designation+": prospective short-circuit current")
}

// clearRaw fills in what a short circuit does at the fuse of a transformer supply: the
// supply's own resistance limits its current.
func (p *Plan) clearRaw(f *facts.Fuse, r raw) {
	short := func(name string, mains quantity.Ratio, more quantity.Ohm) quantity.Ampere {
		i := quantity.Ampere(float64(r.open) * float64(mains) / float64(r.ohm+more))
		p.work(f.Part.Designation, name, sizing.Working{
			Formula: "I_k = m × U_open ÷ (R + ΣR)", Value: float64(i), Unit: "A", Source: "Thévenin's theorem on the stated points",
			Substituted: fmt.Sprintf("%v × %v ÷ (%s Ω + %s Ω)", float64(mains), r.open, sizing.Digits(float64(r.ohm)), sizing.Digits(float64(more))),
		})
		return i
	}
	f.Prospective = short("prospective current at the fuse", 1+r.mains.Plus, 0)
	f.FarEnd = short("current of a short at the far end", 1-r.mains.Plus, quantity.Ohm(fuseOhm(f.Rating)+leadOhm(p)))
	p.breaking(f, r.high(0))
	p.opens(f)
}

// opens fills in when a fuse opens at the current of a far-end short, and what its
// cable stands.
func (p *Plan) opens(f *facts.Fuse) {
	o, w, err := sizing.OpeningTime(sizing.OpeningInput{Class: f.Class, Rating: f.Rating, Current: f.FarEnd})
	if err != nil {
		p.block(f.Part.Designation, f.Part.At, "", err)
		return
	}
	f.Opens = !math.IsInf(float64(o.Latest), 1)
	if f.Opens {
		f.OpensWithin = o.Latest
		p.work(f.Part.Designation, "opens within", w)
	}
	if f.CableSize.Area > 0 {
		f.Withstand = sizing.Withstand(f.CableSize.Area, f.FarEnd, adiabaticK)
	}
}

// adiabaticK is k of IEC 60364-4-43 table 43A for copper with PVC insulation,
// A·√s/mm².
const adiabaticK = 115

// discriminate finds up to which current only f opens and not the fuse before it.
func (p *Plan) discriminate(f *facts.Fuse) {
	d, w, err := sizing.Discriminate(sizing.DiscriminationInput{
		Upper: sizing.Link{Class: f.Before.Class, Rating: f.Before.Rating},
		Lower: sizing.Link{Class: f.Class, Rating: f.Rating}, Fault: f.Prospective,
	})
	if err != nil {
		p.block(f.Part.Designation, f.Part.At, "", err)
		return
	}
	f.DiscriminatesTo, f.DiscriminatesFrom = d.To, d.From
	p.work(f.Part.Designation, "discriminates to "+f.Before.Part.Designation+" up to", w)
}

// distances returns the resistance from a pin of the battery to every pin along
// conductors, joins, fuses, closed contacts and switches: Dijkstra's method, exact
// since the way out of a battery is a tree on each pole.
func (p *Plan) distances(from *circuit.Pin) map[*circuit.Pin]float64 {
	type edge struct {
		to  *circuit.Pin
		ohm float64
	}
	edges := map[*circuit.Pin][]edge{}
	link := func(a, b *circuit.Pin, ohm float64) {
		edges[a] = append(edges[a], edge{b, ohm})
		edges[b] = append(edges[b], edge{a, ohm})
	}
	for _, j := range p.C.Joins {
		link(j.A, j.B, 0)
	}
	for _, w := range p.C.Conductors {
		link(w.From, w.To, float64(w.Ohm))
	}
	for _, part := range p.C.Parts {
		if part.Kind == circuit.Terminal {
			link(part.Pins[0], part.Pins[1], 0)
		}
		for _, e := range part.Elements {
			switch e.Model {
			case "fuse", "switch", "contact", "cut-off":
				link(e.Pins[0].Pin, e.Pins[1].Pin, paramOf(e, "ohm"))
			case "resistor":
				if part.Kind == circuit.Shunt {
					link(e.Pins[0].Pin, e.Pins[1].Pin, paramOf(e, "ohm"))
				}
			}
		}
	}
	out := map[*circuit.Pin]float64{}
	q := &pinQueue{{from, 0}}
	for q.Len() > 0 {
		it := heap.Pop(q).(reached)
		if _, done := out[it.pin]; done {
			continue
		}
		out[it.pin] = it.ohm
		for _, e := range edges[it.pin] {
			if _, done := out[e.to]; !done {
				heap.Push(q, reached{e.to, it.ohm + e.ohm})
			}
		}
	}
	return out
}

func paramOf(e *circuit.Element, name string) float64 {
	for _, x := range e.Params {
		if x.Name == name {
			return x.Value
		}
	}
	return 0
}

// reached is a pin with its distance; pinQueue a heap of them.
type reached struct {
	pin *circuit.Pin
	ohm float64
}

type pinQueue []reached

func (q pinQueue) Len() int           { return len(q) }
func (q pinQueue) Less(i, j int) bool { return q[i].ohm < q[j].ohm }
func (q pinQueue) Swap(i, j int)      { q[i], q[j] = q[j], q[i] }
func (q *pinQueue) Push(x any)        { *q = append(*q, x.(reached)) }
func (q *pinQueue) Pop() any {
	old := *q
	x := old[len(old)-1]
	*q = old[:len(old)-1]
	return x
}
