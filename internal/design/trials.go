package design

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/network"
)

// trials lists the single faults of the job: fuses, diodes, relay, sensor, battery,
// joints, and a short at the far end of every circuit.
func (m *maker) trials() []trial {
	var out []trial
	for _, f := range m.f.Fuses {
		if f.Way != nil && f.Way.Spare() {
			continue
		}
		out = append(out, openPart("fuse-open/"+f.Part.Key, f.Part, f.Part.Designation+" open", f.Way != nil))
	}
	for _, p := range m.f.Circuit.Parts {
		out = append(out, m.partTrials(p)...)
	}
	for _, b := range m.f.Circuit.Boards {
		for _, w := range b.Ways {
			if w.Lighting != nil {
				out = append(out, m.farShort(w))
			}
		}
	}
	return append(out, m.joints()...)
}

func openPart(key string, p *circuit.Part, what string, night bool) trial {
	t := trial{key: key, part: p.Designation, what: what, night: night}
	for _, e := range p.Elements {
		t.overrides = append(t.overrides, network.Override{Element: e.ID, Open: true})
	}
	return t
}

// partTrials lists the faults of one part.
func (m *maker) partTrials(p *circuit.Part) []trial {
	yes, no := true, false
	stuck := func(what string, element string, on *bool) trial {
		return trial{key: what + "/" + p.Key, part: p.Designation, what: p.Designation + " " + what,
			overrides: []network.Override{{Element: element, Stuck: on}}}
	}
	id := p.Designation
	switch p.Kind {
	case circuit.Diode, circuit.Schottky:
		a, k := p.Elements[0].Pins[0].Name, p.Elements[0].Pins[1].Name
		return []trial{
			openPart("open/"+p.Key, p, id+" open", false),
			{key: "short/" + p.Key, part: id, what: id + " shorted", overrides: []network.Override{{Element: id, Short: [2]string{a, k}}}},
		}
	case circuit.Relay:
		return []trial{stuck("stuck held in", id+".coil", &yes), stuck("stuck let go", id+".coil", &no)}
	case circuit.CutOff:
		return []trial{stuck("stuck open", id, &no), stuck("stuck closed", id, &yes)}
	case circuit.PhotoSwitch:
		return []trial{stuck("sees light always", id, &yes), stuck("sees dark always", id, &no)}
	case circuit.LDR:
		lux := func(what string, v float64) trial {
			return trial{key: what + "/" + p.Key, part: id, what: id + " " + what,
				overrides: []network.Override{{Element: id, Params: []circuit.Param{{Name: "lux", Value: v}}}}}
		}
		return []trial{lux("lit by a lamp", dayLux), lux("covered", nightLux), openPart("open/"+p.Key, p, id+" open", false)}
	case circuit.Supply, circuit.ChargerUnit, circuit.PNP, circuit.NPN:
		return []trial{openPart("dead/"+p.Key, p, id+" dead", false)}
	case circuit.Battery:
		return m.cellShorted(p)
	}
	return nil
}

// cellShorted is the battery with one cell shorted, in every condition in which the
// battery itself stands at the terminals.
func (m *maker) cellShorted(p *circuit.Part) []trial {
	c := catalogue.BatteryClassOf(m.f.Battery.Class)
	if c == nil {
		return nil
	}
	return []trial{{
		key: "cell-shorted/" + p.Key, part: p.Designation, what: p.Designation + " has a shorted cell",
		overrides: []network.Override{{Element: p.Designation, Params: []circuit.Param{
			{Name: "emf", Value: float64(m.plan.Full) * float64(m.plan.Cells-1) / float64(m.plan.Cells)},
			{Name: "ohm", Value: float64(m.plan.Internal)},
		}}},
		night: true,
	}}
}

// farShort is a short at the last lamp of a circuit: its fuse opens, and the circuit
// is then as with the fuse open.
func (m *maker) farShort(w *circuit.Way) trial {
	var f *facts.Fuse
	for _, x := range m.f.Fuses {
		if x.Way == w {
			f = x
		}
	}
	t := openPart("far-short/"+w.Fuse.Key, w.Fuse, fmt.Sprintf("short at the end of %s", w.Lighting.Name), true)
	t.opens, t.within, t.like = f, f.OpensWithin, "fuse-open/"+w.Fuse.Key
	return t
}

// joints are bad joints at the battery cable, each feeder and the first leg of every
// board's longest circuit.
func (m *maker) joints() []trial {
	var out []trial
	joint := func(c *circuit.Conductor) {
		out = append(out, trial{
			key: "joint/" + c.Key, part: c.Number, what: fmt.Sprintf("bad joint of %v Ω at %s", badJoint, c.From), night: true,
			overrides: []network.Override{{Element: c.Number, Params: []circuit.Param{{Name: "ohm", Value: float64(c.Ohm) + badJoint}}}},
		})
	}
	for _, c := range m.f.Circuit.Cables {
		if c.Circuit == "" && c.To != nil && c.Cores[0].From.Net >= 0 && m.onMainWay(c) {
			joint(c.Cores[0])
		}
	}
	for _, b := range m.f.Circuit.Boards {
		var longest *circuit.Lighting
		count := 0
		for _, w := range b.Ways {
			if w.Lighting == nil {
				continue
			}
			n := 0
			w.Lighting.Walk(func(_, _ *circuit.Point) { n++ })
			if n > count {
				longest, count = w.Lighting, n
			}
		}
		if longest != nil {
			joint(longest.Points[0].Leg.Cores[0])
		}
	}
	return out
}

// onMainWay reports whether a system cable carries the load: that of the battery or
// a feeder.
func (m *maker) onMainWay(c *circuit.Cable) bool {
	for _, b := range m.f.Circuit.Boards {
		if b.Feeder == c {
			return true
		}
	}
	return c.Cores[0].From.Part.Kind == circuit.SwitchIsolator || c.Cores[0].From.Part.Kind == circuit.Fuse
}
