package schematic

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// Places of the legend, in modules.
const (
	legendTop     = 8.5
	legendColumn  = 37.0
	legendColumns = 3
	legendCell    = 10.0 // room of the symbol itself
	legendGap     = 1.9  // between the bodies of two symbols, one over the other
	legendLeast   = 4.0  // height of an entry: two lines of text
	legendRight   = 122.0
	legendSample  = 11.0 // from an example of a label to its meaning
	legendRow     = 1.75
	linesLong     = 8.0
	linesRow      = 2.0
	linesHeight   = 9.0
	legendBlock   = 2.5  // between two blocks of text
	legendKeyEnd  = 45.0 // below the figure of a way, where it stands here
)

// legendDiagram is the document type of the legend.
const legendDiagram = "Legend"

// entry is one symbol of the legend.
type entry struct {
	sym   *symbols.Symbol
	mark  string
	parts []string // designations of what it stands for in this job
}

// legendEntries are the symbols that the sheets show, in the order of the catalogue;
// blocks of several sizes are one.
func (b *book) legendEntries() []entry {
	byName := map[string]*entry{}
	var out []*entry
	add := func(s *symbols.Symbol, part, mark string) {
		e := byName[s.Name]
		if e == nil {
			e = &entry{sym: s, mark: mark}
			byName[s.Name] = e
			out = append(out, e)
		}
		if part != "" && !slices.Contains(e.parts, part) {
			e.parts = append(e.parts, part)
		}
	}
	for _, sh := range b.sheets {
		for _, y := range sh.scene.symbols {
			switch {
			case y.sym == nil:
			case y.sym == &symbols.Terminal || y.part == nil || y.part.Kind == circuit.MainsConnection:
				add(y.sym, "", "")
			default:
				add(y.sym, y.part.Designation, y.mark)
			}
		}
		if len(sh.scene.points) > 0 {
			add(&symbols.TestPoint, "", "")
		}
		for _, r := range sh.scene.refs {
			if r.out {
				add(&symbols.ReferenceLeaving, "", "")
			} else {
				add(&symbols.ReferenceArriving, "", "")
			}
		}
		for _, o := range sh.scene.objects {
			switch o.Class {
			case classCable:
				add(&symbols.CableOval, "", "")
			case classDot:
				add(&symbols.Junction, "", "")
			}
		}
	}
	order := map[string]int{}
	for i, s := range symbols.All() {
		if _, ok := order[s.Name]; !ok {
			order[s.Name] = i
		}
	}
	slices.SortStableFunc(out, func(a, z *entry) int { return order[a.sym.Name] - order[z.sym.Name] })
	var list []entry
	for _, e := range out {
		list = append(list, *e)
	}
	return list
}

// drawLegend draws the last sheet: the symbols in use, how labels are built, what the
// class letters mean; and how to read a way, where no board's sheet has room for it.
func (b *book) drawLegend(sh *Sheet) error {
	x, y := colText+legendColumn*(legendColumns-1), b.legendSymbols(sh)
	right := legendTop
	if b.key(sh, int(legendRight)) {
		right = legendKeyEnd
	}
	below := b.legendLabels(sh, legendRight, right)
	if y+b.lettersHeight() > b.down(roomAlone) {
		x, y = legendRight, below
	}
	y = b.legendLetters(sh, x, y)
	if y+linesHeight <= b.down(roomAlone) {
		b.legendLines(sh, x, y)
	}
	return b.note(sh, nil, []string{
		"Symbols follow IEC 60617 as handbooks print it; every contact is shown with its coil dead.",
		"Class letters: " + circuit.LetterEdition + ", main classes. The battery is G, as one that gives energy.",
		"Lines cross without joining; a dot joins them.",
	})
}

// levelTurn is how a symbol stands in the legend: level where it may.
func levelTurn(s *symbols.Symbol) symbols.Turn {
	if s.Turns == symbols.Turnable {
		return symbols.H
	}
	return symbols.V
}

// legendSymbols draws the symbols in columns and returns where the last one ends in the
// last column.
func (b *book) legendSymbols(sh *Sheet) float64 {
	o := sh.scene.object(classNote, "symbols", "Symbols of these sheets")
	o.add(textAt(colText, legendTop, "Symbols of these sheets", headStyle, ink.Start))
	col, y := 0, legendTop+2.5
	bottom := b.down(roomAlone)
	for _, e := range b.legendEntries() {
		turn := levelTurn(e.sym)
		r := e.sym.Bounds(turn)
		h, below := max(legendLeast, r.H+legendGap), e.sym.Below(turn)
		h += below
		if y+h > bottom && col+1 < legendColumns {
			col, y = col+1, legendTop+2.5
		}
		left := colText + legendColumn*float64(col)
		at := node{int(left + legendCell/2 - r.X - r.W/2), int(y + (h-below)/2 - r.Y - r.H/2)}
		o.add(&symbolMark{e.sym, at, turn, e.mark})
		name := strings.ToUpper(e.sym.Name[:1]) + e.sym.Name[1:]
		room := legendColumn - legendCell - 2
		middle := float64(at.Y) + r.Y + r.H/2
		lines := []*line{textAt(left+legendCell+0.8, middle, fit(name, nameStyle, room), nameStyle, ink.Start)}
		if t := listed(e.parts, room); t != "" {
			lines = append(lines, textAt(left+legendCell+0.8, middle, t, valueStyle, ink.Start))
		}
		for i, l := range lines {
			l.at.Y += textHeight/2 + linePitch*(float64(i)-float64(len(lines)-1)/2)
			o.add(l)
		}
		y += h
	}
	if col+1 < legendColumns {
		return legendTop
	}
	return y + legendBlock
}

