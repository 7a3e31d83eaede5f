package schematic

import (
	"slices"

	"gloamwright/internal/circuit"
)

// Room on the sheet for lines, in modules.
const (
	gridWidth   = 163
	gridHeight  = 113
	linesRight  = 35 // of the explanation of the lines
	linesBottom = 17
	frameText   = 3  // height of a frame's name
	cableWide   = 10 // of a cable's two lines of text
)

// rect is the outline of a block.
type rect struct{ x0, y0, x1, y1 int }

func (s *blockSheet) rect(v *vertex) rect {
	x, y := s.left(v), s.top(v)
	return rect{x, y, x + blockWidth, y + blockHeight}
}

// sensorRect is the outline of the sensor's block beside its photocell.
func (s *blockSheet) sensorRect(v *vertex) rect {
	x, y := s.way.cols[v.col-1], s.top(v)
	return rect{x, y, x + blockWidth, y + blockHeight}
}

// around is the frame of a place around a block.
func (r rect) around() rect { return rect{r.x0 - 2, r.y0 - 3, r.x1 + 2, r.y1 + 2} }

func (r rect) middle() int { return (r.y0 + r.y1) / 2 }

// fedHere are the stages in column 0 that mains feeds.
func (s *blockSheet) fedHere() []*vertex {
	var out []*vertex
	for _, v := range s.list {
		if v.fed() {
			out = append(out, v)
		}
	}
	return out
}

// trunk is the battery's rail, from the charger to what follows, and its foot under
// the battery.
func (s *blockSheet) trunk(o *overview) (rail, foot []node) {
	if s.battery == nil {
		return nil, nil
	}
	y := s.rows[0] + blockHeight/2
	from, to := s.way.bus, s.way.bus
	if c := s.battery.energyFrom(); c != nil && c.on == s && c.row == 0 {
		from = s.left(c) + blockWidth
	}
	switch {
	case len(s.spine) > 0 && s.spine[0].on == s:
		to = s.left(s.spine[0])
	case s.way.lists && slices.ContainsFunc(s.battery.below(), func(v *vertex) bool { return v.list && v.board == o.beside[0].board }):
		to = colBoards
	}
	if from < to {
		rail = []node{{from, y}, {to, y}}
	}
	return rail, []node{{s.way.bus, y}, {s.way.bus, s.batteryTop() + blockHeight}}
}

// onTrunk reports whether an arc is drawn by the trunk.
func (s *blockSheet) onTrunk(o *overview, a *arc) bool {
	if s.battery == nil || !a.energy {
		return false
	}
	if a.to == s.battery {
		return a.from.on == s && a.from.row == 0 && a.from.col == 0
	}
	if a.from != s.battery {
		return false
	}
	if len(s.spine) > 0 {
		return a.to == s.spine[0] && a.to.on == s
	}
	return a.to.list && a.to.board == o.beside[0].board
}

