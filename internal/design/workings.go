package design

import (
	"fmt"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/sizing"
)

// dropWorkings records for every circuit how the voltage at its worst lamp comes
// about: currents of the solved network times the resistances on the way, so that a
// pocket calculator gives the solver's voltage.
func (m *maker) dropWorkings() {
	sol := m.solved["end"]
	g := m.f.Battery.Part
	if sol == nil || g == nil {
		return
	}
	before := map[*circuit.Point]*circuit.Point{}
	way := map[*circuit.Point]*circuit.Way{}
	worst := map[string]*facts.Luminaire{}
	for _, b := range m.f.Circuit.Boards {
		for _, w := range b.Ways {
			if w.Lighting != nil {
				w.Lighting.Walk(func(p, prev *circuit.Point) { before[p], way[p] = prev, w })
			}
		}
	}
	var order []string
	for _, l := range m.f.Luminaires {
		if worst[l.Circuit] == nil {
			order = append(order, l.Circuit)
		}
		if x := worst[l.Circuit]; x == nil || l.WorstV < x.WorstV {
			worst[l.Circuit] = l
		}
	}
	across := func(a, b *circuit.Pin) float64 { return sol.Across(a.Net, b.Net) }
	for _, name := range order {
		l := worst[name]
		w := way[l.Point]
		bat := across(g.Pin("+"), g.Pin("-"))
		bar := across(w.Board.Plus.Pin("in"), w.Board.Minus.Pin("in"))
		terms := []string{fmt.Sprintf("%.3f V", bat), fmt.Sprintf("%.3f V to the bar of %s", bat-bar, w.Board.Title)}
		i := sol.Current(w.Fuse.Designation)
		if i < 0 {
			i = -i
		}
		start := across(w.TermPlus.Pin("out"), w.TermMinus.Pin("out"))
		terms = append(terms, fmt.Sprintf("%.4f A × %.5f Ω", i, (bar-start)/i))
		var legs []string
		for p := l.Point; p != nil; p = before[p] {
			a := sol.Current(p.Leg.Cores[0].Number)
			if a < 0 {
				a = -a
			}
			legs = append([]string{fmt.Sprintf("%.4f A × %.5f Ω", a, float64(p.Leg.Cores[0].Ohm+p.Leg.Cores[1].Ohm))}, legs...)
		}
		terms = append(terms, legs...)
		v := across(l.Part.Pin("+"), l.Part.Pin("-"))
		m.f.Workings = append(m.f.Workings, sizing.Working{
			For: name, Name: "voltage at " + l.Part.Designation + ", end of discharge",
			Formula:     "U_lamp = U_battery − ΔU_trunk − I_way × R_way − Σ(I_leg × R_leg)",
			Substituted: strings.Join(terms, " − "), Value: v, Unit: "V",
			Source: "network solution: Kirchhoff's and Ohm's laws",
			Uses:   []string{w.Fuse.Designation + ": fuse rating"},
		})
	}
}