// listed names as many designations as a line has room for: "-F1, -F2 and 7 more".
func listed(names []string, room float64) string {
	for n := len(names); n > 0; n-- {
		t := strings.Join(names[:n], ", ")
		if more := len(names) - n; more > 0 {
			t += fmt.Sprintf(" and %d more", more)
		}
		if width(t, valueStyle) <= room {
			return t
		}
	}
	return ""
}

// label is an example of a label with its meaning.
type label struct{ sample, means string }

// labels are the labels of this job, an example of each sort.
func (b *book) labels() []label {
	var out []label
	add := func(sample, means string) {
		if sample != "" {
			out = append(out, label{sample, means})
		}
	}
	for _, kind := range []circuit.Kind{circuit.Relay, circuit.Fuse} {
		i := slices.IndexFunc(b.c.Parts, func(p *circuit.Part) bool { return p.Kind == kind })
		if i >= 0 {
			p := b.c.Parts[i]
			add(p.Designation, "part: class letter and number")
			add(p.Pins[0].String(), "its terminal "+p.Pins[0].Name)
			break
		}
	}
	for _, p := range b.c.Places {
		add(p.Designation, "place: "+lower(p.Name))
		break
	}
	for _, bd := range b.c.Boards {
		w := bd.Ways[0]
		add(w.Fuse.Designation, fmt.Sprintf("fuse: board %d, way %d", bd.Number, w.Number))
		add(w.TermPlus.Designation, "terminal of strip "+bd.Strip)
		add(w.WirePlus.Number, "wire: its number at both ends")
		break
	}
	if l := b.firstLighting(); l != nil {
		p := l.Points[0]
		add(p.Luminaire.Designation, "luminaire; its leg is "+p.Leg.Designation)
		add(p.Leg.Designation, "cable, with its length")
		if plus, minus := cores(p.Leg); plus != nil && minus != nil {
			add(plus.Number+", "+minus.Number, "its cores, L+ and L−")
		}
		if s := coresAndSize(p.Leg); s != "" {
			add(s, "two cores of that size")
		}
		if l.TestPoint != nil {
			add(l.TestPoint.Label, "test point; black probe on "+BlackLabel)
		}
	}
	for _, r := range b.c.Rails {
		if r.Positive {
			add(r.Name, "plus rail; L− is common to all")
			break
		}
	}
	add("/2.B7", "goes on on sheet 2, zone B7")
	var seen []string
	for _, c := range b.c.Conductors {
		if c.Colour != "" && !slices.Contains(seen, c.Colour) {
			seen = append(seen, c.Colour)
		}
	}
	slices.Sort(seen)
	for _, c := range seen {
		if word, ok := catalogue.ColourWord(c); ok {
			add(c, "colour: "+word)
		}
	}
	return out
}

// firstLighting is the first lighting circuit of the first board that has one.
func (b *book) firstLighting() *circuit.Lighting {
	for _, bd := range b.c.Boards {
		for _, w := range bd.Ways {
			if w.Lighting != nil {
				return w.Lighting
			}
		}
	}
	return nil
}

// legendLabels draws how labels are built and returns where the next block may begin.
func (b *book) legendLabels(sh *Sheet, x, y float64) float64 {
	o := sh.scene.object(classNote, "labels", "How labels are built")
	o.add(textAt(x, y, "How labels are built", headStyle, ink.Start))
	y += 2.4
	for _, l := range b.labels() {
		o.add(textAt(x, y, fit(l.sample, nameStyle, legendSample-0.6), nameStyle, ink.Start),
			textAt(x+legendSample, y, fit(l.means, valueStyle, colEnd-x-legendSample), valueStyle, ink.Start))
		y += legendRow
	}
	return y + legendBlock
}

// letters are the classes that the parts of this job bear.
func (b *book) letters() []circuit.Class {
	used := map[string]bool{"W": len(b.c.Cables) > 0}
	for _, p := range b.c.Parts {
		used[p.Kind.Letter()] = true
	}
	return slices.DeleteFunc(slices.Clone(circuit.Classes), func(c circuit.Class) bool { return !used[c.Letter] })
}

func (b *book) lettersHeight() float64 { return 2.4 + legendRow*float64(len(b.letters())) }

// legendLines draws what the sorts of lines mean.
func (b *book) legendLines(sh *Sheet, x, y float64) {
	o := sh.scene.object(classNote, "line-sorts", "Lines")
	o.add(textAt(x, y, "Lines", headStyle, ink.Start))
	for i, s := range []string{"rail, or bar of a board", "wire, core or track", "place, stage or mains side", "between the ways of a board"} {
		y := y + 2.4 + linesRow*float64(i)
		level := y - textHeight/2
		switch i {
		case 0:
			o.add(segment(railPen, x, level, x+linesLong, level))
		case 1:
			o.add(segment(normalPen, x, level, x+linesLong, level))
		case 2:
			o.add(boundarySide(x, level, x+linesLong, level))
		case 3:
			o.add(segment(guidePen, x, level, x+linesLong, level))
		}
		o.add(textAt(x+linesLong+1, y, s, valueStyle, ink.Start))
	}
}

// legendLetters draws what the class letters mean and returns where the next block may
// begin.
func (b *book) legendLetters(sh *Sheet, x, y float64) float64 {
	o := sh.scene.object(classNote, "letters", "Class letters")
	o.add(textAt(x, y, "Class letters", headStyle, ink.Start))
	y += 2.4
	for _, c := range b.letters() {
		o.add(textAt(x, y, c.Letter, nameStyle, ink.Start), textAt(x+2.5, y, fit(c.Purpose, valueStyle, legendColumn-4), valueStyle, ink.Start))
		y += legendRow
	}
	return y + legendBlock
}
