package endurance

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// Battery is the store that is followed.
type Battery struct {
	Class    *catalogue.BatteryClass
	Rates    []catalogue.RatePoint // capacity against time; nil: the class's table
	Cells    int                   // in series
	Capacity quantity.AmpereHour   // rated, of the whole battery
	Left     quantity.Ratio        // share of the rated capacity that age has left; 1 for a new one
	Room     quantity.Celsius
}

// UnknownError says which figure is not held, so that nothing is guessed.
type UnknownError struct{ What string }

// Error returns what is not known, for an electrician.
func (e *UnknownError) Error() string { return "endurance: " + e.What }

// model is a battery ready to be followed: everything that does not change in a run.
type model struct {
	class    *catalogue.BatteryClass
	rates    rateTable
	knees    []knee
	cells    float64
	capacity float64 // Ah, with age and temperature
	full     float64 // Ah that a full battery gives at most
	ohm      float64
	lift     float64 // V that boost stands above the full rest voltage
}

func newModel(b Battery) (*model, error) {
	switch {
	case b.Class == nil:
		return nil, &UnknownError{"no battery class is given"}
	case b.Cells < 1 || !(b.Capacity > 0) || !(b.Left > 0) || b.Left > 1 || math.IsInf(float64(b.Capacity), 0):
		return nil, &UnknownError{fmt.Sprintf("%d cells of %v with %v of the capacity left are no battery", b.Cells, b.Capacity, b.Left)}
	}
	factor, listed := b.Class.SizeFactor(b.Room)
	if !listed {
		return nil, &UnknownError{fmt.Sprintf("what a %s battery gives at %v is not held; the table starts at %v", b.Class.Title, b.Room, b.Class.Size[0].At)}
	}
	m := &model{class: b.Class, cells: float64(b.Cells)}
	rates := b.Rates
	if rates == nil {
		rates = b.Class.Rates
	}
	var err error
	if m.rates, err = newRateTable(rates, b.Class.EndVolt); err != nil {
		return nil, err
	}
	m.capacity = float64(b.Capacity) * float64(b.Left) / float64(factor)
	m.full = m.capacity * m.rates.most
	m.ohm = m.cells * b.Class.OhmAh.Typical / m.capacity
	m.lift = m.cells * float64(b.Class.Boost-b.Class.RestVolt(1))
	m.knees = m.fitKnees()
	return m, nil
}

// rest returns the rest voltage of the whole battery at a state of charge.
func (m *model) rest(s float64) float64 {
	return m.cells * float64(m.class.RestVolt(quantity.Ratio(s)))
}
