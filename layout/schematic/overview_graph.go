package schematic

import (
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/stage"
)

// vertex is a stage on the overview. A photocell's sensor in a place of its own stands
// beside its photocell.
type vertex struct {
	name   string
	box    *stageBox      // nil for a board
	board  *circuit.Board // nil for other stages
	sensor *circuit.Place
	in     []*arc
	out    []*arc

	on       *blockSheet // nil until it has a cell
	col, row int
	list     bool // a board that is drawn as a list of its ways
}

// partsStage is the name of the block that single parts stand in; no stage of a
// description bears it.
const partsStage = "+parts"

// arc is one connection of two stages as the description states it.
type arc struct {
	from, to *vertex
	energy   bool // on the way to the lights, or into the battery
	coil     bool // holds a relay in

	pts   []node // its line, empty where a reference stands for it
	joint bool   // it begins with a dot on the battery's rail
}

func (v *vertex) kind() string {
	if v.box != nil {
		return v.box.st.Kind
	}
	return "distribution-board"
}

func (v *vertex) heading() string {
	if v.board != nil {
		return v.board.Title
	}
	return v.box.st.Heading
}

// fed reports whether mains feeds the stage itself.
func (v *vertex) fed() bool { return v.box != nil && v.box.mains }

// energyFrom is the stage that the energy comes from, nil at a source.
func (v *vertex) energyFrom() *vertex {
	for _, a := range v.in {
		if a.energy {
			return a.from
		}
	}
	return nil
}

// below are the stages that the energy goes on to.
func (v *vertex) below() []*vertex {
	var out []*vertex
	for _, a := range v.out {
		if a.energy && !slices.Contains(out, a.to) {
			out = append(out, a.to)
		}
	}
	return out
}

// depth is the number of stages on the longest way on from v, boards that stand apart
// as lists not counted.
func (v *vertex) depth(guard int) int {
	n := 0
	if guard > 0 {
		for _, w := range v.below() {
			if !w.list {
				n = max(n, 1+w.depth(guard-1))
			}
		}
	}
	return n
}

// graph returns the stages and how the description connects them, in the energy's
// order, so that the order of the file does not show. Boards that hang on boards are
// left out: the boards' lists show them.
func (b *book) graph() []*vertex {
	var out []*vertex
	byName := map[string]*vertex{}
	boxes := map[string]*stageBox{}
	for _, x := range b.boxes() {
		boxes[x.st.Name] = x
	}
	boards := map[string]*circuit.Board{}
	for _, bd := range b.c.Boards {
		boards[bd.Name] = bd
	}
	for _, st := range b.c.Stages {
		v := &vertex{name: st.Name, box: boxes[st.Name], board: boards[st.Name]}
		if v.box == nil && (v.board == nil || v.board.Parent != nil) {
			continue
		}
		if v.box != nil && st.Kind == "photocell" {
			for _, it := range st.Sketch.Items {
				if it.Op == circuit.OpPlace {
					v.sensor = it.Place
				}
			}
		}
		out = append(out, v)
		byName[st.Name] = v
	}
	if b.d.Site != nil {
		b.joinStages(out, byName)
	}
	return out
}

// joinStages reads the connections from the references of the description.
func (b *book) joinStages(list []*vertex, byName map[string]*vertex) {
	join := func(from, to *vertex, energy, coil bool) {
		if from == nil || to == nil || from == to {
			return
		}
		a := &arc{from: from, to: to, energy: energy, coil: coil}
		from.out, to.in = append(from.out, a), append(to.in, a)
	}
	for _, v := range list {
		s := b.stageNamed(v.name)
		if s == nil {
			continue
		}
		for _, f := range fieldsOf(v.kind()) {
			r, ok := describe.Get[describe.Ref](s.Fields, f.Name)
			if !ok {
				continue
			}
			other := byName[r.Val.Stage]
			if f.Feeds {
				join(v, other, f.Port == "charge", f.Port == "coil")
				continue
			}
			coil := f.Name == "coil"
			join(other, v, !coil && b.inTheWay(v), coil)
		}
	}
	// single parts and test points hang on the rails that they name
	if v := byName[partsStage]; v != nil {
		var seen []string
		see := func(net string) {
			if name, port, dotted := strings.Cut(net, "."); dotted && port != "minus" {
				seen = append(seen, name)
			}
		}
		for _, p := range b.d.Site.Parts {
			for _, n := range p.Pins {
				see(n.Net.Val)
			}
		}
		for _, p := range b.d.Site.TestPoints {
			see(p.At_.Val)
		}
		for _, w := range list {
			if slices.Contains(seen, w.name) {
				join(w, v, false, false)
			}
		}
	}
	// what feeds nothing but coils is no way of energy
	for changed := true; changed; {
		changed = false
		for _, v := range list {
			if len(v.out) == 0 || len(v.below()) > 0 || v.energyFrom() == nil || v.kind() == "battery" || v.kind() == "changeover-relay" {
				continue
			}
			if slices.ContainsFunc(v.out, func(a *arc) bool { return a.coil }) {
				for _, a := range v.in {
					changed = changed || a.energy
					a.energy = false
				}
			}
		}
	}
}

// inTheWay reports whether a stage stands in the plus line of what it takes from.
func (b *book) inTheWay(v *vertex) bool {
	switch v.kind() {
	case "linear-charger", "isolator", "low-voltage-disconnect", "changeover-relay", "distribution-board":
		return true
	case "meter":
		reads, _ := stageField[string](b, v.name, "reads")
		return reads == "amps"
	}
	return false
}

// fieldsOf are the references that a stage kind takes.
func fieldsOf(kind string) []describe.Field {
	var out []describe.Field
	for _, k := range stage.Kinds() {
		if k.Name != kind {
			continue
		}
		for _, f := range k.Fields {
			if f.Type == describe.StageRef {
				out = append(out, f)
			}
		}
	}
	return out
}

// stageNamed is a stage of the description.
func (b *book) stageNamed(name string) *describe.Stage {
	for _, s := range b.d.Site.Stages {
		if s.Name.Val == name {
			return s
		}
	}
	return nil
}
