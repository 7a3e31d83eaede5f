package packet

import (
	"fmt"
	"slices"

	"gloamwright/internal/facts"
	"gloamwright/layout/ink"
)

// testPoints are the readings to take, condition by condition.
func (b *book) testPoints() *section {
	s := &section{key: keyTestPoints, title: "Test points", document: "Test point table", letter: "M", label: "Before",
		purpose: "Use this sheet to prove with a meter that the system stands where it was calculated to stand.",
		note:    "Meter range DC 60 V. Red probe, then black probe, as listed. Start with condition 1.",
		sub: func(topics []string) string {
			if len(topics) == 1 {
				return "condition " + topics[0]
			}
			return "conditions " + topics[0] + " to " + topics[len(topics)-1]
		}}
	t := &table{st: tableText, min: plainRow, cols: []column{{head: "Point", w: 13}, {head: "What it shows", w: 40}, {head: "Red probe", w: 20.5},
		{head: "Black probe", w: 20.5}, {head: "Low V", w: 12, a: endAnchor}, {head: "Typical V", w: 17, a: endAnchor}, {head: "High V", w: 13, a: endAnchor},
		{head: "Measured V", w: 23, a: midAnchor}, {head: "OK", w: 9, a: midAnchor}, {head: "Else", w: 12, a: midAnchor}}}
	shown := b.shown()
	for _, c := range shown {
		i := b.conditionIndex(c)
		topic := fmt.Sprint(c.Number)
		head := b.conditionHead(c)
		head.topic = topic
		s.blocks = append(s.blocks, head, t.head(0))
		var rows []block
		for _, r := range b.d.Readings {
			band := r.Bands[i]
			rw := row{topic: topic, changed: b.d.Changes != nil && b.d.Changes.Moved(r.Point.Label, c.Key), cells: []cell{
				fat(r.Point.Label), txt(r.Point.Shows), txt(pinName(r.Point.Red)), txt(pinName(r.Point.Black)),
				txt(lowVolt(band.Low)), half(typicalVolt(band.Typical)), txt(highVolt(band.High)), writeIn(), tickBox(), txt(b.elseBlock(r, c))}}
			rw.marks = []string{readingMark(r.Point.Label, c.Key)}
			if c.Number == 1 {
				rw.marks = append(rw.marks, rowMark(r.Point.Label))
			}
			x := t.line(b, 0, rw)
			x.next = true
			rows = append(rows, x)
			for _, o := range r.OrAt(i) {
				x := t.line(b, 0, row{topic: topic, cells: []cell{
					fat("or"), over(txt("with "+o.With), 2), txt(lowVolt(o.Low)), half(typicalVolt(o.Typical)), txt(highVolt(o.High)), none(), none(), none()}})
				x.next = true
				rows = append(rows, x)
			}
		}
		if n := len(rows); n > 0 {
			rows[n-1].next = c == shown[len(shown)-1] // the words below it stay with the last
		}
		s.blocks = append(s.blocks, rows...)
	}
	example := ""
	if f := b.first(keyFaults); f > 0 {
		example = fmt.Sprintf(" (%d.1 is sheet %d, block 1)", f, f)
	}
	s.blocks = append(s.blocks, b.paragraph("Outside the band: write the reading, leave OK empty, go on at Else"+example+". End means the lamp of the circuit with the lowest voltage. Bands are worst case and include the meter's own error.", noteText, 0.5))
	return s
}

func readingMark(point, condition string) string { return "reading " + point + " " + condition }

// conditionHead is the black figure, how to set the condition and what to expect.
func (b *book) conditionHead(c *facts.Condition) block {
	const least, label = 13.6, 15.0
	room := b.pg.width - 16 - label - 46
	set := wrap(c.Set, tableText, room)
	expect := wrap(c.Expect, tableText, room)
	n := len(set) + len(expect)
	h := max(least, 5.6+float64(n)*tableText.lead+0.8)
	return block{h: h, gap: 2.5, next: true, marks: []string{"condition " + c.Key}, draw: func(p *pad, y, h float64) {
		l := p.pg.l
		p.fill(l, y, p.pg.width, h, ink.Tint)
		p.fill(l, y, 13, h, ink.Black)
		p.write(l+6.5, y+h/2+2.2, fmt.Sprint(c.Number), style{ink.Bold, 18, 7, ink.White}, ink.Middle)
		p.write(l+16, y+4.3, c.Name, style{ink.Bold, 10.5, 4, ink.Black}, ink.Start)
		base := y + 8.6
		p.write(l+16, base, "Set", tableText.as(ink.Bold), ink.Start)
		p.lines(l+16+label, base, set, tableText.lead)
		base += float64(len(set)) * tableText.lead
		p.write(l+16, base, "Expect", tableText.as(ink.Bold), ink.Start)
		p.lines(l+16+label, base, expect, tableText.lead)
		p.namedBlank(p.pg.right()-44, y+0.7, 28, "Date", dateGuide)
		p.namedBlank(p.pg.right()-14.5, y+0.7, 14, "Initials", "")
	}}
}

