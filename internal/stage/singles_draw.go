package stage

import (
	"fmt"
	"slices"

	"gloamwright/internal/circuit"
)

// Measures of the block of single parts, in modules. Labels stand left of the parts;
// a contact stands level and moves its run to the right.
const (
	labelColumn = 10  // from a column's left edge to its line
	columnGap   = 1   // from a column's right edge to the next
	contactJog  = 10  // from a run's line to its line behind a contact
	contactLead = 3   // from the line to the contact's pin
	returnStep  = 4   // from a run's line to the one that goes back up
	probeRoom   = 7   // right of a line with a test point
	endRoom     = 4   // right of the last line of a bus with a terminal
	blockWidth  = 110 // at most, unless one group is wider
	firstRow    = 6   // where the first band of parts begins
	lastRow     = 50  // where the last must end
	headingRoom = 3   // left of the first column, for the heading
	halfSymbol  = 2
	stubLength  = 8 // of the lead to a test point on a rail
)

// slots are the heights that a part and a contact take in a band, from roomy to tight.
var slots = [][2]int{{9, 11}, {8, 10}, {7, 9}, {6, 8}, {5, 8}}

// column is an upright strip of the drawing: the runs that stand in it one under the
// other.
type column struct {
	x      int // of its line
	jogs   int
	points bool
	back   bool // its run goes back up
	end    bool // a bus ends in a terminal right of it
	lowest *net // where its last run ends
}

func (c *column) width() int {
	w := labelColumn + contactJog*c.jogs + columnGap
	if c.back {
		w += returnStep
	}
	if c.points {
		w += probeRoom
	}
	if c.end {
		w += endRoom
	}
	return w
}

// columns puts the runs into columns: one that begins on the bus where the first one
// above ends stands under it, all others get a column of their own. So no bus is met
// from all four sides.
func (g *group) columns() (cols []*column) {
	for _, r := range g.runs {
		jogs := 0
		for _, s := range r.list {
			if s.kind.Name == "contact" {
				jogs++
			}
		}
		back := r.top.level == r.bottom.level
		under := slices.IndexFunc(cols, func(c *column) bool { return c.lowest == r.top && r.top.free() && c.jogs == 0 })
		if first := g.firstAt(cols, r.top); under >= 0 && jogs == 0 && !back && under == first {
			r.col = cols[under]
			r.col.lowest = r.bottom
		} else {
			r.col = &column{jogs: jogs, back: back, lowest: r.bottom}
			cols = append(cols, r.col)
		}
		for _, n := range append(slices.Clone(r.links), r.top) {
			r.col.points = r.col.points || n.free() && len(n.points) > 0
		}
	}
	for _, n := range g.nets {
		if n.free() && len(n.ends) > 0 && len(n.at) > 0 {
			g.last(n).col.end = true
		}
	}
	return cols
}

// firstAt is the leftmost column that touches the bus of n so far.
func (g *group) firstAt(cols []*column, n *net) int {
	for i, c := range cols {
		for _, r := range g.runs {
			if r.col == c && (r.top == n || r.bottom == n) {
				return i
			}
		}
	}
	return -1
}

// last is the run that touches the bus of n in the rightmost column.
func (g *group) last(n *net) *run {
	var out *run
	for _, r := range g.runs {
		if r.col != nil && (r.top == n || r.bottom == n) {
			out = r
		}
	}
	return out
}

func (g *group) width() int {
	if len(g.runs) == 0 {
		return len(g.nets[0].ends)*labelColumn + len(g.nets[0].points)*(labelColumn+probeRoom)
	}
	w := 0
	for _, c := range g.columns() {
		w += c.width()
	}
	return w
}

// draw fills blocks with the groups from left to right.
func (x *singles) draw(groups []*group) {
	var blocks [][]*group
	left := 0
	for _, g := range groups {
		w := g.width()
		if len(blocks) == 0 || left+w > blockWidth {
			blocks = append(blocks, nil)
			left = 0
		}
		left += w
		blocks[len(blocks)-1] = append(blocks[len(blocks)-1], g)
	}
	for i, list := range blocks {
		x.begin(i, len(blocks))
		for _, g := range list {
			for _, s := range g.list {
				s.part = x.part(s)
			}
		}
	}
	for i, list := range blocks {
		x.b.cur = x.b.C.Stages[len(x.b.C.Stages)-len(blocks)+i]
		x.b.sketch(0)
		left := headingRoom
		for _, g := range list {
			left = x.group(g, left)
		}
		x.b.sk.Width = left + 2
		x.b.cur.Sketch = x.b.sk
	}
}

// begin adds the i-th block.
func (x *singles) begin(i, of int) {
	b := x.b
	b.cur = &circuit.Stage{Name: partsStage, Kind: "parts", Heading: "Parts", Place: b.places[cabinet]}
	if i > 0 {
		b.cur.Name += fmt.Sprint(i + 1)
	}
	if of > 1 {
		b.cur.Heading += fmt.Sprintf(" %d", i+1)
	}
	if len(b.Site.Parts) > 0 {
		b.cur.At = b.Site.Parts[0].Pos
	} else {
		b.cur.At = b.Site.TestPoints[0].Pos
	}
	b.C.Stages = append(b.C.Stages, b.cur)
}

