package release

import (
	"runtime"
	"slices"
	"strings"
	"sync"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/design"
)

// mostTrials bounds the designs that are made to tell which change forces what. With
// more changes at once the notice says what can force a piece of work.
const mostTrials = 8

// trial is the new description with one change taken back.
type trial struct {
	values []int // numbers of the changed values that are taken back together
	site   *describe.Site
	found  *comparison // nil if it could not be designed
}

// attribute names, for every piece of work, the changes that force it: those without
// which it would not be there, or be another. For this the description is designed again
// with one change at a time taken back. Work that stays whichever single change is taken
// back keeps what was said of it: all changes that can force it.
func (c *comparison) attribute(reg *Register, was *describe.Site, d *design.Design) {
	list := trials(c.out.Values, was, d.Site)
	if len(list) < 2 || len(list) > mostTrials {
		return
	}
	c.try(list, reg, d)
	signs := make([]map[workKey][]string, len(list))
	for i, t := range list {
		if t.found != nil {
			signs[i] = t.found.signs()
		}
	}
	for _, tool := range design.Tools {
		for k := range c.work[tool] {
			w := &c.work[tool][k]
			var causes []int
			for i, t := range list {
				if t.found == nil || !slices.Contains(signs[i][keyOf(*w)], c.sign(*w)) {
					causes = append(causes, t.values...)
				}
			}
			if slices.Sort(causes); len(causes) > 0 && len(causes) <= len(c.out.Values) {
				w.Causes = slices.Compact(causes)
			}
		}
	}
}

// try designs the trials, one on each processor, with the labels that d has.
func (c *comparison) try(list []*trial, reg *Register, d *design.Design) {
	var all sync.WaitGroup
	room := make(chan bool, runtime.GOMAXPROCS(0))
	for _, t := range list {
		kept, mistakes := reg.Keep(t.site)
		if mistakes.HasErrors() {
			continue
		}
		for _, id := range circuit.SortedKeys(d.Labels) {
			if _, ok := kept[id]; !ok {
				kept[id] = d.Labels[id]
			}
		}
		all.Add(1)
		go func() {
			defer all.Done()
			room <- true
			defer func() { <-room }()
			made, err := design.Make(t.site, kept)
			if err != nil {
				return
			}
			if r, err := recordOf(made); err == nil {
				t.found = compareRecords(c.old, r, nil, nil, c.names)
			}
		}()
	}
	all.Wait()
}

// workKey is what a piece of work is, apart from how it is done.
type workKey struct{ tool, test, label, what string }

func keyOf(w design.WorkItem) workKey {
	return workKey{w.Tool, w.Test, strings.Join(w.Labels, " "), w.What}
}

// sign says how a piece of work is done; of readings, which bands they have.
func (c *comparison) sign(w design.WorkItem) string {
	s := w.Do + "|" + w.Was + "|" + w.Is
	if w.Test == design.TestReadings {
		for _, r := range c.out.Readings {
			if r.Point == w.Labels[0] {
				s += "|" + r.Condition + " " + r.Is
			}
		}
	}
	return s
}

func (c *comparison) signs() map[workKey][]string {
	out := map[workKey][]string{}
	for _, list := range c.work {
		for _, w := range list {
			out[keyOf(w)] = append(out[keyOf(w)], c.sign(w))
		}
	}
	return out
}

// trials lists what can be taken back by itself: a value of the duty, the practice as a
// whole, a stage or a luminaire type that was there before, a lighting circuit. New
// luminaire types go with the circuits that use them.
func trials(values []design.ValueChange, was, now *describe.Site) []*trial {
	var out []*trial
	index := map[string]*trial{}
	back := func(v design.ValueChange, name string, change func(s *describe.Site)) {
		t := index[name]
		if t == nil {
			t = &trial{site: copyOf(now, was)}
			change(t.site)
			index[name] = t
			out = append(out, t)
		}
		t.values = append(t.values, v.Number)
	}
	circuits := renamings(was, now)
	for _, v := range values {
		group, rest, _ := strings.Cut(v.Path, ".")
		name, _, _ := strings.Cut(rest, ".")
		switch group {
		case "duty":
			if set := dutyValues[name]; set != nil {
				back(v, v.Path, func(s *describe.Site) { set(&s.Duty, &was.Duty) })
			}
		case "practice":
			back(v, group, func(s *describe.Site) { s.Practice = was.Practice })
		case "stages":
			if i, j := stageNamed(was, name), stageNamed(now, name); i >= 0 && j >= 0 && was.Stages[i].Kind.Val == now.Stages[j].Kind.Val {
				back(v, group+"."+name, func(s *describe.Site) {
					s.Stages[j] = &describe.Stage{Name: was.Stages[i].Name, Kind: was.Stages[i].Kind, Fields: was.Stages[i].Fields.Clone()}
				})
			}
		case "luminaires":
			if i, j := lampNamed(was, name), lampNamed(now, name); i >= 0 && j >= 0 {
				back(v, group+"."+name, func(s *describe.Site) { s.Luminaires[j] = was.Luminaires[i] })
				continue
			}
			for _, c := range now.Circuits {
				if usesLamp(c, name) {
					back(v, "circuits."+c.Name.Val, func(s *describe.Site) { takeBack(s, was, c.Name.Val, circuits) })
				}
			}
		case "circuits":
			name := circuitOf(v.Path, now, was)
			if strings.HasSuffix(v.Path, ".name") {
				continue // a name moves no copper
			}
			back(v, "circuits."+name, func(s *describe.Site) { takeBack(s, was, name, circuits) })
		}
	}
	return out
}

