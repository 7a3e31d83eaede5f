package schematic

import (
	"cmp"
	"slices"

	"gloamwright/internal/circuit"
)

// cell is a place for a block; row 0 is the energy's row, row -1 the one above it.
type cell struct{ col, row int }

// blockSheet is one sheet of blocks.
type blockSheet struct {
	way     arrangement
	cells   map[cell]*vertex
	list    []*vertex // in the order in which they were placed
	battery *vertex   // stands over its rail, left of column 1
	spine   []*vertex // what follows it
	arcs    []*arc    // all that begin or end here
	lost    int       // arcs that found no way
	rows    []int     // tops of the rows from 0 on
}

// arrangement is one way to share the sheet out.
type arrangement struct {
	cols   []int // left edges of the columns
	bus    int   // the battery's rail
	chain  int   // the last column that stages may take
	lists  bool  // the boards stand at the right as lists of their ways
	tables bool  // the two tables stand below
	bottom int   // of the lowest block
}

// Columns of the overview. Column 0 is for what mains feeds; the battery's rail stands
// between it and column 1.
var (
	wideColumns  = []int{colSource, colChain, colChain + chainPitch, colChain + 2*chainPitch, colChain + 3*chainPitch}
	denseColumns = []int{24, 50, 73, 96, 119, 142}
)

const denseBus = 46

// roomBelow is the bottom of the lowest block over the tables, and without them.
const (
	roomBelow = 77
	roomAlone = 96
)

// arrangements are the ways to lay the stages out, the best first.
func (b *book) arrangements() []arrangement {
	wide := arrangement{cols: wideColumns, bus: colBus, chain: len(wideColumns) - 1, tables: true, bottom: int(b.down(roomBelow))}
	beside := wide
	beside.lists, beside.chain = true, chainBeside
	dense := wide
	dense.cols, dense.bus, dense.chain = denseColumns, denseBus, len(denseColumns)-1
	alone := dense
	alone.tables, alone.bottom = false, int(b.down(roomAlone))
	return []arrangement{beside, wide, dense, alone}
}

// Pitches of the rows below the energy's.
const (
	mostPitch  = 20
	leastPitch = 14 // a block and room for an arrow from above
	frameBelow = 3  // room for the frame of a place under a block
)

// lastRow is how many rows there is room for below the energy's.
func (w *arrangement) lastRow() int {
	return (w.bottom - rowEnergy - blockHeight + 1) / leastPitch // the energy's row can stand a module higher
}

// setRows finds the tops of the rows in use.
func (s *blockSheet) setRows() {
	n, bottom := 0, s.way.bottom
	for c := range s.cells {
		n = max(n, c.row)
	}
	for _, v := range s.list {
		if v.sensor != nil && v.row == n { // its frame reaches lower
			bottom = s.way.bottom - frameBelow
		}
	}
	top := rowEnergy
	s.rows = []int{top}
	if n == 0 {
		return
	}
	pitch := min(mostPitch, (bottom-top-blockHeight)/n)
	if pitch < leastPitch {
		top--
		s.rows[0] = top
		pitch = (bottom - top - blockHeight) / n
	}
	if n == 2 && pitch > 18 {
		pitch = 18
	}
	for i := 1; i <= n; i++ {
		s.rows = append(s.rows, top+pitch*i)
	}
	if n < 3 && pitch > 16 { // the rest of the room goes between the energy's row and the others
		for i := 1; i <= n; i++ {
			s.rows[i] = min(s.rows[i]+2, bottom-blockHeight-pitch*(n-i))
		}
	}
}

// left and top are the corner of a block in its cell.
func (s *blockSheet) left(v *vertex) int {
	if v == s.battery {
		return s.way.bus - blockWidth/2
	}
	return s.way.cols[v.col]
}

func (s *blockSheet) top(v *vertex) int {
	if v == s.battery || v.row < 0 {
		return s.batteryTop()
	}
	return s.rows[v.row]
}

func (s *blockSheet) batteryTop() int { return rowBattery - rowEnergy + s.rows[0] }

// free reports whether a cell can take a block.
func (s *blockSheet) free(c cell) bool {
	if c.col < 0 || c.col > s.way.chain || c.row > s.way.lastRow() || c.row < -1 || c.row == -1 && c.col < 2 {
		return false
	}
	_, taken := s.cells[c]
	return !taken
}