// elseBlock is where to go on when a reading is outside its band: the block of the
// fault-finding table that this reading tells best, or that it moves in at all.
func (b *book) elseBlock(r *facts.Reading, c *facts.Condition) string {
	g := 0
	for _, f := range b.d.Faults {
		if f.Best.Point == r.Point.Label && f.Best.Condition == c.Key {
			g = f.Group
			break
		}
	}
	if g == 0 {
		for _, f := range b.d.Faults {
			for _, m := range f.Moved {
				if m.Point == r.Point.Label && m.Condition == c.Key && (g == 0 || f.Group < g) {
					g = f.Group
				}
			}
		}
	}
	if g == 0 || b.blockOf[g] == 0 {
		return ""
	}
	return fmt.Sprintf("%d.%d", b.refs.at[faultMark(g)], b.blockOf[g])
}

func faultMark(group int) string { return fmt.Sprintf("fault group %d", group) }

// matrix is all readings side by side, on a sheet on its side.
func (b *book) matrix() *section {
	s := &section{key: keyMatrix, title: "Test points, all conditions", document: "Test point table", letter: "M", side: true, label: "See also",
		purpose: "Use this sheet to see every reading side by side: to compare, to look for a fault, to keep by the cabinet.",
		note:    fmt.Sprintf("%s hold the steps that set each condition, and the blanks to sign.", b.upperSheets(keyTestPoints))}
	shown := b.shown()
	const most = 6
	shown = shown[:min(most, len(shown))]
	if len(shown) == 0 {
		return nil
	}
	pg := b.sidePg
	first := 52.0
	each := (pg.width - first) / float64(len(shown))
	value := 15.0
	blank := each - value - 1.5
	headHigh := 13.0
	s.heads = &block{h: headHigh, draw: func(p *pad, y, h float64) {
		p.write(p.pg.l, y+h-1.4, "Point, probes", columnHead, ink.Start)
		for i, c := range shown {
			x := p.pg.l + first + float64(i)*each + 1.5
			p.fill(x, y, each-1.5, h, ink.Tint)
			p.fill(x, y, 8, h, ink.Black)
			p.write(x+4, y+h/2+1.8, fmt.Sprint(c.Number), style{ink.Bold, 15, 5, ink.White}, ink.Middle)
			lines, _ := cutLines(c.Name, groupHead, each-11.5, 2)
			p.lines(x+9.5, y+4.4, lines, 4)
		}
		p.rule(p.pg.l, y+h, p.pg.width, headLine, ink.Black)
	}}
	var rows []block
	const high = 9.2
	for _, r := range b.d.Readings {
		rows = append(rows, block{h: high, draw: func(p *pad, y, h float64) {
			l := p.pg.l
			p.write(l, y+3.9, r.Point.Label, tableText.as(ink.Bold), ink.Start)
			p.fit(l+11.5, y+3.9, r.Point.Shows, tableText, first-12, ink.Start)
			p.fit(l+11.5, y+7.8, pinName(r.Point.Red)+" to "+pinName(r.Point.Black), noteText, first-12, ink.Start)
			p.rule(l, y+h, first-1, hairline, ink.Rule)
			for i, c := range shown {
				band := r.Bands[p.b.conditionIndex(c)]
				x := l + first + float64(i)*each + 1.5
				if or := r.OrAt(p.b.conditionIndex(c)); len(or) > 0 {
					p.write(x+value-1.5, y+3.9, typicalVolt(band.Typical), tableText, ink.End)
					p.write(x+value-1.5, y+7.9, "or "+typicalVolt(or[0].Typical), tableText, ink.End)
				} else if highVolt(band.High) == "0.1" {
					p.write(x+value-1.5, y+5.8, "0.0", tableText, ink.End)
				} else {
					p.write(x+value-1.5, y+3.9, highVolt(band.High), tableText, ink.End)
					p.write(x+value-1.5, y+7.9, lowVolt(band.Low), tableText, ink.End)
				}
				p.rule(x, y+h, value, hairline, ink.Rule)
				p.blank(x+value, y, blank, h)
			}
			if ch := p.b.d.Changes; ch != nil {
				for _, c := range shown {
					if ch.Moved(r.Point.Label, c.Key) {
						p.changed(y, h)
						break
					}
				}
			}
		}})
	}
	if room := pg.end() - pg.top() - headHigh; float64(len(rows))*high > room {
		rows[(len(rows)+1)/2].group = true // two sheets of equal length
	}
	s.blocks = append(s.blocks, together(rows)...)
	note := fmt.Sprintf("Each pair of figures is the highest and the lowest reading to expect, in volts DC; 0.0 stands for 0.0 to 0.1. A reading outside its pair: %s.", b.sheets(keyFaults))
	if slices.ContainsFunc(b.d.Readings, func(r *facts.Reading) bool {
		return slices.ContainsFunc(shown, func(c *facts.Condition) bool { return len(r.OrAt(b.conditionIndex(c))) > 0 })
	}) {
		note += fmt.Sprintf(" A figure with or: a relay may stand either way; typical readings, their bands are on %s.", b.sheets(keyTestPoints))
	}
	s.blocks = append(s.blocks, b.paragraphIn(note, noteText, 0.5, pg.width))
	return s
}
