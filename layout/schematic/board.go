package schematic

import (
	"strconv"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
)

// Rows of a board's frame and head.
const (
	rowBoardTop   = 7
	rowBoardEnd   = 24
	rowGuideTop   = 25
	rowPlace      = 8.6  // board's place, baseline
	rowPlusName   = 10.1 // name of the L+ bar
	rowMinusName  = 14.6
	rowNumber     = 20.6 // wire numbers
	colBoard      = 11
	colBoardFed   = 19
	colBoardNames = 11.5
	longPlace     = 24.0 // the most room of a place's name
)

// drawBoard draws one sheet of a board.
func (b *book) drawBoard(sh *Sheet, s *boardSheet) error {
	x := s.start
	var xs []int
	for _, c := range s.columns {
		xs = append(xs, x)
		x += c.width
	}
	end := x - 1
	b.guides(sh, s, xs, end)
	if !s.rests {
		b.bars(sh, s, xs, end)
	}
	strip := false
	for i, c := range s.columns {
		b.drawColumn(sh, s, c, xs[i])
		strip = strip || c.kind != restColumn
	}
	if strip {
		sh.scene.object(classNote, "strip-"+s.board.Strip, "Terminal strip "+s.board.Strip).
			add(textAt(float64(s.start)-6.2, rowTerminal+textHeight/2, s.board.Strip, nameStyle, ink.Start))
	}
	b.foot(sh, s, xs, end)
	if b.keySheet() == s {
		b.key(sh, end+2)
	}
	if s.first {
		pl := b.place("board " + s.board.Name)
		pl.sheet, pl.at = sh, point{float64(s.start), rowBarPlus}
	}
	return b.boardNotes(sh, s)
}

// guides draws the dotted lines between the ways.
func (b *book) guides(sh *Sheet, s *boardSheet, xs []int, end int) {
	o := sh.scene.object(classGuide, "lanes", "")
	for _, x := range append(append([]int{}, xs...), end+1) {
		o.add(segment(guidePen, float64(x-1), rowGuideTop, float64(x-1), b.footTop(s)-1))
	}
}

// bars draws the board's frame and its two bars with their references.
func (b *book) bars(sh *Sheet, s *boardSheet, xs []int, end int) {
	sc, bd := sh.scene, s.board
	left, open := float64(colBoard), ""
	fed := bd.Feeder != nil && s.first
	if fed {
		left = colBoardFed
	}
	right := float64(end)
	if !s.first {
		left, open = colText, open+"W"
	}
	if s.more {
		right, open = colEnd, open+"E"
	}
	o := sc.object(classBoundary, "board-"+bd.Name, bd.Title, ink.Attr{Name: "board", Value: bd.Name})
	boundary(o, left, rowBoardTop, right, rowBoardEnd, open)
	at := colBoardNames
	if fed {
		at = left + 0.8
	}
	name := textAt(at, rowPlace, fit(bd.Place.Designation+" "+bd.Place.Name, valueStyle, longPlace), valueStyle, ink.Start)
	o.add(name)

	last := len(xs) - 1
	plusEnd, minusEnd := xs[last], xs[last]+s.columns[last].minus
	reached := 0 // end of the L+ bar
	for _, r := range []struct {
		bar  *circuit.Part
		y    int
		text float64
		end  int
	}{{bd.Plus, rowBarPlus, rowPlusName, plusEnd}, {bd.Minus, rowBarMinus, rowMinusName, minusEnd}} {
		rail := b.railOf[r.bar.Pin("in")]
		before, after := b.neighbours(rail, sh.Number)
		x0, x1 := colArrive, r.end
		if fed {
			x0 = terminalEntry + 1
		}
		if after > 0 {
			x1 = colLeave
		}
		if r.y == rowBarPlus {
			reached = x1
		}
		w := sc.wire(nil, node{x0, r.y}, node{x1, r.y})
		w.rail, w.thick, w.name = true, true, rail.Name
		if before > 0 && !fed {
			obj, mate := b.railRefer(sh, rail, before, node{x0, r.y})
			obj.add(&line{at: point{colBoardNames, r.text}, runs: []run{{s: rail.Name, st: nameStyle}, {to: mate}}, close: before > 9})
		}
		if after > 0 {
			obj, mate := b.railRefer(sh, rail, after, node{x1, r.y})
			obj.add(&line{at: point{colLeave + arrowLead + 0.3, r.text}, anchor: ink.End,
				runs: []run{{s: rail.Name, st: nameStyle}, {to: mate}}})
		}
		if fed {
			tx := 23.0
			if r.y == rowBarMinus {
				tx = 25.8
			}
			sc.object(classRail, rail.Name, rail.Name).add(textAt(tx, r.text+0.1, rail.Name, nameStyle, ink.Start))
		}
	}
	if fed {
		b.entry(sh, bd)
	}
	if s.first && bd.TestPoint != nil {
		b.barPoint(sh, s, xs, reached, name.box())
	}
}

