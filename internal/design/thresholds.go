package design

import (
	"errors"
	"fmt"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/network"
	"gloamwright/internal/quantity"
)

// thresholds finds where things change over, by sweeping the solved circuit up and
// down with its memory.
func (m *maker) thresholds() error {
	if err := m.twilight(); err != nil {
		return err
	}
	if err := m.cutOffVolts(); err != nil {
		return err
	}
	return m.lowestMains()
}

func (m *maker) spec(key string) (operating, bool) {
	for _, o := range conditionsOfAnyJob {
		if o.key == key {
			return o, m.solved[key] != nil
		}
	}
	return operating{}, false
}

func (m *maker) threshold(key, name, unit string, at float64, text string) *facts.Threshold {
	t := &facts.Threshold{Key: key, Name: name, Value: at, Unit: unit, Text: text}
	m.f.Thresholds = append(m.f.Thresholds, t)
	return t
}

// settingBand gives a threshold the band that the accuracy of its setting and the
// meter leave: the setting moves it volt for volt.
func (m *maker) settingBand(t *facts.Threshold, element, param string) {
	for _, e := range m.f.Netlist.Elements {
		if e.ID != element {
			continue
		}
		for _, p := range e.Params {
			if p.Name == param {
				half := p.Value*p.Tol + t.Value*meterShare + float64(meterVolt)
				t.Low, t.High = t.Value-half, t.Value+half
			}
		}
	}
}

// sweep walks a condition through a range. Where something never comes to rest on the
// way there is no threshold; that is recorded, and ok is false.
func (m *maker) sweep(key, name, unit string, s network.Sweep, from network.State) (t network.Threshold, ok bool, err error) {
	t, err = m.net.Threshold(s, from)
	var restless *network.ChatterError
	if errors.As(err, &restless) {
		m.f.Thresholds = append(m.f.Thresholds, &facts.Threshold{Key: key, Name: name, Unit: unit, Restless: restless.Elements, Text: "it never comes to rest"})
		return t, false, nil
	}
	if err != nil {
		return t, false, fmt.Errorf("sweep for where %s: %w", name, err)
	}
	return t, true, nil
}

// Ends of the sweeps.
const (
	sweepMost  = 10000. // lx
	sweepLeast = 0.01   // lx
	sweepSteps = 10     // before the place is closed in on
)

// twilight finds the illuminances at which the lights come on and go off in an outage.
func (m *maker) twilight() error {
	o, ok := m.spec("outage-day")
	r := m.f.Relay
	if !ok || r == nil || !m.hasSensor() {
		return nil
	}
	coil := r.Part.Designation + ".coil"
	sweep := func(key, name string, from, to float64, state network.State) (network.Threshold, bool, error) {
		return m.sweep(key, name, "lx", network.Sweep{
			From: from, To: to, Geometric: true, Steps: sweepSteps, Watch: []string{coil},
			Set: func(x float64) network.Environment {
				e := m.environment(o)
				e.Lux = x
				return e
			},
		}, state)
	}
	const dark, light = "lights come on in an outage", "lights go off again"
	down, ok, err := sweep("dark", dark, dayLux, sweepLeast, m.solved[o.key].State)
	if err != nil || !ok {
		return err
	}
	if !down.Found {
		m.threshold("dark", dark, "lx", 0, "they do not come on, however dark it gets")
		return nil
	}
	m.threshold("dark", dark, "lx", down.At, "")
	up, ok, err := sweep("light", light, down.At, sweepMost, down.After.State)
	if err != nil || !ok {
		return err
	}
	if !up.Found {
		m.threshold("light", light, "lx", 0, "they do not go off, however light it gets")
		return nil
	}
	m.threshold("light", light, "lx", up.At, "")
	return nil
}

func (m *maker) hasSensor() bool {
	for _, p := range m.f.Circuit.Parts {
		if p.Kind == circuit.LDR || p.Kind == circuit.PhotoSwitch {
			return true
		}
	}
	return false
}

// cutOffVolts finds the battery's voltage at which the cut-off opens and recloses, at
// the battery and where it senses.
func (m *maker) cutOffVolts() error {
	o, ok := m.spec("outage-night")
	q, b := m.f.CutOff, m.f.Battery.Part
	if !ok || q == nil || b == nil {
		return nil
	}
	id := q.Part.Designation
	set := func(x float64) network.Environment { return m.environment(o).Set(b.Designation, "emf", x) }
	read := func(s *network.Solution) (battery, sense float64) {
		return s.Across(b.Pin("+").Net, b.Pin("-").Net), s.Across(q.Part.Pin("in").Net, q.Part.Pin("-").Net)
	}
	down, ok, err := m.sweep("opens", "cut-off opens", "V",
		network.Sweep{From: float64(m.plan.Full), To: float64(q.Opens) * 0.8, Steps: sweepSteps, Set: set, Watch: []string{id}}, m.solved[o.key].State)
	if err != nil || !ok {
		return err
	}
	if !down.Found {
		m.threshold("opens", "cut-off opens", "V", 0, "it does not open")
		return nil
	}
	at, sense := read(down.Before)
	q.AtBattery = quantity.Volt(at)
	m.settingBand(m.threshold("opens-battery", "cut-off opens, read at the battery", "V", at, ""), id, "opens_volt")
	m.settingBand(m.threshold("opens-sense", "cut-off opens, read at its input", "V", sense, ""), id, "opens_volt")
	up, ok, err := m.sweep("recloses", "cut-off recloses", "V",
		network.Sweep{From: down.At, To: float64(m.plan.Highest) * 1.1, Steps: sweepSteps, Set: set, Watch: []string{id}}, down.After.State)
	if err != nil || !ok {
		return err
	}
	if up.Found {
		at, sense = read(up.Before)
		m.settingBand(m.threshold("recloses-battery", "cut-off recloses, read at the battery", "V", at, ""), id, "recloses_volt")
		m.settingBand(m.threshold("recloses-sense", "cut-off recloses, read at its input", "V", sense, ""), id, "recloses_volt")
	}
	return nil
}

// lowestMains finds the mains voltage down to which the relay is held in at night.
func (m *maker) lowestMains() error {
	o, ok := m.spec("mains-night")
	r := m.f.Relay
	if !ok || r == nil {
		return nil
	}
	coil := r.Part.Designation + ".coil"
	if !m.solved[o.key].State[coil] {
		return nil
	}
	const mains = "relay lets go when the mains falls to"
	down, ok, err := m.sweep("mains", mains, "V", network.Sweep{
		From: 1, To: 0, Steps: sweepSteps, Watch: []string{coil},
		Set: func(x float64) network.Environment {
			e := m.environment(o)
			e.Mains = x
			return e
		},
	}, m.solved[o.key].State)
	if err != nil || !ok {
		return err
	}
	if down.Found {
		m.threshold("mains", mains, "V", down.At*float64(m.mainsNominal()), "")
	}
	m.threshold("pick-up", "coil picks up when hot at", "V", float64(r.PickUp), "")
	return nil
}
