package packet

import (
	"fmt"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/layout/ink"
	"gloamwright/templates"
)

// checkLine is one line of the checklist, filled in.
type checkLine struct {
	number, key            string
	do, expect, unit, word string
	reason                 string // why it does not apply; empty: it does
}

// checkBlock is one part of the checklist, filled in.
type checkBlock struct {
	*templates.Block
	lines []checkLine
	hold  int // number of its hold point; 0: none
}

// first and last are the numbers of the lines that apply.
func (c *checkBlock) first() string { return c.edge(func(i, n int) int { return i }) }
func (c *checkBlock) last() string  { return c.edge(func(i, n int) int { return n - 1 - i }) }

func (c *checkBlock) edge(pick func(i, n int) int) string {
	for i := range c.lines {
		if l := c.lines[pick(i, len(c.lines))]; l.reason == "" {
			return l.number
		}
	}
	return c.Letter
}

// checkBlocks fills in the checklist. It is called before any page refers to a line.
func (b *book) checkBlocks() []checkBlock {
	var out []checkBlock
	hold := 0
	for i := range b.words.texts.Checklist {
		x := checkBlock{Block: &b.words.texts.Checklist[i]}
		for _, l := range x.Lines {
			for _, more := range b.repeats(l.Each) {
				c := checkLine{number: fmt.Sprintf("%s%d", x.Letter, len(x.lines)+1), key: l.Key, do: b.say(l.Do, more), word: l.Write}
				if b.words.applies(l.When) {
					c.expect, c.unit = b.say(l.Expect, more), b.say(l.Unit, more)
				} else {
					c.reason = b.say(l.Otherwise, more)
				}
				x.lines = append(x.lines, c)
			}
		}
		if x.Hold != nil {
			hold++
			x.hold = hold
		}
		out = append(out, x)
	}
	return out
}

// numberLines notes the numbers of the lines that texts refer to.
func (b *book) numberLines() {
	b.lineNumber = map[string]string{}
	for _, x := range b.checkBlocks() {
		for _, l := range x.lines {
			if l.key != "" {
				b.lineNumber[l.key] = l.number
			}
		}
	}
}

// repeats are the values of a line for each thing that it is repeated for.
func (b *book) repeats(each string) []map[string]string {
	var out []map[string]string
	switch each {
	case "":
		return []map[string]string{nil}
	case "board":
		for _, bd := range b.d.Circuit.Boards {
			ways := 0
			for _, w := range bd.Ways {
				if w.Lighting != nil {
					ways++
				}
			}
			out = append(out, map[string]string{"board-title": bd.Title, "board-plus": bd.Plus.Designation, "board-minus": bd.Minus.Designation, "board-ways": fmt.Sprint(ways)})
		}
	case "loop":
		for _, l := range b.d.Loops {
			out = append(out, map[string]string{"loop-name": l.Name, "loop-from": pins(l.From), "loop-to": pins(l.Joined), "loop-band": loopBand(l)})
		}
	case "condition":
		for _, c := range b.shown() {
			out = append(out, map[string]string{"condition-number": fmt.Sprint(c.Number), "condition-name": strings.ToLower(c.Name), "condition-expect": c.Expect})
		}
	case "threshold":
		for _, t := range b.d.Thresholds {
			if unseen[t.Key] {
				continue
			}
			out = append(out, map[string]string{"threshold-name": upper(t.Name), "threshold-band": thresholdBand(t), "threshold-unit": t.Unit})
		}
	}
	return out
}

// unseen are thresholds that cannot be approached on site: they lie on the mains side or
// in the coil.
var unseen = map[string]bool{"mains": true, "pick-up": true}

func pins(p [2]*circuit.Pin) string { return pinName(p[0]) + " and " + pinName(p[1]) }

// loopBand prints a loop resistance with its band, to a hundredth of an ohm.
func loopBand(l *facts.Loop) string {
	return outward(float64(l.Low), 2, false) + " to " + outward(float64(l.High), 2, true) + " Ω"
}