// barPoint marks the test point on the L+ bar: in the first place over the bar that
// is clear of the place's name and of the ways, else at the bar's end.
func (b *book) barPoint(sh *Sheet, s *boardSheet, xs []int, end int, name ink.Rect) {
	for x := s.start + 3; x < end-1; x++ {
		near := float64(x)-1 < name.X+name.W
		for _, at := range xs {
			near = near || x-at < 3 && at-x < 3
		}
		if !near {
			if x > s.start+3 {
				sh.scene.moved++
			}
			b.probe(sh, s.board.TestPoint, node{x, rowBarPlus}, "N")
			return
		}
	}
	sh.scene.moved++
	b.probe(sh, s.board.TestPoint, node{end, rowBarPlus}, "E")
}

// entry draws the incoming cable of a board that another board feeds.
func (b *book) entry(sh *Sheet, bd *circuit.Board) {
	sc := sh.scene
	plus, minus := cores(bd.Feeder)
	p, m := node{colArrive, rowBarPlus}, node{colArrive, rowBarMinus}
	names := b.railOf[bd.Plus.Pin("in")].Name + ", " + b.railOf[bd.Minus.Pin("in")].Name
	obj, mate := b.refer(sh, "feeder "+bd.Name, names, false, 'W', p, m)
	obj.add(textAt(colText, 8.2, names, nameStyle, ink.Start), &line{at: point{colText, 9.8}, runs: []run{{to: mate}}})
	sc.wire(plus, p, node{terminalEntry - 1, rowBarPlus})
	sc.wire(minus, m, node{terminalEntry - 1, rowBarMinus})
	o := sc.cable(bd.Feeder)
	o.add(&oval{at: point{14, 12}, rx: 0.45, ry: 1.7})
	b.cableText(o, bd.Feeder, colText, 15.7)
	for _, t := range []struct {
		term *circuit.Part
		at   node
		y    float64
	}{{bd.InPlus, node{terminalEntry, rowBarPlus}, 10.2}, {bd.InMinus, node{terminalEntry, rowBarMinus}, 14.9}} {
		o := sc.terminal(t.term, t.at, "H", "out", "in")
		_, n, _ := strings.Cut(t.term.Designation, ":")
		o.add(textAt(float64(t.at.X), t.y, ":"+n, valueStyle, ink.Middle))
	}
}

// drawColumn draws one way and what hangs on it.
func (b *book) drawColumn(sh *Sheet, s *boardSheet, c *column, x int) {
	sc := sh.scene
	switch c.kind {
	case restColumn:
		b.restHead(sh, c, x)
	default:
		b.wayHead(sh, c, x)
	}
	if c.kind == feederColumn {
		b.feederWay(sh, c, x)
	}
	for _, p := range c.cores {
		sc.wire(p.c, shift(p.pts, x)...)
	}
	for _, v := range c.ovals {
		b.columnOval(sh, v, x)
	}
	for _, l := range c.lengths {
		sc.cable(l.cable).add(textAt(l.at.X+float64(x), l.at.Y, b.lengths.Format(l.cable.Length), valueStyle, ink.Middle))
	}
	for _, r := range c.rungs {
		b.luminaire(sh, r, x)
	}
	if c.far != nil {
		at, side := node{x + c.far.x, c.far.y}, "F"
		if !c.far.end {
			side = "W"
		}
		b.probe(sh, c.way.Lighting.TestPoint, at, side)
	}
	for _, k := range c.cuts {
		b.drawCut(sh, k, x)
	}
}

