package packet

import (
	"strings"

	"gloamwright/layout/ink"
	"gloamwright/templates"
)

// cautions is the sheet of what can hurt, and of who may do what.
func (b *book) cautions() *section {
	s := &section{key: keyCautions, title: "Cautions and competence", document: "Cautions", letter: "S", label: "Before",
		purpose: "Use this sheet to know what can hurt you here, and who may do which work.",
		note:    "Read it before any other sheet, and once more before the battery goes in."}
	var absent []string
	first, noticed := true, false
	for i := range b.words.texts.Cautions {
		c := &b.words.texts.Cautions[i]
		if !b.words.applies(c.When) {
			if c.Absent != "" {
				absent = append(absent, c.Absent)
			}
			continue
		}
		x := b.caution(c)
		if first {
			x.gap = 0
		}
		first = false
		if c.Signal == "notice" && !noticed {
			x.group, noticed = true, true
		}
		s.blocks = append(s.blocks, x)
	}
	s.blocks = append(s.blocks, b.competence()...)
	remark := b.say(b.words.texts.Remark, nil)
	if len(absent) > 0 {
		remark += " Not printed, because this job has none: " + strings.Join(absent, ", ") + "."
	}
	s.blocks = append(s.blocks, b.paragraph(remark, noteText, 1.5))
	return s
}

// Measures of a caution, mm.
const (
	signalWide = 32.0
	cautionAt  = 36.0
)

// caution is one block: the signal word in its field, the fact, what to do.
func (b *book) caution(c *templates.Caution) block {
	lines := wrap(b.say(c.Text, nil), cautionText, b.pg.width-cautionAt)
	at, cut := cutLine(b.say(c.At, nil), remarkText, 60)
	if cut {
		b.noteCut(c.At)
	}
	head, cut := cutLine(b.say(c.Head, nil), cautionHead, b.pg.width-cautionAt-at.width()-3)
	if cut {
		b.noteCut(c.Head)
	}
	field := 6 + cautionText.lead*float64(len(lines)) + 2.2
	return block{h: field + 1.1, gap: 1.1, draw: func(p *pad, y, h float64) {
		l := p.pg.l
		mid := y + field/2
		word := style{ink.Bold, 10.5, 4, ink.Black}
		switch c.Signal {
		case "danger":
			p.fill(l, y, signalWide, field, ink.Black)
			word.color = ink.White
		case "warning":
			p.frame(l+warnLine/2, y+warnLine/2, signalWide-warnLine, field-warnLine, warnLine, ink.Black)
		case "caution":
			p.frame(l+0.15, y+0.15, signalWide-0.3, field-0.3, 0.3, ink.Black)
		}
		if c.Signal == "notice" {
			p.fill(l+3.5, mid-0.5, 5, 1, ink.Black)
		} else {
			p.triangle(l+6, mid-0.3, 5.6, word.color)
		}
		p.write(l+11, mid+1.3, strings.ToUpper(c.Signal), word, ink.Start)
		p.text(l+cautionAt, y+4.6, head, ink.Start)
		p.text(p.pg.right(), y+4.6, at, ink.End)
		p.lines(l+cautionAt, y+4.6+cautionText.lead, lines, cautionText.lead)
		p.rule(l, y+h, p.pg.width, hairline, ink.Rule)
	}}
}

// competence is who may do which work, to be signed.
func (b *book) competence() []block {
	t := &table{st: tableText, min: blankRow, cols: []column{{head: "Work", w: 66}, {head: "Who", w: 48}, {head: "Name in print", w: 34}, {head: "Signature", w: 32}}}
	out := []block{b.head(0, b.pg.width, "Who may do what", ""), t.head(0)}
	var rows []block
	for _, c := range b.words.texts.Competence {
		if b.words.applies(c.When) {
			rows = append(rows, t.line(b, 0, row{cells: []cell{txt(b.say(c.Work, nil)), txt(b.say(c.Who, nil)), writeIn(), writeIn()}}))
		}
	}
	return append(out, together(rows)...)
}