// thresholdBand prints where a threshold lies: its band, or the calculated value alone.
func thresholdBand(t *facts.Threshold) string {
	digits := 1
	if t.High > t.Low {
		return outward(t.Low, digits, false) + " to " + outward(t.High, digits, true) + " " + t.Unit
	}
	return fmt.Sprintf("calculated %.*f %s", digits, t.Value, t.Unit)
}

// checklist is commissioning from the first look to the hand-over.
func (b *book) checklist() *section {
	s := &section{key: keyChecklist, title: "Commissioning", document: "Commissioning checklist", letter: "K", label: "Before"}
	t := &table{st: lineText, min: plainRow, cols: []column{{head: "Line", w: 10}, {head: "Do", w: 76, pad: 3}, {head: "Expect", w: 28}, {head: "Measured", w: 34},
		{head: "OK     Not", w: 19, a: midAnchor}, {head: "Initials", w: 13, a: midAnchor}}}
	head := t.head(0)
	s.heads = &head
	for _, x := range b.checkBlocks() {
		band := b.band(x.Letter+" "+x.Title, b.say(x.Remark, nil), 2.4)
		if x.Sheet != "" {
			band.opens = &opening{sub: b.say(x.Sheet, nil), purpose: b.say(x.Purpose, nil), note: b.say(x.Before, nil)}
		}
		s.blocks = append(s.blocks, band)
		var rows []block
		for _, l := range x.lines {
			rows = append(rows, b.checkRow(t, l))
		}
		rows = together(rows)
		if x.hold > 0 { // stays with the last two lines
			for i := max(0, len(rows)-2); i < len(rows); i++ {
				rows[i].next = true
			}
		}
		s.blocks = append(s.blocks, rows...)
		if x.hold > 0 {
			text := b.say(x.Hold.Text, map[string]string{"first": x.first(), "last": x.last()})
			s.blocks = append(s.blocks, b.holdPoint(x.hold, text, x.Hold.Who))
		}
	}
	return s
}

// checkRow is a line with its blank, OK and Not, and initials; or the reason why it does
// not apply.
func (b *book) checkRow(t *table, l checkLine) block {
	number := half(l.number)
	marks := []string{"line " + l.number}
	if l.reason != "" {
		x := *t
		x.cols = []column{t.cols[0], t.cols[1], {w: 10}, {w: t.width() - t.cols[0].w - t.cols[1].w - 10}}
		return x.line(b, 0, row{marks: marks, cells: []cell{number, txt(l.do), fat("n/a"), txt("not applicable because " + l.reason)}})
	}
	blank := none()
	switch {
	case l.unit != "":
		blank = cell{kind: cellBlank, frame: 23, tail: l.unit}
	case l.word != "":
		blank = cell{kind: cellBlank, frame: 23, tail: l.word}
	}
	return t.line(b, 0, row{marks: marks, cells: []cell{number, txt(l.do), txt(l.expect), blank, {kind: cellTwo}, writeIn()}})
}

// holdPoint is the bar at which one signs before going on.
func (b *book) holdPoint(n int, text, who string) block {
	const bar, gap = 9.0, 1.0
	return block{h: bar + gap + namedBlankHeight + 1, gap: 2.5, marks: []string{fmt.Sprintf("hold point %d", n)}, draw: func(p *pad, y, h float64) {
		l := p.pg.l
		p.fill(l, y, p.pg.width, bar, ink.Black)
		p.write(l+3, y+bar/2+1.65, "STOP", style{ink.Bold, 13, 5, ink.White}, ink.Start)
		p.write(l+21, y+bar/2+1.35, fmt.Sprintf("Hold point %d", n), style{ink.Bold, 10.5, 4, ink.White}, ink.Start)
		p.fit(l+50, y+bar/2+1.3, text, style{ink.Regular, 10, 4, ink.White}, p.pg.width-52, ink.Start)
		x := l
		for _, f := range []struct {
			w              float64
			caption, guide string
		}{{58, who, ""}, {58, "Signature", ""}, {34, "Date", dateGuide}, {18, "Time", ""}} {
			p.namedBlank(x, y+bar+gap, f.w, f.caption, f.guide)
			x += f.w + 4
		}
	}}
}