// drawCut draws the arrows of a leg that goes on on another sheet. Cores that end
// side by side share one text, the left being L+, and so do those of a comb; other
// cores that end one over the other are named each.
func (b *book) drawCut(sh *Sheet, k cut, x int) {
	plus, minus := shift([]node{k.plus}, x)[0], shift([]node{k.minus}, x)[0]
	obj, mate := b.refer(sh, k.key, k.name, true, k.turn, plus, minus)
	if k.turn != 'E' {
		obj.add(&line{at: point{float64(minus.X) + 1.1, float64(minus.Y) + 0.9}, runs: []run{{s: k.name, st: nameStyle}, {to: mate}}})
		return
	}
	if k.comb {
		obj.add(&line{at: point{float64(minus.X) + arrowLead, float64(plus.Y) - overLine}, anchor: ink.End,
			runs: []run{{s: k.name, st: nameStyle}, {to: mate}}})
		return
	}
	cp, cm := cores(k.cable)
	for _, e := range []struct {
		at node
		c  *circuit.Conductor
	}{{plus, cp}, {minus, cm}} {
		obj.add(&line{at: point{float64(e.at.X) + arrowLead + 0.4, float64(e.at.Y) + textHeight/2},
			runs: []run{{s: e.c.Number, st: wireStyle}, {to: mate}}})
	}
}

func shift(pts []node, x int) []node {
	out := make([]node, len(pts))
	for i, p := range pts {
		out[i] = node{p.X + x, p.Y}
	}
	return out
}

// wayHead draws fuse, wires and terminals of a way.
func (b *book) wayHead(sh *Sheet, c *column, x int) {
	sc, w := sh.scene, c.way
	fx := float64(x)
	bar := "bar of way " + strconv.Itoa(w.Number)
	sc.wire(nil, node{x, rowBarPlus}, node{x, rowFuse - 2}).name = bar
	o := sc.symbol("fuse", w.Fuse, node{x, rowFuse}, "V", nil)
	o.add(textAt(fx-1.1, rowFuse-0.2, w.Fuse.Designation, nameStyle, ink.End))
	rating := "spare"
	if !w.Spare() {
		rating = ""
		if v := valueLines(w.Fuse, 5); len(v) > 0 {
			rating = v[0]
		}
	}
	o.add(textAt(fx-1.1, rowFuse+1.4, rating, valueStyle, ink.End))
	o.add(textAt(fx+1.1, rowFuse+0.7, strconv.Itoa(w.Number), headStyle, ink.Start))
	sc.wire(w.WirePlus, node{x, rowFuse + 2}, node{x, rowTerminal - 1})
	sc.wire(w.WireMinus, node{x + c.minus, rowBarMinus}, node{x + c.minus, rowTerminal - 1})
	sc.number(w.WirePlus, textAt(fx-0.5, rowNumber, w.WirePlus.Number, wireStyle, ink.End))
	sc.number(w.WireMinus, textAt(fx+float64(c.minus)+0.5, rowNumber, w.WireMinus.Number, wireStyle, ink.Start))
	for _, t := range []struct {
		term *circuit.Part
		x    int
		dx   float64
		a    ink.Anchor
	}{{w.TermPlus, x, -0.8, ink.End}, {w.TermMinus, x + c.minus, 0.8, ink.Start}} {
		o := sc.terminal(t.term, node{t.x, rowTerminal}, "V", "in", "out")
		_, n, _ := strings.Cut(t.term.Designation, ":")
		o.add(textAt(float64(t.x)+t.dx, rowTerminal+textHeight/2, ":"+n, valueStyle, t.a))
	}
}

