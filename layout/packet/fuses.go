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

// Measures of the picture of a holder, mm.
const (
	holderHead  = 6.5
	placeWide   = 20.0
	placeHigh   = 22.5
	placesInRow = 8
	feedsText   = 17.4
)

// picture is a piece of the map that may stand beside others.
type picture struct {
	w, h  float64
	under bool // goes on right below the one before
	draw  func(p *pad, x, y float64)
}

// packed puts pictures into rows.
func packed(list []picture, width float64) []block {
	const gap, below = 4.4, 2.5
	var out []block
	for i := 0; i < len(list); {
		j, w := i+1, list[i].w
		for j < len(list) && !list[j].under && !list[i].under && w+gap+list[j].w <= width {
			w += gap + list[j].w
			j++
		}
		row := list[i:j]
		h := 0.0
		for _, x := range row {
			h = max(h, x.h)
		}
		x := block{h: h, gap: below, draw: func(p *pad, y, _ float64) {
			at := p.pg.l
			for _, q := range row {
				q.draw(p, at, y)
				at += q.w + gap
			}
		}}
		if row[0].under {
			x.gap = 0
		}
		x.next = j < len(list) && list[j].under
		out = append(out, x)
		i = j
	}
	return out
}

// holderPictures draw a holder as it is seen with the door open, eight places a row.
func (b *book) holderPictures(h holder) []picture {
	rows := (len(h.places) + placesInRow - 1) / placesInRow
	var out []picture
	for r := range rows {
		list := h.places[r*placesInRow : min(len(h.places), (r+1)*placesInRow)]
		first := r == 0
		high := placeHigh
		if first {
			high += holderHead
		}
		var texts [][]line
		for _, p := range list {
			l, cut := cutLines(p.feeds, noteText, feedsText, 2)
			if cut {
				b.noteCut(p.feeds)
			}
			texts = append(texts, l)
		}
		for _, p := range list {
			if longColour(p.fuse) {
				high += colourLine
				break
			}
		}
		w := float64(len(list)) * placeWide
		out = append(out, picture{w: w, h: high, under: !first, draw: func(p *pad, x, y float64) {
			p.frame(x, y, w, high, barLine, ink.Black)
			top := y
			if first {
				side := "seen from the front"
				room := w - 4 - spans(side, groupRemark).width()
				if w < 60 {
					side, room = "", w-4
				}
				p.fit(x+2, y+4.4, h.title+" "+h.strip, groupHead, room, ink.Start)
				p.write(x+w-2, y+4.4, side, groupRemark, ink.End)
				p.rule(x, y+holderHead, w, hairline, ink.Black)
				top += holderHead
				if len(list) == placesInRow {
					p.countFromLeft(x+w+3, y+holderHead+3)
				}
			}
			for i, q := range list {
				at := x + float64(i)*placeWide
				if i > 0 {
					p.stroke(at, top, at, y+high, hairline, ink.Black)
				}
				p.fusePlace(at, top, q, texts[i])
			}
		}})
	}
	return out
}

// countFromLeft says how places count.
func (p *pad) countFromLeft(x, y float64) {
	if x+17 > p.pg.right() {
		return
	}
	p.write(x, y+1, "places count", remarkText, ink.Start)
	p.arrow(x, y+4, x+14, y+4, 0.35)
	p.write(x, y+8.6, "from the left", remarkText, ink.Start)
}

// fusePlace is one cell of the picture.
func (p *pad) fusePlace(x, y float64, q place, feeds []line) {
	p.write(x+1.8, y+6.8, fmt.Sprint(q.number), style{ink.Bold, 19.6, 7, ink.Black}, ink.Start)
	bx, by := x+placeWide-1.6-9.6, y+1.6
	if q.number > 9 {
		bx = x + placeWide - 1.2 - 8.6
	}
	if q.fuse == nil {
		p.frame(bx, by, 9.6, 6.6, 0.25, ink.Black, 1.2, 0.8)
		p.write(x+placeWide/2, y+13, "spare", noteText, ink.Middle)
		p.write(x+placeWide/2, y+16.7, "keep empty", remarkText, ink.Middle)
		return
	}
	p.fuseBody(bx, by, bare(q.fuse.Rating.String()))
	p.text(x+1.2, y+12.6, spans(q.fuse.Part.Designation, placeName), ink.Start)
	word := spans(q.fuse.Colour, bodyColour)
	if longColour(q.fuse) { // stands on a line of its own
		p.text(x+1.2, y+16.2, word, ink.Start)
		p.lines(x+1.2, y+16.4+colourLine, feeds, noteText.lead)
		return
	}
	p.text(x+placeWide-0.9, y+12.6, word, ink.End)
	p.lines(x+1.2, y+16.4, feeds, noteText.lead)
}

