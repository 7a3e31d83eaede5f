package stage

import (
	"fmt"
	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
	"math"
)

// lowVoltageDisconnect takes the load off the battery before it is discharged too
// deeply, and puts it back when it has been charged.
func lowVoltageDisconnect() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name:   "low-voltage-disconnect",
			Single: true,
			Doc:    "Cut-off: takes the load off a battery that is nearly empty and puts it back when it has been charged.",
			Ports: []describe.Port{
				{Name: "out", Doc: "plus behind the cut-off"},
			},
			Fields: fields(
				describe.Field{Name: "from", Type: describe.StageRef, Required: true, Doc: "The stage that it takes the plus from."},
				describe.Field{Name: "opens", Type: describe.Voltage, Min: "1 V", Max: "60 V", Doc: "Voltage at which it opens; without it from the battery's class."},
				describe.Field{Name: "recloses", Type: describe.Voltage, Min: "1 V", Max: "60 V", Doc: "Voltage at which it closes again; without it from the battery's class."},
				describe.Field{Name: "rated", Type: describe.Current, Min: "0.1 A", Max: "500 A", Doc: "Rated current; without it the next standard rating."},
				describe.Field{Name: "own", Type: describe.Current, Default: "8 mA", Min: "0 mA", Max: "1 A", Doc: "Current that it takes itself."},
				describe.Field{Name: "accuracy", Type: describe.Percent, Default: "1 %", Min: "0 %", Max: "10 %", Doc: "Tolerance of its two voltages, both ways."},
			),
		},
		Class: SupplyClass, Rank: 5, Heading: "Cut-off",
		Expand: func(b *Build, s *describe.Stage) {
			q := b.Part("cut-off", circuit.CutOff, "Low-voltage cut-off", "in", "out", "-")
			b.Element(q, "", "cut-off", "in", "in", "out", "out", "-", "-")
			from, _ := b.ref(s, "from")
			b.sketch(24, "saves the", "battery")
			in := b.lead(circuit.OpIn, "in", q.Pin("in"), from, -3, upEnd, -3, 22, 5, 22)
			b.add(circuit.SketchItem{Op: circuit.OpBlock, Part: q, X: 6, Y: 18, X2: 14, Y2: 28})
			b.add(circuit.SketchItem{Op: circuit.OpStub, Part: q, Name: "in", Pts: points([]int{5, 22, 8, 22})})
			b.add(circuit.SketchItem{Op: circuit.OpStub, Part: q, Name: "out", Pts: points([]int{15, 22, 12, 22})})
			b.add(circuit.SketchItem{Op: circuit.OpSymbol, Symbol: "make", X: 10, Y: 22, Turn: "H"})
			b.add(circuit.SketchItem{Op: circuit.OpField, Part: q, Name: "-", X: 10, Y: 26, Y2: 29})
			down := b.lead(circuit.OpDown, "minus", q.Pin("-"), Minus, 10, 29, 10, downEnd)
			up := b.lead(circuit.OpUp, "out", q.Pin("out"), b.outRail(s, "out"), 15, 22, 19, 22, 19, upEnd)
			b.point(b.TestPoint("output", b.cur.Heading+" output", q.Pin("out")), 19, 15, "W")
			b.number(in, -3, 13)
			b.number(up, 19, 9)
			b.number(down, 10, 42)
		},
		Steps: []Step{{Trunk, sizeCutOff}},
	}
}

