package design

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/network"
	"gloamwright/internal/quantity"
)

// badJoint is the resistance of a bad joint in the fault study (DESIGN section 6).
const badJoint = 0.5

// trial is one fault to try.
type trial struct {
	key, part, what string
	overrides       []network.Override
	opens           *facts.Fuse // fuse that the fault blows first
	within          quantity.Second
	night           bool   // tried in the lit condition only
	like            string // key of an earlier trial that leaves the circuit the same
}

// faultsBeside solves the circuit with one thing wrong at a time, the longest part of a
// design, on the processors that rest leaves free, and on its own once rest is done. It
// records what is then to be seen and which readings leave their bands. Both read what
// was found before; the study writes the faults only, rest everything else.
func (m *maker) faultsBeside(rest func() error) error {
	trials := m.trials()
	tried := map[string]*facts.Fault{}
	var own []trial
	for _, t := range trials {
		f := &facts.Fault{Key: t.key, Part: t.part, What: t.what, Within: t.within}
		if t.opens != nil {
			f.Opens = t.opens.Part.Designation
		}
		if tried[t.like] == nil {
			own = append(own, t)
		}
		tried[t.key] = f
		m.f.Faults = append(m.f.Faults, f)
	}
	if err := m.sideBySide(len(own), rest, func(n *network.Network, i int) error {
		f := tried[own[i].key]
		m.try(n, own[i], f)
		f.Sign = m.sign(f)
		return nil
	}); err != nil {
		return err
	}
	for i, t := range trials {
		if same := tried[t.like]; same != nil {
			f := m.f.Faults[i]
			f.Dark, f.Lit, f.Moved, f.Unsettled, f.Sign = same.Dark, same.Lit, same.Moved, same.Unsettled, same.Sign
		}
	}
	m.group()
	return nil
}

// try solves one fault in every condition that it is tried in.
func (m *maker) try(n *network.Network, t trial, f *facts.Fault) {
	for i, c := range m.f.Conditions {
		if !c.Shown || t.night && c.Key != "outage-night" {
			continue
		}
		env := m.envs[i]
		for _, o := range t.overrides {
			env = env.With(o)
		}
		from := m.solved[c.Key].State
		if c.From != "" && m.solved[c.From] != nil {
			from = m.solved[c.From].State
		}
		sol, err := n.SolveNear(env, from, m.solved[c.Key])
		if err != nil {
			f.Unsettled = append(f.Unsettled, c.Key)
			continue
		}
		m.compare(f, i, c, sol)
	}
}

// compare records which circuits and readings differ from the sound circuit.
func (m *maker) compare(f *facts.Fault, i int, c *facts.Condition, sol *network.Solution) {
	lit := m.litIn(sol)
	for _, s := range m.site.Circuits {
		name := s.Name.Val
		was := slices.Contains(c.Lit, name)
		switch {
		case was && !lit[name]:
			f.Dark = append(f.Dark, facts.Seen{Circuit: name, Condition: c.Key})
		case !was && lit[name]:
			f.Lit = append(f.Lit, facts.Seen{Circuit: name, Condition: c.Key})
		}
	}
	for k, r := range m.f.Readings {
		v := quantity.Volt(sol.Across(r.Point.Red.Net, r.Point.Black.Net))
		if math.Abs(float64(v)) < noVolt {
			v = 0
		}
		if !slices.ContainsFunc(m.f.Readings[k].At(i), func(b facts.Band) bool { return v >= b.Low-deadVolt && v <= b.High+deadVolt }) {
			f.Moved = append(f.Moved, facts.Moved{Point: r.Point.Label, Condition: c.Key, Volt: v})
		}
	}
}

// noVolt is the voltage, V, below which a dead wire's is what rounding leaves of it.
const noVolt = 1e-6

// litIn returns which circuits are lit in a solution.
func (m *maker) litIn(sol *network.Solution) map[string]bool {
	out := map[string]bool{}
	for _, c := range m.site.Circuits {
		out[c.Name.Val] = true
	}
	for _, l := range m.f.Luminaires {
		v := sol.Across(l.Part.Pin("+").Net, l.Part.Pin("-").Net)
		if !m.plan.Load(l.Type).Lit(quantity.Volt(v)) {
			out[l.Circuit] = false
		}
	}
	return out
}

