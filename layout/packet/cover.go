package packet

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"gloamwright/internal/finding"
	"gloamwright/layout/ink"
)

// Measures of the cover, mm.
const (
	coverRules = 55.0  // upper rule of the horizon
	coverSun   = 172.0 // middle of the half disc
	coverLeft  = 116.0 // width of the promise
	coverPanel = 56.0  // width of the status panel
)

// cover is the first sheet: what the system does, its status, what is in the packet.
func (b *book) cover() *section {
	s := &section{key: keyCover, title: "Cover", document: "Cover", letter: "B"}
	s.ownHead = func(p *pad) { p.coverHead() }
	s.blocks = append(s.blocks, space(20), b.promiseAndStatus())
	if d := b.energyWay(); d.draw != nil {
		remark := ""
		if len(b.drawings) > 0 {
			remark = "schematic on " + b.sheets(keySchematic)
		}
		s.blocks = append(s.blocks, b.head(0, b.pg.width, "The way the energy takes", remark), d)
	}
	s.blocks = append(s.blocks, b.contents()...)
	s.blocks = append(s.blocks, b.revisions()...)
	s.blocks = append(s.blocks, b.signOff()...)
	s.tighten(b.pg)
	return s
}

// tighten takes the gaps between the blocks of a single sheet as narrow as it must to
// keep them on it.
func (s *section) tighten(pg page) {
	over := stacked(s.blocks) - (pg.end() - pg.top())
	gaps := 0.0
	for _, x := range s.blocks[1:] {
		gaps += x.gap
	}
	if over <= 0 || gaps == 0 {
		return
	}
	const least = 0.35 // of a gap
	share := max(least, 1-over/gaps)
	for i := range s.blocks {
		s.blocks[i].gap *= share
	}
}

// coverHead is the head of the cover, with the title block in words.
func (p *pad) coverHead() {
	pg, job := p.pg, p.b.d.Site.Job
	small := style{ink.Regular, 9, 4, ink.Black}
	x := pg.right()
	x -= p.write(x, pg.t+4.6, fmt.Sprintf("of %d", p.last), small, ink.End) + 1
	x -= p.write(x, pg.t+4.6, fmt.Sprint(p.n), style{ink.Bold, 14, 5, ink.Black}, ink.End) + 1
	x -= p.write(x, pg.t+4.6, "Sheet", small, ink.End) + 8
	w := p.fit(pg.l, pg.t+4.6, job.Number.Val, style{ink.MonoBold, 11, 4.5, ink.Black}, 90, ink.Start)
	left := pg.l + w + 9
	left += p.write(left, pg.t+4.6, "Build packet", style{ink.Regular, 11, 4.5, ink.Mid}, ink.Start) + 8
	p.coverFirm(left, x)
	title := coverTitle
	for _, pt := range []float64{30, 24, 20} {
		title.pt = pt
		if spans(job.Title.Val, title).width() <= pg.width {
			break
		}
	}
	if spans(job.Title.Val, title).width() <= pg.width {
		p.write(pg.l, pg.t+22, job.Title.Val, title, ink.Start)
	} else { // two lines
		title.pt = 16
		lines, cut := cutLines(job.Title.Val, title, pg.width, 2)
		if cut {
			p.b.noteCut(job.Title.Val)
		}
		p.lines(pg.l, pg.t+15.8, lines, 7)
	}
	room := coverSun - 13 - pg.l - 4
	site, cut := cutLines(job.Site.Val, coverPlace, room, 2)
	if cut {
		p.b.noteCut(job.Site.Val)
	}
	p.lines(pg.l, pg.t+30.3, site, coverPlace.lead)
	if job.Client.Val != "" {
		y := pg.t + 37
		if len(site) > 1 {
			y = pg.t + 41.2
		}
		p.fit(pg.l, y, "for "+job.Client.Val, coverClient, room, ink.Start)
	}
	if p.b.status() == notForConstruction {
		p.halfDisc(coverSun, coverRules-2, 13)
		p.blackBar(coverRules-2, 4.8)
	} else {
		p.halfDisc(coverSun, coverRules, 13)
		p.rule(pg.l, coverRules, pg.width, barLine, ink.Dusk)
		p.rule(pg.l, coverRules+1.9, pg.width, 0.5, ink.Dusk)
	}
	p.rule(pg.l, coverRules+3.5, pg.width, 0.35, ink.Dusk)
	p.rule(pg.l, coverRules+4.8, pg.width, hairline, ink.Dusk)
}

