package design

import (
	"fmt"
	"math"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/network"
	"gloamwright/internal/quantity"
)

// The error of the technician's multimeter on its direct-voltage range, and the
// highest reading of a point that is dead (common practice, no source).
const (
	meterShare = 0.005
	meterVolt  = quantity.Volt(0.02)
	deadVolt   = quantity.Volt(0.1)
)

// readings records what every test point shows in every condition, with its band:
// worst case over the tolerances of all parts, and the meter's own error.
func (m *maker) readings() error {
	points := m.f.Circuit.TestPoints
	for _, tp := range points {
		if tp.Black == nil {
			tp.Black = m.f.Circuit.Black
		}
		m.f.Readings = append(m.f.Readings, &facts.Reading{Point: tp})
	}
	bands := make([][]network.Band, len(m.f.Conditions))
	others := make([][]otherState, len(m.f.Conditions))
	if err := m.sideBySide(len(bands), nil, func(n *network.Network, i int) (err error) {
		c := m.f.Conditions[i]
		sol := m.solved[c.Key].Apart(n)
		var doubtful []string
		bands[i], doubtful, err = m.pointBands(sol)
		if err == nil {
			others[i], err = m.others(n, sol, i, doubtful)
		}
		if err != nil {
			return fmt.Errorf("bands in condition %q: %w", c.Name, err)
		}
		return nil
	}); err != nil {
		return err
	}
	for k, c := range m.f.Conditions {
		for _, o := range others[k] {
			c.Either = append(c.Either, o.Either)
		}
		for i, r := range m.f.Readings {
			b, or := withOthers(band(bands[k][i]), others[k], i)
			r.Bands, r.Or = append(r.Bands, b), append(r.Or, or)
		}
	}
	return m.fuseLoads()
}

// pointBands are the bands of all test points in a solution, and what may stand
// elsewhere within the tolerances. The cards of the stages bend their laws: their bands
// are solved at the corners, and so are the coils. Behind the boards all is nearly linear.
func (m *maker) pointBands(sol *network.Solution) (out []network.Band, doubtful []string, err error) {
	var control, field []network.Output
	for _, r := range m.f.Readings {
		if o := network.Between(r.Point.Red.Net, r.Point.Black.Net); r.Point.Stage != "" {
			control = append(control, o)
		} else {
			field = append(field, o)
		}
	}
	for _, p := range m.f.Circuit.Parts {
		if p.Kind == circuit.Relay {
			control = append(control, network.Between(p.Pin("A1").Net, p.Pin("A2").Net))
		}
	}
	corners, err := sol.Bands(control, network.Corners)
	if err != nil {
		return nil, nil, err
	}
	for _, b := range corners {
		doubtful = append(doubtful, b.Doubtful...)
	}
	linear, err := sol.Bands(field, network.Linear)
	if err != nil {
		return nil, nil, err
	}
	for _, r := range m.f.Readings {
		if r.Point.Stage != "" {
			out, corners = append(out, corners[0]), corners[1:]
		} else {
			out, linear = append(out, linear[0]), linear[1:]
		}
	}
	return out, doubtful, nil
}

// band adds the meter's error to a band of the network.
func band(b network.Band) facts.Band {
	meter := func(v float64) quantity.Volt { return quantity.Volt(math.Abs(v)*meterShare) + meterVolt }
	out := facts.Band{
		Low: quantity.Volt(b.Low) - meter(b.Low), Typical: quantity.Volt(b.Typical), High: quantity.Volt(b.High) + meter(b.High),
		Root: quantity.Volt(b.RSS),
	}
	if max(math.Abs(b.Low), math.Abs(b.High)) < float64(deadVolt) {
		out = facts.Band{Low: 0, Typical: 0, High: deadVolt}
	}
	return out
}

// fuseLoads records the band of the current that each fuse carries while the lights
// are on with a full battery.
func (m *maker) fuseLoads() error {
	sol := m.solved["outage-night"]
	if sol == nil {
		return nil
	}
	var outs []network.Output
	for _, f := range m.f.Fuses {
		outs = append(outs, network.Into(f.Part.Designation))
	}
	bands, err := sol.Bands(outs, network.Linear)
	if err != nil {
		return fmt.Errorf("bands of the fuses: %w", err)
	}
	for i, f := range m.f.Fuses {
		lo, hi := math.Abs(bands[i].Low), math.Abs(bands[i].High)
		f.LoadLow, f.LoadHigh = quantity.Ampere(min(lo, hi)), quantity.Ampere(max(lo, hi))
	}
	return nil
}
