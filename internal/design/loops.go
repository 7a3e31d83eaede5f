package design

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// copperOhm is the resistivity of copper at 20 °C, Ω·mm²/m (IEC 60028).
const copperOhm = 1.0 / 58

// loops says what a run of two cores reads with its far end joined: at least copper of
// the full cross-section in the cold (IEC 60028), at most the resistance that the size
// may have (IEC 60228 or ASTM B258) at the cable's highest surroundings: no load warms it.
func (m *maker) loops() {
	for _, b := range m.f.Circuit.Boards {
		if b.Feeder != nil && len(b.Feeder.Cores) >= 2 {
			p, n := b.Feeder.Cores[0], b.Feeder.Cores[1]
			m.f.Loops = append(m.f.Loops, m.loop("the feeder of "+b.Title, []*circuit.Cable{b.Feeder},
				[2]*circuit.Pin{p.From, n.From}, [2]*circuit.Pin{p.To, n.To}))
		}
	}
	for _, b := range m.f.Circuit.Boards {
		for _, w := range b.Ways {
			if w.Lighting != nil {
				m.circuitLoop(w.Lighting)
			}
		}
	}
}

// circuitLoop is the way to the luminaire with the most resistance before it.
func (m *maker) circuitLoop(l *circuit.Lighting) {
	before := map[*circuit.Point]*circuit.Point{}
	var far *circuit.Point
	var most quantity.Ohm
	l.Walk(func(p, prev *circuit.Point) {
		before[p] = prev
		var r quantity.Ohm
		for q := p; q != nil; q = before[q] {
			r += q.Leg.Cores[0].Ohm + q.Leg.Cores[1].Ohm
		}
		if r > most {
			far, most = p, r
		}
	})
	if far == nil {
		return
	}
	var legs []*circuit.Cable
	for q := far; q != nil; q = before[q] {
		legs = append([]*circuit.Cable{q.Leg}, legs...)
	}
	first := legs[0]
	m.f.Loops = append(m.f.Loops, m.loop(l.Name, legs, [2]*circuit.Pin{first.Cores[0].From, first.Cores[1].From},
		[2]*circuit.Pin{far.Luminaire.Pin("+"), far.Luminaire.Pin("-")}))
}

func (m *maker) loop(name string, legs []*circuit.Cable, from, joined [2]*circuit.Pin) *facts.Loop {
	out := &facts.Loop{Name: name, From: from, Joined: joined}
	cold, warm := m.site.Duty.BatteryRoom.Val.Low, m.site.Duty.CableAmbient.Val
	for _, leg := range legs {
		out.Length += leg.Length
		for _, c := range leg.Cores[:2] {
			full := quantity.Ohm(copperOhm * float64(c.Length) / float64(c.Size.Area))
			low, _ := sizing.ResistanceAt(full, catalogue.ReferenceTemperature, cold, catalogue.CopperZero)
			out.Low += low
			if k, ok := catalogue.ConductorOf(c.Size); ok {
				out.High += sizing.PerMetre(k, warm) * quantity.Ohm(c.Length)
			} else {
				out.High += c.Ohm
			}
		}
	}
	return out
}
