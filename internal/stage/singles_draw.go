package stage

import (
	"slices"

	"gloamwright/internal/circuit"
)

// alone draws what stands on a rail without parts: terminals and test points.
func (x *singles) alone(n *net, left int) int {
	b := x.b
	if n.free() {
		return left
	}
	op, from, to := circuit.OpUp, stubLength, upEnd
	if n.minus() {
		op, from, to = circuit.OpDown, downEnd-stubLength+upEnd, downEnd
	}
	lead := func(local string, col, length int) *circuit.Part {
		t := b.Terminal(cabinet, local)
		t.Lower = n.minus()
		b.onRail(b.rails[n.rail], t.Pin("out"))
		pts := []int{col, from, col, to}
		if length == 0 {
			pts = []int{col, to}
		}
		b.add(circuit.SketchItem{Op: op, Part: t, Rail: b.rails[n.rail].Name, Pts: points(pts)})
		return t
	}
	for _, s := range n.ends {
		s.part = lead(s.d.Name.Val, left+labelColumn, 0)
		s.part.Key, s.part.At = "parts/"+s.d.Name.Val, s.d.Pos
		left += labelColumn
	}
	for _, t := range n.points {
		term := lead("tp/"+t.Name.Val, left+labelColumn, stubLength)
		tp := b.TestPoint(t.Name.Val, capital(t.Name.Val), term.Pin("in"))
		term.Key, tp.Key = partsStage+"/terminal/"+cabinet+"/tp/"+t.Name.Val, partsStage+"/tp/"+t.Name.Val // wherever it is drawn
		side := "S"
		if n.minus() {
			side = "N"
		}
		b.point(tp, float64(left+labelColumn), float64(from), side)
		left += labelColumn + probeRoom
	}
	return left
}

// tap is where a run meets a bus.
type tap struct {
	pin  *circuit.Pin
	x, y int // of the pin's side of the line
}

// groupDrawing is a group being drawn.
type groupDrawing struct {
	x    *singles
	g    *group
	slot [2]int
	rows []int // rows of the buses
	taps map[*net][]tap
}

// run draws a run's parts and the wires between them; its ends go to rails, or are
// noted for the bus.
func (d *groupDrawing) run(r *run) {
	b := d.x.b
	col, y := r.col.x, firstRow
	if r.top.level >= 0 {
		y = d.rows[r.top.level]
	}
	above := r.top
	var from *circuit.Pin
	fromX, fromY := col, 0
	for i, s := range r.list {
		below := r.bottom
		if i < len(r.links) {
			below = r.links[i]
		}
		upper, lower := s.pin(above), s.pin(below)
		h := s.height(d.slot)
		mid := y + h/2
		topY, endY, endX := mid-halfSymbol, mid+halfSymbol, col
		if s.kind.Name == "contact" {
			mid = y + h - h/2 + 1
			topY, endY, endX = mid, mid, col+contactJog
		}
		d.part(s, col, mid, upper.Name == s.pins[0])
		if i == 0 {
			d.begin(r, upper, col, topY, s)
		} else {
			w := b.Wire(from, upper, true, bridgeLength)
			w.At = s.d.Pos
			pts := []int{fromX, fromY}
			if fromX != col { // out of a contact
				pts = append(pts, col, fromY)
			}
			b.line(w, append(pts, d.down(s, col, topY)...)...)
			switch {
			case d.slot[0] < roomy:
				if len(above.points) == 0 {
					b.number(w, float64(col)+rightNumber, float64(fromY+topY)/2+0.5)
				}
			case fromX != col: // clear of the contact's marks
				b.number(w, float64(col), float64(fromY)+4.2)
			default:
				b.number(w, float64(col), float64(fromY)+2.6)
			}
			for _, t := range above.points {
				b.point(b.TestPoint(t.Name.Val, capital(t.Name.Val), upper), float64(col), float64((fromY+topY)/2), "E")
			}
		}
		from, fromX, fromY = lower, endX, endY
		if s.kind.Name == "contact" { // the line goes on behind the contact
			fromX = col + contactJog - contactLead
		}
		col, y, above = endX, y+h, below
	}
	d.finish(r, from, fromX, fromY, col, y)
}

// lowestLabel is the level of a last pin down to which the number of its lead has room
// on the left.
const lowestLabel = 44

// rightNumber is where a number ends that stands right of its line.
const rightNumber = 3.4

// down is the way from above to a part's upper pin: straight, or round the corner into
// a contact.
func (d *groupDrawing) down(s *single, col, y int) []int {
	if s.kind.Name == "contact" {
		return []int{col, y, col + contactLead, y}
	}
	return []int{col, y}
}

// begin joins a run's first pin to its rail, or notes it for the bus.
func (d *groupDrawing) begin(r *run, pin *circuit.Pin, col, y int, s *single) {
	b := d.x.b
	way := d.down(s, col, y)
	slices.Reverse(way)
	for i := 0; i+1 < len(way); i += 2 { // reversing swapped x and y
		way[i], way[i+1] = way[i+1], way[i]
	}
	if r.top.free() {
		d.taps[r.top] = append(d.taps[r.top], tap{pin, col, y})
		if len(way) > 2 && !r.top.loose() {
			b.line(nil, way...)
		}
		return
	}
	w := b.lead(circuit.OpUp, "part/"+s.d.Name.Val+"/"+pin.Name, pin, r.top.rail, append(way, col, upEnd)...)
	w.At = s.d.Pos
	b.number(w, float64(col), 5)
}

