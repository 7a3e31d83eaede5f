package release

import (
	"slices"

	"gloamwright/internal/design"
	"gloamwright/internal/quantity"
)

// comparison finds what a technician has to redo between two records. Each kind of
// work is found by one file: compare_cables.go, compare_fuses.go …
type comparison struct {
	old, now *record
	scopes   []scope // of the changed values
	names    names
	homes    map[string]home
	types    map[string][]string // lamp types by circuit, in either record
	work     map[string][]design.WorkItem
	out      *design.Changes
}

// home is where in the plant a labelled thing belongs.
type home struct {
	circuits, stages []string
	lamp             string
}

// names is what records do not hold: titles and strips of boards by name, the new
// names of circuits by the old, and the unit of lengths.
type names struct {
	titles, strips, renamed map[string]string
	lengths                 quantity.LengthUnit // in which the notice is worded
}

// compareRecords finds what two records differ in. values and scopes are what changed in
// the description.
func compareRecords(old, now *record, values []design.ValueChange, scopes []scope, n names) *comparison {
	c := &comparison{
		old: old, now: now, scopes: scopes, names: n, homes: map[string]home{}, types: map[string][]string{},
		work: map[string][]design.WorkItem{},
		out:  &design.Changes{From: old.Job.Revision, To: now.Job.Revision, Values: values, Touched: map[string]bool{}, Rows: map[string]bool{}},
	}
	c.place(old)
	c.place(now)
	c.cables()
	c.wires()
	c.parts()
	c.fuses()
	c.settings()
	c.labels()
	c.readings()
	c.tests()
	c.findings()
	return c
}

// notice returns what was found, work put together where it differs only in labels.
func (c *comparison) notice() *design.Changes {
	for _, tool := range design.Tools {
		c.out.Work = append(c.out.Work, grouped(c.work[tool])...)
	}
	c.stays()
	return c.out
}

// of returns the present name of a circuit of either record.
func (n names) of(circuit string) string {
	if now, ok := n.renamed[circuit]; ok {
		return now
	}
	return circuit
}

// place notes where everything of a record belongs.
func (c *comparison) place(r *record) {
	stage, circuit := map[string]string{}, map[string]string{}
	for _, p := range r.Parts {
		stage[p.Designation] = p.Stage
		circuit[p.Designation] = c.names.of(p.Circuit)
		c.at(p.Designation, circuit[p.Designation], p.Stage)
	}
	for _, l := range r.Luminaires {
		h := c.homes[l.Designation]
		h.lamp = l.Type
		c.homes[l.Designation] = h
		if in := c.names.of(l.Circuit); !slices.Contains(c.types[in], l.Type) {
			c.types[in] = append(c.types[in], l.Type)
		}
	}
	ends := func(label string, ends ...string) {
		for _, e := range ends {
			if _, ok := stage[e]; !ok {
				e = partOf(e)
			}
			c.at(label, circuit[e], stage[e])
		}
	}
	for _, w := range r.Conductors {
		for _, label := range []string{w.Run, w.Number} {
			if label != "" {
				c.at(label, c.names.of(w.Circuit), "")
				ends(label, w.From, w.To)
			}
		}
	}
	for _, t := range r.TestPoints {
		ends(t.Label, t.Terminal)
	}
}

func (c *comparison) at(label, circuit, stage string) {
	h := c.homes[label]
	if circuit != "" && !slices.Contains(h.circuits, circuit) {
		h.circuits = append(h.circuits, circuit)
	}
	if stage != "" && !slices.Contains(h.stages, stage) {
		h.stages = append(h.stages, stage)
	}
	c.homes[label] = h
}

// do notes one thing to do at one label, or at the plant as a whole if label is "".
func (c *comparison) do(item design.WorkItem, label string) {
	if label != "" {
		item.Labels = []string{label}
		if item.Tool == design.TestAgain {
			c.out.Rows[label] = true
		} else {
			c.out.Touched[label] = true
		}
	}
	item.Causes = c.causes(label)
	c.work[item.Tool] = append(c.work[item.Tool], item)
}

// causes returns the numbers of the changed values that can force work at a label. If
// some act on its circuit, stage or lamp type, these and those that act everywhere can;
// else all can that act on more than paper.
func (c *comparison) causes(label string) []int {
	h := c.homes[label]
	var near, all, paper []int
	direct := false
	for i, s := range c.scopes {
		switch {
		case s.paper:
			paper = append(paper, i+1)
			continue
		case s.circuit == "" && s.stage == "" && s.lamp == "":
			near = append(near, i+1)
		case s.circuit != "" && slices.Contains(h.circuits, s.circuit),
			s.stage != "" && slices.Contains(h.stages, s.stage),
			s.lamp != "" && (s.lamp == h.lamp || h.lamp == "" && c.uses(h.circuits, s.lamp)):
			near = append(near, i+1)
			direct = true
		}
		all = append(all, i+1)
	}
	switch {
	case direct:
		return near
	case len(all) > 0:
		return all
	}
	return paper
}

func (c *comparison) uses(circuits []string, lamp string) bool {
	return slices.ContainsFunc(circuits, func(name string) bool { return slices.Contains(c.types[name], lamp) })
}

// grouped puts items together that differ in nothing but their labels.
func grouped(items []design.WorkItem) []design.WorkItem {
	var out []design.WorkItem
	for _, i := range items {
		j := slices.IndexFunc(out, func(o design.WorkItem) bool {
			return o.Do == i.Do && o.Was == i.Was && o.Is == i.Is && o.Test == i.Test && o.What == i.What && slices.Equal(o.Causes, i.Causes)
		})
		if j < 0 {
			out = append(out, i)
		} else {
			out[j].Labels = append(out[j].Labels, i.Labels...)
		}
	}
	for k := range out {
		if len(out[k].Causes) == 1 {
			out[k].From = out[k].Causes[0]
		}
		slices.SortFunc(out[k].Labels, compareLabels)
		if out[k].What == "" {
			out[k].What = together(out[k].Labels)
		}
	}
	return out
}

// pairs walks two lists by label: what both have in the order of now, with what only
// now has between; then what only old has.
func pairs[T any](old, now []T, label func(*T) string, f func(o, n *T)) {
	before := map[string]*T{}
	for i := range old {
		before[label(&old[i])] = &old[i]
	}
	seen := map[string]bool{}
	for i := range now {
		l := label(&now[i])
		seen[l] = true
		f(before[l], &now[i])
	}
	for i := range old {
		if !seen[label(&old[i])] {
			f(&old[i], nil)
		}
	}
}