// coverFirm names the firm between two places of the cover's head, its mark before the
// name.
func (p *pad) coverFirm(left, right float64) {
	const most, high, gap = 32.0, 9.0, 2.5
	firm := p.b.words.texts.Firm
	name := style{ink.Medium, 10.5, 4.5, ink.Black}
	mark := 0.0
	if firm.Logo != nil {
		w, h := firm.Logo.Fit(most, high)
		mark = w + gap
		x := right - w
		if firm.Name != "" {
			x = max(left, right-mark-spans(firm.Name, name).width())
		}
		firm.Logo.Draw(p.c, ink.Rect{X: x, Y: max(p.pg.t, p.pg.t+3.2-h/2), W: w, H: h})
	}
	if firm.Name != "" {
		p.fit(right, p.pg.t+4.6, firm.Name, name, right-left-mark, ink.End)
	}
}

// spelled are small numbers in words.
var spelled = []string{"no", "one", "two", "three", "four", "five", "six", "seven", "eight", "nine", "ten", "eleven", "twelve"}

func inWords(n int) string {
	if n < len(spelled) {
		return spelled[n]
	}
	return fmt.Sprint(n)
}

// counting is "one circuit", "nine circuits".
func counting(n int, one string) string {
	if n == 1 {
		return inWords(n) + " " + one
	}
	return inWords(n) + " " + one + "s"
}

// promiseText says in words when what lights, how long, at the worst, and what it
// does not do.
func (b *book) promiseText() string {
	d := b.d
	asks := map[string]int{}
	circuits := 0
	for _, c := range d.Site.Circuits {
		asks[c.Lit.Val]++
		circuits++
	}
	when, dark := "When the mains fails", ""
	switch {
	case asks["outage-night"] == circuits:
		when, dark = "When the mains fails after dark", " By day they stay dark and spare the battery."
	case asks["night"] == circuits:
		when, dark = "After dark, mains or not", " By day they stay dark."
	case asks["always"] == circuits:
		when = "Day and night, mains or not"
	case asks["outage"] == circuits:
	default:
		when, dark = "When their hour comes", fmt.Sprintf(" What each circuit waits for stands on %s.", b.sheets(keyBasis))
	}
	lights := fmt.Sprintf("%d lights", d.Totals.Luminaires)
	come, stay := "come on by themselves", "stay lit"
	if d.Totals.Luminaires == 1 {
		lights, come, stay = "1 light", "comes on by itself", "stays lit"
	}
	return fmt.Sprintf("%s, %s on %s %s and %s for at least %s without mains, even with an old battery at %v.%s", when, lights,
		counting(circuits, "circuit"), come, stay, hoursInWords(d.Site.Duty.Outage.Val.Hours()), d.Site.Duty.BatteryRoom.Val.Low, dark)
}

func hoursInWords(h float64) string {
	if h == 1 {
		return "1 hour"
	}
	return fmt.Sprintf("%g hours", h)
}

// facts of the cover under the promise.
func (b *book) coverFacts() []pair {
	d := b.d
	var out []pair
	duty := d.Site.Duty
	if h := d.Endurance.Held; h > 0 {
		out = append(out, pair{"Lasts", fmt.Sprintf("%s at %v, battery at the end of its life; %v asked", hours(h.Hours()), duty.BatteryRoom.Val.Low, duty.Outage.Val), ""})
	}
	if h := d.Endurance.Recharge; h > 0 {
		out = append(out, pair{"Full again", fmt.Sprintf("%s after such an outage; %v asked", hours(h.Hours()), duty.Recharge.Val), ""})
	}
	out = append(out, pair{"Load", fmt.Sprintf("%s of lights; %s at the end of discharge", figure(d.Totals.LoadWatt), figure(d.Totals.LoadA)), ""})
	if d.Totals.WorstLamp != "" {
		out = append(out, pair{"Worst drop", fmt.Sprintf("%s at %s; limit %v", figure(d.Totals.WorstDrop), d.Totals.WorstLamp, d.Site.Practice.LampDrop.Val), ""})
	}
	return out[:min(3, len(out))]
}

