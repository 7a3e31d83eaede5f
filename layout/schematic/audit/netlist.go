package audit

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// reference is an off-sheet arrow.
type reference struct {
	x *instance
	r *reader
}

// set is all circuit sheets together.
type set struct {
	readers []*reader
	offset  map[*reader]int
	parent  []int
	faults  []Fault
	pins    map[string]int // node of every pin found
}

func (s *set) fault(rule Rule, r *reader, at ink.Point, format string, args ...any) {
	s.faults = append(s.faults, Fault{rule, r.sheet.Number, r.sheet.Format.Zone(at.X, at.Y), at, fmt.Sprintf(format, args...)})
}

func (s *set) root(n int) int {
	for s.parent[n] != n {
		s.parent[n] = s.parent[s.parent[n]]
		n = s.parent[n]
	}
	return n
}

func (s *set) join(a, b int) {
	a, b = s.root(a), s.root(b)
	s.parent[max(a, b)] = min(a, b)
}

// bundle is the arrows of one reference: one wire, or the two cores of a cable.
type bundle struct {
	key, net string
	out      bool
	r        *reader
	ends     []ink.Point
	group    *Group
}

// references joins the sheets at their references. Ends of one reference belong to
// the ends of its mate in order: the left to the left, the upper to the upper or,
// where each core is named, by name.
func (s *set) references() {
	s.offset = map[*reader]int{}
	for _, r := range s.readers {
		s.offset[r] = len(s.parent)
		for n := range r.parent {
			s.parent = append(s.parent, s.offset[r]+r.parent[n])
		}
	}
	var bundles []*bundle
	byGroup := map[*Group]*bundle{}
	for _, r := range s.readers {
		for _, f := range r.refs {
			b := byGroup[f.x.group]
			if b == nil {
				b = &bundle{key: f.x.group.Get("key"), net: f.x.group.Get("net"), out: f.x.sym == &symbols.ReferenceLeaving, r: r, group: f.x.group}
				byGroup[f.x.group] = b
				bundles = append(bundles, b)
			}
			b.ends = append(b.ends, f.x.at)
		}
	}
	for i, b := range bundles {
		b.sort()
		var mates []*bundle
		for _, m := range bundles {
			if m.key == b.key && m != b {
				mates = append(mates, m)
			}
		}
		switch {
		case len(mates) != 1 || mates[0].out == b.out || len(mates[0].ends) != len(b.ends) || mates[0].net != b.net:
			s.fault(RuleReference, b.r, b.ends[0], "reference %s has %d mates", b.net, len(mates))
			continue
		}
		m := mates[0]
		s.names(b, m)
		if slices.Index(bundles, m) > i {
			for k := range b.ends {
				s.join(s.offset[b.r]+b.r.node(b.ends[k]), s.offset[m.r]+m.r.node(m.ends[k]))
			}
		}
	}
	for _, r := range s.readers {
		s.contacts(r)
	}
}

// sort orders the ends as a reader pairs them: of cores that run upright the left
// is L+, of level ones the upper; cores named singly go by their sign.
func (b *bundle) sort() {
	signs := map[ink.Point]string{}
	for _, t := range b.group.texts(b.r.page) {
		for _, e := range b.ends {
			if d := t.At.Y - e.Y; d > 0 && d < module && t.At.X > e.X {
				if strings.HasSuffix(t.S, "+") {
					signs[e] = "+"
				}
				if strings.HasSuffix(t.S, "−") {
					signs[e] = "−"
				}
			}
		}
	}
	slices.SortStableFunc(b.ends, func(p, q ink.Point) int {
		if len(signs) == 2 && len(b.ends) == 2 {
			return cmp.Compare(signs[p], signs[q]) // "+" sorts before "−"
		}
		return cmp.Or(cmp.Compare(p.Y, q.Y), cmp.Compare(p.X, q.X))
	})
}

// texts are the texts of a group.
func (g *Group) texts(p *Page) []Text {
	var out []Text
	for _, t := range p.Texts {
		if t.Group == g {
			out = append(out, t)
		}
	}
	return out
}

// names checks that a reference names its net and the true place of its mate.
func (s *set) names(b, m *bundle) {
	found, net := false, false
	for _, t := range b.group.texts(b.r.page) {
		if n := strings.TrimRight(t.S, "+−"); n != "" && strings.Contains(b.net, n) {
			net = true
		}
		if n, z, ok := named(t.S); ok {
			found = true
			if n != m.r.sheet.Number || z != m.r.sheet.Format.Zone(m.ends[0].X, m.ends[0].Y) && !m.at(z) {
				s.fault(RuleReference, b.r, t.At, "%s names %s, its mate is at /%d.%s", b.net, t.S, m.r.sheet.Number,
					m.r.sheet.Format.Zone(m.ends[0].X, m.ends[0].Y))
			}
		}
	}
	if !found || !net {
		s.fault(RuleReference, b.r, b.ends[0], "reference %s does not name its net and place", b.net)
	}
}

// at reports whether one of the ends is in the zone.
func (b *bundle) at(zone string) bool {
	for _, e := range b.ends {
		if b.r.sheet.Format.Zone(e.X, e.Y) == zone {
			return true
		}
	}
	return false
}

