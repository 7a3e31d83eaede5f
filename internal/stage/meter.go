package stage

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// meter shows the volts of a rail, or the amperes through a shunt in it.
func meter() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "meter",
			Doc:  "Panel meter: volts across a rail through a fuse, or amperes through a shunt in the plus line.",
			Ports: []describe.Port{
				{Name: "out", Doc: "plus behind the shunt of an ammeter"},
			},
			Fields: fields(
				describe.Field{Name: "from", Type: describe.StageRef, Required: true, Doc: "The stage whose plus it measures."},
				describe.Field{Name: "reads", Type: describe.Choice, Default: "volts", Choices: []string{"volts", "amps"}, Doc: "What it measures."},
				describe.Field{Name: "range", Type: describe.Current, Min: "0.1 A", Max: "500 A", Doc: "Full scale of an ammeter; without it the next one above the load."},
				describe.Field{Name: "own", Type: describe.Current, Default: "1 mA", Min: "0 mA", Max: "200 mA", Doc: "Current that a voltmeter takes itself at nominal voltage."},
			),
		},
		Class: SupplyClass, Rank: 3, Heading: "Meter",
		Expand: func(b *Build, s *describe.Stage) {
			from, _ := b.ref(s, "from")
			if must[string](s, "reads") == "amps" {
				sh := b.Part("shunt", circuit.Shunt, "Shunt", "1", "2", "3", "4")
				b.Element(sh, "", "resistor", "1", "1", "2", "2")
				b.Element(sh, "sense1", "resistor", "1", "1", "2", "3")
				b.Element(sh, "sense2", "resistor", "1", "2", "2", "4")
				p := b.Part("meter", circuit.Ammeter, "Ammeter", "1", "2")
				b.Element(p, "", "meter", "1", "1", "2", "2")
				b.Join(sh.Pin("3"), p.Pin("1"))
				b.Join(sh.Pin("4"), p.Pin("2"))
				b.sketch(23, "shows the", "load")
				in := b.lead(circuit.OpIn, "in", sh.Pin("1"), from, 12, upEnd, 12, 17, 14, 17)
				b.symbol("shunt", sh, 16, 17, "HU", "A", "1", "2", "2", "1", "3", "4", "4", "3")
				out := b.lead(circuit.OpUp, "out", sh.Pin("2"), b.outRail(s, "out"), 18, 17, 20, 17, 20, upEnd)
				b.line(nil, 15, 19, 15, 22)
				b.line(nil, 17, 19, 17, 28, 15, 28, 15, 26)
				b.symbol("ammeter", p, 15, 24, "V", "L")
				b.number(in, 12, 11)
				b.number(out, 20, 11)
				return
			}
			f := b.Part("fuse", circuit.Fuse, "Meter fuse and holder", "1", "2")
			b.Element(f, "", "fuse", "1", "1", "2", "2")
			p := b.Part("meter", circuit.Voltmeter, "Voltmeter", "1", "2")
			b.Element(p, "", "meter", "1", "1", "2", "2")
			b.sketch(15, "shows the", "volts")
			b.hangTwo(from, "fuse", f, "voltmeter", p)
		},
		Steps: []Step{{Trunk, sizeMeter}},
	}
}

// Figures of meters (common practice, no source): the tolerance of what a meter takes
// itself, the resistance of an ammeter's input and of a shunt's sense tags, and how far
// a shunt's resistance may be off.
const (
	ammeterOhm = 1e6
	senseOhm   = 1e-4
	shuntTol   = 0.005
)

// sizeMeter chooses the range of an ammeter and its shunt, or the fuse of a voltmeter.
func sizeMeter(p *Plan, s *describe.Stage) {
	m := p.part(s, "meter")
	if must[string](s, "reads") == "volts" {
		own := must[quantity.Ampere](s, "own")
		p.controlFuse(p.part(s, "fuse"), "meter")
		full, _ := catalogue.NextRating(meterVolts, p.Highest)
		set(m, "range", full.String(), float64(full), "V", true, false)
		ohm := float64(ammeterOhm)
		if own > 0 {
			ohm = float64(p.Site.Duty.Nominal.Val) / float64(own)
		}
		params(m, "", circuit.Param{Name: "ohm", Value: ohm, Tol: ownTol})
		for _, o := range p.Site.Stages {
			for _, f := range kindOf(o.Kind.Val).Fields {
				if f.Type != describe.StageRef {
					continue
				}
				if r, ok := describe.Get[describe.Ref](o.Fields, f.Name); ok && r.Val.Stage == s.Name.Val {
					p.block(m.Designation, o.Name.Pos, "", &sizing.UnknownError{What: "what feeds " + o.Name.Val, Source: s.Name.Val + " is a voltmeter and passes nothing on", Ask: "name the stage that the voltmeter itself takes from"})
				}
			}
		}
		return
	}
	load := max(p.Light+p.Standing, p.F.Charger.Current)
	sh := p.part(s, "shunt")
	full, given := describe.Get[quantity.Ampere](s.Fields, "range")
	if !given {
		full.Val, _ = p.nextRating(m, "range", catalogue.MeterRanges, load)
	}
	ohm := shuntOhm(full.Val)
	set(sh, "rating", full.Val.String(), float64(full.Val), "A", true, given)
	set(sh, "drop", catalogue.ShuntVolt.String(), float64(catalogue.ShuntVolt), "V", true, false)
	set(m, "range", full.Val.String(), float64(full.Val), "A", true, given)
	p.work(sh.Designation, "shunt", sizing.Working{
		Formula: "R = 60 mV ÷ I_range", Value: float64(ohm), Unit: "Ω", Source: "IEC 60051-2 (from memory)",
		Substituted: "0.06 V ÷ " + sizing.Digits(float64(full.Val)) + " A",
	})
	params(sh, "", circuit.Param{Name: "ohm", Value: float64(ohm), Tol: shuntTol})
	params(sh, "sense1", circuit.Param{Name: "ohm", Value: senseOhm})
	params(sh, "sense2", circuit.Param{Name: "ohm", Value: senseOhm})
	params(m, "", circuit.Param{Name: "ohm", Value: ammeterOhm})
	p.TrunkOhm += ohm
	if load > full.Val {
		p.block(m.Designation, m.At, "", &sizing.BlockedError{
			Limit: sizing.LimitLoad, Subject: "the current of the ammeter", Value: float64(load), Bound: float64(full.Val), Unit: "A", Frees: "take a range of at least " + load.String(),
		})
	}
}

// shuntOhm is the resistance of a shunt for a range.
func shuntOhm(full quantity.Ampere) quantity.Ohm {
	return quantity.Ohm(float64(catalogue.ShuntVolt) / float64(full))
}

// meterVolts are full scales of voltmeters: IEC 60051-2, from memory.
var meterVolts = []quantity.Volt{6, 10, 15, 25, 40, 60, 100}
