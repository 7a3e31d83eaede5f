package packet

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/layout/ink"
)

// footCells are the fields of ISO 7200 at the foot; widths are for 180 mm.
type footCell struct {
	caption string
	w       float64
}

var footCells = []footCell{{"Owner", 37}, {"Identification", 28}, {"Revision", 14}, {"Issued", 22}, {"Document", 43}, {"Prepared", 21}, {"Approved", 15}}

// preparedCell is the place of who prepared the document among the cells.
const preparedCell = 5

// footWithFirm are the widths of the cells where a firm stands with who prepared.
var footWithFirm = []float64{37, 25, 14, 19, 40, 32, 13}

// footCells are the cells at the foot; the firm, if there is one, stands over who
// prepared.
func (b *book) footCells() []footCell {
	out := slices.Clone(footCells)
	if name := b.words.texts.Firm.Name; name != "" {
		for i, w := range footWithFirm {
			out[i].w = w
		}
		out[preparedCell].caption += ", " + name
	}
	return out
}

// language of the documents, ISO 639.
const language = "en"

// drawFoot draws the line that leads on, the fields and the scale bar.
func (p *pad) drawFoot(s *sheetPlan, next *sheetPlan) {
	pg, job := p.pg, p.b.d.Site.Job
	yb := pg.h - pg.bottom
	if r := p.b.first(keyRedLine); r > 0 {
		p.write(pg.l, yb-footHeight, fmt.Sprintf("Unclear or built differently: stop, write it on sheet %d.", r), remarkText, ink.Start)
	}
	if next != nil {
		title := style{ink.Medium, 9.5, 4, ink.Black}
		text := fmt.Sprintf("%s %d, %s", strings.ToLower(p.b.pageWord()), next.n, next.short())
		w := p.write(pg.right(), yb-footHeight, text, title, ink.End)
		x := pg.right() - w - 1.5
		y := yb - footHeight - 1.1
		p.polygon(ink.Black, ink.Point{X: x - 2.6, Y: y - 1.3}, ink.Point{X: x, Y: y}, ink.Point{X: x - 2.6, Y: y + 1.3})
		p.write(x-4, yb-footHeight, "Next", style{ink.Regular, 9.5, 4, ink.Mid}, ink.End)
		p.c.Link(ink.Rect{X: x - 4, Y: yb - footHeight - 3.4, W: w + 5.5, H: 4.4}, ink.Target{Sheet: next.n})
	}
	issued := ""
	switch {
	case p.b.record != nil:
		issued = p.b.record.Date
	case p.b.d.Issued && p.b.d.ForConstruction():
		issued = job.Date.Val
	}
	values := []string{job.Client.Val, job.Number.Val + "-" + s.s.letter, p.b.revision(), issued, s.s.document, job.Prepared.Val, ""}
	p.rule(pg.l, yb-15, pg.width, 0.35, ink.Black)
	x := pg.l
	for i, c := range p.b.footCells() {
		w := c.w * pg.width / 180
		at := x + 1.5
		if i == 0 {
			at = x
		} else {
			p.stroke(x, yb-14.2, x, yb-7.4, hairline, ink.Rule)
		}
		p.fit(at, yb-15+3.1, c.caption, footCaption, x+w-at-1, ink.Start)
		p.fit(at, yb-15+6.8, values[i], footValue, x+w-at-1, ink.Start)
		x += w
	}
	p.rule(pg.l, yb-6.8, pg.width, hairline, ink.Rule)
	p.scaleBar(pg.l, yb-2.2)
	p.write(pg.l+102.5, yb-2.2, "must measure 100 mm", style{ink.Regular, 8, 3.3, ink.Mid}, ink.Start)
	w := p.write(pg.right(), yb-2.2, "Gloamwright", footValue, ink.End)
	mark := pg.right() - w - 4.6
	p.halfDisc(mark, yb-2.2, 1.6)
	p.rule(mark-2.6, yb-2.2, 5.2, 0.35, ink.Dusk)
	p.write(mark-4, yb-2.2, pg.name+", "+language, style{ink.Regular, 8.5, 3.7, ink.Mid}, ink.End)
}

// scaleBar is exactly 100 mm long, so that a print can be checked.
func (p *pad) scaleBar(x, y float64) {
	p.rule(x, y, 100, 0.35, ink.Black)
	for i := 0; i <= 10; i++ {
		up := 1.5
		if i%5 == 0 {
			up = 2.6
		}
		at := x + float64(i)*10
		p.stroke(at, y+0.175, at, y-up, 0.35, ink.Black)
	}
}
