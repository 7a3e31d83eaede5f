package schematic

import (
	"fmt"
	"strings"

	"gloamwright/layout/ink"
)

// Places of the overview, in modules.
const (
	blockWidth   = 18
	blockHeight  = 10
	colMains     = 11
	mainsWidth   = 8
	colSource    = 27
	colBus       = 52
	colChain     = 59
	chainPitch   = 28
	colBoards    = 112
	rowBattery   = 9
	rowEnergy    = 26
	rowTablesTop = 79.5
	chainBeside  = 2 // columns of stages beside the boards
)

// overview is what the overview shows, laid out before anything is drawn.
type overview struct {
	sheets []*blockSheet
	beside []boardBlock   // the boards at the right of the first sheet
	pages  [][]boardBlock // the boards on sheets of their own
	lists  int            // number of overview sheets before them
}

// says is the plain sentence on the arrow of a control: what it stands for.
func says(x *stageBox) string {
	switch x.st.Kind {
	case "photocell":
		return "it is light"
	case "regulated-supply", "transformer-supply":
		return "mains is on"
	}
	return ""
}

// drawOverview draws overview sheet i.
func (b *book) drawOverview(sh *Sheet, i int) error {
	o := b.over
	far := "Far end: lowest volts at a luminaire while it must be lit."
	if i < o.lists {
		s := o.sheets[i]
		b.drawBlocks(sh, o, s)
		notes := []string{"/n: the sheet that draws the block."}
		if i == 0 {
			b.legend(sh)
			if s.way.tables {
				b.litTable(sh)
				b.figures(sh)
			}
			if s.way.lists {
				b.drawBoardBlocks(sh, o.beside)
				notes = append(notes, far)
			}
			for _, p := range b.c.Places {
				if p.Key == mainCabinet {
					notes = append(notes, fmt.Sprintf("A block without a place of its own is in the %s, %s.", lower(p.Name), p.Designation))
				}
			}
		}
		return b.note(sh, nil, notes)
	}
	page := i - o.lists
	b.drawBoardBlocks(sh, o.pages[page])
	if page == 0 && !o.sheets[0].way.tables {
		b.litTable(sh)
		b.figures(sh)
	}
	return b.note(sh, nil, []string{"/n: the sheet that draws the board.", far})
}

// block draws a stage as a box: its name, its sheet, three lines.
func (b *book) block(sh *Sheet, key, name string, at rect, lines []string, to *place) {
	left, top := float64(at.x0), float64(at.y0)
	o := sh.scene.object(classBlock, key, strings.Join(append([]string{name}, lines...), ", "), ink.Attr{Name: "stage", Value: key})
	o.add(box(normalPen, left, top, float64(at.x1), float64(at.y1)))
	st := headStyle
	if width(name, st) > blockWidth-4.2 {
		st = nameStyle
	}
	o.add(textAt(left+1, top+2.2, fit(name, st, blockWidth-4.2), st, ink.Start))
	o.add(&line{at: point{left + blockWidth - 0.8, top + 2}, anchor: ink.End, runs: []run{{to: to, short: true}}})
	if len(lines) > 3 {
		lines = lines[:3]
	}
	for i, s := range lines {
		o.add(textAt(left+1, top+4.6+1.65*float64(i), fit(s, valueStyle, blockWidth-1.6), valueStyle, ink.Start))
	}
	here := b.place("block " + key)
	here.sheet, here.at, here.anchor = sh, point{left, top}, o.ID
}

// flow draws a way of energy or control as a polyline with a filled head.
func (b *book) flow(sh *Sheet, key, says string, energy, both bool, pts ...point) *object {
	o := sh.scene.object(classBlock, "flow-"+key, says)
	pen, length, wid := normalPen, 1.2, 0.8
	if energy {
		pen, length, wid = railPen, 1.4, 1.0
	}
	cut := func(tip, from point) (point, *head) {
		h := &head{tip: tip, len: length, wid: wid}
		switch {
		case tip.X > from.X:
			h.dx = 1
		case tip.X < from.X:
			h.dx = -1
		case tip.Y > from.Y:
			h.dy = 1
		default:
			h.dy = -1
		}
		return point{tip.X - h.dx*length, tip.Y - h.dy*length}, h
	}
	line := append([]point{}, pts...)
	n := len(line) - 1
	end, h := cut(line[n], line[n-1])
	line[n] = end
	heads := []*head{h}
	if both {
		start, h := cut(pts[0], pts[1])
		line[0] = start
		heads = append(heads, h)
	}
	o.add(&stroke{pts: line, pen: pen})
	for _, h := range heads {
		o.add(h)
	}
	return o
}
