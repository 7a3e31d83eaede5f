package schematic

import (
	"cmp"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
)

// drawLinks draws the leads between stages and those that come down from a rail.
func (b *book) drawLinks(sh *Sheet, p *plan) {
	sc := sh.scene
	for _, d := range p.drops {
		sc.wire(d.drop.wire, d.pts...)
		sc.ring(d.drop.term, node{d.x, rowRingUpper}, false)
		if c := d.drop.wire; c != nil {
			sc.number(c, textAt(float64(d.x)-0.5, rowDropNumber, c.Number, wireStyle, ink.End))
		}
	}
	pairs := map[*circuit.Cable][]linkRun{}
	var cables []*circuit.Cable
	for _, r := range p.runs {
		sc.wire(r.link.wire, r.pts...).name = "link " + r.link.key
		b.linkReferences(sh, p, r)
		c := r.link.cable
		if c == nil {
			b.linkNumber(sh, p, r)
			continue
		}
		if pairs[c] == nil {
			cables = append(cables, c)
		}
		pairs[c] = append(pairs[c], r)
	}
	for _, c := range cables {
		b.linkCable(sh, p, c, pairs[c])
	}
}

// linkNumber writes the wire number over the level end of a link, in the gap, left of
// any upright lead; or beside the link's own upright piece.
func (b *book) linkNumber(sh *Sheet, p *plan, r linkRun) {
	c := r.link.wire
	if c == nil {
		return
	}
	a, z := r.pts[0], r.pts[1]
	x := float64(a.X+z.X) / 2
	switch {
	case len(r.pts) > 2 && !r.arrive:
		sh.scene.number(c, textAt(float64(r.pts[1].X)-0.5, float64(r.pts[1].Y+r.pts[2].Y)/2+0.5, c.Number, wireStyle, ink.End))
		return
	case r.arrive && len(r.pts) == 2: // the reference says it
		return
	case r.arrive: // beside the piece that comes to the stage
		up, down := r.pts[1], r.pts[2]
		y := float64(up.Y+down.Y)/2 + textHeight/2
		if between(up.Y, rowDropNumber, down.Y) {
			y = rowDropNumber
		}
		sh.scene.number(c, textAt(float64(up.X)-0.5, y, c.Number, wireStyle, ink.End))
		return
	case r.leave:
		x = float64(a.X) + 3
	case !r.arrive && p.crossed(a, z):
		x = float64(a.X) + gapFirst/2.0
		sh.scene.moved++
	}
	sh.scene.number(c, textAt(x, float64(a.Y)-overTight, c.Number, wireStyle, ink.Middle))
}

// crossed reports whether an upright lead passes through a level piece.
func (p *plan) crossed(a, z node) bool {
	passes := func(pts []node) bool {
		for i := 1; i < len(pts); i++ {
			if q, r := pts[i-1], pts[i]; q.X == r.X && a.X < q.X && q.X < z.X && between(q.Y, a.Y, r.Y) {
				return true
			}
		}
		return false
	}
	for _, d := range p.drops {
		if passes(d.pts) {
			return true
		}
	}
	for _, k := range p.runs {
		if passes(k.pts) {
			return true
		}
	}
	for i, x := range p.boxes {
		if x.ownLead && p.xs[i]-gapFirst > a.X && p.xs[i]-gapFirst < z.X {
			return true
		}
	}
	return false
}

// linkReferences draws the ends of a link that goes on to another sheet.
func (b *book) linkReferences(sh *Sheet, p *plan, r linkRun) {
	name := "signal"
	if c := r.link.wire; c != nil {
		name = c.Number
	}
	if r.arrive {
		at := r.pts[0]
		obj, mate := b.refer(sh, r.link.key, name, false, 'W', at)
		obj.add(arriving(p.over(at.Y), at.Y, run{s: name, st: wireStyle}, mate))
	}
	if r.leave {
		at := r.pts[len(r.pts)-1]
		obj, mate := b.refer(sh, r.link.key, name, true, 'E', at)
		obj.add(leaving(p.over(at.Y), at.Y, run{s: name, st: wireStyle}, mate))
	}
}

