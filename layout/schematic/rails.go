package schematic

import (
	"cmp"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
)

// layRails gives every rail that the stages of p use its line. Rails that carry the
// load take the first free row from the top of rowsPlus, auxiliary ones from the
// second. It reports false when the rows do not suffice.
func (b *book) layRails(p *plan) bool {
	byRail := map[*circuit.Rail]*railRun{}
	var order []*railRun
	at := func(l lead) {
		r := b.railOf[l.term.Pin("out")]
		if r == nil || len(r.Pins) < 2 {
			return
		}
		run := byRail[r]
		if run == nil {
			run = &railRun{rail: r}
			byRail[r] = run
			order = append(order, run)
		}
		run.leads = append(run.leads, l)
	}
	here := map[string]bool{}
	for i, x := range p.boxes {
		here[x.st.Name] = true
		for _, l := range x.leads() {
			at(lead{l.term, p.xs[i] + l.x})
		}
	}
	for _, d := range p.drops {
		at(lead{d.drop.term, d.x})
	}
	first := b.order(p.boxes[0].st.Name)
	for _, run := range order {
		slices.SortStableFunc(run.leads, func(a, b lead) int { return cmp.Compare(a.x, b.x) })
		run.x0, run.x1 = run.leads[0].x, run.leads[len(run.leads)-1].x
		for _, n := range run.rail.Pins {
			if here[n.Part.Stage] {
				continue
			}
			if b.order(n.Part.Stage) < first {
				run.before, run.x0 = true, colArrive
			} else {
				run.after, run.x1 = true, colLeave
			}
		}
	}
	slices.SortStableFunc(order, func(x, y *railRun) int { return cmp.Compare(x.leads[0].x, y.leads[0].x) })
	ok := layRows(order, rowsTwo)
	if !ok {
		p.tight = true
		ok = layRows(order, rowsThree)
	}
	for _, run := range order {
		if !run.rail.Positive {
			run.y = rowMinus
		}
		p.rails = append(p.rails, *run)
	}
	return ok
}

// layRows gives the plus rails rows and reports whether they suffice.
func layRows(order []*railRun, rows []int) bool {
	var in []taken
	ok := true
	for _, main := range []bool{true, false} {
		for _, run := range order {
			if !run.rail.Positive || mainRail(run.rail) != main {
				continue
			}
			from := rows
			if !main {
				from = rows[1:]
			}
			var free bool
			run.y, free = freeRow(&in, from, run.x0, run.x1)
			ok = ok && free
		}
	}
	return ok
}

// mainRail reports whether a rail carries the load; others feed control only.
func mainRail(r *circuit.Rail) bool { return !r.Positive || strings.HasSuffix(r.Name, "L+") }

// order is the rank of a stage in the energy's way; things of no stage come last.
func (b *book) order(stage string) int {
	for i, s := range b.c.Stages {
		if s.Name == stage {
			return i
		}
	}
	return len(b.c.Stages)
}

// drawRails draws the rails of a plan: lines, leads, references, names.
func (b *book) drawRails(sh *Sheet, p *plan) {
	sc := sh.scene
	for _, r := range p.rails {
		before, after := b.neighbours(r.rail, sh.Number)
		for _, l := range r.leads {
			if r.y == rowMinus {
				sc.wire(nil, node{l.x, rowRingLower + 1}, node{l.x, r.y}).name = r.rail.Name
			} else {
				sc.wire(nil, node{l.x, rowRingUpper - 1}, node{l.x, r.y}).name = r.rail.Name
			}
		}
		b.railLine(sh, r)
		if r.before {
			obj, mate := b.railRefer(sh, r.rail, before, node{r.x0, r.y})
			obj.add(arriving(p.over(r.y), r.y, run{s: r.rail.Name, st: nameStyle}, mate))
		}
		if r.after {
			obj, mate := b.railRefer(sh, r.rail, after, node{r.x1, r.y})
			obj.add(leaving(p.over(r.y), r.y, run{s: r.rail.Name, st: nameStyle}, mate))
		}
		if !r.before {
			b.railName(sh, p, r)
		}
	}
}