// restHead draws the head of a column whose cores come from another sheet.
func (b *book) restHead(sh *Sheet, c *column, x int) {
	fx := float64(x)
	obj, mate := b.refer(sh, c.key, c.name, false, 'N', node{x, rowRest}, node{x + minusCore, rowRest})
	obj.add(&line{at: point{fx + legText, rowRest - 0.4}, runs: []run{{s: c.name, st: nameStyle}, {to: mate}}})
	o := sh.scene.object(classNote, "way-"+strconv.Itoa(c.way.Number)+"-"+c.key, "Way "+strconv.Itoa(c.way.Number)+", continued")
	o.add(textAt(fx, rowFuse+0.7, strconv.Itoa(c.way.Number), headStyle, ink.Start))
	o.add(textAt(fx, rowFuse+2.9, "continued", valueStyle, ink.Start))
}

// feederWay draws the cable that feeds another board.
func (b *book) feederWay(sh *Sheet, c *column, x int) {
	bd := c.way.Feeds
	plus, minus := cores(bd.Feeder)
	p, m := node{x, rowLamp}, node{x + minusCore, rowLamp}
	sh.scene.wire(plus, node{x, rowTerminal + 1}, p)
	sh.scene.wire(minus, node{x + minusCore, rowTerminal + 1}, m)
	b.columnOval(sh, columnOval{bd.Feeder, 0, rowCable, false}, x)
	sh.scene.cable(bd.Feeder).add(textAt(float64(x)+minusCore/2, rowLamp-2, b.lengths.Format(bd.Feeder.Length), valueStyle, ink.Middle))
	names := b.railOf[bd.Plus.Pin("in")].Name + ", " + b.railOf[bd.Minus.Pin("in")].Name
	obj, mate := b.refer(sh, "feeder "+bd.Name, names, true, 'S', p, m)
	obj.add(textAt(float64(x)+legText, rowLamp+0.4, names, nameStyle, ink.Start),
		&line{at: point{float64(x) + legText, rowLamp + 2}, runs: []run{{to: mate}}})
}

// columnOval draws a cable's mark on its cores and writes name and size.
func (b *book) columnOval(sh *Sheet, v columnOval, x int) {
	o := sh.scene.cable(v.cable)
	fx := float64(x + v.x)
	if v.upright {
		o.add(&oval{at: point{fx + branchOval, v.y}, rx: 0.45, ry: 1.7})
		o.add(textAt(fx+branchOval+0.8, v.y+2.5, coresAndSize(v.cable), valueStyle, ink.Start))
		return
	}
	o.add(&oval{at: point{fx + minusCore/2, v.y}, rx: 3.7, ry: 0.45})
	o.add(textAt(fx+legText, v.y-0.2, v.cable.Designation, nameStyle, ink.Start))
	if s := coresAndSize(v.cable); s != "" {
		o.add(textAt(fx+legText, v.y+1.4, s, valueStyle, ink.Start))
	}
}

// luminaire draws a lamp in its rung with number, type and place.
func (b *book) luminaire(sh *Sheet, r rung, x int) {
	p := r.point.Luminaire
	o := sh.scene.symbol(b.lampSymbol(r.point.Type), p, node{x + r.x + minusCore/2, r.y}, "H", map[string]string{"1": "+", "2": "-"})
	fx, fy := float64(x+r.x)+lampText, float64(r.y)
	d := width(p.Designation, nameStyle) + wordGap
	o.add(&line{at: point{fx, fy - 0.2}, runs: []run{{s: p.Designation, st: nameStyle},
		{s: fit(r.point.Type, valueStyle, lampRoom-d), st: valueStyle}}})
	if r.point.Place != "" {
		o.add(textAt(fx, fy+1.4, fit(r.point.Place, valueStyle, lampRoom), valueStyle, ink.Start))
	}
}
