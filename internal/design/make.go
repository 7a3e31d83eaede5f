package design

import (
	"errors"

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
func Make(site *describe.Site, kept circuit.Labels) (*Design, error) {
	c := stage.Expand(site)
	labels := c.Label(kept)
	f := &facts.Facts{Site: site, Circuit: c}
	plan := stage.Size(site, c, f)
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
	m.relay()
	if err := m.besideFaults(func() error {
		if err := m.thresholds(); err != nil {
			return err
		}
		return m.endurance()
	}); err != nil {
		return nil, err
	}
	return &Design{Facts: f, Findings: finding.Judge(f), Labels: labels}, nil
}

// besideFaults runs rest while the fault study, the longest part of a design, runs on
// a network of its own. Both read what was found so far; the study writes the faults
// only, rest everything else.
func (m *maker) besideFaults(rest func() error) error {
	n, err := network.New(m.f.Netlist)
	if err != nil {
		return err
	}
	study := *m
	study.net = n
	done := make(chan error, 1)
	go func() { done <- study.faults() }()
	err = rest()
	return errors.Join(err, <-done)
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
