package design

import (
	"fmt"
	"math"
	"slices"
	"sort"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/endurance"
	"gloamwright/internal/facts"
	"gloamwright/internal/network"
	"gloamwright/internal/quantity"
)

// loadPoints is the number of battery voltages at which the lit circuit is solved for
// its load, and followed times the asked outage is followed at most.
const (
	loadPoints   = 9
	followed     = 4
	rechargeMost = 14 * 24 // hours
)

// lit is the circuit with its lights on, over the battery's voltage: what it draws,
// and how far each circuit's worst lamp is above the voltage at which it goes out.
type lit struct {
	volts, amps []float64
	spare       map[string][]float64 // by circuit
}

// endurance follows the outage and the recharge hour by hour: coldest room and end of
// life, typical room, hottest room, and a week with one outage a day.
func (m *maker) endurance() error {
	b := m.f.Battery
	class := catalogue.BatteryClassOf(b.Class)
	if b.Part == nil || class == nil || m.solved["outage-night"] == nil {
		return nil
	}
	table, err := m.litTable()
	if err != nil {
		return err
	}
	room := m.site.Duty.BatteryRoom.Val
	typical := (room.Low + room.High) / 2
	aged := m.site.Practice.Ageing.Val
	runs := []struct {
		name string
		at   quantity.Celsius
		left quantity.Ratio
	}{
		{"coldest, end of life", room.Low, aged},
		{"coldest, new", room.Low, 1},
		{"typical, end of life", typical, aged},
		{"typical, new", typical, 1},
		{"hottest, end of life", room.High, aged},
		{"hottest, new", room.High, 1},
	}
	out := m.outage(table)
	e := &m.f.Endurance
	for i, r := range runs {
		bat := endurance.Battery{Class: class, Rates: b.Rates, Cells: b.Series, Capacity: b.Capacity, Left: r.left, Room: r.at}
		res, err := endurance.Discharge(bat, out)
		if err != nil {
			return m.unknownHours(err)
		}
		e.Runs = append(e.Runs, run("Outage, "+r.name, r.at, r.left < 1, false, res.Samples))
		if i > 0 {
			continue
		}
		m.held(out, res)
		if err := m.refill(bat, out, r.at); err != nil {
			return err
		}
	}
	return m.standing()
}

// unknownHours records that the tables do not reach far enough to state the hours.
func (m *maker) unknownHours(err error) error {
	m.f.Blocked = append(m.f.Blocked, &facts.Blocked{
		Subject: m.f.Battery.Part.Designation, Limit: err.Error(), Unknown: true, At: m.f.Battery.Part.At,
		Remedy: "Another battery class or another room temperature.",
	})
	return nil
}

func run(name string, at quantity.Celsius, aged, recharge bool, samples []endurance.Sample) *facts.Run {
	r := &facts.Run{Name: name, Temperature: at, Aged: aged, Recharge: recharge}
	for _, s := range samples {
		r.Curve = append(r.Curve, facts.Sample{Hours: s.Hours, Volt: s.Volt, SoC: s.SoC, Current: s.Current})
	}
	return r
}

// litTable solves the lit circuit at battery voltages from full down to where the
// lamps have gone out. The cut-off is held closed: it is watched by the outage.
func (m *maker) litTable() (*lit, error) {
	var spec operating
	for _, o := range conditionsOfAnyJob {
		if o.key == "outage-night" {
			spec = o
		}
	}
	b := m.f.Battery.Part
	t := &lit{spare: map[string][]float64{}}
	low := float64(m.plan.End) * 0.85
	high := float64(m.plan.Full) * 1.02
	closed := true
	state := m.solved["outage-night"].State
	for i := range loadPoints {
		v := high - (high-low)*float64(i)/(loadPoints-1)
		env := m.environment(spec).With(network.Override{Element: b.Designation, Params: []circuit.Param{
			{Name: "emf", Value: v}, {Name: "ohm", Value: sourceOhm},
		}})
		if m.f.CutOff != nil {
			env = env.With(network.Override{Element: m.f.CutOff.Part.Designation, Stuck: &closed})
		}
		sol, err := m.net.Solve(env, state)
		if err != nil {
			return nil, &Unsolved{fmt.Sprintf("lights on, battery at %.1f V", v), err}
		}
		state = sol.State
		t.volts = append(t.volts, sol.Across(b.Pin("+").Net, b.Pin("-").Net))
		t.amps = append(t.amps, math.Max(0, -sol.Current(b.Designation)))
		spare := map[string]float64{}
		for _, l := range m.f.Luminaires {
			s := sol.Across(l.Part.Pin("+").Net, l.Part.Pin("-").Net) - float64(l.Works.Low)
			if old, ok := spare[l.Circuit]; !ok || s < old {
				spare[l.Circuit] = s
			}
		}
		for name, s := range spare {
			t.spare[name] = append(t.spare[name], s)
		}
	}
	return t, nil
}

