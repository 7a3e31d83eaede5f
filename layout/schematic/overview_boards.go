package schematic

import (
	"fmt"
	"math"
	"slices"
	"strconv"

	"gloamwright/internal/circuit"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
)

// boardBlock is a board as a list on the overview.
type boardBlock struct {
	board *circuit.Board
	x, y  float64
	w     float64
	from  feedSide
	line  []point // of its feeder, from the way that feeds it; empty: an arrow from above says where from
}

// feedSide is how a board's feeder is drawn.
type feedSide uint8

const (
	byStage  feedSide = iota // a stage's line leads to it
	fromOver                 // the board right above feeds it
	byLine                   // a line from its way
	byName                   // an arrow with the place of what feeds it
)

// Board lists, in modules.
const (
	boardWidth  = 49 // beside the stages
	boardNarrow = 46 // leaves room for feeders at the right
	boardTree   = 44 // on a sheet of their own
	boardRow    = 1.92
	boardHead   = 9.2 // first row below the top
	boardsTop   = 22.0
	boardsLeast = 9
	boardsGap   = 11 // over a board that the one above feeds: its cable's texts stand there
	boardsClear = 5  // over another
	boardArrive = 3  // where a feeder arrives, below the top
	treeColumns = 3
	treeGap     = 10
	treeTop     = 11
	treeTrack   = 1.25
	sideTracks  = 2 // feeders at the right of narrow lists
)

// waysInFull is the largest board whose ways are listed one by one.
const waysInFull = 12

func (b *book) boardHeight(bd *circuit.Board) float64 {
	return boardHead + boardRow*float64(b.boardRows(bd)-1) + 0.9
}

// boardRows is how many rows the list of a board has: one a way, or one a sheet.
func (b *book) boardRows(bd *circuit.Board) int {
	if len(bd.Ways) <= waysInFull {
		return len(bd.Ways)
	}
	n := 0
	for _, s := range b.boardSheets {
		if s.board == bd {
			n++
		}
	}
	return max(n, 1)
}

// wayLevel is the middle of the row that lists a way.
func (b *book) wayLevel(k *boardBlock, w *circuit.Way) float64 {
	row := w.Number - 1
	if len(k.board.Ways) > waysInFull {
		row = 0
		n := 0
		for _, s := range b.boardSheets {
			if s.board != k.board {
				continue
			}
			for _, c := range s.columns {
				if c.way == w {
					row = n
				}
			}
			n++
		}
	}
	return k.y + boardHead + boardRow*float64(row) - textHeight/2
}

// boardsBeside places all boards at the right of the stages, one under the other, and
// reports whether there is room for them.
func (b *book) boardsBeside(o *overview, all []*vertex) bool {
	order := b.boardOrder()
	if len(order) == 0 {
		return false
	}
	sides := 0
	for i, bd := range order {
		if bd.Parent != nil && bd.Parent.Board != order[i-1] {
			sides++
		}
	}
	w := float64(boardWidth)
	if sides > 0 {
		w = boardNarrow
	}
	y := 0.0
	o.beside = nil
	for i, bd := range order {
		k := boardBlock{board: bd, x: colBoards, y: y, w: w}
		if i > 0 {
			gap := float64(boardsClear)
			if bd.Parent != nil {
				k.from = byLine
				if bd.Parent.Board == order[i-1] {
					k.from, gap = fromOver, boardsGap
				}
			}
			k.y += gap
		}
		y = k.y + b.boardHeight(bd)
		o.beside = append(o.beside, k)
	}
	top := min(boardsTop, math.Floor(b.down(roomBelow)-y)) // higher where the room asks for it
	if sides > sideTracks || top < boardsLeast {
		o.beside = nil
		return false
	}
	for i := range o.beside {
		o.beside[i].y += top
	}
	track := 0
	for i := range o.beside {
		k := &o.beside[i]
		if k.from != byLine {
			continue
		}
		x := k.x + w + 2 + 2*float64(sideTracks-1-track) // the outer ones begin higher
		track++
		for j := range o.beside {
			if up := &o.beside[j]; up.board == k.board.Parent.Board {
				k.line = []point{{up.x + w, b.wayLevel(up, k.board.Parent)}, {x, b.wayLevel(up, k.board.Parent)}, {x, k.y + boardArrive}, {k.x + w, k.y + boardArrive}}
			}
		}
	}
	return true
}