// linkCable draws the oval around a pair of links that are cores of one cable, and
// writes its name at the first place right of it.
func (b *book) linkCable(sh *Sheet, p *plan, c *circuit.Cable, runs []linkRun) {
	o := sh.scene.cable(c)
	first, last := runs[0].pts[0], runs[len(runs)-1].pts[0]
	x := float64(first.X) + float64(gapPlain)/2 + 0.5
	if runs[0].arrive {
		x = float64(runs[0].pts[1].X) - 1.5
	}
	mid, half := float64(first.Y+last.Y)/2, float64(last.Y-first.Y)/2+0.7
	o.add(&oval{at: point{x, mid}, rx: 0.45, ry: half})
	tx := x + 2.4
	if runs[0].leave {
		tx = x + 1
	}
	b.cableText(o, c, tx, float64(first.Y)-1.2-linePitch)
}

// nameTerminals writes strip and number at every ring, from the left; the first of
// a row and of another strip bears the full name. Odd numbers of level wires stand
// above, even ones below.
func (b *book) nameTerminals(sh *Sheet) {
	rings := slices.Clone(sh.scene.rings)
	row := func(r ringAt) int {
		if r.level {
			return 0
		}
		return r.at.Y
	}
	slices.SortStableFunc(rings, func(a, z ringAt) int {
		return cmp.Or(cmp.Compare(row(a), row(z)), cmp.Compare(a.at.X, z.at.X), cmp.Compare(a.at.Y, z.at.Y))
	})
	last := map[int]string{}
	for _, r := range rings {
		strip, number, _ := strings.Cut(r.term.Designation, ":")
		name := ":" + number
		if last[row(r)] != strip {
			name = r.term.Designation
		}
		last[row(r)] = strip
		x, y := float64(r.at.X), float64(r.at.Y)
		l := textAt(x-0.7, y+textHeight/2, name, valueStyle, ink.End)
		if r.level {
			even := number != "" && (number[len(number)-1]-'0')%2 == 0
			l = textAt(x, y-0.8, name, valueStyle, ink.Middle)
			if even {
				l.at.Y = y + 1.9
			}
		}
		sh.scene.terminalObject(r.term).add(l)
	}
}

// blackProbe marks the place of the black probe, on L−, on the sheet that draws its
// terminal.
func (b *book) blackProbe(sh *Sheet, p *plan) {
	if b.c.Black == nil {
		return
	}
	for _, r := range p.rails {
		if r.y != rowMinus {
			continue
		}
		here := false
		for _, l := range r.leads {
			here = here || l.term == b.c.Black.Part
		}
		if !here {
			continue
		}
		for x := r.x1 - 3; x > r.x0+2; x-- {
			if b.freeBelow(p, r, x) {
				if x < r.x1-3 {
					sh.scene.moved++
				}
				tp := &circuit.TestPoint{Key: "black", Label: BlackLabel, Shows: "L−, for the black probe", Red: b.c.Black}
				b.probe(sh, tp, node{x, rowMinus}, "S")
				return
			}
		}
	}
}

// BlackLabel is the label of the place where the black probe rests.
const BlackLabel = "TP0"

// freeBelow reports whether a test point at x of rail r has room: right of the last
// frame's leads when it can, clear of leads and of the leads in the low rows.
func (b *book) freeBelow(p *plan, r railRun, x int) bool {
	if r.after && x > colLeave-14 {
		return false
	}
	for _, l := range r.leads {
		if x-l.x < 3 && l.x-x < 3 {
			return false
		}
	}
	for _, k := range p.runs {
		for i := 1; i < len(k.pts); i++ {
			a, z := k.pts[i-1], k.pts[i]
			if max(a.Y, z.Y) > rowMinus && min(a.X, z.X)-6 < x && x < max(a.X, z.X)+2 {
				return false
			}
		}
	}
	return true
}
