package sizing

// window bounds what any choice within limits gives, by leg, at its start and its end.
type window struct {
	most, least       []float64 // V at the start
	endMost, endLeast []float64 // V at the end
	loop, longest     []float64 // Ω from the source to the start, least and greatest
	endLongest        []float64
}

// span fills the window; false if even the thickest sizes leave too little voltage
// somewhere.
func (w *window) span(p *plan, open [][]int) bool {
	n := len(p.t.Legs)
	room := make([]float64, 7*n)
	for _, s := range []*[]float64{&w.most, &w.least, &w.endMost, &w.endLeast, &w.loop, &w.longest, &w.endLongest} {
		*s, room = room[:n:n], room[n:]
	}
	weak, strong := p.leastAmps(open), p.mostAmps()
	endLoop := make([]float64, n)
	for i := range n {
		leg := &p.t.Legs[i]
		w.most[i], w.least[i] = float64(p.t.Volts), float64(p.t.Volts)
		w.loop[i], w.longest[i] = float64(p.t.Ahead), float64(p.t.Ahead)
		if q := leg.Parent; q >= 0 {
			w.most[i], w.least[i], w.loop[i], w.longest[i] = w.endMost[q], w.endLeast[q], endLoop[q], w.endLongest[q]
		}
		thick, thin := p.extremes(i, open)
		w.endMost[i] = w.most[i] - weak[i]*p.t.ohms(i, thick)
		w.endLeast[i] = max(w.least[i]-strong[i]*p.t.ohms(i, thin), float64(leg.MinVolt), collapsed*float64(p.t.Volts))
		endLoop[i] = w.loop[i] + p.t.faultOhms(i, thick)
		w.endLongest[i] = w.longest[i] + p.t.faultOhms(i, thin)
		if w.endMost[i] < w.endLeast[i]-voltSlack {
			return false
		}
		w.endMost[i] = max(w.endMost[i], w.endLeast[i])
	}
	return true
}

// extremes returns the options of least and of greatest resistance that leg i may take.
func (p *plan) extremes(i int, open [][]int) (thick, thin *Option) {
	g := p.group[i]
	if g == free {
		return p.t.Legs[i].Pinned, p.t.Legs[i].Pinned
	}
	return &p.t.Options[largest(open[g])], &p.t.Options[smallest(open[g])]
}

// leastAmps returns currents of all legs that no choice within limits undercuts.
// Constant power draws least at the highest voltage, a resistor at the lowest; the
// highest voltages follow from the least currents through the least resistances.
func (p *plan) leastAmps(open [][]int) []float64 {
	n := len(p.t.Legs)
	r, v, a := make([]float64, n), make([]float64, n), make([]float64, n)
	for i := range r {
		thick, _ := p.extremes(i, open)
		r[i] = p.t.ohms(i, thick)
		v[i] = float64(p.t.Volts)
	}
	const rounds = 6
	for range rounds {
		for i := range a {
			l := &p.t.Legs[i]
			a[i] = float64(l.Load.Current)
			if l.Load.Power > 0 {
				a[i] += float64(l.Load.Power) / v[i]
			}
			if l.Load.Ohm > 0 {
				a[i] += float64(l.MinVolt) / float64(l.Load.Ohm)
			}
			a[i] = max(a[i], 0)
		}
		for i := n - 1; i >= 0; i-- {
			if q := p.t.Legs[i].Parent; q >= 0 {
				a[q] += a[i]
			}
		}
		for i := range v {
			up := float64(p.t.Volts)
			if q := p.t.Legs[i].Parent; q >= 0 {
				up = v[q]
			}
			v[i] = max(up-a[i]*r[i], collapsed*float64(p.t.Volts))
		}
	}
	return a
}

// mostAmps returns the currents of all legs when each load stands at the worst
// voltage for it within limits.
func (p *plan) mostAmps() []float64 {
	a := make([]float64, len(p.t.Legs))
	for i := len(a) - 1; i >= 0; i-- {
		l := &p.t.Legs[i]
		own := float64(l.Load.Current)
		if l.Load.Power > 0 {
			own += float64(l.Load.Power) / float64(l.MinVolt)
		}
		if l.Load.Ohm > 0 {
			own += float64(p.t.Volts) / float64(l.Load.Ohm)
		}
		a[i] += own
		if q := l.Parent; q >= 0 {
			a[q] += a[i]
		}
	}
	return a
}
