package schematic

import (
	"cmp"
	"slices"

	"gloamwright/internal/circuit"
)

// plan is the arrangement of some neighbouring stages on one sheet.
type plan struct {
	boxes []*stageBox
	title string
	xs    []int // left edges of the frames
	end   int   // right edge of the last frame
	tight bool  // plus rails in three rows
	runs  []linkRun
	drops []dropRun
	rails []railRun
}

// linkRun is the way of one link on this sheet.
type linkRun struct {
	link   *link
	pts    []node
	arrive bool // comes from another sheet
	leave  bool // goes on to another sheet
}

// dropRun is the way of one lead from a rail to a left port.
type dropRun struct {
	drop *drop
	x    int // of the upright piece
	pts  []node
}

// railRun is one rail's line on this sheet.
type railRun struct {
	rail   *circuit.Rail
	y      int
	x0, x1 int
	leads  []lead // on the sheet, from the left
	before bool   // comes from a sheet before
	after  bool   // goes on to a sheet after
}

// arrange places stages side by side. It reports false when they need more room
// than one sheet has. Sheet numbers of rails are not known while breaks are being
// sought: a rail with pins outside is then taken to reach the edge.
func (b *book) arrange(boxes []*stageBox, alone bool) (*plan, bool) {
	p, ok := b.arrangeFrom(boxes, alone, 0)
	if !ok || !p.tight {
		return p, ok
	}
	for _, r := range p.rails { // close texts at the left edge need their room
		if s := clearArriving - r.leads[0].x; s > 0 {
			return b.arrangeFrom(boxes, alone, s)
		}
	}
	return p, true
}

// clearArriving is where the first lead may stand when rails arrive in three rows.
const clearArriving = 21

// arrangeFrom is arrange with everything moved right by shift.
func (b *book) arrangeFrom(boxes []*stageBox, alone bool, shift int) (*plan, bool) {
	p := &plan{boxes: boxes}
	index := map[*stageBox]int{}
	for i, x := range boxes {
		index[x] = i
	}
	readings := 0
	for _, x := range boxes {
		readings += x.readings
	}
	if readings > b.readingRows() && !alone {
		return nil, false
	}
	x := 0
	var tracks [][]*track
	for i, bx := range boxes {
		t := p.gapTracks(index, i)
		tracks = append(tracks, t)
		n := len(t)
		if bx.ownLead {
			n++
		}
		gap := gapPlain
		if n > 0 {
			gap = gapFirst + gapTrack*(n-1) + gapFirst
		}
		switch {
		case i == 0 && bx.mains:
			x = colFirst + stripWidth
		case i == 0 && n == 0 && !p.arrives(index, bx):
			x = colFrame
		case i == 0:
			x = max(20, 16+gapFirst+gapTrack*(n-1))
		case bx.mains:
			x += gapPlain + stripWidth + gapTrack*n
		default:
			x += gap
		}
		if i == 0 {
			x += shift
		}
		if i > 0 { // a heading that reaches over needs its room before leads and strip
			over := boxes[i-1].headOver
			if n == 0 && !bx.mains {
				over = max(0, over-2)
			}
			x += over
		}
		p.xs = append(p.xs, x)
		x += bx.st.Sketch.Width
	}
	p.end = x
	last := p.gapTracks(index, len(boxes))
	tracks = append(tracks, last)
	if p.end > colLast && !alone {
		return nil, false
	}
	at := p.placeTracks(tracks)
	ok := b.layRails(p)
	return p, p.placeLinks(index, at) && ok || alone
}

// track is one upright lead in a gap.
type track struct {
	drop *drop
	link *link
	up   bool // goes up into the stage on the right from a low row
	down bool // goes down to a low row from the stage on the left
	x    int
}

// direct reports whether a link runs level through one gap, or straight to the
// edge of the sheet.
func direct(index map[*stageBox]int, n int, k *link) (from, to int, level bool) {
	f, okF := index[k.from]
	t, okT := index[k.to]
	switch {
	case okF && okT:
		return f, t, t == f+1
	case okF:
		return f, n, f == n-1
	}
	return -1, t, t == 0
}

// gapTracks lists the upright leads in the gap before box i, nearest first.
func (p *plan) gapTracks(index map[*stageBox]int, i int) []*track {
	n := len(p.boxes)
	var out []*track
	if i < n {
		drops := slices.Clone(p.boxes[i].drops)
		slices.SortStableFunc(drops, func(a, b *drop) int { return cmp.Compare(a.y, b.y) })
		for _, d := range drops {
			out = append(out, &track{drop: d})
		}
		for _, k := range p.boxes[i].links {
			if k.to != p.boxes[i] {
				continue
			}
			f, _, level := direct(index, n, k)
			switch {
			case !level:
				out = append(out, &track{link: k, up: true})
			case f >= 0 && k.fromY != k.toY:
				out = append(out, &track{link: k})
			}
		}
	}
	if i > 0 {
		for _, k := range p.boxes[i-1].links {
			if k.from != p.boxes[i-1] {
				continue
			}
			if _, _, level := direct(index, n, k); !level {
				out = append(out, &track{link: k, down: true})
			}
		}
	}
	return out
}

