package endurance

import (
	"math"

	"gloamwright/internal/quantity"
)

// knee is the sharpness δ of the knee at one discharge time.
type knee struct{ logT, delta float64 }

// Bounds of δ. usualKnee serves where the class's tables fix none; below sharpest the
// curve would be a corner, above bluntest a straight line.
const (
	usualKnee = 0.1
	sharpest  = 0.02
	bluntest  = 1.0
	// pivot is the part of the capacity at which the curve is laid through the table of
	// end voltages: in the middle of the knee.
	pivot = 0.85
)

// fitKnees finds δ for each time of the class's table of end voltages: the curve of a
// constant current of that time passes the table's entry nearest to the pivot. With
// the share f of its whole polarisation that the cell shows there,
// f = δD/(1 + δ − D), so δ = f(1 − D)/(D − f).
func (m *model) fitKnees() []knee {
	var out []knee
	for _, row := range m.class.Ends {
		hours := row.Time.Hours()
		k := knee{logT: math.Log(hours), delta: usualKnee}
		best := math.Inf(1)
		for _, p := range row.Parts {
			d := float64(p.Part)
			if d >= 1 || math.Abs(d-pivot) >= best {
				continue
			}
			best = math.Abs(d - pivot)
			frac := m.rates.fractionAt(hours)
			s := 1 - frac*d/m.rates.most
			i := m.capacity * frac / hours
			whole := m.spread(i, hours)
			f := (m.rest(s) - m.ohm*i - m.cells*float64(p.End)) / whole
			if whole > 0 && f > 0 && f < d {
				k.delta = min(max(f*(1-d)/(d-f), sharpest), bluntest)
			}
		}
		out = append(out, k)
	}
	return out
}

// fractionAt returns the part of the rated capacity at a time of the table.
func (t *rateTable) fractionAt(hours float64) float64 {
	y, n := math.Log(hours), len(t.logT)
	switch {
	case y <= t.logT[0]:
		return t.frac[0]
	case y >= t.logT[n-1]:
		return t.frac[n-1]
	}
	for i := 1; i < n; i++ {
		if y <= t.logT[i] {
			return t.frac[i-1] + (t.frac[i]-t.frac[i-1])*(y-t.logT[i-1])/(t.logT[i]-t.logT[i-1])
		}
	}
	return t.frac[n-1]
}

// deltaAt returns δ for a current that empties the battery in so many hours.
func (m *model) deltaAt(hours float64) float64 {
	k := m.knees
	if len(k) == 0 {
		return usualKnee
	}
	y := math.Log(hours)
	if y <= k[0].logT {
		return k[0].delta
	}
	for i := 1; i < len(k); i++ {
		if y <= k[i].logT {
			return k[i-1].delta + (k[i].delta-k[i-1].delta)*(y-k[i-1].logT)/(k[i].logT-k[i-1].logT)
		}
	}
	return k[len(k)-1].delta
}

// spread returns K i of Shepherd's equation for a current that empties the battery in
// so many hours: what the voltage must still fall, besides rest voltage and resistance,
// to stand at the table's end voltage when the battery is empty. Below the table's
// least current it shrinks with the current.
func (m *model) spread(i, hours float64) float64 {
	rate := i / m.capacity
	s := 1 - min(rate*hours, m.rates.most)/m.rates.most
	v := m.rest(s) - m.ohm*i - m.cells*m.rates.endAt(hours)
	if least := m.rates.rate[len(m.rates.rate)-1]; rate < least {
		v *= rate / least
	}
	return v
}

// state is where a battery stands: the charge taken out of it, and the part of it that
// is used up at the rates of this discharge.
type state struct {
	out  float64 // Ah
	used float64 // D; 1 is empty
}

func (m *model) soc(st state) float64 { return max(0, 1-st.out/m.full) }

// volt returns the terminal voltage under a current, and how long a full battery would
// give that current.
func (m *model) volt(st state, i float64) (v, hours float64, beyond bool) {
	e := m.rest(m.soc(st))
	if i <= 0 {
		return e, math.Inf(1), false
	}
	hours, beyond = m.rates.timeAt(i / m.capacity)
	delta := m.deltaAt(hours)
	d := min(st.used, 1+delta/2)
	return e - m.ohm*i - m.spread(i, hours)*delta*d/(1+delta-d), hours, beyond
}

// point is a solved instant under load.
type point struct {
	volt, amp float64
	hours     float64 // in which a full battery would be empty at this current
	beyond    bool
	collapsed bool // the load takes more than the battery can give
}

// Bounds of the search for the voltage at which battery and load agree.
const (
	loadRounds   = 80
	plainRounds  = 30 // after these each step is halved, against loads that jump
	loadAgrees   = 1e-7
	nearlyAgrees = 1e-2
)

// under solves battery and load together. It starts from the rest voltage or from the
// solution an instant before, so that of two solutions of a constant-power load the upper
// one is found.
func (m *model) under(st state, load Load, from float64) point {
	v := from
	var p point
	for n := range loadRounds {
		p.amp = float64(load(quantity.Volt(v)))
		next, hours, beyond := m.volt(st, p.amp)
		p.volt, p.hours, p.beyond = next, hours, beyond
		if math.Abs(next-v) < loadAgrees {
			return p
		}
		if next <= 0 || math.IsNaN(next) {
			p.volt, p.collapsed = 0, true
			return p
		}
		if n >= plainRounds {
			next = (v + next) / 2
		}
		v = next
	}
	if math.Abs(p.volt-v) > nearlyAgrees*m.cells {
		p.collapsed = true
	}
	return p
}
