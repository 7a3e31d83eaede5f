package stage

import (
	"strings"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// controlWire is the size of wires that carry coils, sensors and supplies of cards
// inside the cabinet (common practice, no source).
var controlWire = map[catalogue.System]quantity.WireSize{
	catalogue.Metric: {Area: 0.75},
	catalogue.AWG:    {Area: catalogue.LeastControl.Least(catalogue.AWG), Gauge: catalogue.LeastControl.Gauge},
}

// controlSize is the size of those wires here: thicker where the short-circuit current of
// the battery asks it.
func (p *Plan) controlSize() quantity.WireSize {
	return thicker(controlWire[p.System], p.ControlSize)
}

// thicker returns the thicker of two sizes.
func thicker(a, b quantity.WireSize) quantity.WireSize {
	if a.Area > b.Area {
		return a
	}
	return b
}

// wires gives every conductor that no step has sized its size, every one its colour
// and resistance.
func (p *Plan) wires() {
	for _, w := range p.C.Conductors {
		w.Colour = p.Site.Practice.Negative.Val
		if w.Positive {
			w.Colour = p.Site.Practice.Positive.Val
		}
		if w.Size.Area == 0 {
			w.Size = p.wireSize(w)
		}
		if w.Cable != nil && w.Cable.Size.Area == 0 {
			w.Cable.Size = w.Size
		}
		if w.Ohm == 0 {
			c, ok := catalogue.ConductorOf(w.Size)
			if !ok {
				panic("stage: wire " + w.Number + " has no standard size")
			}
			w.Ohm = sizing.PerMetre(c, p.running(w.Size)) * quantity.Ohm(w.Length)
		}
	}
	for _, r := range p.C.Rails {
		r.Colour = p.Site.Practice.Negative.Val
		if r.Positive {
			r.Colour = p.Site.Practice.Positive.Val
		}
		for _, w := range p.C.Conductors {
			if w.Rail == r.Name {
				r.Size = w.Size
				break
			}
		}
	}
}

// wireSize is the size of a single wire or of a core that no step has sized.
func (p *Plan) wireSize(w *circuit.Conductor) quantity.WireSize {
	if w.Cable != nil && w.Cable.Size.Area > 0 {
		return p.metricOr(w.Cable.Size)
	}
	if p.onTrunk(w) {
		return p.TrunkSize
	}
	for _, b := range p.C.Boards {
		for _, way := range b.Ways {
			if way.Spare() && (way.WirePlus == w || way.WireMinus == w) {
				return p.spareWire(b)
			}
		}
		if b.Feeder != nil && (b.InPlus == w.From.Part || b.InMinus == w.From.Part) {
			return b.Feeder.Size
		}
	}
	if p.chargeWire(w) {
		return p.ChargeSize
	}
	return p.controlSize()
}

// metricOr returns a size in the firm's system: as it is, or the gauge not thinner.
func (p *Plan) metricOr(s quantity.WireSize) quantity.WireSize {
	if systemOf(s) == p.System {
		return s
	}
	for _, c := range catalogue.Conductors(p.System) {
		if c.Size.Area >= s.Area-areaSlack {
			return c.Size
		}
	}
	return s
}

// spareWire is the size of the leads of a spare way: that of the board's thinnest
// used one.
func (p *Plan) spareWire(b *circuit.Board) quantity.WireSize {
	var s quantity.WireSize
	for _, w := range b.Ways {
		if w.WirePlus.Size.Area > 0 && (s.Area == 0 || w.WirePlus.Size.Area < s.Area) {
			s = w.WirePlus.Size
		}
	}
	if s.Area == 0 {
		return p.controlSize()
	}
	return s
}

// onTrunk reports whether the whole load can flow through w: a segment of a rail of
// the energy's way, or a lead of a part that stands in series with it.
func (p *Plan) onTrunk(w *circuit.Conductor) bool {
	if w.Rail != "" {
		return !strings.HasPrefix(w.Rail, "P") && !p.fedRail(w)
	}
	return seriesPin(w.From) || seriesPin(w.To)
}

// fedRail reports whether w is a segment inside a board that a feeder feeds.
func (p *Plan) fedRail(w *circuit.Conductor) bool {
	for _, b := range p.C.Boards {
		if b.InPlus != nil && (w.From.Part == b.InPlus || w.From.Part == b.InMinus) {
			return true
		}
	}
	return false
}

// seriesPin reports whether a pin belongs to a part in the energy's way.
func seriesPin(p *circuit.Pin) bool {
	switch p.Part.Kind {
	case circuit.Battery, circuit.SwitchIsolator:
		return true
	case circuit.CutOff:
		return p.Name != "-"
	case circuit.Relay:
		return p.Name != "A1" && p.Name != "A2"
	case circuit.Shunt:
		return p.Name == "1" || p.Name == "2"
	}
	return false
}

// chargeWire reports whether the charger's current flows through w.
func (p *Plan) chargeWire(w *circuit.Conductor) bool {
	for _, pin := range []*circuit.Pin{w.From, w.To} {
		if s := pin.Part.Stage; s != "" && (pin.Part.Kind == circuit.ChargerUnit || pin.Part.Kind == circuit.Fuse || pin.Part.Kind == circuit.Schottky || pin.Part.Kind == circuit.Preset) {
			if k := p.kindName(s); k == "charger" || k == "linear-charger" {
				return !strings.HasPrefix(pin.Name, "θ")
			}
		}
	}
	return false
}

// kindName returns the kind of the stage of that name; empty for the block of single
// parts.
func (p *Plan) kindName(stage string) string {
	for _, s := range p.Site.Stages {
		if s.Name.Val == stage {
			return s.Kind.Val
		}
	}
	return ""
}