func (p *plan) arrives(index map[*stageBox]int, x *stageBox) bool {
	for _, k := range x.links {
		if _, here := index[k.from]; k.to == x && !here {
			return true
		}
	}
	return false
}

// trackColumns says where the upright pieces of links stand.
type trackColumns struct{ ups, downs, turns map[*link]int }

// placeTracks gives every track its column and every drop its way.
func (p *plan) placeTracks(tracks [][]*track) trackColumns {
	at := trackColumns{map[*link]int{}, map[*link]int{}, map[*link]int{}}
	for i, list := range tracks {
		for j, t := range list {
			if i < len(p.boxes) {
				k := j
				if p.boxes[i].ownLead {
					k++
				}
				t.x = p.xs[i] - gapFirst - gapTrack*k
				if p.boxes[i].mains {
					t.x = p.xs[i] - stripWidth - gapFirst - gapTrack*j
				}
			} else {
				t.x = p.end + gapFirst + gapTrack*(len(list)-1-j)
			}
			switch {
			case t.drop != nil:
				y := rowRail + t.drop.y
				p.drops = append(p.drops, dropRun{t.drop, t.x, []node{{t.x, rowRingUpper + 1}, {t.x, y}, {p.xs[i], y}}})
			case t.up:
				at.ups[t.link] = t.x
			case t.down:
				at.downs[t.link] = t.x
			default:
				at.turns[t.link] = t.x
			}
		}
	}
	return at
}

// placeLinks gives every link its way. It reports false when the rows over and under
// the rails do not suffice.
func (p *plan) placeLinks(index map[*stageBox]int, at trackColumns) bool {
	high := p.freeAbove()
	var low []taken
	ok := true
	seen := map[*link]bool{}
	for _, x := range p.boxes {
		for _, k := range x.links {
			if seen[k] {
				continue
			}
			seen[k] = true
			f, t, level := direct(index, len(p.boxes), k)
			from, to := node{colArrive, rowRail + k.toY}, node{colLeave, rowRail + k.fromY}
			if f >= 0 {
				from = node{p.xs[f] + p.boxes[f].st.Sketch.Width, rowRail + k.fromY}
			}
			if t < len(p.boxes) {
				to = node{p.xs[t], rowRail + k.toY}
			}
			r := linkRun{link: k, arrive: f < 0, leave: t == len(p.boxes)}
			switch {
			case level && from.Y == to.Y:
				r.pts = []node{from, to}
			case level:
				r.pts = []node{from, {at.turns[k], from.Y}, {at.turns[k], to.Y}, to}
			default:
				x0, x1 := colArrive, colLeave
				if f >= 0 {
					x0 = at.downs[k]
				}
				if t < len(p.boxes) {
					x1 = at.ups[k]
				}
				y, free := 0, false
				if max(from.Y, to.Y) <= rowRail+highest { // nearer to the upper rows
					y, free = freeRow(&high.in, high.rows, min(x0, x1), max(x0, x1))
				}
				if !free {
					y, free = freeRow(&low, rowsLow, min(x0, x1), max(x0, x1))
				}
				ok = ok && free
				if f >= 0 {
					r.pts = append(r.pts, from, node{x0, from.Y})
				}
				r.pts = append(r.pts, node{x0, y}, node{x1, y})
				if t < len(p.boxes) {
					r.pts = append(r.pts, node{x1, to.Y}, to)
				}
			}
			p.runs = append(p.runs, r)
		}
	}
	return ok
}

// highest is the level under the L+ rail down to which a link between stages that are
// no neighbours runs over the rails: the first coil feed. What is lower runs under L−,
// so as to pass no other coil feed.
const highest = 24

// rowsUsed are rows and the stretches of them that are in use.
type rowsUsed struct {
	rows []int
	in   []taken
}

// freeAbove are the rows of the auxiliary rails, with the rails in them.
func (p *plan) freeAbove() rowsUsed {
	u := rowsUsed{rows: rowsTwo[1:]}
	if p.tight {
		u.rows = rowsThree[1:]
	}
	for _, r := range p.rails {
		if r.rail.Positive {
			u.in = append(u.in, taken{r.y, r.x0, r.x1})
		}
	}
	return u
}

// taken is a stretch of a row that is in use.
type taken struct{ y, x0, x1 int }

// freeRow takes the first row that is free between two columns. With none free it
// returns the last, takes nothing and reports false.
func freeRow(in *[]taken, rows []int, x0, x1 int) (int, bool) {
	for _, r := range rows {
		free := true
		for _, t := range *in {
			free = free && (t.y != r || x1+2 < t.x0 || t.x1+2 < x0)
		}
		if free {
			*in = append(*in, taken{r, x0, x1})
			return r, true
		}
	}
	return rows[len(rows)-1], false
}