// amps returns the load at a battery voltage, linear between the solved ones.
func (t *lit) load(v quantity.Volt) quantity.Ampere {
	return quantity.Ampere(interpolate(t.volts, t.amps, float64(v)))
}

// goesOut returns the battery voltage at which a circuit's worst lamp goes out; 0 if
// it stays lit down to the lowest one solved.
func (t *lit) goesOut(circuit string) quantity.Volt {
	s := t.spare[circuit]
	for i := 1; i < len(s); i++ {
		if s[i] < 0 {
			if s[i-1] <= s[i] {
				return quantity.Volt(t.volts[i-1])
			}
			f := s[i-1] / (s[i-1] - s[i])
			return quantity.Volt(t.volts[i-1] + f*(t.volts[i]-t.volts[i-1]))
		}
	}
	return 0
}

// interpolate reads y at v, x falling; outside it holds the end values.
func interpolate(x, y []float64, v float64) float64 {
	i := sort.Search(len(x), func(i int) bool { return x[i] <= v })
	switch {
	case i == 0:
		return y[0]
	case i == len(x):
		return y[len(y)-1]
	}
	f := (x[i-1] - v) / (x[i-1] - x[i])
	return y[i-1] + f*(y[i]-y[i-1])
}

// outage is the asked outage as the battery sees it.
func (m *maker) outage(t *lit) endurance.Outage {
	o := endurance.Outage{From: 1, Load: t.load, For: m.site.Duty.Outage.Val * followed}
	if c := m.f.CutOff; c != nil {
		o.CutOff = c.AtBattery
	}
	for _, c := range m.site.Circuits {
		if !slices.Contains(m.litAtNight(), c.Name.Val) {
			continue // the function table says whether it should be
		}
		o.Watches = append(o.Watches, endurance.Watch{Name: c.Name.Val, Below: t.goesOut(c.Name.Val)})
	}
	return o
}

// litAtNight returns the circuits that an outage at night finds lit.
func (m *maker) litAtNight() []string {
	for _, c := range m.f.Conditions {
		if c.Key == "outage-night" {
			return c.Lit
		}
	}
	return nil
}

// held records how long each circuit stays lit in the coldest room at the end of the
// battery's life.
func (m *maker) held(o endurance.Outage, r endurance.Result) {
	e := &m.f.Endurance
	if r.CutOff.Happens {
		e.CutOff = r.CutOff.At
	}
	e.Held = o.For
	for i, w := range o.Watches {
		t := o.For
		if r.Out[i].Happens {
			t = r.Out[i].At
		}
		e.Lit = append(e.Lit, facts.LitFor{Circuit: w.Name, For: t})
		e.Held = min(e.Held, t)
	}
}

// refill follows the recharge after the asked outage, and a week with one a day.
func (m *maker) refill(bat endurance.Battery, o endurance.Outage, at quantity.Celsius) error {
	c := m.f.Charger
	if c.Part == nil {
		return nil
	}
	o.For = m.site.Duty.Outage.Val
	after, err := endurance.Discharge(bat, o)
	if err != nil {
		return m.unknownHours(err)
	}
	ch := endurance.Charger{Current: c.Current, Boost: c.Boost, Float: c.Float, Ohm: c.Impedance}
	if c.Compensated {
		shift := c.PerKelvin * quantity.Volt(at-m.plan.Class.ChargeAt)
		ch.Boost += shift
		ch.Float += shift
	}
	ch.Standing = m.plan.Standing + m.plan.Held
	fill, err := endurance.Recharge(bat, after.Left, ch, quantity.Hours(rechargeMost))
	if err != nil {
		return m.unknownHours(err)
	}
	e := &m.f.Endurance
	e.Runs = append(e.Runs, run("Recharge after the asked outage", at, true, true, fill.Samples))
	if fill.Full.Happens {
		e.Recharge = fill.Full.At
	}
	week, err := endurance.Week(bat, o, ch)
	if err != nil {
		return m.unknownHours(err)
	}
	e.Week = run("A week with one such outage a day", at, true, false, week.Samples)
	for _, d := range week.Days {
		e.Days = append(e.Days, facts.Day{Started: d.Started, Lowest: d.Lowest, Held: d.Held})
	}
	return nil
}

// standing records the drain by daylight with mains off, and how long a full battery
// at the end of its life stands it.
func (m *maker) standing() error {
	sol := m.solved["outage-day"]
	b := m.f.Battery
	if sol == nil {
		return nil
	}
	drain := math.Max(0, -sol.Current(b.Part.Designation))
	m.f.Endurance.DrainA = quantity.Ampere(drain)
	bat := endurance.Battery{
		Class: m.plan.Class, Rates: b.Rates, Cells: b.Series, Capacity: b.Capacity,
		Left: m.site.Practice.Ageing.Val, Room: m.site.Duty.BatteryRoom.Val.Low,
	}
	t, err := endurance.Standing(bat, quantity.Ampere(drain))
	if err != nil {
		return m.unknownHours(err)
	}
	m.f.Endurance.Standing = t
	return nil
}
