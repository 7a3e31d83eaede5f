package endurance

import (
	"math"

	"gloamwright/internal/quantity"
)

// hoursPerMonth is a month of thirty days, which self-discharge is stated for.
const hoursPerMonth = 30 * hoursPerDay

// Standing returns how long a full battery stands a small steady drain: its capacity at
// that rate over the drain and its own self-discharge, which is taken as a current.
// Without either it stands for ever, an infinite time.
func Standing(b Battery, drain quantity.Ampere) (quantity.Second, error) {
	m, err := newModel(b)
	if err != nil {
		return 0, err
	}
	i := float64(drain) + float64(b.Class.SelfDischarge)*m.capacity/hoursPerMonth
	if i <= 0 {
		return quantity.Second(math.Inf(1)), nil
	}
	hours, _ := m.rates.timeAt(i / m.capacity)
	return seconds(hours), nil
}
