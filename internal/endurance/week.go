package endurance

import (
	"gloamwright/internal/quantity"
)

// daysPerWeek and hoursPerDay are the calendar's.
const (
	daysPerWeek = 7
	hoursPerDay = 24
)

// Day is one day of a week with an outage each day.
type Day struct {
	Started quantity.Ratio // state of charge when the mains failed
	Lowest  quantity.Ratio // when it came back
	Held    bool           // no watch went out, the cut-off stayed closed
	Full    Moment         // from the moment when the mains came back
}

// Days is a week followed: seven outages, each on a battery as the day before left it.
type Days struct {
	Samples []Sample
	Days    []Day
	Left    quantity.Ratio // state of charge at the end of the week
}

// Week follows a battery for seven days with one outage at the start of each, recharged
// for the rest of the day. The first outage starts from full.
func Week(b Battery, o Outage, c Charger) (Days, error) {
	m, err := newModel(b)
	if err != nil {
		return Days{}, err
	}
	var w Days
	out := 0.0
	for day := range daysPerWeek {
		began := float64(day * hoursPerDay)
		d := Day{Started: quantity.Ratio(1 - out/m.full), Held: true}
		res, st := m.discharge(state{out: out, used: out / m.full}, o)
		for _, x := range res.Out {
			d.Held = d.Held && !x.Happens
		}
		d.Held = d.Held && !res.CutOff.Happens && !res.Flat.Happens
		d.Lowest = res.Left
		w.add(began, res.Samples)
		back := o.For.Hours()
		fill, left := m.recharge(st.out, c, hoursPerDay-back, true)
		d.Full = fill.Full
		w.add(began+back, fill.Samples)
		w.Days = append(w.Days, d)
		out = left
	}
	w.Left = quantity.Ratio(1 - out/m.full)
	return w, nil
}

func (w *Days) add(from float64, samples []Sample) {
	for _, s := range samples {
		s.Hours += from
		w.Samples = append(w.Samples, s)
	}
}