// pageBoards places the boards' lists on sheets of their own, each right of the board
// that feeds it, and returns the titles of the sheets.
func (b *book) pageBoards(o *overview, tables bool) []string {
	var waiting []*circuit.Board
	for _, bd := range b.c.Boards {
		if bd.Parent == nil {
			waiting = append(waiting, bd)
		}
	}
	for len(waiting) > 0 {
		bottom := b.down(96)
		if tables && len(o.pages) == 0 {
			bottom = b.down(77)
		}
		t := &boardTreePage{b: b, bottom: bottom}
		var later []*circuit.Board
		for _, bd := range waiting {
			if !t.add(bd, nil, 0) {
				later = append(later, bd)
			}
		}
		waiting = append(later, t.later...)
		t.lines()
		o.pages = append(o.pages, t.list)
	}
	var titles []string
	for k := range o.pages {
		title := "Overview, boards"
		if len(o.pages) > 1 {
			title += " " + strconv.Itoa(k+1)
		}
		titles = append(titles, title)
	}
	return titles
}

// boardTreePage is one sheet of boards in columns after their distance from the first.
type boardTreePage struct {
	b      *book
	bottom float64
	list   []boardBlock
	next   [treeColumns]float64
	later  []*circuit.Board // of boards that stand here, without room for themselves
}

// add places a board and those that it feeds. It reports whether the board itself found
// room.
func (t *boardTreePage) add(bd *circuit.Board, parent *boardBlock, col int) bool {
	if col == treeColumns {
		return false
	}
	h := t.b.boardHeight(bd)
	y := max(t.next[col], treeTop)
	from := byName
	if parent != nil {
		from = byLine
		y = max(y, t.b.wayLevel(parent, bd.Parent)-boardArrive) // the feeder straight, where there is room
		if y+h > t.bottom && max(t.next[col], treeTop)+h <= t.bottom {
			y = t.bottom - h
		}
	}
	if y+h > t.bottom && t.next[col] > 0 {
		return false
	}
	t.list = append(t.list, boardBlock{board: bd, x: colText + (boardTree+treeGap)*float64(col), y: y, w: boardTree, from: from})
	here := t.list[len(t.list)-1]
	t.next[col] = y + h + boardsClear
	for _, w := range bd.Ways {
		if w.Feeds != nil && !t.add(w.Feeds, &here, col+1) {
			t.later = append(t.later, w.Feeds)
		}
	}
	return true
}

// lines finds the feeders in the gaps: those that run down take tracks from the right,
// those that run up from the left, so that none crosses another.
func (t *boardTreePage) lines() {
	for col := 1; col < treeColumns; col++ {
		x := colText + (boardTree+treeGap)*float64(col)
		var down, up []*boardBlock
		for i := range t.list {
			k := &t.list[i]
			if k.from != byLine || k.x != x {
				continue
			}
			j := slices.IndexFunc(t.list, func(o boardBlock) bool { return o.board == k.board.Parent.Board })
			p := &t.list[j]
			from, to := point{p.x + p.w, t.b.wayLevel(p, k.board.Parent)}, point{k.x, k.y + boardArrive}
			switch {
			case math.Abs(from.Y-to.Y) < 0.05:
				k.line = []point{from, {to.X, from.Y}}
				continue
			case to.Y > from.Y:
				down = append(down, k)
			default:
				up = append(up, k)
			}
			k.line = []point{from, to}
		}
		for i, list := range [][]*boardBlock{down, up} {
			pitch := min(treeTrack, (treeGap-3.5)/float64(max(1, len(list)-1)))
			for n, k := range list {
				at := x - treeGap + 1.5 + pitch*float64(n)
				if i == 0 {
					at = x - 2 - pitch*float64(n)
				}
				a, z := k.line[0], k.line[1]
				k.line = []point{a, {at, a.Y}, {at, z.Y}, z}
			}
		}
	}
}