func hours(h float64) string { return fmt.Sprintf("%.1f h", h) }

// promiseAndStatus stands below the rules: the promise at the left, the status panel at
// the right.
func (b *book) promiseAndStatus() block {
	lines := wrap(b.promiseText(), promise, coverLeft)
	list := b.coverFacts()
	var set [][]line
	factRows := 0
	for _, f := range list {
		l := wrap(f.is, tableText, coverLeft-20)
		set = append(set, l)
		factRows += len(l)
	}
	h := max(float64(len(lines))*promise.lead+2.5+float64(factRows)*4.4, 33.5)
	return block{h: h, draw: func(p *pad, y, h float64) {
		p.lines(p.pg.l, y+rise*promise.lead, lines, promise.lead)
		at := y + float64(len(lines))*promise.lead + 2.5
		for i, f := range list {
			p.write(p.pg.l, at+rise*4.4, f.what, tableText.as(ink.Bold), ink.Start)
			p.lines(p.pg.l+20, at+rise*4.4, set[i], 4.4)
			at += float64(len(set[i])) * 4.4
		}
		p.statusPanel(p.pg.right()-coverPanel, y, 33.5)
	}}
}

// statusPanel says whether one may build from this packet.
func (p *pad) statusPanel(x, y, h float64) {
	b := p.b
	st, job := b.status(), b.d.Site.Job
	c, grey := ink.Black, ink.Mid
	if st == notForConstruction {
		p.fill(x, y, coverPanel, h, ink.Black)
		c, grey = ink.White, ink.White
	} else {
		p.frame(x+warnLine/2, y+warnLine/2, coverPanel-warnLine, h-warnLine, 0.7, ink.Black)
	}
	big := style{ink.Bold, 13, 5.4, c}
	if st == forConstruction {
		for spans(st, big).width() > coverPanel-8 {
			big.pt -= 0.25
		}
	}
	at := y + 6.6
	for _, l := range wrap(st, big, coverPanel-8) {
		p.text(x+4, at, l, ink.Start)
		at += big.lead
	}
	if st == draft {
		p.write(x+4+spans(st, big).width()+3, at-big.lead, "not issued", style{ink.Regular, 10, 4, c}, ink.Start)
	}
	p.rule(x+4, at-2.8, coverPanel-8, 0.35, c)
	rows := []pair{{"Revision", b.revision(), ""}}
	if st == forConstruction {
		rows = append(rows, pair{"Issued", job.Date.Val, ""})
		if ch := b.d.Changes; ch != nil {
			rows = append(rows, pair{"Replaces", ch.From + ": mark it void", ""})
		}
	} else if job.Date.Val != "" {
		rows = append(rows, pair{"Dated", job.Date.Val, ""})
	}
	f := fmt.Sprintf("%s, %s", counted(b.d.Count(finding.Caution), "caution"), counted(b.d.Count(finding.Note), "note"))
	if n := b.d.Count(finding.Stop); n > 0 {
		f = fmt.Sprintf("%d stop: sheet %d", n, b.first(keyBasis))
	}
	rows = append(rows, pair{"Findings", f, ""})
	at += 1.8
	for _, r := range rows {
		p.write(x+4, at, r.what, tableText.in(grey), ink.Start)
		p.fit(x+22, at, r.is, tableText.as(ink.Medium).in(c), coverPanel-25, ink.Start)
		at += 4.7
	}
}

// contents is the list of sheets in three columns, in the order of work.
func (b *book) contents() []block {
	type entry struct{ sheets, title string }
	var list []entry
	for _, k := range b.keys {
		f, l := b.refs.first[k.key], b.refs.last[k.key]
		n := fmt.Sprint(f)
		if l > f {
			n = fmt.Sprintf("%d–%d", f, l)
		}
		list = append(list, entry{n, k.title})
	}
	const columns = 3
	rows := int(math.Ceil(float64(len(list)) / columns))
	h := float64(rows)*4.4 + 2.2
	return []block{b.head(0, b.pg.width, "What is in this packet", "in the order of work"), {h: h, draw: func(p *pad, y, h float64) {
		each := p.pg.width / columns
		for i, e := range list {
			x := p.pg.l + float64(i/rows)*each
			at := y + 1.6 + float64(i%rows)*4.4 + rise*4.4
			p.write(x+10.5, at, e.sheets, tableText.as(ink.Medium), ink.End)
			p.fit(x+13.5, at, e.title, tableText, each-15, ink.Start)
			if first := b.sheetNumber(e.sheets); first > 0 {
				p.c.Link(ink.Rect{X: x, Y: at - 3.3, W: each - 2, H: 4.4}, ink.Target{Sheet: first})
			}
		}
	}}}
}