// part builds a single part, or the contact of a relay.
func (x *singles) part(s *single) *circuit.Part {
	b := x.b
	if s.relay != nil {
		return x.contact(s)
	}
	if s.part != nil { // a relay that one of its contacts has built
		return s.part
	}
	kind := s.kind.Part
	if s.kind.Name == "capacitor" && polarised(s) {
		kind = circuit.Electrolytic
	}
	s.pins = [2]string{s.kind.Ports[0].Name, s.kind.Ports[1].Name}
	p := b.Part(s.d.Name.Val, kind, s.kind.Text, s.pins[0], s.pins[1])
	p.Key, p.At = "parts/"+s.d.Name.Val, s.d.Pos
	suffix := ""
	if s.kind.Name == "relay" {
		suffix = "coil"
	}
	b.Element(p, suffix, s.kind.Model, s.kind.Ends[0], s.pins[0], s.kind.Ends[1], s.pins[1])
	return p
}

func polarised(s *single) bool { return partField[bool](s.d, "polarised") }

// contact adds a contact to its relay: poles are counted in the order of the
// description, the pin nearer to plus is the common one.
func (x *singles) contact(s *single) *circuit.Part {
	if s.relay.part == nil {
		s.relay.part = x.part(s.relay)
	}
	k := s.relay.part
	pole := (len(k.Pins)-2)/2 + 1
	end, rest := "4", 0.0
	if partField[string](s.d, "is") == "break" {
		end, rest = "2", 1
	}
	common, other := fmt.Sprintf("%d1", pole), fmt.Sprintf("%d%s", pole, end)
	s.pins = [2]string{common, other}
	if s.top != s.nets[0] {
		s.pins = [2]string{other, common}
	}
	addPins(k, []string{common, other})
	e := x.b.Element(k, common+"-"+other, "contact", "1", common, "2", other)
	e.Control = "coil"
	e.Params = []circuit.Param{{Name: "rest_closed", Value: rest}}
	return k
}

// pin returns the part's pin on a net.
func (s *single) pin(n *net) *circuit.Pin {
	if s.nets[0] == n {
		return s.part.Pin(s.pins[0])
	}
	return s.part.Pin(s.pins[1])
}

// group draws one group from column left on and returns its right edge.
func (x *singles) group(g *group, left int) int {
	if len(g.runs) == 0 {
		return x.alone(g.nets[0], left)
	}
	cols := g.columns()
	for _, c := range cols {
		c.x = left + labelColumn
		left += c.width()
	}
	slot, rows := g.bands()
	x.b.sk.Bottom = max(x.b.sk.Bottom, rows[len(rows)-1])
	d := &groupDrawing{x: x, g: g, slot: slot, rows: rows, taps: map[*net][]tap{}}
	for _, r := range g.runs {
		d.run(r)
	}
	for _, n := range g.nets {
		if n.free() && n.joint() {
			d.bus(n)
		}
	}
	return left
}

// bands finds the rows of the buses: between two of them stands the tallest run that
// begins there.
func (g *group) bands() (slot [2]int, rows []int) {
	for _, slot = range slots {
		rows = rows[:0]
		y := firstRow
		for i := -1; i < g.rows; i++ {
			h := slot[0] / 2
			for _, r := range g.runs {
				if r.top.level == i {
					h = max(h, r.height(slot))
				}
			}
			y += h
			rows = append(rows, y)
		}
		if y <= lastRow {
			break
		}
	}
	return slot, rows
}

func (r *run) height(slot [2]int) int {
	h := 0
	for _, s := range r.list {
		if s.kind.Name == "contact" {
			h += slot[1]
		} else {
			h += slot[0]
		}
	}
	if r.top.level == r.bottom.level {
		h += 2
	}
	return h
}

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
	part *single
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
		h := d.slot[0]
		mid := y + h/2
		topY, endY, endX := mid-halfSymbol, mid+halfSymbol, col
		if s.kind.Name == "contact" {
			h = d.slot[1]
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
			below := 2.6
			if fromX != col { // clear of the contact's marks
				below = 4.2
			}
			if float64(topY-fromY) > below {
				d.number(w, s, col, float64(fromY)+below)
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

// number prints a wire's number left of the line at x; right of it over a coil, whose
// mark stands left.
func (d *groupDrawing) number(w *circuit.Conductor, s *single, x int, y float64) {
	at := float64(x)
	if s.kind.Name == "relay" {
		at += coilNumber
	}
	d.x.b.number(w, at, y)
}

// coilNumber moves a number to the right of its line.
const coilNumber = 3.4

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
		d.taps[r.top] = append(d.taps[r.top], tap{pin, s, col, y})
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
		d.taps[r.bottom] = append(d.taps[r.bottom], tap{pin, s, col, y})
		if len(way) > 2 && !r.bottom.loose() {
			b.line(nil, way...)
		}
	case r.bottom.minus():
		w := b.lead(circuit.OpDown, local, pin, Minus, append(way, col, downEnd)...)
		w.At = s.d.Pos
		b.number(w, float64(col), 48.5)
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
		at := float64(y) + 1.8
		if t.y < y {
			at = float64(y) - 0.6
		}
		d.number(w, t.part, t.x, at)
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