// sign says in words what a person sees.
func (m *maker) sign(f *facts.Fault) string {
	conds := map[string]string{}
	for _, c := range m.f.Conditions {
		conds[c.Key] = c.Name
	}
	say := func(list []facts.Seen, how string) string {
		byCondition := map[string][]string{}
		var order []string
		for _, s := range list {
			if byCondition[s.Condition] == nil {
				order = append(order, s.Condition)
			}
			byCondition[s.Condition] = append(byCondition[s.Condition], s.Circuit)
		}
		var parts []string
		for _, k := range order {
			names := byCondition[k]
			who := strings.Join(names, ", ")
			if len(names) == len(m.site.Circuits) {
				who = "All circuits"
			} else if b := m.wholeBoard(names); b != "" {
				who = "All of " + b
			}
			parts = append(parts, fmt.Sprintf("%s %s: %s", who, how, strings.ToLower(conds[k])))
		}
		return strings.Join(parts, "; ")
	}
	// The condition in which the lights are meant to serve says most.
	first := func(list []facts.Seen) []facts.Seen {
		var out []facts.Seen
		for _, s := range list {
			if s.Condition == "outage-night" {
				out = append(out, s)
			}
		}
		if len(out) > 0 {
			return out
		}
		for _, s := range list {
			if s.Condition == list[0].Condition {
				out = append(out, s)
			}
		}
		return out
	}
	var parts []string
	if len(f.Dark) > 0 {
		parts = append(parts, say(first(f.Dark), "dark"))
	}
	if len(f.Lit) > 0 {
		parts = append(parts, say(first(f.Lit), "lit"))
	}
	if len(parts) == 0 {
		if len(f.Moved) == 0 {
			return "Nothing is seen and no reading moves"
		}
		return "Lights as they must be, readings outside their bands"
	}
	return strings.Join(parts, "; ")
}

// wholeBoard returns the title of the board whose circuits, with those of the boards
// behind it, are exactly names; empty if there is none.
func (m *maker) wholeBoard(names []string) string {
	for _, b := range m.f.Circuit.Boards {
		var own []string
		var walk func(b *circuit.Board)
		walk = func(b *circuit.Board) {
			for _, w := range b.Ways {
				if w.Lighting != nil {
					own = append(own, w.Lighting.Name)
				}
				if w.Feeds != nil {
					walk(w.Feeds)
				}
			}
		}
		walk(b)
		if len(own) < 2 || len(own) != len(names) {
			continue
		}
		same := true
		for _, n := range own {
			same = same && slices.Contains(names, n)
		}
		if same {
			return b.Title
		}
	}
	return ""
}

// group numbers the faults by what is seen and names for each the reading that tells
// it best from the others of its group.
func (m *maker) group() {
	number := map[string]int{}
	byGroup := map[int][]*facts.Fault{}
	for _, f := range m.f.Faults {
		if number[f.Sign] == 0 {
			number[f.Sign] = len(number) + 1
		}
		f.Group = number[f.Sign]
		byGroup[f.Group] = append(byGroup[f.Group], f)
	}
	for _, f := range m.f.Faults {
		best, score := "", 0
		for _, mv := range f.Moved {
			apart := 0
			for _, o := range byGroup[f.Group] {
				if o != f && !movedAlike(o, mv) {
					apart++
				}
			}
			if apart > score || best == "" {
				best, score = mv.Point+" in "+mv.Condition, apart
				f.Best = mv
			}
		}
		f.NextBest = best
	}
}

// movedAlike reports whether a fault moves the same reading to nearly the same value.
func movedAlike(o *facts.Fault, mv facts.Moved) bool {
	for _, x := range o.Moved {
		if x.Point == mv.Point && x.Condition == mv.Condition {
			return math.Abs(float64(x.Volt-mv.Volt)) < alikeVolt
		}
	}
	return false
}

// alikeVolt is the difference that a meter shows surely (common practice, no source).
const alikeVolt = 0.3
