package schematic

import (
	"fmt"
	"strconv"

	"gloamwright/internal/circuit"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
)

// boardBlock is a board as a list on the overview.
type boardBlock struct {
	board *circuit.Board
	x, y  float64
	under *circuit.Board // the board right above that feeds it
}

const (
	boardRow  = 1.92 // pitch of the list
	boardHead = 9.2  // first row below the top
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

// pageBoards places the boards' lists, each under the board that feeds it where
// there is room, and returns the titles of the overview's sheets.
func (b *book) pageBoards(o *overview) []string {
	order := b.boardOrder()
	o.beside = len(o.chain) <= chainBeside
	place := func(bd *circuit.Board, x, y float64, page int) {
		k := boardBlock{board: bd, x: x, y: y}
		if bs := o.pages[page]; len(bs) > 0 && bd.Parent != nil {
			if last := bs[len(bs)-1]; last.board == bd.Parent.Board && last.x == x {
				k.under = last.board
			}
		}
		o.pages[page] = append(o.pages[page], k)
	}
	bottom := b.down(77)
	i := 0
	if o.beside {
		o.pages = append(o.pages, nil)
		y := float64(boardsTop)
		for ; i < len(order); i++ {
			h := b.boardHeight(order[i])
			if y+h > bottom {
				break
			}
			place(order[i], colBoards, y, 0)
			y += h + boardsGap
		}
	}
	titles := []string{"Overview"}
	for i < len(order) {
		o.pages = append(o.pages, nil)
		page := len(o.pages) - 1
		for col := 0; col < boardPages && i < len(order); col++ {
			y := 8.0
			for first := true; i < len(order); i++ {
				h := b.boardHeight(order[i])
				if !first && y+h > b.down(96) {
					break
				}
				place(order[i], colText+float64(boardWidth+2)*float64(col), y, page)
				y += h + boardsGap/2 + 2
				first = false
			}
		}
		titles = append(titles, "Overview, boards")
	}
	if n := len(titles) - 1; n > 1 {
		for k := 1; k <= n; k++ {
			titles[k] = fmt.Sprintf("Overview, boards %d", k)
		}
	}
	return titles
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
	for _, k := range list {
		b.boardBlock(sh, k)
		if k.under == nil {
			continue
		}
		top := 0.0
		for _, other := range list {
			if other.board == k.under {
				top = other.y + b.boardHeight(other.board)
			}
		}
		x := k.x + boardWidth/2
		f := b.flow(sh, "feeder-"+k.board.Name, "energy", true, false, point{x, top}, point{x, k.y})
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

// boardBlock draws a board as a list of its ways.
func (b *book) boardBlock(sh *Sheet, k boardBlock) {
	bd := k.board
	o := sh.scene.object(classBlock, "board-"+bd.Name, bd.Title, ink.Attr{Name: "board", Value: bd.Name})
	right, h := k.x+boardWidth, b.boardHeight(bd)
	o.add(box(normalPen, k.x, k.y, right, k.y+h))
	name := fit(bd.Title, headStyle, boardWidth-12)
	o.add(textAt(k.x+1, k.y+2.2, name, headStyle, ink.Start))
	o.add(textAt(k.x+1+width(name, headStyle)+1, k.y+2.2, bd.Place.Designation, valueStyle, ink.Start))
	o.add(&line{at: point{right - 0.8, k.y + 2}, anchor: ink.End, runs: []run{{to: b.place("board " + bd.Name), short: true}}})
	first, last := bd.Ways[0].Fuse, bd.Ways[len(bd.Ways)-1].Fuse
	sub := first.Designation + " to " + last.Designation
	if first == last {
		sub = first.Designation
	}
	if bd.Parent != nil && k.under == nil {
		sub += fmt.Sprintf(", fed by %s, way %d, cable %s", bd.Parent.Board.Title, bd.Parent.Number, bd.Feeder.Designation)
	}
	o.add(textAt(k.x+1, k.y+4.6, fit(sub, valueStyle, boardWidth-2), valueStyle, ink.Start))
	y := k.y + 7.3
	column := []float64{1, 3.4, 21, 31.5, 38.5, boardWidth - 0.8} // way, name, fuse, load, run, far end
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
				b.boardSheetRow(o, k.x, y, s)
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
func (b *book) boardSheetRow(o *object, x, y float64, s *boardSheet) {
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
	o.add(textAt(x+38.5, y, fmt.Sprintf("%d luminaires", n), valueStyle, ink.End))
	if w > 0 {
		o.add(textAt(x+boardWidth-0.8, y, watts(w), valueStyle, ink.End))
	}
}