// finish joins a run's last pin, whose line stands at x, y, to its rail or notes it for
// the bus.
func (d *groupDrawing) finish(r *run, pin *circuit.Pin, x, y, col, slotEnd int) {
	b := d.x.b
	s := r.list[len(r.list)-1]
	way := []int{x, y}
	if x != col { // out of a contact and down
		way = append(way, col, y)
	}
	local := "part/" + s.d.Name.Val + "/" + pin.Name
	switch {
	case r.bottom.free():
		d.taps[r.bottom] = append(d.taps[r.bottom], tap{pin, col, y})
		if len(way) > 2 && !r.bottom.loose() {
			b.line(nil, way...)
		}
	case r.bottom.minus():
		w := b.lead(circuit.OpDown, local, pin, Minus, append(way, col, downEnd)...)
		w.At = s.d.Pos
		at := float64(col)
		if y > lowestLabel { // the last part's ratings stand there
			at += rightNumber
		}
		b.number(w, at, 48.5)
	default: // back up to another plus rail
		w := b.lead(circuit.OpUp, local, pin, r.bottom.rail, append(way, col, slotEnd, col+returnStep, slotEnd, col+returnStep, upEnd)...)
		w.At = s.d.Pos
		b.number(w, float64(col+returnStep), 5)
	}
}

// part draws the symbol of s in the line at x, its middle at y.
func (d *groupDrawing) part(s *single, x, y int, upright bool) {
	b := d.x.b
	switch {
	case s.kind.Name == "contact":
		name := partField[string](s.d, "is")
		common := s.pins[0]
		other := s.pins[1]
		if !upright {
			common, other = other, common
		}
		b.symbol(name, s.part, float64(x+contactLead+halfSymbol), float64(y), "H", "C", "1", common, "2", other)
	case s.kind.Polar || s.kind.Name == "capacitor" && polarised(s):
		symbol := s.kind.Symbol
		if s.kind.Name == "capacitor" {
			symbol = "capacitor_pol"
		}
		turn := "V"
		if !upright {
			turn = "U"
		}
		b.symbol(symbol, s.part, float64(x), float64(y), turn, "L")
	case upright:
		b.symbol(s.kind.Symbol, s.part, float64(x), float64(y), "V", "L")
	default:
		b.symbol(s.kind.Symbol, s.part, float64(x), float64(y), "V", "L", "1", s.pins[1], "2", s.pins[0])
	}
}

// bus draws a net where more than two things meet: level between its taps, with the
// wires from pin to pin along it.
func (d *groupDrawing) bus(n *net) {
	b := d.x.b
	taps := d.taps[n]
	slices.SortStableFunc(taps, func(p, q tap) int { return p.x - q.x })
	y := d.rows[n.level]
	for i, t := range taps {
		if i == 0 {
			continue
		}
		before := taps[i-1]
		w := b.Wire(before.pin, t.pin, true, bridgeLength)
		pts := []int{before.x, y}
		if i == 1 && before.y != y {
			pts = []int{before.x, before.y, before.x, y}
		}
		if t.x != before.x {
			pts = append(pts, t.x, y)
		}
		b.line(w, append(pts, t.x, t.y)...)
		shared := slices.ContainsFunc(taps, func(o tap) bool { return o != t && o.x == t.x })
		switch at := float64(t.x); { // where no label stands
		case shared:
			b.number(w, at+rightNumber, float64(y)+1.6)
		case t.y > y:
			b.number(w, at, float64(y)-0.6)
		default:
			b.number(w, at, float64(y)+1.6)
		}
	}
	if len(taps) == 0 {
		return
	}
	first, last := taps[0], taps[len(taps)-1]
	for i, s := range n.ends { // one under the other, right of the bus
		t := b.Terminal(cabinet, s.d.Name.Val)
		t.Key, t.At, s.part = "parts/"+s.d.Name.Val, s.d.Pos, t
		w := b.Wire(last.pin, t.Pin("in"), true, bridgeLength)
		pts := []int{last.x + 1, y, last.x + 1, y + 2*i, last.x + 2, y + 2*i}
		if i == 0 {
			pts = []int{last.x, y, last.x + 2, y}
			if len(taps) == 1 {
				pts = append([]int{last.x, last.y}, pts...)
			}
		}
		b.line(w, pts...)
		b.add(circuit.SketchItem{Op: circuit.OpTerminal, Part: t, X: float64(last.x + 3), Y: float64(y + 2*i)})
	}
	for _, t := range n.points {
		at := first.x + 3
		if len(taps) == 1 || last.x == first.x {
			at = first.x
			y = (first.y + d.rows[n.level]) / 2
		}
		b.point(b.TestPoint(t.Name.Val, capital(t.Name.Val), first.pin), float64(at), float64(y), "S")
	}
}
