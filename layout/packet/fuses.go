package packet

import (
	"fmt"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/layout/ink"
)

// place is one place of a fuse holder.
type place struct {
	number int
	fuse   *facts.Fuse // nil: a spare place
	feeds  string
}

// holder is a row of fuse places as the technician sees it.
type holder struct {
	title, strip string
	places       []place
}

// fuses is the fuse map: the holders as a picture, the table, the door copies.
func (b *book) fuses() *section {
	s := &section{key: keyFuses, title: "Fuse map", document: "Fuse map", letter: "F", label: "Before",
		purpose: "Use this sheet to put the right fuse in the right place, and to find a place again.",
		note:    fmt.Sprintf("%s done. Fuses go in one by one, as %s tells.", b.upperSheets(keyWires), b.sheets(keyChecklist))}
	var pics []picture
	for _, h := range b.holders() {
		pics = append(pics, b.holderPictures(h)...)
	}
	for _, f := range b.ofSystem() {
		pics = append(pics, b.systemFuse(f))
	}
	s.blocks = append(s.blocks, packed(pics, b.pg.width)...)
	s.blocks = append(s.blocks, b.fuseTable()...)
	s.blocks = append(s.blocks, b.doorCopies()...)
	return s
}

// holders are the boards' fuse places in their order.
func (b *book) holders() []holder {
	var out []holder
	for _, bd := range b.d.Circuit.Boards {
		h := holder{title: bd.Title, strip: bd.Strip}
		for _, w := range bd.Ways {
			p := place{number: w.Number}
			if !w.Spare() {
				p.fuse, p.feeds = b.fuseOf(w.Fuse), wayFeeds(w)
			}
			h.places = append(h.places, p)
		}
		out = append(out, h)
	}
	return out
}

func wayFeeds(w *circuit.Way) string {
	switch {
	case w.Lighting != nil:
		return w.Lighting.Name
	case w.Feeds != nil:
		return w.Feeds.Title
	}
	return ""
}

// ofSystem lists the fuses that stand on no board, the battery's first.
func (b *book) ofSystem() []*facts.Fuse {
	var out []*facts.Fuse
	if f := b.mainFuse(); f != nil {
		out = append(out, f)
	}
	for _, f := range b.d.Fuses {
		if f.Board == nil && f != b.mainFuse() {
			out = append(out, f)
		}
	}
	return out
}

// fuseTable has a row for each fuse: rating and what the wire carries side by side.
func (b *book) fuseTable() []block {
	t := &table{st: tableText, min: plainRow, cols: []column{{head: "Place", w: 16}, {head: "Fuse", w: 14}, {head: "Rating A", w: 13, a: endAnchor},
		{head: "Wire carries A", w: 17, a: endAnchor}, {head: "Wire mm²", w: 12, a: endAnchor}, {head: "Fault here A", w: 16, a: endAnchor},
		{head: "Feeds", w: 37, indent: 3}, {head: "Load A, low to high", w: 25, a: midAnchor}, {head: "Measured A", w: 20, a: midAnchor}, {head: "Spare", w: 10, a: midAnchor}}}
	if b.d.Site.Practice.Conductors.Val == "awg" {
		t.cols[4].head = "Wire AWG"
	}
	head := t.head(0)
	head.gap = 3
	var rows []block
	list := b.ofSystem()
	for _, h := range b.holders() {
		for _, q := range h.places {
			if q.fuse != nil {
				list = append(list, q.fuse)
			}
		}
	}
	for i, f := range list {
		where := ""
		if f.Way != nil {
			where = fmt.Sprintf("%s %d", firstWord(f.Board.Title), f.Way.Number)
			if spans(where, t.st).width() > t.cols[0].w-padding {
				where = fmt.Sprintf("%s %d", f.Board.Strip, f.Way.Number)
			}
		} else if f.Part.Place != nil {
			where = firstWord(f.Part.Place.Name)
		}
		last := i == len(list)-1 || list[i+1].Board != f.Board
		size, _, _ := strings.Cut(f.CableSize.String(), " ")
		rows = append(rows, t.line(b, 0, row{heavy: last, changed: b.touched(f.Part.Designation), marks: []string{"fuse " + f.Part.Designation}, cells: []cell{
			upTo(txt(where), 2), txt(f.Part.Designation), fat(fmt.Sprintf("%g", float64(f.Rating))), fat(amperes(float64(f.CableAmpacity))), txt(size),
			txt(thousands(float64(f.Prospective))), upTo(txt(upper(f.Feeds)), 2), txt(ampereBand(float64(f.LoadLow), float64(f.LoadHigh))), writeIn(), tickBox()}}))
	}
	out := append([]block{head}, together(rows)...)
	return append(out, b.paragraph("Places count from the left. The figure in a fuse is its rating in amperes, the word its body colour. A fuse is never rated above what its wire may carry: compare the two bold columns. "+b.fuseNote(list), noteText, 0.5))
}

