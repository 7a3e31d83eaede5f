package packet

import (
	"fmt"

	"gloamwright/internal/commission"
	"gloamwright/internal/design"
	"gloamwright/layout/ink"
)

// keyRecord is the section of a commissioning record.
const keyRecord = "record"

// Record draws the commissioning record of a plant as a PDF document: the readings as
// left against their bands, what is open, and the blanks to sign.
func Record(d *design.Design, r *commission.Record) ([]byte, error) {
	p, err := buildRecord(d, r)
	if err != nil {
		return nil, err
	}
	return p.PDF, nil
}

// buildRecord is Record with an account of what was made.
func buildRecord(d *design.Design, r *commission.Record) (*Packet, error) {
	b := newBook(d, nil)
	b.record = r
	return b.settle()
}

// recordStatus is the word in the status box of a record.
func recordStatus(r *commission.Record) string {
	if r.Passed {
		return "PASSED"
	}
	return fmt.Sprintf("OPEN POINTS: %d", r.Open)
}

// recordSection is the whole record.
func (b *book) recordSection() *section {
	r := b.record
	s := &section{key: keyRecord, title: "Commissioning record", document: "Commissioning record", letter: "R", label: "Made from",
		purpose: "Use this record to know what was measured, what stood inside its band, and what is still open.",
		note:    fmt.Sprintf("The readings sheet of %s, revision %s, as it was filled.", r.Job, r.Revision)}
	s.blocks = append(s.blocks, b.recordCounts(), b.recordWho())
	s.blocks = append(s.blocks, b.recordOpen()...)
	s.blocks = append(s.blocks, b.recordReadings()...)
	return s
}

// recordCounts is the row of figures at the head of a record.
func (b *book) recordCounts() block {
	count := map[commission.Verdict]int{}
	for _, j := range b.record.Judged {
		count[j.Verdict]++
	}
	all := len(b.record.Judged)
	slips := count[commission.UnitSlip] + count[commission.Swapped] + count[commission.Unreadable]
	fields := []struct {
		caption string
		n       int
	}{{"Readings", all}, {"Inside their band", count[commission.Inside]}, {"Outside", count[commission.Outside]}, {"Not measured", count[commission.Missing]}, {"To read again", slips}}
	return block{h: 13, draw: func(p *pad, y, h float64) {
		w := p.pg.width / float64(len(fields))
		for i, f := range fields {
			x := p.pg.l + w*float64(i)
			if i > 0 {
				p.stroke(x, y+0.5, x, y+h-2, hairline, ink.Rule)
				x += 3
			}
			p.write(x, y+3, f.caption, style{ink.Regular, 8.5, 3.7, ink.Mid}, ink.Start)
			p.write(x, y+9.6, fmt.Sprint(f.n), style{ink.Bold, 15, 6, ink.Black}, ink.Start)
		}
	}}
}

// recordWho says who measured what, when and with what.
func (b *book) recordWho() block {
	r := b.record
	const halfWidth = 90.0
	t := &table{st: tableText, min: plainRow, cols: []column{{w: 26}, {w: halfWidth - 26}, {w: 26}, {w: halfWidth - 26}}}
	blank := func(s string) cell {
		if s == "" {
			return writeIn()
		}
		return fat(s)
	}
	rows := []row{
		{cells: []cell{txt("Plant"), fat(r.Title + ", " + r.Site), txt("Packet"), fat(r.Job + ", revision " + r.Revision)}},
		{cells: []cell{txt("Measured by"), blank(r.Tester), txt("Meter"), blank(r.Meter)}},
		{cells: []cell{txt("Measured on"), blank(r.Date), txt("Room, battery"), writeIn()}},
	}
	var blocks []block
	h := headLine
	for _, x := range rows {
		l := t.line(b, 0, x)
		blocks = append(blocks, l)
		h += l.h
	}
	return block{h: h, draw: func(p *pad, y, _ float64) {
		p.rule(p.pg.l, y, p.pg.width, headLine, ink.Black)
		y += headLine
		for _, l := range blocks {
			l.draw(p, y, l.h)
			y += l.h
		}
	}}
}

