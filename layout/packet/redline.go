package packet

import (
	"fmt"

	"gloamwright/layout/ink"
)

// redLineRows is how many deviations a red-line sheet has room for.
const redLineRows = 9

// redLine is the sheet on which a technician writes what was built differently.
func (b *book) redLine() *section {
	s := &section{key: keyRedLine, title: "Red-line sheet", document: "Red-line sheet", letter: "X", label: "How",
		purpose: "Use this sheet to write what was built differently, so that the next revision is true.",
		note:    "One line for each thing. Mark the place on its own sheet too. Hand this sheet to the designer."}
	t := &table{st: tableText, min: blankRow, cols: []column{{head: "No", w: 8}, {head: "Sheet", w: 13}, {head: "Designation, place", w: 33},
		{head: "As drawn", w: 40}, {head: "As built", w: 40}, {head: "Why", w: 32}, {head: "Initials", w: 14, a: ink.Middle}}}
	head := t.head(0)
	s.blocks = append(s.blocks, head)
	for i := range redLineRows {
		cells := []cell{txt(fmt.Sprint(i + 1))}
		for range t.cols[1:] {
			cells = append(cells, writeIn())
		}
		s.blocks = append(s.blocks, t.line(b, 0, row{cells: cells, bare: true}))
	}
	grid := block{h: 60, gap: 0, fill: true, most: 200, next: true, draw: func(p *pad, y, h float64) { p.grid(y, h) }}
	s.blocks = append(s.blocks, b.head(0, b.pg.width, "Sketch", "one square is 5 mm"), grid, signHere("Drawn by, name in print", false))
	return s
}

// grid is a field to sketch in, squared at 5 mm.
func (p *pad) grid(y, h float64) {
	const square = 5.0
	rows := int((h - 3) / square)
	high := float64(rows) * square
	top := y + 1.5
	p.fill(p.pg.l, top, p.pg.width, high, ink.White)
	for i := 1; i < int(p.pg.width/square); i++ {
		x := p.pg.l + float64(i)*square
		p.stroke(x, top, x, top+high, hairline, gridGrey)
	}
	for i := 1; i < rows; i++ {
		p.rule(p.pg.l, top+float64(i)*square, p.pg.width, hairline, gridGrey)
	}
	p.frame(p.pg.l, top, p.pg.width, high, blankLine, ink.Dusk)
}

// signHere is a row of blanks for name, signature, date and, if asked, time.
func signHere(who string, time bool) block {
	return block{h: namedBlankHeight, gap: 3, draw: func(p *pad, y, h float64) { p.signature(y, who, time) }}
}

// signature draws the blanks to sign in.
func (p *pad) signature(y float64, who string, time bool) {
	const name, date, clock, gap = 58.0, 34.0, 18.0, 10.0 / 3
	x := p.pg.l
	p.namedBlank(x, y, name, who, "")
	x += name + gap
	sign := name
	if !time {
		sign += clock + gap
	}
	p.namedBlank(x, y, sign, "Signature", "")
	x += sign + gap
	p.namedBlank(x, y, date, "Date", dateGuide)
	if time {
		x += date + gap
		p.namedBlank(x, y, p.pg.right()-x, "Time", "")
	}
}
