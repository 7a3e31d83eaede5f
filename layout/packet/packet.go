// Package packet makes the build packet: the paper that a technician builds,
// measures and signs from. Every page is one section in a file of its own; a page
// prints what the Design holds and computes nothing.
//
// Lengths are millimetres from the upper left corner of the sheet. A packet is laid
// out twice or more: the first time the sheets are counted, then they are made again
// with true sheet numbers in their texts, until nothing moves.
package packet

import (
	"errors"
	"fmt"
	"strings"
	"time"

	"gloamwright/internal/design"
	"gloamwright/layout/ink"
	"gloamwright/layout/schematic"
)

// Packet is a finished build packet.
type Packet struct {
	PDF []byte
	// Sheets holds the title of each sheet.
	Sheets []string
	// Cut lists the texts that had to be shortened somewhere.
	Cut []string

	recorders []*ink.Recorder
	plans     []*sheetPlan
	refs      *refs
	contents  []contentLine
}

// Make draws the build packet of d with its schematic sheets as a PDF document. It
// fails when a text holds a sign that the type faces lack; the error names all of
// them with their places.
func Make(d *design.Design, sheets []*schematic.Sheet) ([]byte, error) {
	p, err := Build(d, sheets)
	if err != nil {
		return nil, err
	}
	return p.PDF, nil
}

// rounds is how often a packet is laid out at most before its references must stand.
const rounds = 8

// Build is Make with an account of what was made.
func Build(d *design.Design, sheets []*schematic.Sheet) (*Packet, error) {
	return newBook(d, sheets).settle()
}

// settle lays the book out until nothing moves, and draws it.
func (b *book) settle() (*Packet, error) {
	for range rounds {
		b.start()
		if err := b.readTexts(); err != nil {
			return nil, err
		}
		plans := b.layOut()
		now := b.refsOf(plans)
		if now.equal(b.refs) {
			return b.draw(plans)
		}
		b.refs = now
	}
	return nil, errors.New("the sheet numbers of the document do not settle")
}

// refsOf collects where everything stands.
func (b *book) refsOf(plans []*sheetPlan) *refs {
	r := newRefs()
	r.total = len(plans)
	for _, s := range plans {
		k := s.s.key
		if r.first[k] == 0 {
			r.first[k] = s.n
		}
		r.last[k] = s.n
		for _, x := range s.blocks {
			for _, m := range x.marks {
				if r.at[m] == 0 {
					r.at[m] = s.n
				}
			}
		}
	}
	return r
}

// layOut makes all sections and breaks them into sheets.
func (b *book) layOut() []*sheetPlan {
	var out []*sheetPlan
	for _, s := range b.sections() {
		pg := b.pg
		if s.side {
			pg = b.sidePg
		}
		for _, p := range s.paginate(pg) {
			p.n = len(out) + 1
			out = append(out, p)
		}
	}
	return out
}

// draw draws the sheets and writes the document.
func (b *book) draw(plans []*sheetPlan) (*Packet, error) {
	if err := b.lost(plans); err != nil {
		return nil, err
	}
	job := b.d.Site.Job
	date, err := time.Parse(time.DateOnly, job.Date.Val)
	if err != nil {
		date = time.Time{} // none, or not in the form of ISO 8601: a finding says so
	}
	pdf := ink.NewPDF(ink.Info{
		Title:    fmt.Sprintf("%s %s, %s, revision %s", job.Number.Val, job.Title.Val, b.kind(), job.Revision.Val),
		Author:   job.Prepared.Val,
		Subject:  strings.TrimSpace(job.Site.Val + " for " + job.Client.Val),
		Keywords: strings.Join([]string{b.status(), job.Number.Val, "revision " + job.Revision.Val}, ", "),
		Date:     date,
	})
	out := &Packet{plans: plans, refs: b.refs, contents: b.keys}
	b.findSymbols(plans)
	for i, s := range plans {
		w, h := b.size(s.s)
		title := s.title()
		if s.s.book != "" {
			title = s.s.book
		}
		c := pdf.Sheet(w, h, fmt.Sprintf("%d %s", s.n, title))
		out.Sheets = append(out.Sheets, title)
		if r, ok := c.(*ink.Recorder); ok {
			out.recorders = append(out.recorders, r)
		}
		if s.s.drawing != nil {
			b.drawSchematic(c, s, len(plans))
			continue
		}
		p := &pad{c: c, pg: b.pg, b: b, n: s.n, last: len(plans)}
		if s.s.side {
			p.pg = b.sidePg
		}
		var next *sheetPlan
		if i+1 < len(plans) {
			next = plans[i+1]
		}
		if s.s.ownHead == nil || s.k > 1 {
			p.drawHead(s)
		} else {
			s.s.ownHead(p)
		}
		p.drawFoot(s, next)
		s.drawBlocks(p)
		if s.s.crosses {
			p.crosses()
		}
	}
	out.Cut = b.cuts
	if out.PDF, err = pdf.Output(); err != nil {
		return nil, err
	}
	return out, nil
}

// lost reports references to sections and marks that no sheet holds.
func (b *book) lost(plans []*sheetPlan) error {
	var list []string
	for _, k := range sortedKeys(b.refs.asked) {
		if b.refs.first[k] == 0 && b.refs.at[k] == 0 {
			list = append(list, k)
		}
	}
	if len(list) > 0 {
		return fmt.Errorf("the packet refers to what it does not hold: %s", strings.Join(list, ", "))
	}
	return nil
}
