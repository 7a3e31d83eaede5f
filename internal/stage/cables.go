package stage

import (
	"fmt"
	"strings"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// discriminationRatio is how much a feeder fuse should be above the largest fuse
// behind it: the 1.6 to 1 of gG fuse-links in IEC 60269-1 (from memory), taken as the
// starting point for other classes; the gates then say up to which current it holds.
const discriminationRatio = 1.6

// usedBattery is the resistance of a battery at the end of its life as a multiple of
// that when new (common practice, no source).
const usedBattery = 1.5

// sizeBoard sizes feeders, legs and way fuses of all boards together, once: with the
// first classes of fuse with which everything fits.
func sizeBoard(p *Plan, _ *describe.Stage) {
	if p.cabled || len(p.C.Boards) == 0 {
		return
	}
	p.cabled = true
	best := p.bestTree()
	best.commit()
	if best.err == nil && p.sells[""] {
		best.res, best.err = best.choose()
	}
	if best.err != nil {
		p.block("Cables", p.C.Boards[0].At, "", best.err)
		if best.res == nil {
			best.res = best.thickest()
		}
	}
	best.assign(best.res)
}

// grow builds the tree of feeders and legs with the given classes of fuse and chooses its
// sizes.
func (p *Plan) grow(lights, feeders *catalogue.FuseClass, above bool) *tree {
	t := &tree{p: p, lights: lights, feeders: feeders, above: above}
	t.Volts = p.End
	t.Ahead = p.Internal * usedBattery
	t.Taper = p.Site.Practice.Taper.Val
	t.Lengths = p.Site.Practice.LengthUnit()
	t.options()
	trunk := t.leg(sizing.Leg{Name: "trunk", Parent: -1, Extra: p.TrunkOhm, Pinned: &t.Options[len(t.Options)-1]}, nil)
	for _, b := range p.C.Boards {
		if b.Parent == nil {
			t.board(b, trunk)
		}
	}
	if t.drawsMore() {
		t.Also = append(t.Also, t.full())
	}
	t.res, t.err = t.Choose()
	return t
}

// drawsMore reports whether some lamp draws more at a higher voltage, so that it loses
// most on its way not at the end of discharge but while the battery is full.
func (t *tree) drawsMore() bool {
	for _, l := range t.Legs {
		if l.Load.Ohm > 0 {
			return true
		}
	}
	return false
}

// full is the tree with the battery full, or on float where circuits are lit while mains
// is on.
func (t *tree) full() sizing.Condition {
	c := sizing.Condition{Volts: t.p.Full, MinVolt: make([]quantity.Volt, len(t.Legs))}
	for _, s := range t.p.Site.Circuits {
		if s.Lit.Val == "night" || s.Lit.Val == "always" {
			c.Volts = max(c.Volts, t.p.Float)
		}
	}
	for i := range t.Legs {
		if t.Legs[i].MinVolt > 0 {
			c.MinVolt[i] = c.Volts - t.p.permittedDrop()
		}
	}
	return c
}

// tree is the tree of feeders and legs with what belongs to each leg.
type tree struct {
	sizing.Tree
	p               *Plan
	lights, feeders *catalogue.FuseClass // of the ways of circuits and of feeders
	above           bool                 // feeder fuses stand above those behind them
	fuses           []*wayFuse           // in printing order
	cables          []*circuit.Cable     // by leg; nil for the trunk
	ways            []*circuit.Way       // the way whose fuse protects the leg
	res             *sizing.TreeResult
	err             error
	fused           []fusedWay // ways with a fuse, those behind a feeder before it

	thinnest quantity.Ohm // per metre, of the thinnest option
	paid     float64      // for the fuses of all ways, where they were chosen by price
}

func (t *tree) leg(l sizing.Leg, c *circuit.Cable) int {
	t.Legs = append(t.Legs, l)
	t.cables = append(t.cables, c)
	t.ways = append(t.ways, nil)
	return len(t.Legs) - 1
}

// options lists the sizes that a leg may take.
func (t *tree) options() {
	for _, c := range t.p.sizes() {
		if o, ok := t.option(c.Size); ok {
			t.Options = append(t.Options, o)
		}
	}
	t.thinnest = t.Options[0].PerMetre
}

// option returns the figures of one size as laid. Its resistance is that at the
// temperature at which it runs with the load factor's share of its ampacity: the
// temperature rise goes with the square of the current (IEC 60287-1-1).
func (t *tree) option(size quantity.WireSize) (sizing.Option, bool) {
	c, ok := catalogue.ConductorOf(size)
	if !ok {
		return sizing.Option{}, false
	}
	iz := t.p.ampacity(c.Size, t.p.grouping)
	if iz == 0 {
		return sizing.Option{}, false
	}
	return sizing.Option{
		Size: c.Size, PerMetre: sizing.PerMetre(c, t.p.running(size)),
		Fault:    sizing.PerMetre(c, catalogue.AmpacityOf(systemOf(size)).Conductor),
		Ampacity: iz,
	}, true
}

// running is the temperature of a conductor that carries the load factor's share of
// its ampacity.
func (p *Plan) running(size quantity.WireSize) quantity.Celsius {
	k := quantity.Celsius(p.Site.Practice.LoadFactor.Val)
	ambient := p.ambient
	hot := catalogue.AmpacityOf(systemOf(size)).Conductor
	return ambient + max(0, hot-ambient)*k*k
}

// board adds the ways of a board below leg at.
func (t *tree) board(b *circuit.Board, at int) {
	for _, w := range b.Ways {
		switch {
		case w.Lighting != nil:
			t.lighting(w, at)
		case w.Feeds != nil:
			t.feeder(w, at)
		default:
			t.spare(w)
		}
	}
}

// spare leaves a way without a fuse-link.
func (t *tree) spare(w *circuit.Way) { t.fuses = append(t.fuses, &wayFuse{way: w, class: t.lights}) }

// wayExtra is the resistance of a way before its cable: fuse and the two leads to
// its terminals in the thinnest size that a fixed cable may have.
func (t *tree) wayExtra(rating quantity.Ampere) quantity.Ohm {
	return quantity.Ohm(fuseOhm(rating)) + 2*quantity.Ohm(boardLead)*t.thinnest
}

func (t *tree) lighting(w *circuit.Way, at int) {
	p := t.p
	var ib quantity.Ampere
	w.Lighting.Walk(func(pt, _ *circuit.Point) { ib += p.LampDesign(p.loads[pt.Type]) })
	d := p.circuitOf(w.Lighting.Name)
	f := t.fuse(w, w.Lighting.Name, ib, d.Fuse, 0)
	legs := map[*circuit.Point]int{}
	protects := []int{}
	w.Lighting.Walk(func(pt, before *circuit.Point) {
		l := p.loads[pt.Type]
		leg := t.protected(f, sizing.Leg{
			Name: pt.Luminaire.Designation, Parent: at, Circuit: w.Lighting.Name, Length: pt.Leg.Length,
			Load: l.Tree, MinVolt: max(p.LampEnd(), l.Works.Low),
		})
		if before != nil {
			leg.Parent = legs[before]
		} else {
			leg.Extra = t.wayExtra(f.rating)
		}
		if size, ok := p.pinnedLeg(d, pt.Leg); ok {
			if o, ok := t.option(size); ok {
				leg.Pinned = &o
			}
		}
		legs[pt] = t.leg(leg, pt.Leg)
		t.ways[legs[pt]] = w
		protects = append(protects, legs[pt])
	})
	t.fused = append(t.fused, fusedWay{proposed: f, legs: protects, given: d.Fuse.Given})
}

func (t *tree) feeder(w *circuit.Way, at int) {
	p := t.p
	var ib, largest quantity.Ampere
	p.below(w.Feeds, func(pt *circuit.Point) { ib += p.LampDesign(p.loads[pt.Type]) })
	// The ways behind come first, so that the feeder's fuse can stand above theirs.
	// Their legs need the feeder's leg as parent: it is filled in afterwards.
	i := t.leg(sizing.Leg{}, w.Feeds.Feeder)
	t.ways[i] = w
	before, first := len(t.fuses), len(t.fused)
	t.board(w.Feeds, i)
	for _, f := range t.fuses[before:] {
		largest = max(largest, f.rating)
	}
	if !t.above {
		largest = 0
	}
	s := p.stageOf(w.Feeds.Name)
	given, _ := describe.Get[quantity.Ampere](s.Fields, "fuse")
	f := t.fuse(w, w.Feeds.Title, ib, given, largest)
	leg := t.protected(f, sizing.Leg{Name: w.Feeds.Feeder.Designation, Parent: at, Length: w.Feeds.Feeder.Length, Extra: t.wayExtra(f.rating)})
	if v, ok := describe.Get[quantity.WireSize](s.Fields, "cable"); ok {
		if o, ok := t.option(v.Val); ok {
			leg.Pinned = &o
		}
	}
	t.Legs[i] = leg
	x := fusedWay{proposed: f, legs: []int{i}, given: given.Given}
	for k := first; k < len(t.fused); k++ {
		x.behind = append(x.behind, k)
		if m := &t.fused[k].most; given.Given && (*m == 0 || given.Val/discriminationRatio < *m) {
			*m = given.Val / discriminationRatio
		}
	}
	t.fused = append(t.fused, x)
}

// protected fills in what the fuse asks of a leg.
func (t *tree) protected(f *wayFuse, l sizing.Leg) sizing.Leg {
	asks, err := t.asks(f.class, f.rating)
	if err != nil {
		f.errs = append(f.errs, err)
	}
	l.Carry, l.Loop, l.Least = asks.Carry, asks.Loop, catalogue.LeastFixed.Least(t.p.System)
	return l
}

// asks returns what a fuse asks of every leg that it protects.
func (t *tree) asks(class *catalogue.FuseClass, rating quantity.Ampere) (sizing.FuseOption, error) {
	o := sizing.FuseOption{Rating: rating, Carry: sizing.CableFor(class, rating), Extra: t.wayExtra(rating)}
	need, _, err := sizing.CurrentToOpen(class, rating, t.p.Site.Practice.ClearWithin.Val)
	if err == nil {
		o.Loop = sizing.MostLoop(t.p.Empty, need)
	}
	return o, err
}

// loadWorking records the design current of a circuit, lamp type by lamp type.
func (p *Plan) loadWorking(l *circuit.Lighting, ib quantity.Ampere) {
	count := map[string]int{}
	var order []string
	l.Walk(func(pt, _ *circuit.Point) {
		if count[pt.Type] == 0 {
			order = append(order, pt.Type)
		}
		count[pt.Type]++
	})
	var terms []string
	for _, t := range order {
		terms = append(terms, fmt.Sprintf("%d × %.4f A %s", count[t], float64(p.LampDesign(p.loads[t])), t))
	}
	p.work(l.Name, "design current", sizing.Working{
		Formula:     "I_B = Σ n × I_lamp, the greater of end of discharge less permitted drop and float",
		Substituted: strings.Join(terms, " + "), Value: float64(ib), Unit: "A", Source: "Ohm's law; P = U × I",
	})
}

// below calls fn for every luminaire behind a board.
func (p *Plan) below(b *circuit.Board, fn func(*circuit.Point)) {
	for _, w := range b.Ways {
		if w.Lighting != nil {
			w.Lighting.Walk(func(pt, _ *circuit.Point) { fn(pt) })
		} else if w.Feeds != nil {
			p.below(w.Feeds, fn)
		}
	}
}

func (p *Plan) circuitOf(name string) *describe.Circuit {
	for _, c := range p.Site.Circuits {
		if c.Name.Val == name {
			return c
		}
	}
	panic("stage: no circuit " + name)
}

func (p *Plan) stageOf(name string) *describe.Stage {
	for _, s := range p.Site.Stages {
		if s.Name.Val == name {
			return s
		}
	}
	panic("stage: no stage " + name)
}

// pinnedLeg returns the size that the user gave for a leg: its own, or its circuit's.
func (p *Plan) pinnedLeg(c *describe.Circuit, leg *circuit.Cable) (quantity.WireSize, bool) {
	var find func(legs []*describe.Leg) (quantity.WireSize, bool)
	find = func(legs []*describe.Leg) (quantity.WireSize, bool) {
		for _, l := range legs {
			if l.Pos == leg.At && l.Cable.Given {
				return l.Cable.Val, true
			}
			for _, b := range l.Branches {
				if s, ok := find(b); ok {
					return s, true
				}
			}
		}
		return quantity.WireSize{}, false
	}
	if s, ok := find(c.Points); ok {
		return s, true
	}
	return c.Cable.Val, c.Cable.Given
}

// thickest is what stands when nothing fits: pinned sizes as given, the thickest
// option elsewhere. The findings say that it must not be built.
func (t *tree) thickest() *sizing.TreeResult {
	r := &sizing.TreeResult{}
	for i := range t.Legs {
		o := &t.Options[len(t.Options)-1]
		if t.Legs[i].Pinned != nil {
			o = t.Legs[i].Pinned
		}
		r.Sizes = append(r.Sizes, o)
	}
	r.Volts, r.Amps, _ = t.Solve(r.Sizes)
	return r
}

// assign writes the chosen sizes to the cables and their fuses.
func (t *tree) assign(r *sizing.TreeResult) {
	p := t.p
	thinnest := map[*circuit.Way]*sizing.Option{}
	for i, c := range t.cables {
		if c == nil {
			continue
		}
		o := r.Sizes[i]
		p.run(c, o.Size, o.PerMetre)
		w := t.ways[i]
		if th := thinnest[w]; th == nil || o.Ampacity < th.Ampacity {
			thinnest[w] = o
		}
		if w.WirePlus.Size.Area == 0 { // the first leg: what its terminals hold
			w.WirePlus.Size, w.WireMinus.Size = o.Size, o.Size
		}
	}
	for _, f := range p.F.Fuses {
		if o := thinnest[f.Way]; f.Way != nil && o != nil {
			f.CableAmpacity, f.CableSize = o.Ampacity, o.Size
		}
	}
	if r.Cost > 0 {
		p.F.Totals.Bound, p.F.Totals.Proven = quantity.Ratio((r.Bound+t.paid)/(r.Cost+t.paid)), r.Proven
	}
	t.workings(r)
}

// run gives a cable its size and its cores their resistance.
func (p *Plan) run(c *circuit.Cable, size quantity.WireSize, perMetre quantity.Ohm) {
	c.Size = size
	for _, w := range c.Cores {
		w.Size = size
		w.Ohm = perMetre * quantity.Ohm(w.Length)
	}
}