// put places stages side by side from a cell on, each with its sensor before it.
func (s *blockSheet) put(at cell, vs ...*vertex) bool {
	for i, v := range vs {
		if !s.free(cell{at.col + i, at.row}) || v.sensor != nil && (i > 0 || !s.free(cell{at.col - 1, at.row})) {
			return false
		}
		if v.sensor != nil && s.tight(at) && !s.free(cell{at.col - 1, at.row - 1}) {
			return false
		}
	}
	for i, v := range vs {
		v.col, v.row, v.on = at.col+i, at.row, s
		s.cells[cell{v.col, v.row}] = v
		if v.sensor != nil {
			s.cells[cell{v.col - 1, v.row}] = v
			if s.tight(at) {
				s.cells[cell{v.col - 1, v.row - 1}] = v
			}
		}
		s.list = append(s.list, v)
	}
	return true
}

// tight reports whether the rows stand so close that the cell over a sensor stays empty:
// the frame of its place reaches into it.
func (s *blockSheet) tight(at cell) bool { return !s.way.tables && at.row > 1 }

// placeBlocks shares stages out to the cells of a new sheet. What finds no cell is left
// without one.
func (b *book) placeBlocks(way arrangement, todo []*vertex) *blockSheet {
	s := &blockSheet{way: way, cells: map[cell]*vertex{}}
	for _, v := range todo {
		v.on, v.list = nil, way.lists && v.board != nil
	}
	waiting := func(v *vertex) bool { return v != nil && v.on == nil && !v.list && slices.Contains(todo, v) }
	i := slices.IndexFunc(todo, func(v *vertex) bool { return v.kind() == "battery" })
	if i >= 0 {
		s.battery = todo[i]
		s.battery.on, s.battery.col = s, 0
		s.list = append(s.list, s.battery)
		if c := s.battery.energyFrom(); waiting(c) {
			s.put(cell{0, 0}, c)
		}
		s.spine = s.chainFrom(s.battery, waiting)
		for k, v := range s.spine {
			s.put(cell{1 + k%way.chain, k / way.chain}, v)
		}
	}
	for _, v := range todo { // branches of the energy's way
		if waiting(v) && v.energyFrom() != nil && !v.fed() && v.kind() != "linear-charger" {
			at := cell{1, 1}
			if up := v.energyFrom(); up.on == s {
				at = cell{min(up.col+1, way.chain), max(1, up.row)}
			}
			s.row(append([]*vertex{v}, s.chainFrom(v, waiting)...), 1, at, false)
		}
	}
	b.placeControls(s, todo, waiting)
	for _, v := range todo { // what hangs on one stage: meters, lamps, and supplies of their own
		if waiting(v) {
			s.near(v)
		}
	}
	return s
}

// chainFrom is the longest way of the energy on from v.
func (s *blockSheet) chainFrom(v *vertex, waiting func(*vertex) bool) []*vertex {
	var out []*vertex
	for len(out) < 1000 { // a loop of references is refused before
		var next *vertex
		for _, w := range v.below() {
			if waiting(w) && (next == nil || w.depth(100) > next.depth(100)) {
				next = w
			}
		}
		if next == nil {
			return out
		}
		out = append(out, next)
		v = next
	}
	return out
}

// row places stages side by side in the first row that has room, the column as near
// to the wanted one as can be; fixed: only there.
func (s *blockSheet) row(list []*vertex, least int, want cell, fixed bool) {
	for n := len(list); n > 0; n-- { // what is longer than the sheet is broken
		type try struct {
			at   cell
			cost int
		}
		var tries []try
		for r := max(1, want.row); r <= s.way.lastRow(); r++ {
			for c := least; c+n-1 <= s.way.chain; c++ {
				off := absInt(c - want.col)
				if !fixed || off == 0 {
					tries = append(tries, try{cell{c, r}, 2*off + r})
				}
			}
		}
		slices.SortStableFunc(tries, func(a, z try) int { return cmp.Compare(a.cost, z.cost) })
		for _, t := range tries {
			if s.put(t.at, list[:n]...) {
				if n < len(list) {
					s.row(list[n:], least, cell{1, t.at.row + 1}, false)
				}
				return
			}
		}
	}
}

