package design

import (
	"math"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// luminaires records voltage and current at every lamp, and which circuits are lit.
func (m *maker) luminaires() {
	lit := make([]map[string]bool, len(m.f.Conditions))
	for i := range lit {
		lit[i] = map[string]bool{}
		for _, c := range m.site.Circuits {
			lit[i][c.Name.Val] = true
		}
	}
	nominal := float64(m.site.Duty.Nominal.Val)
	for _, b := range m.f.Circuit.Boards {
		for _, w := range b.Ways {
			if w.Lighting == nil {
				continue
			}
			w.Lighting.Walk(func(pt, _ *circuit.Point) {
				load := m.plan.Load(pt.Type)
				l := &facts.Luminaire{
					Part: pt.Luminaire, Point: pt, Circuit: w.Lighting.Name, Type: pt.Type, Kind: load.Kind,
					Works: load.Works, Watt: load.Rated, Rated: load.Full, Dimmest: load.Dimmest, WorstV: quantity.Volt(math.Inf(1)),
				}
				for i, c := range m.f.Conditions {
					sol := m.solved[c.Key]
					v := live(sol.Across(pt.Luminaire.Pin("+").Net, pt.Luminaire.Pin("-").Net))
					a := sol.Current(pt.Luminaire.Designation)
					l.Volts = append(l.Volts, quantity.Volt(v))
					l.Amps = append(l.Amps, quantity.Ampere(a))
					if !load.Lit(quantity.Volt(v)) {
						lit[i][w.Lighting.Name] = false
					}
					// A dark circuit is the function table's business, not the cables'.
					if on, known := m.wanted(w.Lighting.Lit, c); on && known && v > 0 {
						l.WorstV = min(l.WorstV, quantity.Volt(v))
						l.Drop = max(l.Drop, quantity.Ratio((float64(c.BatteryV)-v)/nominal))
					}
				}
				if math.IsInf(float64(l.WorstV), 1) {
					l.WorstV = 0
				}
				if l.Drop > m.f.Totals.WorstDrop {
					m.f.Totals.WorstDrop, m.f.Totals.WorstLamp = l.Drop, pt.Luminaire.Designation
				}
				if m.f.Totals.LowestV == 0 || l.WorstV > 0 && l.WorstV < m.f.Totals.LowestV {
					m.f.Totals.LowestV = l.WorstV
				}
				m.f.Luminaires = append(m.f.Luminaires, l)
			})
		}
	}
	for i, c := range m.f.Conditions {
		for _, s := range m.site.Circuits {
			if lit[i][s.Name.Val] {
				c.Lit = append(c.Lit, s.Name.Val)
			}
		}
	}
	for _, w := range m.f.Circuit.Cables {
		m.f.Totals.CableM += w.Length
	}
	for _, w := range m.f.Circuit.Conductors {
		m.f.Totals.CopperKg += float64(w.Length) * float64(w.Size.Area) * copperDensity
	}
}

// live returns v, or 0 if it is only the insulation's leakage past open contacts.
func live(v float64) float64 {
	if math.Abs(v) < float64(deadVolt) {
		return 0
	}
	return v
}

// leakage is a current that no meter of the trade shows: what flows through the
// insulation of a dead wire.
const leakage quantity.Ampere = 1e-6

// copperDensity is 8.89 g/cm³ (IEC 60028), in kg per metre and mm².
const copperDensity = 8.89e-3

// farEnds puts each circuit's far-end test point at its lamp with the lowest voltage
// while it must be lit.
func (m *maker) farEnds() {
	for _, b := range m.f.Circuit.Boards {
		for _, w := range b.Ways {
			if w.Lighting == nil {
				continue
			}
			var worst *facts.Luminaire
			for _, l := range m.f.Luminaires {
				if l.Circuit == w.Lighting.Name && (worst == nil || l.WorstV < worst.WorstV) {
					worst = l
				}
			}
			tp := w.Lighting.TestPoint
			tp.Red, tp.Black = worst.Part.Pin("+"), worst.Part.Pin("-")
		}
	}
}

// conductors records the highest current of every conductor.
func (m *maker) conductors() {
	fuseOf := m.fuseOf()
	inNet := map[string]bool{}
	for _, e := range m.f.Netlist.Elements {
		inNet[e.ID] = true
	}
	for _, w := range m.f.Circuit.Conductors {
		c := &facts.Conductor{Conductor: w, Ampacity: m.plan.Ampacity(w), Fuse: fuseOf[w]}
		if inNet[w.Number] {
			for _, cond := range m.f.Conditions {
				c.Current = max(c.Current, quantity.Ampere(math.Abs(m.solved[cond.Key].Current(w.Number))))
			}
			if c.Current < leakage {
				c.Current = 0
			}
		}
		m.f.Conductors = append(m.f.Conductors, c)
	}
	if sol := m.solved["end"]; sol != nil {
		for _, l := range m.f.Luminaires {
			m.f.Totals.LoadA += quantity.Ampere(sol.Current(l.Part.Designation))
		}
	}
}

// fuseOf finds the fuse that protects each conductor: that of its way, or the first
// fuse between it and the battery.
func (m *maker) fuseOf() map[*circuit.Conductor]string {
	out := map[*circuit.Conductor]string{}
	byCircuit := map[string]string{}
	byCable := map[*circuit.Cable]string{}
	byWire := map[*circuit.Conductor]string{}
	for _, b := range m.f.Circuit.Boards {
		for _, w := range b.Ways {
			byWire[w.WirePlus], byWire[w.WireMinus] = w.Fuse.Designation, w.Fuse.Designation
			if w.Lighting != nil {
				byCircuit[w.Lighting.Name] = w.Fuse.Designation
			}
			if w.Feeds != nil {
				byCable[w.Feeds.Feeder] = w.Fuse.Designation
				for _, c := range m.f.Circuit.Conductors {
					if c.From.Part == w.Feeds.InPlus || c.From.Part == w.Feeds.InMinus {
						byWire[c] = w.Fuse.Designation
					}
				}
			}
		}
	}
	stageFuse := map[string]string{}
	main := ""
	for _, f := range m.f.Fuses {
		if f.Way != nil {
			continue
		}
		stageFuse[f.Part.Stage] = f.Part.Designation
		if m.f.Battery.Part != nil && f.Part.Stage == m.f.Battery.Part.Stage {
			main = f.Part.Designation
		}
	}
	for _, c := range m.f.Circuit.Conductors {
		switch {
		case byWire[c] != "":
			out[c] = byWire[c]
		case c.Cable != nil && byCable[c.Cable] != "":
			out[c] = byCable[c.Cable]
		case c.Circuit != "":
			out[c] = byCircuit[c.Circuit]
		default:
			out[c] = main
			for _, pin := range []*circuit.Pin{c.From, c.To} {
				if s := stageFuse[pin.Part.Stage]; s != "" && c.Rail == "" && pin.Part.Kind != circuit.Terminal {
					out[c] = s
				}
			}
		}
	}
	return out
}

// function compares what every circuit asks for with what was found.
func (m *maker) function() {
	for _, s := range m.site.Circuits {
		row := &facts.FunctionRow{Circuit: s.Name.Val, Asked: s.Lit.Val}
		for _, c := range m.f.Conditions {
			want, known := m.wanted(s.Lit.Val, c)
			found := false
			for _, name := range c.Lit {
				found = found || name == s.Name.Val
			}
			row.Wanted = append(row.Wanted, want)
			row.Known = append(row.Known, known)
			row.Found = append(row.Found, found)
		}
		m.f.Function = append(m.f.Function, row)
	}
}

// relays records the lowest voltage of each coil in the conditions in which it must hold.
func (m *maker) relays() {
	for _, r := range m.f.Relays {
		m.relay(r)
	}
}

// relay records a coil's lowest voltage.
func (m *maker) relay(r *facts.Relay) {
	r.LowestFeed = quantity.Volt(math.Inf(1))
	coil := r.Part.Designation + ".coil"
	for _, c := range m.f.Conditions {
		sol := m.solved[c.Key]
		if !sol.State[coil] || c.Battery == cutOff {
			continue
		}
		v := quantity.Volt(sol.Across(r.Part.Pin("A1").Net, r.Part.Pin("A2").Net))
		if c.MainsV > 0 {
			r.LowestFeed = min(r.LowestFeed, v)
		} else if r.LowestCold == 0 || v < r.LowestCold {
			r.LowestCold = v
		}
	}
	if r.LowestCold == 0 { // no battery holds it: nothing to compare
		r.PickUpCold = 0
	}
	if math.IsInf(float64(r.LowestFeed), 1) {
		r.LowestFeed = r.PickUp
	}
}
