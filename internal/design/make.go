package design

import (
	"slices"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/finding"
	"gloamwright/internal/network"
	"gloamwright/internal/stage"
)

// Make designs a site: it expands the description, gives labels (kept ones stay),
// sizes everything, solves the circuit in every operating condition and judges what
// came out. The site must have passed the decoder without errors.
//
// When the simulated outage or recharge falls short of what is asked and the user has
// not given the battery or the charger, the next larger one is tried.
func Make(site *describe.Site, kept circuit.Labels) (*Design, error) {
	more := stage.Reserve{Capacity: 1, Charge: 1}
	for try := 1; ; try++ {
		d, err := attempt(site, kept, more)
		if err != nil || try == mostAttempts || !d.asks(&more) {
			return d, err
		}
	}
}

// mostAttempts bounds the designs of one site; each takes at least a standard step.
const mostAttempts = 4

// asks raises more to what the simulations ask beyond the sizing, and reports whether
// they ask anything that may be chosen.
func (d *Design) asks(more *stage.Reserve) bool {
	const step = 1.02 // beyond what was short, so that the next attempt stands clear
	e, duty := d.Endurance, d.Site.Duty
	asked := false
	if b := d.Battery; b.Part != nil && !b.Pinned && b.Required > 0 && e.Held > 0 && e.Held < duty.Outage.Val && len(e.Lit) > 0 {
		more.Capacity = step * float64(b.Capacity/b.Required) * max(more.Capacity, 1) * float64(duty.Outage.Val/e.Held)
		asked = true
	}
	if b, c := d.Battery, d.Charger; c.Part != nil && c.Part.Kind == circuit.ChargerUnit && !b.Pinned && !c.Pinned && b.Required > 0 && c.Limit > 0 && c.Current > c.Limit {
		// The smallest charger that returns the charge in time is too strong for it.
		more.Capacity = max(more.Capacity, step*float64(b.Capacity/b.Required)*max(more.Capacity, 1)*float64(c.Current/c.Limit))
		asked = true
	}
	if c := d.Charger; c.Part != nil && c.Part.Kind == circuit.ChargerUnit && !c.Pinned && c.Required > 0 && c.Current < c.Limit && recharged(e.Runs) && (e.Recharge == 0 || e.Recharge > duty.Recharge.Val) {
		k := 1.5 // it never filled: half as much again
		if e.Recharge > 0 {
			k = float64(e.Recharge / duty.Recharge.Val)
		}
		more.Charge = step * float64(c.Current/c.Required) * max(more.Charge, 1) * k
		asked = true
	}
	return asked
}

// recharged reports whether a recharge was followed.
func recharged(runs []*facts.Run) bool {
	return slices.ContainsFunc(runs, func(r *facts.Run) bool { return r.Recharge })
}

// attempt is one design of a site.
func attempt(site *describe.Site, kept circuit.Labels, more stage.Reserve) (*Design, error) {
	c := stage.Expand(site)
	labels := c.Label(kept)
	f := &facts.Facts{Site: site, Circuit: c}
	plan := stage.Size(site, c, f, more)
	f.Netlist = c.Resolve()
	n, err := network.New(f.Netlist)
	if err != nil {
		return nil, err
	}
	for _, e := range f.Netlist.Elements {
		f.Elements = append(f.Elements, facts.ElementValues{Element: e.ID, Params: n.Values(e.ID)})
	}
	m := &maker{site: site, plan: plan, f: f, net: n, solved: map[string]*network.Solution{}, stuck: map[string][]network.Override{}}
	if err := m.conditions(); err != nil {
		return nil, err
	}
	m.luminaires()
	if err := m.collapse(); err != nil {
		return nil, err
	}
	m.farEnds()
	m.conductors()
	m.function()
	m.loops()
	if err := m.readings(); err != nil {
		return nil, err
	}
	if err := m.expect(); err != nil {
		return nil, err
	}
	m.dropWorkings()
	m.relays()
	if err := m.faultsBeside(func() error {
		if err := m.thresholds(); err != nil {
			return err
		}
		return m.endurance()
	}); err != nil {
		return nil, err
	}
	return &Design{Facts: f, Findings: finding.Judge(f), Labels: labels}, nil
}

// maker is a design in the making.
type maker struct {
	site   *describe.Site
	plan   *stage.Plan
	f      *facts.Facts
	net    *network.Network
	solved map[string]*network.Solution  // by condition key
	stuck  map[string][]network.Override // what is held because it never comes to rest, by condition key
	envs   []network.Environment         // by condition
}