// fuseNote names the classes of the fuses with their voltage and breaking capacity, and
// the condition of the load.
func (b *book) fuseNote(list []*facts.Fuse) string {
	var out []string
	if c := b.condition("outage-night"); c != nil {
		out = append(out, fmt.Sprintf("Load: condition %d, %s, %s at the battery.", c.Number, strings.ToLower(c.Name), figure(c.BatteryV)))
	}
	seen := map[string]bool{}
	for _, f := range list {
		if seen[f.Style] {
			continue
		}
		seen[f.Style] = true
		out = append(out, fmt.Sprintf("%s: DC %v, breaks %s A.", f.Style, f.BreakingVolt, thousands(float64(f.Breaking))))
	}
	return strings.Join(out, " ")
}

// condition finds a condition by its key.
func (b *book) condition(key string) *facts.Condition {
	for _, c := range b.d.Conditions {
		if c.Key == key {
			return c
		}
	}
	return nil
}

func firstWord(s string) string {
	w, _, _ := strings.Cut(s, " ")
	return w
}

// amperes prints a current: whole from 100 A, one decimal from 10 A, else two.
func amperes(v float64) string {
	switch {
	case v >= 100:
		return thousands(v)
	case v >= 10:
		return fmt.Sprintf("%.1f", v)
	}
	return fmt.Sprintf("%.2f", v)
}

// ampereBand prints a band of currents, rounded outwards.
func ampereBand(low, high float64) string {
	digits := 2
	if high < 0.1 {
		digits = 3
	}
	return fmt.Sprintf("%s to %s", outward(low, digits, false), outward(high, digits, true))
}

// doorCopies are to be cut out and put into the doors.
func (b *book) doorCopies() []block {
	var out []block
	list := b.holders()
	const wideCopy, narrowCopy, gap, least, most = 118.0, 58.0, 4.0, 36.0, 70.0
	for i := 0; i < len(list); {
		pair := []holder{list[i]}
		widths := []float64{wideCopy}
		if len(list[i].places) <= 4 {
			widths[0] = narrowCopy
		}
		if i+1 < len(list) && widths[0]+gap+copyWidth(list[i+1]) <= b.pg.width {
			pair = append(pair, list[i+1])
			widths = append(widths, copyWidth(list[i+1]))
		}
		i += len(pair)
		h := least
		for _, x := range pair {
			h = max(h, 16+float64(copyRows(x))*6.2)
		}
		out = append(out, block{h: h, gap: 3, fill: true, most: most, draw: func(p *pad, y, h float64) {
			x := p.pg.l
			for k, hd := range pair {
				p.doorCopy(x, y, widths[k], h, hd)
				x += widths[k] + gap
			}
		}})
	}
	return out
}

func copyWidth(h holder) float64 {
	if len(h.places) <= 4 {
		return 58
	}
	return 118
}

func copyRows(h holder) int {
	if len(h.places) <= 4 {
		return len(h.places)
	}
	return (len(h.places) + 1) / 2
}

// doorCopy is the list of places for one door.
func (p *pad) doorCopy(x, y, w, h float64, hd holder) {
	p.frame(x, y, w, h, 0.25, ink.Black, 2, 1.2)
	job := p.b.d.Site.Job
	code := style{ink.Mono, 8.5, 3.7, ink.Black}
	id := spans(job.Number.Val+"-"+job.Revision.Val, code)
	p.text(x+w-3, y+5.6, id, ink.End)
	p.fit(x+3, y+5.6, hd.title+" "+hd.strip, sectionHead, w-8-id.width(), ink.Start)
	p.rule(x+3, y+7.6, w-6, headLine, ink.Black)
	rows := copyRows(hd)
	pitch := (h - 16) / float64(rows)
	columns := (len(hd.places) + rows - 1) / rows
	each := (w - 6) / float64(columns)
	for i, q := range hd.places {
		at := x + 3 + float64(i/rows)*each
		base := y + 8.6 + (float64(i%rows)+0.5)*pitch + 1.4
		p.write(at+4.5, base, fmt.Sprint(q.number), style{ink.Bold, 11, 5, ink.Black}, ink.End)
		rating, words := "–", "spare"
		if q.fuse != nil {
			rating, words = q.fuse.Rating.String(), q.feeds
		}
		p.write(at+14.5, base, rating, style{ink.Bold, 11, 5, ink.Black}, ink.End)
		p.fit(at+16.5, base, words, style{ink.Regular, 10, 5, ink.Black}, each-18, ink.Start)
	}
	p.rule(x+3, y+h-5.6, w-6, hairline, ink.Rule)
	warn := fmt.Sprintf("Live with the mains off: DC %v. Same rating only; find the cause first.", p.b.d.Site.Duty.Nominal.Val)
	if w < 100 {
		warn = fmt.Sprintf("Live with mains off: DC %v.", p.b.d.Site.Duty.Nominal.Val)
	}
	st := noteText
	st.pt = 8
	p.fit(x+3, y+h-2, warn, st, w-17, ink.Start)
	p.write(x+w-3, y+h-2, "cut out", remarkText, ink.End)
}