// routeBlocks finds the lines between the blocks of a sheet.
func (b *book) routeBlocks(o *overview, s *blockSheet, all []*vertex) {
	s.setRows()
	r := newRouter(gridWidth, gridHeight)
	r.block(0, s.way.bottom+2, gridWidth-1, gridHeight-1)
	r.block(0, 0, gridWidth-1, 4)
	r.block(0, 0, 7, gridHeight-1)
	if len(o.sheets) == 0 || o.sheets[0] == s {
		r.block(0, 0, linesRight, linesBottom)
	}
	frame := func(at rect) { // with its name in the upper left corner
		r.frame(at.x0, at.y0, at.x1, at.y1)
		for y := at.y0; y < at.y0+frameText; y++ {
			for x := at.x0 + 1; x < at.x1; x++ {
				r.grid[r.index(node{x, y})] |= solid
			}
		}
	}
	for _, v := range s.list {
		at := s.rect(v)
		r.block(at.x0, at.y0, at.x1, at.y1)
		if v.sensor != nil {
			k := s.sensorRect(v)
			r.block(k.x0, k.y0, k.x1, k.y1)
			frame(k.around())
			r.take([]node{{k.x1, k.middle()}, {at.x0, at.middle()}})
			for x := k.x1 + 2; x < at.x0; x++ { // its cable's name
				r.grid[r.index(node{x, k.middle() - 2})] |= solid
				r.grid[r.index(node{x, k.middle() - 1})] |= solid
			}
		}
	}
	for _, k := range o.beside {
		if s.way.lists {
			r.block(int(k.x), int(k.y), int(k.x+k.w), int(k.y+b.boardHeight(k.board)+0.99))
		}
	}
	if fed := s.fedHere(); len(fed) > 0 {
		at := s.mainsRect(fed)
		frame(at)
		for _, v := range fed {
			y := s.rect(v).middle()
			r.take([]node{{at.x1, y}, {s.left(v), y}})
		}
	}
	rail, foot := s.trunk(o)
	r.take(rail)
	r.take(foot)
	if s.battery != nil {
		if b.batteryPlace(s.battery).Key != mainCabinet {
			frame(s.rect(s.battery).around())
		}
		if b.batteryCable(s.battery) != nil {
			y := foot[1].Y + 2
			for dy := range 4 {
				for dx := 1; dx <= cableWide; dx++ {
					r.grid[r.index(node{s.way.bus + dx, y + dy})] |= solid
				}
			}
		}
	}
	s.arcs, s.lost = nil, 0
	for _, v := range all {
		for _, a := range v.in {
			if a.from.on == s || a.to.on == s {
				a.pts, a.joint = nil, false
				s.arcs = append(s.arcs, a)
			}
		}
	}
	s.reserveStubs(r)
	rank := func(a *arc) int {
		switch {
		case a.energy:
			return 0
		case a.coil:
			return 2
		case a.to.sensor != nil || a.to.kind() == "photocell":
			return 1
		}
		return 3
	}
	slices.SortStableFunc(s.arcs, func(a, z *arc) int { return rank(a) - rank(z) })
	for _, a := range s.arcs {
		if s.onTrunk(o, a) || s.elsewhere(a) {
			continue
		}
		a.pts = r.find(b.outPorts(o, s, a, rail, foot), b.inPorts(o, s, a))
		a.joint = a.from == s.battery && len(a.pts) > 0
		if len(a.pts) == 0 {
			s.lost++
			continue
		}
		r.take(a.pts)
	}
}

// elsewhere reports whether one end of an arc is on another sheet.
func (s *blockSheet) elsewhere(a *arc) bool {
	return a.from.on != s || a.to.on != s && !a.to.list
}

// stubs are the references that stand for lines to other sheets: what leaves a stage
// below, what arrives above.
func (s *blockSheet) stubs(v *vertex) (in, out []*arc) {
	for _, a := range s.arcs {
		missing := s.elsewhere(a) || len(a.pts) == 0 && s.lost > 0 && !a.to.list && a.from != s.battery && a.to != s.battery
		if missing && a.from == v {
			out = append(out, a)
		}
		if missing && a.to == v {
			in = append(in, a)
		}
	}
	return in, out
}

// Places of stubs along a block's edge.
const (
	stubOut, stubIn = 2, 10
	stubWide        = 7
	stubLong        = 2.4
)

func (s *blockSheet) reserveStubs(r *router) {
	for _, v := range s.list {
		in, out := s.stubs(v)
		at := s.rect(v)
		if len(out) > 0 {
			r.block(at.x0+stubOut, at.y1+1, at.x0+stubOut+stubWide-1, at.y1+2)
		}
		if len(in) > 0 {
			r.block(at.x0+stubIn, at.y0-2, at.x0+stubIn+stubWide-1, at.y0-1)
		}
	}
}

// The places along an edge where lines may meet a block, the middle first, with what
// each costs over it.
var (
	sidePorts = [][2]int{{5, 0}, {3, 70}, {7, 70}, {2, 90}, {8, 90}}
	edgePorts = [][2]int{{9, 0}, {6, 6}, {12, 6}, {3, 12}, {15, 12}}
)

