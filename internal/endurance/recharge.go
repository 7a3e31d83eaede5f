package endurance

import (
	"math"

	"gloamwright/internal/quantity"
)

// Charger is what refills the battery. Voltages are for the whole battery at its
// present temperature.
type Charger struct {
	Current quantity.Ampere // greatest output
	Boost   quantity.Volt   // 0: no boost stage
	Float   quantity.Volt
	// Standing is what the site takes from the charger meanwhile.
	Standing quantity.Ampere
	// Ohm is the charger's output impedance, by which its current falls as the battery
	// fills; 0: it holds its voltage.
	Ohm quantity.Ohm
}

// Refill is a recharge followed to its end.
type Refill struct {
	Samples  []Sample
	Full     Moment
	Returned quantity.AmpereHour // into the battery
	Left     quantity.Ratio      // state of charge at the end
}

// Limits of a recharge, common practice, no source.
const (
	// fullFrom is the state of charge that counts as full: the last part takes days.
	fullFrom = 0.99
	// boostTail is the current, in parts of the rated capacity for each hour, at which a
	// charger goes from boost to float.
	boostTail = 0.01
	// ampereHour is the time constant of the ampere-hour law, in hours.
	ampereHour = 1.0
	// rechargeStep is the length of a step in hours.
	rechargeStep = 1.0 / 60
)

// Recharge follows a battery from a state of charge until it is full or the time asked
// for is over.
func Recharge(b Battery, from quantity.Ratio, c Charger, limit quantity.Second) (Refill, error) {
	m, err := newModel(b)
	if err != nil {
		return Refill{}, err
	}
	out := m.full * (1 - min(max(float64(from), 0), 1))
	r, _ := m.recharge(out, c, limit.Hours(), false)
	return r, nil
}

// recharge follows the battery from a charge taken out of it, in Ah, until it is full or,
// if whole is set, to the end of the time; it returns what is still out then.
func (m *model) recharge(out float64, c Charger, limit float64, whole bool) (Refill, float64) {
	factor := float64(m.class.ChargeFactor)
	owed := out * factor // what must still be put in
	most := math.Max(0, float64(c.Current-c.Standing))
	boosting := c.Boost > c.Float
	r := Refill{}
	emit := func(t, v, i float64) {
		r.Samples = append(r.Samples, Sample{Hours: t, Volt: quantity.Volt(v), SoC: quantity.Ratio(1 - owed/factor/m.full), Current: quantity.Ampere(i)})
	}
	returned := 0.0
	for n := 0; ; n++ {
		t := math.Min(float64(n)*rechargeStep, limit)
		set := float64(c.Float)
		if boosting {
			set = float64(c.Boost)
		}
		v, i := m.taken(owed, set, most, float64(c.Ohm))
		if boosting && i <= boostTail*m.capacity && v >= set-loadAgrees {
			boosting = false
			v, i = m.taken(owed, float64(c.Float), most, float64(c.Ohm))
		}
		full := owed/factor <= (1-fullFrom)*m.full
		if full && !r.Full.Happens {
			r.Full = Moment{seconds(t), true}
		}
		done := t >= limit || full && !whole
		emit(t, v, i)
		if done {
			break
		}
		dt := math.Min(rechargeStep, limit-t)
		put := math.Min(i*dt, owed)
		owed -= put
		returned += put
	}
	r.Samples = thin(r.Samples)
	r.Returned, r.Left = quantity.AmpereHour(returned), quantity.Ratio(1-owed/factor/m.full)
	return r, owed / factor
}

// taken returns terminal voltage and current of a battery to which owed ampere-hours
// must still be returned, on a charger set to a voltage and limited to a current, with
// an output impedance.
func (m *model) taken(owed, set, most, ohm float64) (v, i float64) {
	s := 1 - owed/float64(m.class.ChargeFactor)/m.full
	e := m.rest(s)
	if owed <= 0 {
		return math.Max(set, e), 0
	}
	r := m.ohm + ampereHour*m.lift/owed
	i = math.Min(most, math.Max(0, (set-e)/(r+ohm)))
	return math.Min(e+r*i, math.Max(set, e)), i
}