// placeControls places what holds the relays in: photocells first, under what feeds
// them, then the supplies with what follows them.
func (b *book) placeControls(s *blockSheet, todo []*vertex, waiting func(*vertex) bool) {
	for _, fromMains := range []bool{false, true} {
		for _, relay := range todo {
			for _, a := range relay.in {
				if !a.coil || !waiting(a.from) {
					continue
				}
				list := []*vertex{a.from}
				root := a.from
				for up := feeder(root); up != nil && len(list) < 1000; up = feeder(root) {
					root = up
					if !waiting(up) {
						break
					}
					list = append([]*vertex{up}, list...)
				}
				mains := list[0].fed()
				if mains != fromMains {
					continue
				}
				if mains {
					if !s.clearRow(list, relay) {
						s.row(list, 0, cell{0, 1}, true)
					}
					continue
				}
				want := cell{1, 1}
				if root.on == s && root != list[0] {
					want = cell{max(1, root.col), 1}
					if root.fed() {
						want = cell{root.col + 1, root.row}
					}
				}
				s.row(list, 0, want, false)
			}
		}
	}
}

// clearRow places what mains feeds in the first row where nothing stands between it and
// the relay's column, so that its arrow runs straight.
func (s *blockSheet) clearRow(list []*vertex, relay *vertex) bool {
	if relay.on != s {
		return false
	}
rows:
	for r := max(1, relay.row+1); r <= s.way.lastRow(); r++ {
		for c := range max(len(list), relay.col) {
			if !s.free(cell{c, r}) {
				continue rows
			}
		}
		return s.put(cell{0, r}, list...)
	}
	return false
}

// feeder is what feeds a stage of a coil's feed.
func feeder(v *vertex) *vertex {
	for _, a := range v.in {
		if !a.coil {
			return a.from
		}
	}
	return nil
}

// near places a stage in the free cell nearest to what it hangs on.
func (s *blockSheet) near(v *vertex) {
	type try struct {
		at   cell
		cost int
	}
	up, is := (*vertex)(nil), cell{1, 0}
	switch {
	case len(v.in) > 0:
		up = v.in[0].from
	case len(v.out) > 0:
		up = v.out[0].to
	}
	if up != nil && up.on == s {
		is = cell{up.col, up.row}
		if up == s.battery {
			is = cell{1, 0}
		}
	}
	least := 1
	if v.fed() || len(s.list) == 0 {
		least = 0
	}
	var tries []try
	for r := -1; r <= s.way.lastRow(); r++ {
		for c := least; c <= s.way.chain; c++ {
			if v.fed() && c > 0 {
				break
			}
			cost := 3*absInt(c-is.col) + 2*absInt(r-is.row)
			if s.spine != nil && r == 0 {
				cost += 3 // the energy's row is for the energy
			}
			tries = append(tries, try{cell{c, r}, cost})
		}
	}
	slices.SortStableFunc(tries, func(a, z try) int { return cmp.Compare(a.cost, z.cost) })
	for _, t := range tries {
		if s.put(t.at, v) {
			return
		}
	}
}

// planOverview sorts the stages into the overview and returns the supplementary titles
// of its sheets.
func (b *book) planOverview() []string {
	o := &overview{}
	b.over = o
	all := b.graph()
	ways := b.arrangements()
	for _, w := range ways {
		if w.lists && !b.boardsBeside(o, all) {
			continue
		}
		s := b.placeBlocks(w, all)
		b.routeBlocks(o, s, all)
		missing := slices.ContainsFunc(all, func(v *vertex) bool { return v.on == nil && !v.list })
		o.sheets = []*blockSheet{s}
		wraps := len(s.spine) > w.chain && w.chain < len(denseColumns)-1
		if !missing && !wraps && s.lost == 0 {
			break
		}
	}
	last := ways[len(ways)-1]
	for { // more stages than one sheet has room for
		var todo []*vertex
		for _, v := range all {
			if v.on == nil && !v.list {
				todo = append(todo, v)
			}
		}
		if len(todo) == 0 {
			break
		}
		s := b.placeBlocks(last, todo)
		b.routeBlocks(o, s, todo)
		o.sheets = append(o.sheets, s)
	}
	titles := []string{"Overview"}
	for range o.sheets[1:] {
		titles = append(titles, "Overview, more stages")
	}
	o.lists = len(titles)
	if o.sheets[0].way.lists {
		return titles
	}
	o.beside = nil
	if o.sheets[0].way.tables && !slices.ContainsFunc(b.c.Boards, func(bd *circuit.Board) bool { return bd.Parent != nil }) {
		return titles // every board is a block already, and its own sheets list its ways
	}
	titles = append(titles, b.pageBoards(o, !o.sheets[0].way.tables)...)
	return titles
}
