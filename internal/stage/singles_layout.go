package stage

import (
	"fmt"
	"slices"

	"gloamwright/internal/circuit"
)

// Measures of the block of single parts, in modules. Labels stand left of the parts;
// a contact stands level and moves its run to the right.
const (
	labelColumn = 11  // from a column's left edge to its line
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
var slots = [][2]int{{9, 11}, {8, 10}, {7, 9}, {6, 8}, {5, 7}}

// coilSlot is the least height of a coil, whose marks stand beside its leads; roomy the
// slot from which on wire numbers stand left of the line, under the labels.
const (
	coilSlot = 8
	roomy    = 8
)

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
	groups = slices.DeleteFunc(groups, x.hosted)
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
		h += s.height(slot)
	}
	if r.top.level == r.bottom.level {
		h += 2
	}
	return h
}

// height is what a part takes of a band.
func (s *single) height(slot [2]int) int {
	switch s.kind.Name {
	case "contact":
		return slot[1]
	case "relay":
		return max(slot[0], coilSlot)
	}
	return slot[0]
}
