package finding

import (
	"slices"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// lightingOf returns the circuit of that name; nil if there is none.
func lightingOf(f *facts.Facts, name string) *circuit.Lighting {
	for _, b := range f.Circuit.Boards {
		for _, w := range b.Ways {
			if w.Lighting != nil && w.Lighting.Name == name {
				return w.Lighting
			}
		}
	}
	return nil
}

// legsTo returns the legs of its own circuit between the board and a lamp.
func legsTo(l *circuit.Lighting, lamp *circuit.Part) []*circuit.Cable {
	if l == nil {
		return nil
	}
	return legsOnRun(l.Points, lamp)
}

func legsOnRun(run []*circuit.Point, lamp *circuit.Part) []*circuit.Cable {
	var legs []*circuit.Cable
	for _, p := range run {
		legs = append(legs, p.Leg)
		if p.Luminaire == lamp {
			return legs
		}
		for _, b := range p.Branches {
			if side := legsOnRun(b, lamp); side != nil {
				return append(legs, side...)
			}
		}
	}
	return nil
}

// outcome returns what was found on a conductor; nil if nothing was.
func outcome(f *facts.Facts, c *circuit.Conductor) *facts.Conductor {
	for _, o := range f.Conductors {
		if o.Conductor == c {
			return o
		}
	}
	return nil
}

// lost returns the share of the nominal voltage that legs lose at their highest
// currents, each leg taken at least at the given size (the zero size: as it is).
func lost(f *facts.Facts, legs []*circuit.Cable, size quantity.WireSize) quantity.Ratio {
	var v quantity.Volt
	for _, leg := range legs {
		for _, core := range leg.Cores {
			o := outcome(f, core)
			if o == nil {
				continue
			}
			r := core.Ohm
			if size.Area > core.Size.Area {
				r *= quantity.Ohm(resistanceRatio(size, core.Size))
			}
			v += quantity.Volt(float64(o.Current) * float64(r))
		}
	}
	return quantity.Ratio(v / f.Site.Duty.Nominal.Val)
}

// resistanceRatio returns the resistance of one size over that of another, by the
// conductor tables; by area where a table lacks the size.
func resistanceRatio(of, to quantity.WireSize) float64 {
	a, okA := catalogue.ConductorOf(of)
	b, okB := catalogue.ConductorOf(to)
	if okA && okB {
		return float64(a.PerKM / b.PerKM)
	}
	return float64(to.Area / of.Area)
}

// sizes returns the conductor sizes that the firm uses, thinnest first.
func sizes(f *facts.Facts) []quantity.WireSize {
	out := slices.Clone(f.Site.Practice.Sizes.Val)
	if len(out) == 0 {
		for _, c := range catalogue.Conductors(catalogue.System(f.Site.Practice.Conductors.Val)) {
			out = append(out, c.Size)
		}
	}
	slices.SortFunc(out, func(a, b quantity.WireSize) int {
		switch {
		case a.Area < b.Area:
			return -1
		case a.Area > b.Area:
			return 1
		}
		return 0
	})
	return out
}

// thicker returns the sizes above one, thinnest first.
func thicker(f *facts.Facts, than quantity.WireSize) []quantity.WireSize {
	all := sizes(f)
	i := slices.IndexFunc(all, func(s quantity.WireSize) bool { return over(s.Area, than.Area) })
	if i < 0 {
		return nil
	}
	return all[i:]
}

// thickest returns the greatest size among the cores of legs.
func thickest(legs []*circuit.Cable) quantity.WireSize {
	var out quantity.WireSize
	for _, leg := range legs {
		for _, core := range leg.Cores {
			if core.Size.Area > out.Area {
				out = core.Size
			}
		}
	}
	return out
}

// carries returns what another size of the same cable carries under the same ambient
// temperature and grouping: the tabled currents' ratio times the present figure. ok is
// false where a size is not in the table.
func carries(f *facts.Facts, now quantity.Ampere, of, other quantity.WireSize) (a quantity.Ampere, ok bool) {
	table := catalogue.AmpacityOf(catalogue.System(f.Site.Practice.Conductors.Val))
	before, ok1 := table.Current(of)
	after, ok2 := table.Current(other)
	if !ok1 || !ok2 {
		return 0, false
	}
	return now * after.Current / before.Current, true
}
