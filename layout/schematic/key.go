package schematic

import (
	"strconv"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// Room of the key, in modules.
const (
	keyWidth  = 39
	keyCore   = 7    // its L+ core from its left edge
	keyText   = 20.5 // where its words begin
	keyLeader = 16.0
)

// keySheet is the board sheet that shows how a way is read: the last that has room,
// nil for none.
func (b *book) keySheet() *boardSheet {
	var out *boardSheet
	for _, s := range b.boardSheets {
		if !s.rests && s.end()+2+keyWidth <= colEnd {
			out = s
		}
	}
	return out
}

// end is the right edge of the last lane.
func (s *boardSheet) end() int {
	x := s.start - 1
	for _, c := range s.columns {
		x += c.width
	}
	return x
}

// key draws how to read a way, with the labels of the first lighting way as an
// example, and reports whether there is one. It is a figure: nothing in it is connected.
func (b *book) key(sh *Sheet, left int) bool {
	l := b.firstLighting()
	if l == nil || l.TestPoint == nil {
		return false
	}
	w := l.Way
	o := sh.scene.object(classNote, "key", "How to read a way")
	x, fx := left+keyCore, float64(left+keyCore)
	o.add(textAt(float64(left), 8.5, "How to read a way", headStyle, ink.Start))
	say := func(y float64, from float64, s string) {
		o.add(segment(thinPen, fx+from, y, float64(left)+keyText-0.6, y), textAt(float64(left)+keyText, y+textHeight/2, s, valueStyle, ink.Start))
	}
	o.add(segment(railPen, float64(left), rowBarPlus, float64(left)+keyLeader, rowBarPlus),
		segment(railPen, float64(left), rowBarMinus, float64(left)+keyLeader, rowBarMinus))
	say(rowBarPlus, keyLeader-keyCore+0.4, "L+ bar")
	say(rowBarMinus, keyLeader-keyCore+0.4, "L− bar: no dot, no joint")
	v := func(x, y0, y1 float64) { o.add(segment(normalPen, x, y0, x, y1)) }
	mark := func(s *symbols.Symbol, x, y int, t symbols.Turn) { o.add(&symbolMark{s, node{x, y}, t, ""}) }
	const lamp = rowLamp
	mx := fx + minusCore
	o.add(&disc{point{fx, rowBarPlus}, railDotRadius}, &disc{point{mx, rowBarMinus}, railDotRadius})
	v(fx, rowBarPlus, rowFuse-2)
	mark(&symbols.Fuse, x, rowFuse, symbols.V)
	v(fx, rowFuse+2, rowTerminal-1)
	v(mx, rowBarMinus, rowTerminal-1)
	mark(&symbols.Terminal, x, rowTerminal, symbols.V)
	mark(&symbols.Terminal, x+minusCore, rowTerminal, symbols.V)
	v(fx, rowTerminal+1, lamp+farEnd-ringRadius)
	v(mx, rowTerminal+1, lamp)
	o.add(&oval{at: point{fx + minusCore/2, rowCable}, rx: 3.7, ry: 0.45})
	mark(&symbols.Lamp, x+minusCore/2, lamp, symbols.H)
	o.add(segment(normalPen, fx, lamp, fx+1, lamp), segment(normalPen, mx-1, lamp, mx, lamp), &disc{point{fx, lamp}, dotRadius})
	o.add(&ring{point{fx, lamp + farEnd}, ringRadius}, &tag{point{fx + tagGap, lamp + farEnd}, w.Lighting.TestPoint.Label})
	labelStack(o, append([]string{w.Fuse.Designation}, valueLines(w.Fuse, labelRoom)...), fx-1.1, rowFuse-0.2, ink.End)
	number := strconv.Itoa(w.Number)
	o.add(textAt(fx+1.1, rowFuse+0.7, number, headStyle, ink.Start))
	say(rowFuse, 1.7+width(number, headStyle), "way, as on the fuse map")
	o.add(textAt(fx-0.5, rowNumber, w.WirePlus.Number, wireStyle, ink.End), textAt(mx+0.5, rowNumber, w.WireMinus.Number, wireStyle, ink.Start))
	say(rowNumber-0.5, minusCore+1+width(w.WireMinus.Number, wireStyle), "wire number")
	for _, t := range []struct {
		term *circuit.Part
		x    float64
		a    ink.Anchor
	}{{w.TermPlus, fx - 0.8, ink.End}, {w.TermMinus, mx + 0.8, ink.Start}} {
		_, n, _ := strings.Cut(t.term.Designation, ":")
		o.add(textAt(t.x, rowTerminal+textHeight/2, ":"+n, valueStyle, t.a))
	}
	say(rowTerminal, minusCore+3.4, "terminal")
	say(rowCable, minusCore+1.2, "cable: name, cores and size")
	leg := w.Lighting.Points[0].Leg
	o.add(textAt(fx+minusCore/2, lamp-2, b.lengths.Format(leg.Length), valueStyle, ink.Middle))
	say(lamp-2.5, minusCore+0.4, "length of this leg")
	say(lamp, minusCore+0.4, "number, type, place")
	say(lamp+farEnd, tagGap+symbols.TagBox(ink.Point{}, w.Lighting.TestPoint.Label, ink.Start).W/module+0.5, "test point, far end")
	return true
}