// sizeCutOff chooses or checks the cut-off's voltages and rating. It opens at the end
// of discharge that the battery is sized for.
func sizeCutOff(p *Plan, s *describe.Stage) {
	q := p.part(s, "cut-off")
	acc := float64(must[quantity.Ratio](s, "accuracy"))
	opens, givenOpens := describe.Get[quantity.Volt](s.Fields, "opens")
	closes, givenCloses := describe.Get[quantity.Volt](s.Fields, "recloses")
	if p.Class != nil {
		// It senses behind the battery's cable and fuse.
		drop := quantity.Volt(float64(p.Light+p.Standing) * float64(p.CutOffOhm))
		o, r, ws, err := sizing.CutOff(sizing.CutOffInput{
			Class: p.Class, Cells: p.Cells, End: p.End, Drop: drop, Reserve: p.End*endSpread + drop*dropSpread, Accuracy: quantity.Ratio(acc),
		})
		if err != nil && !givenOpens {
			p.block(q.Designation, q.At, "", err)
		}
		for _, w := range ws {
			p.work(q.Designation, "", w, "battery: end of discharge")
		}
		if !givenOpens {
			if err != nil { // the least that the class bears stands in
				o = p.Class.LowestEnd * quantity.Volt(p.Cells)
			}
			opens.Val = quantity.Volt(math.Floor(float64(o)*voltStep+stepSlack) / voltStep)
		}
		if !givenCloses {
			closes.Val = max(r, quantity.Volt(math.Ceil(float64(opens.Val)*(1+recloseGap)*voltStep-stepSlack)/voltStep))
		}
	}
	// The solver needs the order that a real module has; the finding says that the
	// given one is wrong.
	acts := closes.Val
	if closes.Val <= opens.Val {
		p.block(q.Designation, q.At, "", &sizing.BlockedError{
			Limit: sizing.LimitReclose, Value: float64(closes.Val), Bound: float64(opens.Val), Unit: "V",
			Frees: fmt.Sprintf("It must close above the voltage at which it opens, by %v or more.", quantity.Ratio(recloseGap)),
		})
		acts = opens.Val * (1 + recloseGap)
	}
	load := p.Light + p.Standing
	rated, given := describe.Get[quantity.Ampere](s.Fields, "rated")
	if !given {
		rated.Val = p.pricedRating(q, s.Kind.Val, catalogue.CutOffCurrents, load)
	}
	set(q, "opens", "opens "+quantity.Format(opens.Val, 3), float64(opens.Val), "V", true, givenOpens)
	set(q, "recloses", "closes "+quantity.Format(closes.Val, 3), float64(closes.Val), "V", true, givenCloses)
	set(q, "rating", rated.Val.String(), float64(rated.Val), "A", true, given)
	params(q, "",
		circuit.Param{Name: "opens_volt", Value: float64(opens.Val), Tol: acc},
		circuit.Param{Name: "recloses_volt", Value: float64(acts), Tol: acc},
		circuit.Param{Name: "own_ampere", Value: float64(must[quantity.Ampere](s, "own")), Tol: ownTol},
		circuit.Param{Name: "ohm", Value: cutOffOhm, Tol: contactTol},
	)
	p.TrunkOhm += cutOffOhm
	p.F.CutOff = &facts.CutOff{Part: q, Opens: opens.Val, Recloses: closes.Val, Current: load, Rated: rated.Val}
}

// endSpread is how far the voltage that stands for the end of discharge may be off when
// a technician sets a source to it, and dropSpread how far what the way drops: wires,
// fuses and contacts may all be high at once (common practice, no source).
const (
	endSpread  = 0.002
	dropSpread = 0.3
)

// recloseGap is how far above its opening voltage a cut-off closes again, at least: a
// battery that is relieved of its load recovers by about as much (common practice, no
// source).
const recloseGap = 0.05

// cutOffOhm is the resistance of a closed cut-off, and ownTol the tolerance of what
// modules draw themselves (common practice, no source).
const (
	cutOffOhm = 0.01
	ownTol    = 0.2
)

// nextRating chooses the next standard rating for a load, used at most to the
// practice's load factor; ok is false if the list ends below it.
func (p *Plan) nextRating(part *circuit.Part, name string, list []quantity.Ampere, load quantity.Ampere) (rating quantity.Ampere, ok bool) {
	k := p.Site.Practice.LoadFactor.Val
	need := load / quantity.Ampere(k)
	r, ok := catalogue.NextRating(list, need)
	w := sizing.Working{
		Formula: "I_rated ≥ I ÷ k_load, next standard rating", Value: float64(r), Unit: "A",
		Substituted: fmt.Sprintf("%s A ÷ %v = %s A → %s A", sizing.Digits(float64(load)), float64(k), sizing.Digits(float64(need)), sizing.Digits(float64(r))),
		Source:      catalogue.CommonPractice.String(),
	}
	if !ok {
		r = list[len(list)-1]
		p.block(part.Designation, part.At, w.Source, &sizing.BlockedError{
			Limit: sizing.LimitLoad, Value: float64(need), Bound: float64(r), Unit: "A", Frees: "split the job over two systems",
		})
	}
	p.work(part.Designation, name, w)
	return r, ok
}