// boardOrder is the boards in depth: each is followed by those that it feeds.
func (b *book) boardOrder() []*circuit.Board {
	var out []*circuit.Board
	var add func(bd *circuit.Board)
	add = func(bd *circuit.Board) {
		out = append(out, bd)
		for _, w := range bd.Ways {
			if w.Feeds != nil {
				add(w.Feeds)
			}
		}
	}
	for _, bd := range b.c.Boards {
		if bd.Parent == nil {
			add(bd)
		}
	}
	return out
}

func (b *book) drawBoardBlocks(sh *Sheet, list []boardBlock) {
	for i, k := range list {
		b.boardBlock(sh, k)
		key := "feeder-" + k.board.Name
		switch k.from {
		case byLine:
			b.flow(sh, key, k.board.Parent.Board.Title+" to "+k.board.Title, true, false, k.line...)
		case byName:
			b.boardFrom(sh, k, key)
		case fromOver:
			x, top := k.x+boardWidth/2, list[i-1].y+b.boardHeight(list[i-1].board)
			f := b.flow(sh, key, k.board.Parent.Board.Title+" to "+k.board.Title, true, false, point{x, top}, point{x, k.y})
			c := k.board.Feeder
			t := coresAndSize(c)
			if a := b.current[c.Cores[0]]; a != nil && a.Current > 0 {
				t += " " + quantity.Fixed(a.Current, 1)
			}
			y := (top+k.y)/2 - 0.3
			f.add(&line{at: point{x + 1.2, y}, runs: []run{{s: c.Designation, st: nameStyle}, {s: b.lengths.Format(c.Length)}}},
				textAt(x+1.2, y+linePitch, t, valueStyle, ink.Start))
		}
	}
}

// boardFrom draws the arrow of what feeds a board from elsewhere: a stage, or a board
// on another sheet.
func (b *book) boardFrom(sh *Sheet, k boardBlock, key string) {
	name, at := "", (*place)(nil)
	if up := k.board.Parent; up != nil {
		name, at = fmt.Sprintf("from %s, way %d", up.Board.Title, up.Number), b.place("list "+up.Board.Name)
	} else {
		for _, s := range b.over.sheets {
			for _, v := range s.list {
				if v.board != k.board || v.energyFrom() == nil {
					continue
				}
				up := v.energyFrom()
				name, at = "from "+up.heading(), b.place("block "+up.name)
			}
		}
	}
	if name == "" {
		return
	}
	const x = 3.0
	f := b.flow(sh, key, name, true, false, point{k.x + x, k.y - 2.6}, point{k.x + x, k.y})
	f.add(&line{at: point{k.x + x + 1, k.y - 1}, runs: []run{{s: fit(name, valueStyle, k.w-x-8)}, {to: at}}})
}

// boardBlock draws a board as a list of its ways.
func (b *book) boardBlock(sh *Sheet, k boardBlock) {
	bd := k.board
	o := sh.scene.object(classBlock, "board-"+bd.Name, bd.Title, ink.Attr{Name: "board", Value: bd.Name})
	right, h := k.x+k.w, b.boardHeight(bd)
	o.add(box(normalPen, k.x, k.y, right, k.y+h))
	here := b.place("list " + bd.Name)
	here.sheet, here.at, here.anchor = sh, point{k.x, k.y}, o.ID
	name := fit(bd.Title, headStyle, k.w-12)
	o.add(textAt(k.x+1, k.y+2.2, name, headStyle, ink.Start))
	o.add(textAt(k.x+1+width(name, headStyle)+1, k.y+2.2, bd.Place.Designation, valueStyle, ink.Start))
	o.add(&line{at: point{right - 0.8, k.y + 2}, anchor: ink.End, runs: []run{{to: b.place("board " + bd.Name), short: true}}})
	sub := fuseRange(bd)
	if bd.Parent != nil && k.from != fromOver {
		sub += fmt.Sprintf(", fed by %s, way %d, cable %s", bd.Parent.Board.Title, bd.Parent.Number, bd.Feeder.Designation)
	}
	o.add(textAt(k.x+1, k.y+4.6, fit(sub, valueStyle, k.w-2), valueStyle, ink.Start))
	y := k.y + 7.3
	column := boardColumns(k.w)
	head := func(i int, s string, a ink.Anchor) { o.add(textAt(k.x+column[i], y, s, valueStyle, a)) }
	if len(bd.Ways) > waysInFull {
		head(0, "Ways", ink.Start)
		head(5, "Load", ink.End)
	} else {
		head(0, "Way", ink.Start)
		head(2, "Fuse", ink.Start)
		head(3, "Load", ink.End)
		head(4, "Run", ink.End)
		head(5, "Far end", ink.End)
	}
	o.add(segment(thinPen, k.x+1, y+0.55, right-0.8, y+0.55))
	y = k.y + boardHead
	if len(bd.Ways) > waysInFull {
		for _, s := range b.boardSheets {
			if s.board == bd {
				b.boardSheetRow(o, k, y, s)
				y += boardRow
			}
		}
		return
	}
	for _, w := range bd.Ways {
		cells := b.wayCells(w)
		for i, a := range []ink.Anchor{ink.Start, ink.Start, ink.Start, ink.End, ink.End, ink.End} {
			if cells[i] != "" {
				s := cells[i]
				if i == 1 {
					s = fit(s, valueStyle, column[2]-column[1]-0.6)
				}
				o.add(textAt(k.x+column[i], y, s, valueStyle, a))
			}
		}
		y += boardRow
	}
}

