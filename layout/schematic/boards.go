package schematic

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"gloamwright/internal/circuit"
)

// Columns of a board sheet.
const (
	firstCore     = 19  // L+ core of the first way, the board in the feeding cabinet
	firstCoreFed  = 30  // the board fed by a cable
	lanesEnd      = 162 // right edge of the last lane
	minusLast     = 155 // last L− core where the bars go on to the right
	terminalEntry = 21  // rings of an incoming cable
)

// boardSheet is one sheet of a board.
type boardSheet struct {
	board   *circuit.Board
	columns []*column
	first   bool // the board begins here
	more    bool // its ways go on on the next sheet
	rests   bool // only circuits that go on from other sheets; no bars
	title   string
	start   int // L+ core of the first column
	number  int // of the sheet
}

// planBoards lays out every way of every board and breaks them into sheets.
func (b *book) planBoards() ([]*boardSheet, error) {
	var out []*boardSheet
	for _, bd := range b.c.Boards {
		ways, rests := b.columns(bd)
		sheets := b.breakColumns(bd, ways, false)
		if sheets == nil {
			return nil, fmt.Errorf("board %s cannot be laid out on sheets", bd.Title)
		}
		for i, s := range sheets {
			s.first, s.more = i == 0, i+1 < len(sheets)
			s.title = bd.Title
			if len(sheets) > 1 {
				s.title += ", " + wayRange(s.columns)
			}
		}
		out = append(out, sheets...)
		tail := b.breakColumns(bd, rests, true)
		for _, s := range tail {
			s.title = bd.Title + ", " + wayRange(s.columns) + " continued"
		}
		out = append(out, tail...)
	}
	return out, nil
}

// wayRange names the ways of a sheet: "ways 17–22".
func wayRange(cs []*column) string {
	first, last := cs[0].way.Number, cs[len(cs)-1].way.Number
	if first == last {
		return "way " + strconv.Itoa(first)
	}
	return fmt.Sprintf("ways %d–%d", first, last)
}

// rows is how many rows of luminaires a sheet has.
func (b *book) rows() int {
	if b.short() {
		return rowsTabloid
	}
	return rowsA3
}

// columns lays out the ways of a board, and what does not fit below their heads.
func (b *book) columns(bd *circuit.Board) (ways, rests []*column) {
	room := lanesEnd - b.start(bd) + 1
	for _, w := range bd.Ways {
		c := &column{way: w}
		switch {
		case w.Lighting != nil && len(w.Lighting.Points) > 0:
			lightingWay(c, rest{points: w.Lighting.Points}, w.Lighting, b.rows(), room, rowTerminal+1)
		case w.Feeds != nil:
			c.kind, c.width, c.minus = feederColumn, feederWidth, minusCore
		default:
			c.kind, c.width, c.minus = spareColumn, spareWidth, spareMinus
			if w.Number > 9 {
				c.width, c.minus = spareLong, minusCore
			}
		}
		ways = append(ways, c)
	}
	queue := slices.Clone(ways)
	for len(queue) > 0 {
		c := queue[0]
		queue = queue[1:]
		for _, rest := range c.rests {
			d := &column{kind: restColumn, way: c.way, before: c}
			lightingWay(d, rest, c.way.Lighting, b.rows(), lanesEnd-firstCore+1, rowRest)
			rests = append(rests, d)
			queue = append(queue, d)
		}
	}
	return ways, rests
}

// start is the place of the first L+ core on the first sheet of a board.
func (b *book) start(bd *circuit.Board) int {
	if bd.Feeder != nil {
		return firstCoreFed
	}
	return firstCore
}

// breakColumns breaks columns into sheets by the widths of their lanes.
func (b *book) breakColumns(bd *circuit.Board, cs []*column, rests bool) []*boardSheet {
	at := func(i int) int {
		if i == 0 && !rests {
			return b.start(bd)
		}
		return firstCore
	}
	starts := breakUp(len(cs), func(i, j int) (float64, bool) {
		x := at(i) - 1
		capacity := lanesEnd - x
		minus := 0
		for k := i; k < j; k++ {
			minus = x + 1 + cs[k].minus
			x += cs[k].width
			for m := i; m < k; m++ {
				if cs[k].before == cs[m] {
					return 0, false
				}
			}
		}
		if j > i+1 && (x > lanesEnd || !rests && j < len(cs) && minus > minusLast) {
			return 0, false
		}
		c := costSheet
		if j < len(cs) {
			slack := float64(lanesEnd-x) / float64(capacity)
			c += costSlack * slack * slack
		}
		return c, true
	})
	var out []*boardSheet
	for n, i := range starts {
		j := len(cs)
		if n+1 < len(starts) {
			j = starts[n+1]
		}
		out = append(out, &boardSheet{board: bd, columns: cs[i:j], rests: rests, start: at(i)})
	}
	return out
}

// lit says in words when a circuit must be lit.
func lit(s string) string {
	switch s {
	case "outage-night":
		return "outage at night"
	case "night":
		return "dark"
	}
	return strings.ReplaceAll(s, "-", " ")
}
