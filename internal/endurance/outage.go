package endurance

import (
	"math"

	"gloamwright/internal/quantity"
)

// Load returns the current that the site takes from the battery's poles at a voltage.
// It must not be negative.
type Load func(quantity.Volt) quantity.Ampere

// Watch is a thing that goes out when the battery's voltage falls to a value: a circuit
// whose lamps then get less than they work with.
type Watch struct {
	Name  string
	Below quantity.Volt
}

// Outage states a discharge. Zero values: From 1 means full, CutOff 0 none.
type Outage struct {
	From    quantity.Ratio // state of charge at its start; 0 means 1
	Load    Load
	CutOff  quantity.Volt // voltage at which the load is taken off; 0: never
	Watches []Watch
	For     quantity.Second // how long it is followed at most
}

// Moment is when something happens; Happens is false if it does not within the run.
type Moment struct {
	At      quantity.Second
	Happens bool
}

// Sample is one point of a curve.
type Sample struct {
	Hours   float64
	Volt    quantity.Volt
	SoC     quantity.Ratio
	Current quantity.Ampere // into the battery's plus pole
}

// Result is a discharge followed to its end.
type Result struct {
	Samples []Sample
	// Out tells for each watch when it goes out: at its own voltage, or when the cut-off
	// opens or the battery is flat.
	Out    []Moment
	CutOff Moment // the cut-off opens
	Empty  Moment // the table's capacity is used up
	Flat   Moment // the battery gives no more, or not what the load takes
	Taken  quantity.AmpereHour
	Left   quantity.Ratio // state of charge at the end
	// Beyond: a current was higher than that of the capacity table's shortest time.
	Beyond bool
}

// Steps of a run: each uses up at most one part in usedSteps of the battery, and lasts at
// most one part in timeSteps of the run; a curve keeps about curvePoints of them.
const (
	usedSteps   = 500
	timeSteps   = 200
	curvePoints = 96
)

// Discharge follows a battery through an outage, by the trapezoidal rule over steps in
// which it is used up a little. It ends at the time asked for, when the cut-off opens,
// or when the battery is flat.
func Discharge(b Battery, o Outage) (Result, error) {
	m, err := newModel(b)
	if err != nil {
		return Result{}, err
	}
	r, _ := m.discharge(m.startAt(o.From), o)
	return r, nil
}

// startAt returns the state of a rested battery at a state of charge; 0 means full.
func (m *model) startAt(soc quantity.Ratio) state {
	if soc <= 0 || soc > 1 {
		soc = 1
	}
	out := m.full * (1 - float64(soc))
	return state{out: out, used: out / m.full}
}

// discharge follows the battery from a state.
func (m *model) discharge(st state, o Outage) (Result, state) {
	end := o.For.Hours()
	r := Result{Out: make([]Moment, len(o.Watches))}
	before := st.out
	now := m.under(st, o.Load, m.rest(m.soc(st)))
	t := 0.0
	m.events(&r, o, t, now, t, now)
	r.sample(m, t, now, st)
	for t < end && !r.CutOff.Happens && !r.Flat.Happens {
		dt := math.Min(end/timeSteps, end-t)
		if !math.IsInf(now.hours, 1) {
			dt = math.Min(dt, now.hours/usedSteps)
		}
		next, then := m.step(st, now, dt, o.Load)
		if st.used < 1 && next.used >= 1 {
			r.Empty = Moment{seconds(t + dt*(1-st.used)/(next.used-st.used)), true}
		}
		r.Beyond = r.Beyond || then.beyond
		m.events(&r, o, t, now, t+dt, then)
		if next.used >= 1+m.deltaAt(math.Min(then.hours, longest))/2 && !r.CutOff.Happens {
			r.Flat = Moment{seconds(t + dt), true}
		}
		if r.CutOff.Happens { // the run ends when it opens, not with the step
			f := (r.CutOff.At.Hours() - t) / dt
			next = state{out: st.out + f*(next.out-st.out), used: st.used + f*(next.used-st.used)}
			then.volt, then.amp = now.volt+f*(then.volt-now.volt), now.amp+f*(then.amp-now.amp)
			dt *= f
		}
		t, now, st = t+dt, then, next
		r.sample(m, t, now, st)
	}
	for i := range r.Out {
		if !r.Out[i].Happens {
			switch {
			case r.CutOff.Happens:
				r.Out[i] = r.CutOff
			case r.Flat.Happens:
				r.Out[i] = r.Flat
			}
		}
	}
	r.Samples = thin(r.Samples)
	r.Taken, r.Left = quantity.AmpereHour(st.out-before), quantity.Ratio(m.soc(st))
	return r, st
}

// longest bounds a discharge time, so that a vanishing current has a knee too.
const longest = 1e6

// step takes the battery dt hours on: a first try with the present current, then the
// mean of the present and the tried one.
func (m *model) step(st state, now point, dt float64, load Load) (state, point) {
	add := func(amp, perHour float64) state {
		return state{out: st.out + amp*dt, used: st.used + perHour*dt}
	}
	try := m.under(add(now.amp, 1/now.hours), load, now.volt)
	next := add((now.amp+try.amp)/2, (1/now.hours+1/try.hours)/2)
	return next, m.under(next, load, try.volt)
}

// events notes what the fall from one point to the next passes.
func (m *model) events(r *Result, o Outage, t0 float64, a point, t1 float64, b point) {
	passes := func(limit float64) (Moment, bool) {
		if b.volt > limit {
			return Moment{}, false
		}
		f := 0.0
		if a.volt > limit && a.volt > b.volt {
			f = (a.volt - limit) / (a.volt - b.volt)
		}
		return Moment{seconds(t0 + f*(t1-t0)), true}, true
	}
	for i, w := range o.Watches {
		if r.Out[i].Happens {
			continue
		}
		if at, ok := passes(float64(w.Below)); ok {
			r.Out[i] = at
		}
	}
	if o.CutOff > 0 {
		if at, ok := passes(float64(o.CutOff)); ok {
			r.CutOff = at
		}
	}
	if b.collapsed && !r.CutOff.Happens {
		r.Flat = Moment{seconds(t1), true}
	}
}

func (r *Result) sample(m *model, t float64, p point, st state) {
	r.Samples = append(r.Samples, Sample{
		Hours: t, Volt: quantity.Volt(p.volt), SoC: quantity.Ratio(m.soc(st)), Current: quantity.Ampere(-p.amp),
	})
}

// thin keeps about curvePoints samples, evenly over the time, the first and the last
// among them.
func thin(all []Sample) []Sample {
	if len(all) <= curvePoints {
		return all
	}
	last := len(all) - 1
	every := (all[last].Hours - all[0].Hours) / curvePoints
	out := all[:1:1]
	for _, s := range all[1:last] {
		if s.Hours-out[len(out)-1].Hours >= every {
			out = append(out, s)
		}
	}
	return append(out, all[last])
}

func seconds(hours float64) quantity.Second { return quantity.Hours(hours) }