// verdictWords are how a verdict stands in the table of open points.
var verdictWords = map[commission.Verdict]string{
	commission.Missing: "not measured", commission.UnitSlip: "unit slip", commission.Swapped: "probes swapped", commission.Unreadable: "not a voltage",
}

// recordOpen is what is outside, missing or to be read again, with the likely faults
// and the next reading.
func (b *book) recordOpen() []block {
	r := b.record
	var open []commission.Judged
	for _, j := range r.Judged {
		if j.Verdict != commission.Inside {
			open = append(open, j)
		}
	}
	if len(open) == 0 {
		return []block{b.head(0, b.pg.width, "Outside, not measured, open", "nothing passes by being absent"), b.paragraph("Nothing is open: every reading was taken and stands inside its band.", tableText, 1), b.recordSign()}
	}
	t := &table{st: tableText, min: blankRow, cols: []column{{head: "What", w: 36}, {head: "Found", w: 42}, {head: "What it says", w: 56}, {head: "What was done", w: 46}}}
	out := []block{b.head(0, b.pg.width, "Outside, not measured, open", "nothing passes by being absent"), t.head(0)}
	var rows []block
	for _, j := range open {
		found := verdictWords[j.Verdict]
		if j.Text != "" {
			found = j.Text
		}
		if j.Verdict != commission.Missing {
			found += "; band " + recordBand(j)
		}
		rows = append(rows, t.line(b, 0, row{cells: []cell{half(fmt.Sprintf("%s, condition %d", j.Point, j.Number)), txt(found), txt(j.Says), writeIn()}}))
	}
	out = append(out, together(rows)...)
	if len(r.Likely) > 0 {
		out = append(out, b.recordLikely()...)
	}
	return append(out, b.recordSign())
}

// recordBand is a band as it is printed.
func recordBand(j commission.Judged) string { return fmt.Sprintf("%.1f to %.1f V", j.Low, j.High) }

// mostLikely is how many faults a record names.
const mostLikely = 6

// recordLikely names the faults that explain the readings, likeliest first, and the
// reading that tells them apart.
func (b *book) recordLikely() []block {
	r := b.record
	t := &table{st: tableText, min: plainRow, cols: []column{{head: "", w: 8}, {head: "Likely fault", w: 66}, {head: "What is then seen", w: 74}, {head: "Explains", w: 16, a: ink.End}, {head: "Against it", w: 16, a: ink.End}}}
	out := []block{b.head(0, b.pg.width, "Most likely", "single faults, solved one by one; those that explain most come first"), t.head(0)}
	var rows []block
	for i, l := range r.Likely[:min(mostLikely, len(r.Likely))] {
		rows = append(rows, t.line(b, 0, row{cells: []cell{fat(fmt.Sprint(i + 1)), txt(l.What), txt(l.Sign), txt(fmt.Sprint(l.Points)), txt(fmt.Sprint(l.Misses))}}))
	}
	out = append(out, together(rows)...)
	if r.Next != nil {
		out[len(out)-1].next = true
		out = append(out, b.paragraph(bold("Next reading: ")+r.Next.Says, tableText, 1.5))
	}
	return out
}

// recordSign is the blanks for remarks and for tester and owner.
func (b *book) recordSign() block {
	const lines, caption = 3, 4.0
	h := caption + lines*blankRow + 3 + namedBlankHeight
	return block{h: h, gap: 3, draw: func(p *pad, y, _ float64) {
		p.write(p.pg.l, y+2.6, "Remarks", blankCaption, ink.Start)
		for i := range lines {
			p.rule(p.pg.l, y+caption+blankRow*float64(i+1)-1, p.pg.width, blankLine, ink.Dusk)
		}
		y += caption + lines*blankRow + 3
		const gap = 4.0
		w := (p.pg.width - 3*gap) / 4
		for i, c := range []string{"Tester, name in print", "Signature", "Owner, name in print", "Signature"} {
			p.namedBlank(p.pg.l+(w+gap)*float64(i), y, w, c, "")
		}
	}}
}