// sheetNumber reads the first sheet of "6–9".
func (b *book) sheetNumber(s string) int {
	n := 0
	for _, r := range s {
		if r < '0' || r > '9' {
			break
		}
		n = n*10 + int(r-'0')
	}
	return n
}

// revisions is the table of revisions, the latest first.
func (b *book) revisions() []block {
	t := &table{st: tableText, min: plainRow, cols: []column{{head: "Index", w: 12}, {head: "Issued", w: 22}, {head: "What changed, and why", w: 88},
		{head: "Sheets", w: 24}, {head: "By", w: 17}, {head: "Approved", w: 17}}}
	out := []block{b.head(0, b.pg.width, "Revisions", ""), t.head(0)}
	job := b.d.Site.Job
	type rev struct{ index, issued, why, sheets, by string }
	list := []rev{{job.Revision.Val, job.Date.Val, "First issue.", "all", initials(job.Prepared.Val)}}
	if ch := b.d.Changes; ch != nil && len(ch.Revisions) > 0 {
		list = nil
		for _, r := range ch.Revisions {
			sheets := r.Sheets
			if sheets == "" {
				sheets = "all" // an issue replaces the whole packet
			}
			list = append(list, rev{r.Index, r.Issued, r.Why, sheets, initials(r.By)})
		}
		slices.Reverse(list)
	}
	if !b.d.Issued {
		list[0].issued = "not issued"
	}
	var rows []block
	for i, r := range list {
		rows = append(rows, t.line(b, 0, row{changed: i == 0 && len(list) > 1, cells: []cell{fat(r.index), txt(r.issued), upTo(txt(r.why), 4), upTo(txt(r.sheets), 4), txt(r.by), txt("")}}))
	}
	return append(out, together(rows)...)
}

// initials shortens a name: "A. Marlowe" to "A.M.".
func initials(name string) string {
	var out strings.Builder
	for _, w := range strings.Fields(name) {
		for _, r := range w {
			out.WriteRune(r)
			out.WriteByte('.')
			break
		}
	}
	return out.String()
}

// signOff are the lines that say who built, tested and took over; none on a packet that
// nothing must be built from.
func (b *book) signOff() []block {
	head := b.head(0, b.pg.width, "Sign-off", "")
	if b.status() == notForConstruction {
		head.gap = 3
		return []block{head, {h: 24, draw: func(p *pad, y, h float64) { p.hatched(y, h) }}}
	}
	t := &table{st: tableText, min: blankRow, cols: []column{{head: "", w: 34}, {head: "Name in print", w: 56}, {head: "Signature", w: 56}, {head: "Date, year-month-day", w: 34}}}
	var rows []block
	for _, who := range []string{"Built", "Tested", "Accepted, owner"} {
		rows = append(rows, t.line(b, 0, row{cells: []cell{txt(who), writeIn(), writeIn(), writeIn()}}))
	}
	head.gap = 3
	return append([]block{head, t.head(0)}, together(rows)...)
}

// hatched fills the place of the signatures.
func (p *pad) hatched(y, h float64) {
	l, r := p.pg.l, p.pg.right()
	const step = 4.0
	for x := l - h; x < r; x += step {
		x1, y1, x2, y2 := x, y+h, x+h, y
		if x1 < l {
			x1, y1 = l, y+h-(l-x)
		}
		if x2 > r {
			x2, y2 = r, y+(x+h-r)
		}
		p.stroke(x1, y1, x2, y2, hairline, ink.Rule)
	}
	words := "No signature on this packet: build nothing from it."
	st := style{ink.Bold, 12, 5, ink.Black}
	w := spans(words, st).width() + 20
	p.fill((l+r-w)/2, y+h/2-4, w, 8, ink.White)
	p.write((l+r)/2, y+h/2+1.5, words, st, ink.Middle)
}