// Lettering of a place, and the line that a long colour takes, mm.
var (
	placeName  = style{ink.MonoBold, 8.5, 3.7, ink.Black}
	bodyColour = style{ink.Regular, 8, 3.3, ink.Black}
)

const colourLine = 3.3

// longColour reports whether a fuse's colour does not stand beside its designation.
func longColour(f *facts.Fuse) bool {
	return f != nil && spans(f.Part.Designation, placeName).width()+spans(f.Colour, bodyColour).width() > placeWide-2.9
}

// fuseBody is a blade fuse with its rating.
func (p *pad) fuseBody(x, y float64, rating string) {
	const w, h = 9.6, 6.6
	p.c.Stroke((&ink.Path{}).RoundRect(ink.Rect{X: x, Y: y, W: w, H: h}, 0.8), ink.Pen{Width: 0.5, Color: ink.Black})
	for _, at := range []float64{x + 2, x + w - 2} {
		p.stroke(at, y+h, at, y+h+1.3, 0.8, ink.Black)
	}
	p.write(x+w/2, y+h/2+1.65, rating, style{ink.Bold, 13, 5, ink.Black}, ink.Middle)
}

// cartridge is a fuse-link with end caps.
func (p *pad) cartridge(x, y float64, rating string) {
	const w, h, cap = 19.0, 6.4, 3.4
	p.c.Stroke((&ink.Path{}).RoundRect(ink.Rect{X: x, Y: y, W: w, H: h}, 1.4), ink.Pen{Width: 0.5, Color: ink.Black})
	p.stroke(x+cap, y, x+cap, y+h, 0.5, ink.Black)
	p.stroke(x+w-cap, y, x+w-cap, y+h, 0.5, ink.Black)
	p.write(x+w/2, y+h/2+1.65, rating, style{ink.Bold, 13, 5, ink.Black}, ink.Middle)
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

// systemFuse is a fuse outside the boards.
func (b *book) systemFuse(f *facts.Fuse) picture {
	const wide, high = 28.5, 29.0
	where := ""
	if f.Part.Place != nil {
		where = f.Part.Place.Name
	}
	lines, cut := cutLines(upper(f.Feeds), noteText, wide-3.4, 2)
	if cut {
		b.noteCut(f.Feeds)
	}
	return picture{w: wide, h: high, draw: func(p *pad, x, y float64) {
		p.frame(x, y, wide, high, barLine, ink.Black)
		p.fit(x+2, y+4.4, where, groupHead, wide-4, ink.Start)
		p.rule(x, y+holderHead, wide, hairline, ink.Black)
		if f.Colour == "" {
			p.cartridge(x+wide/2-9.5, y+8.4, bare(f.Rating.String()))
		} else {
			p.fuseBody(x+wide/2-4.8, y+8, bare(f.Rating.String()))
		}
		w := p.write(x+1.8, y+19.4, f.Part.Designation, style{ink.MonoBold, 9, 3.7, ink.Black}, ink.Start)
		p.fit(x+wide-1.5, y+19.4, f.Colour, noteText, wide-w-4.5, ink.End)
		p.lines(x+1.8, y+23.2, lines, noteText.lead)
	}}
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
		warn = fmt.Sprintf("Live with the mains off: DC %v.", p.b.d.Site.Duty.Nominal.Val)
	}
	st := noteText
	st.pt = 8
	p.fit(x+3, y+h-2, warn, st, w-17, ink.Start)
	p.write(x+w-3, y+h-2, "cut out", remarkText, ink.End)
}