// boardColumns are the columns of a list: way, name, fuse, load, run, far end.
func boardColumns(w float64) []float64 {
	shift := w - boardWidth
	return []float64{1, 3.4, 21 + 0.7*shift, 31.5 + 0.8*shift, 38.5 + 0.8*shift, w - 0.8}
}

// wayCells are way, name, fuse, load, run and far end of one way.
func (b *book) wayCells(w *circuit.Way) [6]string {
	c := [6]string{strconv.Itoa(w.Number), "spare"}
	fuse := ""
	if v := valueLines(w.Fuse, labelRoom); len(v) > 0 {
		fuse = v[0]
	}
	switch {
	case w.Lighting != nil:
		c = [6]string{c[0], w.Lighting.Name, fuse, watts(b.lightingWatt(w.Lighting.Name)), b.lengths.Format(longest(w.Lighting)), b.lowest(w.Lighting)}
	case w.Feeds != nil:
		c = [6]string{c[0], w.Feeds.Title, fuse, watts(b.boardWatt(w.Feeds)), b.lengths.Format(w.Feeds.Feeder.Length), ""}
	}
	if c[3] == "0 W" {
		c[3] = ""
	}
	return c
}

// longest is the longest way of cable from the board to a luminaire.
func longest(l *circuit.Lighting) quantity.Metre {
	at := map[*circuit.Point]quantity.Metre{}
	var most quantity.Metre
	l.Walk(func(p, before *circuit.Point) {
		at[p] = at[before] + p.Leg.Length
		most = max(most, at[p])
	})
	return most
}

// lowest is the lowest voltage at a luminaire of a circuit while it must be lit.
func (b *book) lowest(l *circuit.Lighting) string {
	var v quantity.Volt
	for _, x := range b.d.Luminaires {
		if x.Circuit == l.Name && x.WorstV > 0 && (v == 0 || x.WorstV < v) {
			v = x.WorstV
		}
	}
	if v == 0 {
		return ""
	}
	return volts(v)
}

// boardSheetRow sums up the ways of one sheet: "1–8 /5 31 luminaires 143 W".
func (b *book) boardSheetRow(o *object, k boardBlock, y float64, s *boardSheet) {
	x := k.x
	var w quantity.Watt
	n := 0
	for _, c := range s.columns {
		n += len(c.rungs)
		if c.kind != restColumn && c.way.Lighting != nil {
			w += b.lightingWatt(c.way.Lighting.Name)
		}
	}
	first, last := s.columns[0].way.Number, s.columns[len(s.columns)-1].way.Number
	t := fmt.Sprintf("%d–%d", first, last)
	if s.rests {
		t += " continued"
	}
	o.add(textAt(x+1, y, t, valueStyle, ink.Start))
	o.add(&line{at: point{x + 16, y}, runs: []run{{s: fmt.Sprintf("/%d", s.number)}}})
	o.add(textAt(x+k.w-10.5, y, fmt.Sprintf("%d luminaires", n), valueStyle, ink.End))
	if w > 0 {
		o.add(textAt(x+k.w-0.8, y, watts(w), valueStyle, ink.End))
	}
}
