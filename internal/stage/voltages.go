package stage

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// voltages sets the voltages that everything is sized with.
func (p *Plan) voltages() {
	s := p.battery()
	nominal := p.Site.Duty.Nominal.Val
	if s == nil {
		p.End, p.Full, p.Float, p.Boost, p.Highest = nominal, nominal, nominal, nominal, nominal
		return
	}
	p.Class = catalogue.BatteryClassOf(must[string](s, "cells"))
	p.Cells = p.Class.CellsFor(nominal)
	p.cellVoltages()
	if v, ok := describe.Get[int](s.Fields, "series"); ok {
		p.Cells = v.Val
		p.cellVoltages()
	} else if p.Highest > catalogue.ExtraLow {
		p.fewerCells()
	}
}

// fewerCells takes cells off a battery until its highest voltage keeps the extra-low
// limit, as the trade does with 48 V of nickel-cadmium cells, whose boost is high.
func (p *Plan) fewerCells() {
	usual, most := p.Cells, p.Highest
	for least := 1; p.Cells > least && p.Highest > catalogue.ExtraLow; {
		p.Cells--
		p.cellVoltages()
	}
	if p.F != nil {
		p.work("battery", "cells in series", sizing.Working{
			Formula: "n ≤ n_usual × 60 V ÷ U_highest, whole cells", Value: float64(p.Cells), Source: "IEC 61140 (60 V DC, ripple-free)",
			Substituted: fmt.Sprintf("%d × 60 V ÷ %s V → %d", usual, sizing.Digits(float64(most)), p.Cells),
		})
	}
}

// cellVoltages sets the voltages of the whole battery from those of its cells.
func (p *Plan) cellVoltages() {
	n := quantity.Volt(p.Cells)
	p.Empty = n * p.Class.RestVolt(0)
	p.Full = n * p.Class.RestVolt(1)
	p.Float, p.Boost = n*p.Class.Float, n*p.Class.Boost
	for _, o := range p.Site.Stages {
		if v, ok := describe.Get[quantity.Volt](o.Fields, "float"); ok {
			p.Float = v.Val
		}
		if v, ok := describe.Get[quantity.Volt](o.Fields, "boost"); ok {
			p.Boost = v.Val
		}
	}
	if p.floatOnly() {
		p.Boost = p.Float
	}
	p.Highest = p.Boost
	if compensatedSite(p.Site) || p.floatOnly() { // a trimmer is set for the season
		cold := p.Site.Duty.BatteryRoom.Val.Low
		p.Highest = max(p.Highest, p.Boost+n*p.Class.Slope*quantity.Volt(cold-p.Class.ChargeAt))
	}
}

// endOfDischarge sets the battery voltage at which an outage may end: the class's own,
// or higher where the farthest lamp, with the whole permitted drop before it, would
// leave its working range, or where the user's cut-off opens.
func (p *Plan) endOfDischarge() {
	s := p.battery()
	if s == nil {
		return
	}
	var lamp quantity.Volt
	for _, t := range p.Site.Luminaires {
		if p.usedType(t.Name.Val) {
			lamp = max(lamp, p.loads[t.Name.Val].Works.Low)
		}
	}
	end, w := sizing.EndOfDischarge(sizing.EndInput{Class: p.Class, Cells: p.Cells, Lamp: lamp, Drop: p.permittedDrop()})
	p.work("battery", "end of discharge", w)
	p.End = end
	whose, at := "which the lamps need", p.lampNeeding(lamp)
	for _, o := range p.Site.Stages {
		// A cut-off that is a little low must not open below the class's end, and one
		// that is a little high not before the outage is over.
		if acc, ok := describe.Get[quantity.Ratio](o.Fields, "accuracy"); ok && o.Kind.Val == "low-voltage-disconnect" {
			p.End = max(end, quantity.Volt(p.Cells)*p.Class.EndVolt*(1+2*quantity.Volt(acc.Val)))
		}
	}
	if v, ok := describe.Get[quantity.Volt](s.Fields, "end"); ok {
		p.End, whose, at = v.Val, "which is given", v.Pos
	}
	for _, o := range p.Site.Stages {
		if v, ok := describe.Get[quantity.Volt](o.Fields, "opens"); ok && o.Kind.Val == "low-voltage-disconnect" && v.Val > p.End {
			p.End, whose, at = v.Val, "at which "+o.Name.Val+" opens", v.Pos
		}
	}
	p.End = quantity.Volt(math.Ceil(float64(p.End)*voltStep-stepSlack) / voltStep)
	if p.End >= p.Full {
		p.block("end of discharge, "+whose, at, w.Source, &sizing.BlockedError{
			Limit: sizing.LimitBattery, Value: float64(p.End), Bound: float64(p.Full), Unit: "V",
			Frees: "A battery of a higher nominal voltage, lamps that work from less, or lower settings.",
		})
		p.End = quantity.Volt(p.Cells) * p.Class.EndVolt
	}
}

// lampNeeding returns where the luminaire type stands that works from v only.
func (p *Plan) lampNeeding(v quantity.Volt) describe.Span {
	for _, t := range p.Site.Luminaires {
		if p.usedType(t.Name.Val) && p.loads[t.Name.Val].Works.Low >= v {
			return t.Name.Pos
		}
	}
	return describe.Span{}
}

// Voltages that a technician sets are whole tenths of a volt.
const (
	voltStep  = 10
	stepSlack = 1e-6
)

// permittedDrop is the drop from the battery to the farthest lamp, at most.
func (p *Plan) permittedDrop() quantity.Volt {
	return quantity.Volt(float64(p.Site.Practice.LampDrop.Val) * float64(p.Site.Duty.Nominal.Val))
}

// usedType reports whether any circuit has a lamp of that type.
func (p *Plan) usedType(name string) bool {
	for _, b := range p.C.Boards {
		for _, w := range b.Ways {
			found := false
			if w.Lighting != nil {
				w.Lighting.Walk(func(pt, _ *circuit.Point) { found = found || pt.Type == name })
			}
			if found {
				return true
			}
		}
	}
	return false
}

// floatOnly reports whether only linear chargers fill the battery, which know no boost.
func (p *Plan) floatOnly() bool {
	linear := false
	for _, s := range p.Site.Stages {
		linear = linear || s.Kind.Val == "linear-charger"
		if s.Kind.Val == "charger" {
			return false
		}
	}
	return linear
}

func compensatedSite(site *describe.Site) bool {
	for _, s := range site.Stages {
		if s.Kind.Val == "charger" && compensated(s) {
			return true
		}
	}
	return false
}