// contacts checks the places printed at contacts and in contact tables: a contact
// names its coil's, a table each drawn contact's.
func (s *set) contacts(r *reader) {
	drawn := func(n int, zone, part string, coil bool) bool {
		for _, q := range s.readers {
			if q.sheet.Number != n {
				continue
			}
			for _, x := range q.symbols {
				if x.group.Get("part") == part && (x.sym == &symbols.Coil) == coil && q.sheet.Format.Zone(x.at.X, x.at.Y) == zone {
					return true
				}
			}
		}
		return false
	}
	for _, t := range r.page.Texts {
		n, zone, ok := named(t.S)
		if !ok || t.Group == nil || t.Group.In("reference") {
			continue
		}
		switch {
		case t.Group.In("part") && !drawn(n, zone, t.Group.Get("part"), true):
			s.fault(RuleContact, r, t.At, "%s names %s, where its coil is not", t.Group.Get("part"), t.S)
		case t.Group.In("table") && t.Group.Get("relay") != "" && !drawn(n, zone, t.Group.Get("relay"), false):
			s.fault(RuleContact, r, t.At, "the table of %s names %s, where no contact of it is", t.Group.Get("relay"), t.S)
		}
	}
	for _, x := range r.symbols {
		if x.group.In("part") && strings.HasPrefix(x.group.Get("role"), "make") || strings.HasPrefix(x.group.Get("role"), "break") {
			count := 0
			for _, t := range x.group.texts(r.page) {
				if _, _, ok := named(t.S); ok {
					count++
				}
			}
			if count != 1 {
				s.fault(RuleContact, r, x.at, "a contact of %s names %d places", x.group.Get("part"), count)
			}
		}
	}
}

// compare holds what is connected on paper against the circuit.
func (s *set) compare(w *Want) {
	s.pins = map[string]int{}
	at := map[string]ink.Point{}
	where := map[string]*reader{}
	for _, r := range s.readers {
		s.readPins(r, w, at, where)
	}
	byClass, byPiece := map[int]string{}, map[int]string{}
	for _, name := range sortedKeys(w.Pins) {
		n, ok := s.pins[name]
		if !ok {
			s.faults = append(s.faults, Fault{Rule: RulePins, What: "pin " + name + " is not drawn"})
			continue
		}
		class, piece := s.root(n), w.Pins[name]
		if other, ok := byClass[class]; !ok {
			byClass[class] = name
		} else if w.Pins[other] != piece {
			s.fault(RuleNet, where[name], at[name], "joined in the drawing, apart in the circuit: %s and %s", other, name)
		}
		if other, ok := byPiece[piece]; !ok {
			byPiece[piece] = name
		} else if s.root(s.pins[other]) != class {
			s.fault(RuleNet, where[name], at[name], "apart in the drawing, joined in the circuit: %s and %s", other, name)
		}
	}
	for _, r := range s.readers {
		for _, p := range r.probes {
			piece, ok := w.Probes[p.label]
			if !ok {
				s.fault(RuleProbe, r, p.at, "test point %q is not in the circuit", p.label)
				continue
			}
			ref, ok := byPiece[piece]
			if !ok || s.root(s.offset[r]+r.node(p.at)) != s.root(s.pins[ref]) {
				s.fault(RuleProbe, r, p.at, "test point %s is not on its potential", p.label)
			}
		}
	}
	found := map[string]int{}
	for _, r := range s.readers {
		for _, p := range r.probes {
			found[p.label]++
		}
	}
	for _, label := range sortedKeys(w.Probes) {
		if found[label] != 1 {
			s.faults = append(s.faults, Fault{Rule: RuleProbe, What: fmt.Sprintf("test point %s is drawn %d times", label, found[label])})
		}
	}
}

// readPins names the pins of a sheet's symbols. A symbol's place comes from its
// strokes; its group says which part it is and which of the part's pins each of its
// own is.
func (s *set) readPins(r *reader, w *Want, at map[string]ink.Point, where map[string]*reader) {
	marks := map[*Group][]*Group{}
	for _, g := range r.page.Groups {
		if g.Class == "pin" {
			marks[g.Parent] = append(marks[g.Parent], g)
		}
	}
	named := map[*Group]bool{}
	for _, x := range r.symbols {
		for _, p := range x.pins {
			for _, m := range marks[x.group] {
				place := samePoint(p.at, ink.Point{X: number(m.Get("x")), Y: number(m.Get("y"))})
				if byName := x.sym != nil && m.Get("own") != ""; byName && p.own != m.Get("own") || !byName && !place {
					continue
				}
				named[m] = true
				name := m.Get("pin")
				if !place {
					s.fault(RulePins, r, p.at, "pin %s is not where it says", name)
				}
				if _, twice := s.pins[name]; twice {
					s.fault(RulePins, r, p.at, "pin %s is drawn twice", name)
					continue
				}
				if _, ok := w.Pins[name]; !ok {
					s.fault(RulePins, r, p.at, "pin %s is not in the circuit", name)
					continue
				}
				s.pins[name] = s.offset[r] + r.node(p.at)
				at[name], where[name] = p.at, r
				break
			}
		}
	}
	for _, g := range r.page.Groups {
		if g.Class == "pin" && !named[g] {
			s.fault(RulePins, r, ink.Point{X: number(g.Get("x")), Y: number(g.Get("y"))}, "pin %s has no symbol", g.Get("pin"))
		}
	}
}

func sortedKeys[V any](m map[string]V) []string {
	out := make([]string, 0, len(m))
	for k := range m {
		out = append(out, k)
	}
	slices.Sort(out)
	return out
}
