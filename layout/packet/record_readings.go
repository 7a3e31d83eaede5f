package packet

import (
	"fmt"

	"gloamwright/internal/commission"
	"gloamwright/layout/ink"
)

// Measures of the readings of a record, mm: two conditions stand beside each other.
const (
	recordHalf  = 87.5
	recordGap   = 5
	recordRow   = 5.8 // with one line
	recordHead  = 7.0
	recordLead  = 3.4
	showsAt     = 10.5
	figureAt    = 44.0 // right end of the reading
	lowAt       = 55.0 // right end of the lowest value
	gaugeStart  = 60.3
	gaugeWide   = 14
	gaugeMissed = 3.2 // from the end that a reading missed to its mark
)

// recordReadings is every reading as left, condition by condition.
func (b *book) recordReadings() []block {
	var groups [][]commission.Judged
	for _, j := range b.record.Judged {
		if n := len(groups); n == 0 || groups[n-1][0].Condition != j.Condition {
			groups = append(groups, nil)
		}
		n := len(groups) - 1
		groups[n] = append(groups[n], j)
	}
	out := []block{b.head(0, b.pg.width, "Readings as left", "volts DC; the mark shows where the reading stands between lowest and highest")}
	for i := 0; i < len(groups); i += 2 {
		pair := groups[i:min(i+2, len(groups))]
		out = append(out, b.recordPair(pair, i > 0)...)
	}
	return out
}

// recordPair is one or two conditions beside each other.
func (b *book) recordPair(pair [][]commission.Judged, gap bool) []block {
	rows := 0
	for _, g := range pair {
		rows = max(rows, len(g))
	}
	head := block{h: recordHead, next: true, draw: func(p *pad, y, _ float64) {
		for k, g := range pair {
			p.recordHead(float64(k)*(recordHalf+recordGap), y, g)
		}
	}}
	if gap {
		head.gap = 3
	}
	var list []block
	for i := range rows {
		h := recordRow
		for _, g := range pair {
			if i < len(g) {
				h = max(h, recordRow+float64(len(b.recordShows(g[i]))-1)*recordLead)
			}
		}
		list = append(list, block{h: h, draw: func(p *pad, y, h float64) {
			for k, g := range pair {
				if i < len(g) {
					p.recordReading(float64(k)*(recordHalf+recordGap), y, h, g[i])
				}
			}
		}})
	}
	for i := range list[:len(list)-1] {
		list[i].next = true // a condition is not split while it fits a sheet
	}
	return append([]block{head}, under(head, list)...)
}

func (p *pad) recordHead(dx, y float64, g []commission.Judged) {
	x := p.pg.l + dx
	inside := 0
	for _, j := range g {
		if j.Verdict == commission.Inside {
			inside++
		}
	}
	p.fill(x, y, recordHalf, recordHead, ink.Tint)
	p.fill(x, y, recordHead, recordHead, ink.Black)
	p.write(x+recordHead/2, y+4.9, fmt.Sprint(g[0].Number), groupHead.in(ink.White), ink.Middle)
	remark := fmt.Sprintf("%d of %d inside", inside, len(g))
	w := p.write(x+recordHalf-1.5, y+4.7, remark, groupRemark, ink.End)
	p.fit(x+9.5, y+4.7, g[0].Name, groupHead, recordHalf-13-w, ink.Start)
}

// recordShows is what a reading shows: in full where its point stands first on the
// record, on one line elsewhere.
func (b *book) recordShows(j commission.Judged) []line {
	room := 25.0
	if j.Verdict == commission.UnitSlip || j.Verdict == commission.Swapped || j.Verdict == commission.Unreadable {
		room = 20 // the reading stands as it was written
	}
	if j.Condition == b.record.Judged[0].Condition {
		return wrap(j.Shows, noteText, room)
	}
	l, cut := cutLine(j.Shows, noteText, room)
	if cut {
		b.noteCut(j.Shows)
	}
	return []line{l}
}

// recordReading is one reading with its band as a gauge.
func (p *pad) recordReading(dx, y, h float64, j commission.Judged) {
	x, base, mid := p.pg.l+dx, y+h/2+1.15, y+h/2
	small := noteText
	p.write(x+1, base, j.Point, tableText.as(ink.Medium), ink.Start)
	figureEnd := x + figureAt
	shows := p.b.recordShows(j)
	p.lines(x+showsAt, mid+1.15-float64(len(shows)-1)*recordLead/2, shows, recordLead)
	switch {
	case j.Verdict == commission.Missing:
		p.write(x+recordHalf-1.5, base, "not measured", small.as(ink.Bold), ink.End)
	case j.Verdict != commission.Inside && j.Verdict != commission.Outside:
		p.fit(figureEnd+4, base, j.Text, small.as(ink.Bold), 18, ink.End)
		p.write(x+recordHalf-1.5, base, verdictWords[j.Verdict], small.as(ink.Bold), ink.End)
	default:
		p.write(figureEnd, base, fmt.Sprintf("%.1f", j.Measured), tableText.as(ink.Bold), ink.End)
		p.recordBand(x, mid, base, j)
	}
	p.rule(x, y+h, recordHalf, hairline, ink.Rule)
	if j.Verdict != commission.Inside {
		p.frame(x, y+0.4, recordHalf, h-0.8, headLine, ink.Black)
	}
}

// recordBand draws the band, or says in words that a dead point is dead.
func (p *pad) recordBand(x, mid, base float64, j commission.Judged) {
	if j.Verdict == commission.Inside && j.Typical == 0 && j.High-j.Low < 0.2 {
		p.write(x+recordHalf-1.5, base, "dead, as it must be", noteText, ink.End)
		return
	}
	p.write(x+lowAt, base, fmt.Sprintf("%.1f", j.Low), noteText, ink.End)
	p.write(x+recordHalf-1.5, base, fmt.Sprintf("%.1f", j.High), noteText, ink.End)
	p.bandGauge(x+gaugeStart, mid, gaugeWide, j.Low, j.Typical, j.High, j.Measured)
}

// bandGauge draws a reading between the lowest and the highest value to expect: a
// lozenge on the line, or an open one beyond the end that it missed.
func (p *pad) bandGauge(x, y, w, low, typical, high, reading float64) {
	const end, tick, halfMark = 1.7, 1.2, 1.15
	if high <= low {
		return
	}
	p.rule(x, y, w, 0.25, ink.Black)
	p.stroke(x, y-end, x, y+end, 0.35, ink.Black)
	p.stroke(x+w, y-end, x+w, y+end, 0.35, ink.Black)
	at := func(v float64) float64 { return x + w*(v-low)/(high-low) }
	p.stroke(at(typical), y-tick, at(typical), y+tick, hairline, ink.Black)
	cx, outside := at(reading), true
	switch {
	case reading < low:
		cx = x - gaugeMissed
	case reading > high:
		cx = x + w + gaugeMissed
	default:
		outside = false
	}
	q := (&ink.Path{}).Polygon(ink.Point{X: cx, Y: y - halfMark}, ink.Point{X: cx + halfMark, Y: y}, ink.Point{X: cx, Y: y + halfMark}, ink.Point{X: cx - halfMark, Y: y})
	if outside {
		p.c.Stroke(q, ink.Pen{Width: 0.35, Color: ink.Black})
		return
	}
	p.c.Fill(q, ink.Black)
}
