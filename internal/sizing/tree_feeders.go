package sizing

import (
	"cmp"
	"slices"
)

// supply is the voltage and the fault loop at the end of a feeder for one set of
// sizes before it.
type supply struct {
	volts, loop float64
	cost        float64 // of all that hangs there; filled in on the way back
	pick        []int   // by feeder on that point, in order: the option with the least cost
	via         [][]int // by feeder on that point and by option: index of the supply at its end
}

// supplyCap bounds how many supplies are told apart at one point; three levels of
// boards with six sizes each stay below it.
const supplyCap = 400

// search returns the cheapest picks (by group) for fixed leg currents. fix holds an
// option for groups that are decided, free for the others. Where there are too many
// ways to tell apart, the relaxed search takes the better figures of neighbours, so
// that its cost is a lower bound; the other takes the worse ones.
func (p *plan) search(amps []float64, fix []int, relaxed bool) (cost float64, picks []int, ok bool) {
	c := &circuits{plan: p, amps: amps, fix: fix, relaxed: relaxed}
	if !c.window() || !c.run() {
		return 0, nil, false
	}
	n := len(p.t.Legs)
	at := make([][]*supply, n+1) // by leg: the supplies at its end
	at[n] = []*supply{{volts: float64(p.t.Volts), loop: float64(p.t.Ahead)}}
	order := append([]int{n}, p.feeders()...)
	for _, i := range order {
		c.spread(i, at)
	}
	for k := len(order) - 1; k >= 0; k-- {
		c.settle(order[k], at)
	}
	root := at[n][0]
	if root.cost < 0 {
		return 0, nil, false
	}
	picks = slices.Clone(fix)
	c.read(n, root, at, picks)
	return root.cost, picks, true
}

// feeders lists the legs that belong to no circuit, each after its parent.
func (p *plan) feeders() []int {
	var out []int
	for i := range p.t.Legs {
		if p.t.Legs[i].Circuit == "" {
			out = append(out, i)
		}
	}
	return out
}

// feederSizes lists what a feeder may take, free standing for a pinned one.
func (c *circuits) feederSizes(i int) []int {
	if s := c.choices(i, c.fix); s != nil {
		return s
	}
	return []int{free}
}

// spread makes the supplies at the ends of all feeders that hang on point i.
func (c *circuits) spread(i int, at [][]*supply) {
	for _, k := range c.kids[i] {
		if c.t.Legs[k].Circuit != "" {
			continue
		}
		leg := &c.t.Legs[k]
		type made struct {
			from *supply
			size int
			to   *supply
		}
		var all []made
		for _, s := range at[i] {
			s.via = append(s.via, nil)
			for n, size := range c.feederSizes(k) {
				s.via[len(s.via)-1] = append(s.via[len(s.via)-1], free)
				o := c.option(k, size)
				to := &supply{volts: s.volts - c.amps[k]*c.t.ohms(k, o), loop: s.loop + c.t.faultOhms(k, o)}
				if to.volts < float64(leg.MinVolt)-voltSlack || !c.inactive[k] && to.loop > float64(leg.Loop)*(1+slack) {
					continue
				}
				all = append(all, made{s, n, to})
			}
		}
		slices.SortStableFunc(all, func(a, b made) int {
			return cmp.Or(cmp.Compare(a.to.volts, b.to.volts), cmp.Compare(a.to.loop, b.to.loop))
		})
		groups := min(len(all), supplyCap)
		for g := range groups {
			part := all[g*len(all)/groups : (g+1)*len(all)/groups]
			one := *part[0].to
			for _, m := range part {
				if c.relaxed {
					one.volts, one.loop = max(one.volts, m.to.volts), min(one.loop, m.to.loop)
				} else {
					one.volts, one.loop = min(one.volts, m.to.volts), max(one.loop, m.to.loop)
				}
				m.from.via[len(m.from.via)-1][m.size] = len(at[k])
			}
			at[k] = append(at[k], &one)
		}
	}
}

// settle fills in the cost of every supply at point i: each circuit takes its
// cheapest label, each feeder its cheapest size. A cost below zero means that
// something does not fit.
func (c *circuits) settle(i int, at [][]*supply) {
	for _, s := range at[i] {
		feeder := 0
		for _, k := range c.kids[i] {
			if c.t.Legs[k].Circuit != "" {
				l := c.cheapest(k, s.volts, s.loop)
				if l == nil {
					s.cost = -1
					break
				}
				s.cost += l.cost
				continue
			}
			best, pick := -1.0, 0
			for n, size := range c.feederSizes(k) {
				to := s.via[feeder][n]
				if to == free || at[k][to].cost < 0 {
					continue
				}
				if cost := at[k][to].cost + c.cost(k, c.option(k, size)); best < 0 || cost < best {
					best, pick = cost, n
				}
			}
			if best < 0 {
				s.cost = -1
				break
			}
			s.cost += best
			s.pick = append(s.pick, pick)
			feeder++
		}
	}
}

// read follows the cheapest way from a supply down and notes its picks.
func (c *circuits) read(i int, s *supply, at [][]*supply, picks []int) {
	feeder := 0
	for _, k := range c.kids[i] {
		if c.t.Legs[k].Circuit != "" {
			c.collect(c.cheapest(k, s.volts, s.loop), picks)
			continue
		}
		n := s.pick[feeder]
		if g := c.group[k]; g != free {
			picks[g] = c.feederSizes(k)[n]
		}
		c.read(k, at[k][s.via[feeder][n]], at, picks)
		feeder++
	}
}
