package sizing

import "slices"

// lack is what is missing at the end of a leg or behind it, each as a share of what is
// permitted: the worst and how often.
type lack struct {
	volts, loop   float64
	nVolts, nLoop float64
}

// repair makes groups thicker until all limits are kept, each time the one that gives most
// of what is missing for its cost. The picks come from a relaxed pass, which falls short
// by little. It gives up after as many steps as there are legs.
func (s *search) repair(picks []int) {
	picks = slices.Clone(picks)
	for range s.t.Legs {
		if _, ok := s.offer(picks); ok {
			return
		}
		sizes := s.sizes(picks)
		lacks, amps, ok := s.lacks(sizes)
		if !ok {
			return
		}
		var best []int
		ratio := 0.0
		for g := range picks {
			if !slices.ContainsFunc(s.members[g], func(i int) bool { return lacks[i].nVolts+lacks[i].nLoop > 0 }) {
				continue
			}
			up, to := s.thickening(g, picks)
			if to == free {
				continue
			}
			gives, costs := 0.0, 0.0
			for _, h := range up {
				for _, i := range s.members[h] {
					gives += s.gives(i, sizes[i], &s.t.Options[to], &lacks[i], amps[i])
					costs += s.cost(i, &s.t.Options[to]) - s.cost(i, sizes[i])
				}
			}
			if r := gives / max(costs, leastCost); gives > 0 && r > ratio {
				best, ratio = append(best[:0], to), r
				best = append(best, up...)
			}
		}
		if best == nil {
			return
		}
		for _, g := range best[1:] {
			picks[g] = best[0]
		}
	}
}

// leastCost stands for a step that costs nothing.
const leastCost = 1e-9

// gives is how much of what is missing behind leg i another option brings, over all ends.
func (s *search) gives(i int, now, then *Option, l *lack, amps float64) float64 {
	ohm, fault := s.t.ohms(i, now)-s.t.ohms(i, then), s.t.faultOhms(i, now)-s.t.faultOhms(i, then)
	return l.nVolts*min(amps*ohm, l.volts) + l.nLoop*min(fault, l.loop)
}

// thickening lists the groups that must change for group g to take its next size, and
// that size: with it those ahead in a tapering circuit that would be thinner.
func (s *search) thickening(g int, picks []int) (groups []int, to int) {
	k := slices.Index(s.allowed[g], picks[g])
	if k+1 >= len(s.allowed[g]) {
		return nil, free
	}
	to = s.allowed[g][k+1]
	groups = []int{g}
	i := s.members[g][0]
	for i = s.t.Legs[i].Parent; s.t.Taper && i >= 0 && s.t.Legs[i].Circuit != ""; i = s.t.Legs[i].Parent {
		h := s.group[i]
		if h == free || picks[h] >= to {
			break
		}
		if !slices.Contains(s.allowed[h], to) {
			return nil, free
		}
		groups = append(groups, h)
	}
	if s.t.Legs[s.members[g][0]].Circuit == "" {
		groups = groups[:1]
	}
	return groups, to
}

// lacks solves the sizes and returns what is missing at and behind each leg, in V and Ω,
// in the condition in which the voltages are furthest from their limits.
func (s *search) lacks(sizes []*Option) (lacks []lack, amps []float64, ok bool) {
	worst := -1.0
	for _, c := range s.conditions {
		l, a, ok := c.t.lacks(sizes)
		if !ok {
			return nil, nil, false
		}
		short := 0.0
		for i := range l {
			short = max(short, l[i].volts)
		}
		if short > worst {
			lacks, amps, worst = l, a, short
		}
	}
	return lacks, amps, true
}

func (t *Tree) lacks(sizes []*Option) (lacks []lack, amps []float64, ok bool) {
	v, a, ok := t.Solve(sizes)
	if !ok {
		return nil, nil, false
	}
	lacks, amps = make([]lack, len(sizes)), make([]float64, len(sizes))
	loops := t.loops(sizes)
	for i := len(sizes) - 1; i >= 0; i-- {
		leg, l := &t.Legs[i], &lacks[i]
		amps[i] = float64(a[i])
		if d := float64(leg.MinVolt - v[i]); d > voltSlack {
			l.volts, l.nVolts = max(l.volts, d), l.nVolts+1
		}
		if leg.Loop > 0 {
			if d := loops[i] - float64(leg.Loop); d > slack*float64(leg.Loop) {
				l.loop, l.nLoop = max(l.loop, d), l.nLoop+1
			}
		}
		if leg.Parent >= 0 {
			up := &lacks[leg.Parent]
			up.volts, up.loop = max(up.volts, l.volts), max(up.loop, l.loop)
			up.nVolts, up.nLoop = up.nVolts+l.nVolts, up.nLoop+l.nLoop
		}
	}
	return lacks, amps, true
}