// over is how far texts stand over a line in that row.
func (p *plan) over(y int) float64 {
	if y > rowsLow[0] {
		return overTight
	}
	for _, r := range p.rails {
		if r.y == y-2 {
			return overTight
		}
	}
	for _, k := range p.runs {
		for _, n := range k.pts {
			if n.Y == y-2 && y < rowMinus {
				return overTight
			}
		}
	}
	return overLine
}

// arriving is the text of a reference at the left edge, leaving one at the right.
func arriving(over float64, y int, name run, mate *place) *line {
	x := float64(colText)
	if over < overLine {
		x = colArrive + 0.3
	}
	return &line{at: point{x, float64(y) - over}, runs: []run{name, {to: mate}}}
}

func leaving(over float64, y int, name run, mate *place) *line {
	x := colLeave + arrowLead + 0.3
	if over < overLine {
		x = colLeave + 0.4
	}
	return &line{at: point{x, float64(y) - over}, anchor: ink.End, runs: []run{name, {to: mate}}}
}

// railLine draws the line of a rail, one stroke for each conductor between
// neighbouring terminals where the order on paper is that of the wires.
func (b *book) railLine(sh *Sheet, r railRun) {
	between := map[[2]*circuit.Pin]*circuit.Conductor{}
	for _, c := range b.c.Conductors {
		if c.Rail == r.rail.Name {
			between[[2]*circuit.Pin{c.From, c.To}] = c
			between[[2]*circuit.Pin{c.To, c.From}] = c
		}
	}
	x := r.x0
	var last *circuit.Pin
	add := func(to int, c *circuit.Conductor) {
		if to == x {
			return
		}
		w := sh.scene.wire(c, node{x, r.y}, node{to, r.y})
		w.rail, w.thick, w.name = true, mainRail(r.rail), r.rail.Name
		x = to
	}
	for _, l := range r.leads {
		pin := l.term.Pin("out")
		add(l.x, between[[2]*circuit.Pin{last, pin}])
		last = pin
	}
	add(r.x1, nil)
}

// railName writes name, size and colour of a rail over its left end, in the first
// place that no lead passes through; where there is none only the name, after its
// right end.
func (b *book) railName(sh *Sheet, p *plan, r railRun) {
	text := []run{{s: r.rail.Name, st: nameStyle}}
	detail := strings.TrimSpace(r.rail.Size.String() + " " + r.rail.Colour)
	full := append(text, run{s: detail, st: valueStyle})
	if r.rail.Size.Area == 0 {
		full = text
	}
	var posts []int // leads that pass through the text's row
	for _, o := range p.rails {
		for _, l := range o.leads {
			if r.y == rowMinus || o.y < r.y {
				posts = append(posts, l.x)
			}
		}
	}
	for _, k := range p.runs {
		for i := 1; i < len(k.pts); i++ {
			a, z := k.pts[i-1], k.pts[i]
			if a.X == z.X && (r.y == rowMinus && max(a.Y, z.Y) > rowMinus || r.y < rowMinus && min(a.Y, z.Y) < r.y) {
				posts = append(posts, a.X)
			}
		}
	}
	y := float64(r.y) - p.over(r.y)
	end := float64(r.x1)
	if r.after {
		end -= 8
	}
	name := "rail " + r.rail.Name
	obj := sh.scene.object(classRail, b.railKey[r.rail]+"-name", name)
	tries := [][]run{full, text}
	if r.after { // its reference bears the name
		tries = tries[:1]
	}
	for i, t := range tries {
		l := &line{at: point{0, y}, runs: t}
		w := l.width()
		for x := float64(r.x0) + 2; x+w < end; x += 0.5 {
			clear := true
			for _, q := range posts {
				clear = clear && (float64(q) < x-0.4 || float64(q) > x+w+0.4)
			}
			if clear {
				if i > 0 || x > float64(r.x0)+2 {
					sh.scene.moved++
				}
				l.at.X = x
				obj.add(l)
				return
			}
		}
	}
	if !r.after {
		sh.scene.moved++
		obj.add(&line{at: point{float64(r.x1) + 0.8, float64(r.y) + 0.5}, runs: text})
	}
}
