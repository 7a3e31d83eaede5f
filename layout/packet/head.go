package packet

import (
	"fmt"

	"gloamwright/layout/ink"
)

// The words of the status, printed as they stand.
const (
	forConstruction    = "FOR CONSTRUCTION"
	notForConstruction = "NOT FOR CONSTRUCTION"
	draft              = "DRAFT"
)

// status is the word that every sheet bears.
func (b *book) status() string {
	switch {
	case !b.d.ForConstruction():
		return notForConstruction
	case b.record != nil:
		return recordStatus(b.record)
	case !b.d.Issued:
		return draft
	}
	return forConstruction
}

// drawHead draws the head of a list sheet: job, sheet number, the horizon with its half
// disc or the black bar, title, status, purpose.
func (p *pad) drawHead(s *sheetPlan) {
	job, pg := p.b.d.Site.Job, p.pg
	// the right block, from the edge leftwards
	x := pg.right()
	base := pg.t + 4.6
	small := tableText.as(ink.Regular)
	small.pt = 9
	number := style{ink.Bold, 14, 5, ink.Black}
	x -= p.write(x, base, fmt.Sprintf("of %d", p.last), small, ink.End) + 1
	x -= p.write(x, base, fmt.Sprint(p.n), number, ink.End) + 1
	x -= p.write(x, base, p.b.pageWord(), small, ink.End) + 5
	x -= p.write(x, base, "Revision "+p.b.revision(), small.as(ink.Medium), ink.End) + 5
	// the left block, cut before it
	left := pg.l
	id := style{ink.MonoBold, 9.5, 4, ink.Black}
	left += p.fit(left, base, job.Number.Val, id, x-left, ink.Start) + 3
	if left < x {
		left += p.fit(left, base, job.Title.Val, small.as(ink.Medium), x-left, ink.Start) + 3
	}
	if left < x-6 && job.Site.Val != "" {
		p.fit(left, base, job.Site.Val, small.in(ink.Mid), x-left, ink.Start)
	}
	p.horizon()
	// status
	edge := pg.right()
	if st := p.b.status(); st != notForConstruction {
		w := spans(st, statusText).width() + 5
		edge -= w
		p.frame(edge, pg.t+13.1, w, 6, headLine, ink.Black)
		p.write(edge+2.5, pg.t+13.1+4.1, st, statusText, ink.Start)
		edge -= 5
	}
	p.fit(pg.l, pg.t+headTitle, s.title(), sheetTitle, edge-pg.l, ink.Start)
	purpose, note := s.s.purpose, s.s.note
	if s.opens != nil && s.opens.purpose != "" {
		purpose = s.opens.purpose
	}
	if s.opens != nil && s.opens.note != "" {
		note = s.opens.note
	}
	p.fit(pg.l, pg.t+headPurpose, purpose, purposeText, pg.width, ink.Start)
	if note != "" {
		y := pg.t + headPurpose + purposeText.lead + 0.4
		w := p.write(pg.l, y, s.s.label, tableText.as(ink.Bold), ink.Start)
		indent := max(15, w+3)
		p.fit(pg.l+indent, y, note, tableText, pg.width-indent, ink.Start)
	}
}

// horizon draws the line with the half disc that travels as the sheets go by, or the
// black bar of a packet that nothing must be built from.
func (p *pad) horizon() {
	pg := p.pg
	if p.b.status() == notForConstruction {
		p.blackBar(pg.t+6.8, 4.8)
		return
	}
	y := pg.t + 8.5
	p.rule(pg.l, y, pg.width, barLine, ink.Dusk)
	p.halfDisc(discAt(pg, p.n, p.last), y, 2.3)
}

// discAt is the place of the half disc on sheet n of last.
func discAt(pg page, n, last int) float64 {
	return pg.l + 3 + (pg.width-6)*(float64(n)-0.5)/float64(last)
}

// blackBar writes NOT FOR CONSTRUCTION three times on black.
func (p *pad) blackBar(y, h float64) {
	pg := p.pg
	p.fill(pg.l, y, pg.width, h, ink.Black)
	st := style{ink.Bold, 8.5, 3.7, ink.White}
	for i := range 3 {
		p.write(pg.l+pg.width*(float64(i)+0.5)/3, y+h/2+1.1, notForConstruction, st, ink.Middle)
	}
}