// edges lists the ports of a block; cost holds what each side costs, in the order
// east, south, west, north; in: lines run towards the block.
func edges(at rect, cost [4]int, in bool) []port {
	var out []port
	for side := range 4 {
		list, dir := sidePorts, side
		if side%2 == 1 {
			list = edgePorts
		}
		if in {
			dir = (side + 2) % 4
		}
		for _, p := range list {
			n := map[int]node{east: {at.x1, at.y0 + p[0]}, south: {at.x0 + p[0], at.y1}, west: {at.x0, at.y0 + p[0]}, north: {at.x0 + p[0], at.y0}}[side]
			out = append(out, port{at: n, dir: dir, cost: cost[side] + p[1]})
		}
	}
	return out
}

// What the sides of a block cost: energy goes from left to right, commands come from
// below, what hangs on a stage stands over or under it.
var (
	energyOut  = [4]int{0, 30, 60, 30}
	energyIn   = [4]int{120, 30, 0, 30}
	coilOut    = [4]int{0, 15, 80, 15}
	coilIn     = [4]int{120, 80, 90, 90}
	hangingOut = [4]int{20, 0, 60, 0}
	hangingIn  = [4]int{60, 0, 5, 0}
	onwardOut  = [4]int{0, 15, 80, 15}
	onwardIn   = [4]int{80, 15, 0, 15}
)

func (b *book) outPorts(o *overview, s *blockSheet, a *arc, rail, foot []node) []port {
	if a.from == s.battery {
		return railPorts(rail, foot)
	}
	at := s.rect(a.from)
	switch {
	case a.energy:
		return edges(at, energyOut, false)
	case a.coil:
		return edges(at, coilOut, false)
	case a.from.energyFrom() != nil:
		return edges(at, hangingOut, false)
	}
	return edges(at, onwardOut, false)
}

// railPorts are the places on the battery's rail where a line may branch off.
func railPorts(rail, foot []node) []port {
	var out []port
	bus, y := foot[0].X, foot[0].Y
	for k := foot[1].Y + 4; k <= y-2; k++ {
		out = append(out, port{node{bus, k}, east, 5}, port{node{bus, k}, west, 10})
	}
	if len(rail) > 0 {
		for x := rail[0].X + 2; x <= rail[1].X-3; x++ {
			if off := absInt(x - bus); off >= 2 {
				out = append(out, port{node{x, y}, south, 0}, port{node{x, y}, north, 10})
			}
		}
	}
	return append(out, port{node{bus, y}, south, 40})
}

func (b *book) inPorts(o *overview, s *blockSheet, a *arc) []port {
	if a.to.list {
		return b.listPorts(o, a.to.board, s.rows[0]+blockHeight/2)
	}
	if a.to == s.battery { // a further charger feeds the rail from below
		return []port{{node{s.way.bus, s.rows[0] + blockHeight/2}, north, 0}}
	}
	at := s.rect(a.to)
	switch {
	case a.energy:
		return edges(at, energyIn, true)
	case a.coil:
		out := edges(at, coilIn, true)
		n := 0
		for _, k := range a.to.in {
			if k.coil {
				n++
			}
		}
		for i := range n { // evenly along the lower edge
			out = append(out, port{node{at.x0 + blockWidth*(i+1)/(n+1), at.y1}, north, 0})
		}
		return out
	case a.from.energyFrom() != nil:
		return edges(at, hangingIn, true)
	}
	return edges(at, onwardIn, true)
}

// listPorts are the places at the left of a board's list.
func (b *book) listPorts(o *overview, bd *circuit.Board, wanted int) []port {
	for _, k := range o.beside {
		if k.board != bd {
			continue
		}
		var out []port
		for y := int(k.y) + 3; y < int(k.y+b.boardHeight(bd)); y++ {
			out = append(out, port{node{int(k.x), y}, east, 2 * absInt(y-wanted)})
		}
		return out
	}
	return nil
}
