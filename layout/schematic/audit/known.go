package audit

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/design"
	"gloamwright/internal/stage"
)

// FromDesign is what a set of sheets is measured against: the energy's ways as the
// description states them, and the forms of stages and circuits.
func FromDesign(d *design.Design) *Known {
	k := &Known{Forms: map[string]string{}}
	kinds := map[string]string{} // of luminaire types
	if d.Site != nil {
		for _, t := range d.Site.Luminaires {
			kinds[t.Name.Val] = t.Kind.Val
		}
		fields := map[string][]describe.Field{}
		for _, x := range stage.Kinds() {
			fields[x.Name] = x.Fields
		}
		for _, s := range d.Site.Stages {
			for _, f := range fields[s.Kind.Val] {
				if f.Type != describe.StageRef {
					continue
				}
				r, ok := describe.Get[describe.Ref](s.Fields, f.Name)
				switch {
				case !ok:
				case f.Feeds:
					k.Flow = append(k.Flow, [2]string{s.Name.Val, r.Val.Stage})
				default:
					k.Flow = append(k.Flow, [2]string{r.Val.Stage, s.Name.Val})
				}
			}
		}
	}
	for _, s := range d.Circuit.Stages {
		if s.Sketch == nil {
			continue
		}
		var b strings.Builder
		b.WriteString(s.Kind)
		for _, p := range s.Parts {
			fmt.Fprintf(&b, " %s %v", p.Kind, p.Lower)
		}
		k.Forms["stage "+s.Name] = b.String()
	}
	for _, bd := range d.Circuit.Boards {
		for _, w := range bd.Ways {
			if l := w.Lighting; l != nil {
				k.Forms["circuit "+l.Name] = formOf(l.Points, l.TestPoint, kinds)
			}
		}
	}
	return k
}

// formOf writes a run: a luminaire by its kind, a new size and the far end marked, side
// runs in brackets.
func formOf(run []*circuit.Point, far *circuit.TestPoint, kinds map[string]string) string {
	var b strings.Builder
	for i, p := range run {
		if i > 0 && p.Leg.Size != run[i-1].Leg.Size {
			b.WriteString(" size")
		}
		b.WriteString(" " + kinds[p.Type])
		if far != nil && far.Red.Part == p.Luminaire {
			b.WriteString(" far")
		}
		for _, side := range p.Branches {
			if side[0].Leg.Size != p.Leg.Size {
				b.WriteString(" size")
			}
			b.WriteString(" (" + formOf(side, far, kinds) + ")")
		}
	}
	return b.String()
}

// flowOf counts for every sheet the references to its stages that run left to right.
func flowOf(readers []*reader, k *Known) []tally {
	type spotOn struct {
		reader int
		x      float64
	}
	at := map[string]spotOn{}
	for i, r := range readers {
		for name, b := range r.frames() {
			if _, ok := at[name]; !ok { // a board goes on over several sheets
				at[name] = spotOn{i, b.X + b.W/2}
			}
		}
	}
	out := make([]tally, len(readers))
	for _, e := range k.Flow {
		from, ok1 := at[e[0]]
		to, ok2 := at[e[1]]
		if !ok1 || !ok2 {
			continue
		}
		out[to.reader].all++
		if cmp.Or(cmp.Compare(from.reader, to.reader), cmp.Compare(from.x, to.x)) <= 0 {
			out[to.reader].good++
		}
	}
	return out
}

// twinsOf counts for every sheet the stages and circuits of a form that occurs more
// than once, and those drawn as the first of it.
func twinsOf(readers []*reader, k *Known) []tally {
	type thing struct {
		name   string
		reader int
	}
	pictures := map[string][]string{} // places of the symbols, sheet by sheet
	first := map[string]thing{}
	var things []thing
	for i, r := range readers {
		marks := map[string][]mark{}
		for _, x := range r.symbols {
			if x.group == nil || !x.group.In("part") {
				continue
			}
			name := "circuit " + x.group.Get("circuit")
			if x.group.Get("circuit") == "" {
				name = "stage " + x.group.Get("stage")
			}
			if k.Forms[name] != "" && (x.sym == nil || !x.onlyInside(r)) {
				id := ""
				if x.sym != nil {
					id = x.sym.ID
				}
				marks[name] = append(marks[name], mark{id, spotOf(x.at)})
			}
		}
		var names []string
		for n := range marks {
			names = append(names, n)
		}
		slices.Sort(names)
		for _, n := range names {
			pictures[n] = append(pictures[n], picture(marks[n]))
			things = append(things, thing{n, i})
			if f := k.Forms[n]; first[f].name == "" {
				first[f] = thing{n, i}
			}
		}
	}
	count := map[string]map[string]bool{}
	for _, t := range things {
		f := k.Forms[t.name]
		if count[f] == nil {
			count[f] = map[string]bool{}
		}
		count[f][t.name] = true
	}
	out := make([]tally, len(readers))
	for _, t := range things {
		f := k.Forms[t.name]
		if len(count[f]) < 2 {
			continue
		}
		out[t.reader].all++
		if slices.Equal(pictures[t.name], pictures[first[f].name]) {
			out[t.reader].good++
		}
	}
	return out
}

// mark is a symbol in its place.
type mark struct {
	id string
	at spot
}

// picture writes symbols and their places from the upper left one.
func picture(list []mark) string {
	slices.SortFunc(list, func(a, b mark) int {
		return cmp.Or(cmp.Compare(a.at.y, b.at.y), cmp.Compare(a.at.x, b.at.x), cmp.Compare(a.id, b.id))
	})
	var b strings.Builder
	o := list[0].at
	for _, m := range list {
		fmt.Fprintf(&b, "%s %d %d;", m.id, m.at.x-o.x, m.at.y-o.y)
	}
	return b.String()
}