// dutyValues copies single values of the duty.
var dutyValues = map[string]func(to, from *describe.Duty){
	"nominal":       func(to, from *describe.Duty) { to.Nominal = from.Nominal },
	"outage":        func(to, from *describe.Duty) { to.Outage = from.Outage },
	"recharge":      func(to, from *describe.Duty) { to.Recharge = from.Recharge },
	"battery_room":  func(to, from *describe.Duty) { to.BatteryRoom = from.BatteryRoom },
	"cable_ambient": func(to, from *describe.Duty) { to.CableAmbient = from.CableAmbient },
}

// copyOf copies a site as far as a trial changes it, and adds the luminaire types that
// only the old description has, for circuits that are taken back.
func copyOf(now, was *describe.Site) *describe.Site {
	s := *now
	s.Circuits = nil
	for _, c := range now.Circuits {
		k := *c
		s.Circuits = append(s.Circuits, &k)
	}
	s.Stages = nil
	for _, st := range now.Stages {
		k := *st
		k.Fields = st.Fields.Clone()
		s.Stages = append(s.Stages, &k)
	}
	s.Luminaires = slices.Clone(now.Luminaires)
	for _, l := range was.Luminaires {
		if lampNamed(now, l.Name.Val) < 0 {
			s.Luminaires = append(s.Luminaires, l)
		}
	}
	return &s
}

// takeBack puts a circuit back to what it was: under its present name, away if it is
// new, there again if it is gone and its board is not.
func takeBack(s, was *describe.Site, name string, same map[string]*describe.Circuit) {
	for _, o := range was.Circuits {
		now := same[o.Name.Val]
		switch {
		case now != nil && now.Name.Val == name:
			i := slices.IndexFunc(s.Circuits, func(c *describe.Circuit) bool { return c.Name.Val == name })
			k := *o
			k.Name, k.Was = s.Circuits[i].Name, s.Circuits[i].Was
			if stageNamed(s, k.Board.Val) < 0 {
				k.Board = s.Circuits[i].Board
			}
			s.Circuits[i] = &k
			return
		case now == nil && o.Name.Val == name:
			if stageNamed(s, o.Board.Val) >= 0 {
				k := *o
				s.Circuits = append(s.Circuits, &k)
			}
			return
		}
	}
	s.Circuits = slices.DeleteFunc(s.Circuits, func(c *describe.Circuit) bool { return c.Name.Val == name })
}

// circuitOf returns the name of the circuit that a path is in. Names may hold points.
func circuitOf(path string, sites ...*describe.Site) string {
	rest := strings.TrimPrefix(path, "circuits.")
	best := ""
	for _, s := range sites {
		for _, c := range s.Circuits {
			if n := c.Name.Val; (rest == n || strings.HasPrefix(rest, n+".")) && len(n) > len(best) {
				best = n
			}
		}
	}
	return best
}

func stageNamed(s *describe.Site, name string) int {
	return slices.IndexFunc(s.Stages, func(t *describe.Stage) bool { return t.Name.Val == name })
}

func lampNamed(s *describe.Site, name string) int {
	return slices.IndexFunc(s.Luminaires, func(l *describe.Luminaire) bool { return l.Name.Val == name })
}

func usesLamp(c *describe.Circuit, name string) bool {
	return slices.ContainsFunc(c.NamedLegs(), func(n describe.NamedLeg) bool { return n.Leg.Luminaire.Val == name })
}
