package packet

import (
	"fmt"
	"math"
	"path/filepath"

	"gloamwright/internal/facts"
	"gloamwright/internal/finding"
	"gloamwright/layout/ink"
)

// basis is the sheet of what was asked, what came out and what was judged.
func (b *book) basis() *section {
	s := &section{key: keyBasis, title: "Design basis and findings", document: "Design basis", letter: "D",
		purpose: "Use this sheet to see what was asked, what came out, and what was judged.", label: "Before",
		note: fmt.Sprintf("%s read. Every figure has its working on %s.", b.upperSheets(keyCautions), b.sheets(keyWorkings))}
	s.blocks = append(s.blocks, b.askedAndCameOut()...)
	s.blocks = append(s.blocks, b.functionTable()...)
	s.blocks = append(s.blocks, b.findings()...)
	return s
}

// pair is one line of a list of figures.
type pair struct{ what, is, limit string }

func (b *book) askedAndCameOut() []block {
	d, duty, practice := b.d, b.d.Site.Duty, b.d.Site.Practice
	asked := []pair{
		{"Nominal voltage", duty.Nominal.Val.String(), ""},
		{"Outage", duty.Outage.Val.String(), ""},
		{"Recharge", duty.Recharge.Val.String(), ""},
		{"Battery room", degrees(duty.BatteryRoom.Val), ""},
		{"Cable ambient", duty.CableAmbient.Val.String(), ""},
		{"Drop to the last lamp", fmt.Sprintf("at most %v of %v", practice.LampDrop.Val, duty.Nominal.Val), ""},
		{"Far-end short cleared", "within " + practice.ClearWithin.Val.String(), ""},
		{"Colours", "positive " + practice.Positive.Val + ", negative " + practice.Negative.Val, ""},
	}
	var out []pair
	if d.Battery.Part != nil {
		out = append(out, pair{fmt.Sprintf("Battery, %g h rating", d.Battery.RatedHours), figure(d.Battery.Capacity), "≥ " + figure(d.Battery.Required)})
	}
	e := d.Endurance
	if e.Held > 0 {
		out = append(out, pair{fmt.Sprintf("Lasts, %v, end of life", duty.BatteryRoom.Val.Low), figure(e.Held), "≥ " + duty.Outage.Val.String()})
	}
	if d.Charger.Part != nil {
		out = append(out, pair{"Charger", figure(d.Charger.Current), "≥ " + figure(d.Charger.Required)})
	}
	if e.Recharge > 0 {
		out = append(out, pair{"Full again", figure(e.Recharge), "≤ " + duty.Recharge.Val.String()})
	}
	if d.Totals.WorstLamp != "" {
		out = append(out, pair{"Worst drop, at " + d.Totals.WorstLamp, figure(d.Totals.WorstDrop), "≤ " + practice.LampDrop.Val.String()})
	}
	if f := b.slowestFuse(); f != nil {
		out = append(out, pair{"Slowest far-end clearing", figure(f.OpensWithin), "≤ " + practice.ClearWithin.Val.String()})
	}
	if f := b.mainFuse(); f != nil {
		out = append(out, pair{"Short at " + f.Part.Designation, figure(f.Prospective), "≤ " + figure(f.Breaking)})
	}
	if e.Standing > 0 {
		out = append(out, pair{"Stands an outage by day", fmt.Sprintf("%.0f days", math.Floor(e.Standing.Hours()/24)), "no limit"})
	}
	const halfWidth, gap = 87.5, 5.0
	left := table{cols: []column{{w: 38}, {w: 49.5}}, st: tableText, min: tightRow, air: tightAir}
	right := table{cols: []column{{w: 44.5}, {w: 20, a: ink.End}, {w: 23, a: ink.End}}, st: tableText, min: tightRow, air: tightAir}
	shift := 180 - halfWidth
	blocks := []block{beside(b.head(0, halfWidth, "Asked", ""), b.head(shift, halfWidth, "Came out", ""))}
	for i := range max(len(asked), len(out)) {
		var l, r block
		if i < len(asked) {
			l = left.line(b, 0, row{cells: []cell{txt(asked[i].what), txt(bold(asked[i].is))}})
		}
		if i < len(out) {
			r = right.line(b, shift, row{cells: []cell{txt(out[i].what), fat(out[i].is), txt(out[i].limit)}})
		}
		x := beside(l, r)
		x.next = i < max(len(asked), len(out))-1
		blocks = append(blocks, x)
	}
	return blocks
}

// beside puts two blocks next to each other.
func beside(l, r block) block {
	out := block{h: max(l.h, r.h), gap: max(l.gap, r.gap), next: l.next || r.next, marks: append(l.marks, r.marks...)}
	out.draw = func(p *pad, y, h float64) {
		for _, x := range []block{l, r} {
			if x.draw != nil {
				x.draw(p, y, h)
			}
		}
	}
	return out
}

// mainFuse is the fuse at the battery.
func (b *book) mainFuse() *facts.Fuse {
	for _, f := range b.d.Fuses {
		if f.Part == b.d.Battery.Fuse {
			return f
		}
	}
	return nil
}

// slowestFuse is the fuse that takes longest over a short at its far end.
func (b *book) slowestFuse() *facts.Fuse {
	var out *facts.Fuse
	for _, f := range b.d.Fuses {
		if f.Opens && (out == nil || f.OpensWithin > out.OpensWithin) {
			out = f
		}
	}
	return out
}

// functionTable is which circuit is lit when.
func (b *book) functionTable() []block {
	shown := b.shown()
	if len(b.d.Function) == 0 || len(shown) == 0 {
		return nil
	}
	agree, places, open := 0, 0, 0
	for _, f := range b.d.Function {
		for _, c := range shown {
			i := b.conditionIndex(c)
			switch {
			case !f.Known[i]:
				open++
			case f.Wanted[i] == f.Found[i]:
				agree++
				places++
			default:
				places++
			}
		}
	}
	remark := fmt.Sprintf("full dot: lit; ring: dark. Asked and found agree in %d of %d places", agree, places)
	if agree == places {
		remark = fmt.Sprintf("full dot: lit; ring: dark. Asked and found agree in all %d places", places)
	}
	if open > 0 {
		remark += "; battery cut off: nothing is asked"
	}
	t := table{cols: []column{{head: "Circuit", w: 42}, {head: "To be lit in", w: 24}}, st: tableText, min: tightRow, air: tightAir}
	each := (180.0 - 66) / float64(len(shown))
	for _, c := range shown {
		t.cols = append(t.cols, column{head: fmt.Sprintf("%d %s", c.Number, c.Name), w: each, a: ink.Middle})
	}
	out := []block{b.head(0, 180, "Which circuit is lit when", remark), t.head(0)}
	var rows []block
	for _, f := range b.d.Function {
		cells := []cell{txt(f.Circuit), txt(f.Asked)}
		for _, c := range shown {
			i := b.conditionIndex(c)
			k := cellRing
			if f.Found[i] {
				k = cellDot
			}
			cells = append(cells, cell{kind: k})
		}
		rows = append(rows, t.line(b, 0, row{cells: cells}))
	}
	return append(out, together(rows)...)
}

// findings are the cards of what was judged, gravest first.
func (b *book) findings() []block {
	d := b.d
	remark := fmt.Sprintf("%d stop, %s, %s. Bar: the figure; tick: its limit", d.Count(finding.Stop),
		counted(d.Count(finding.Caution), "caution"), counted(d.Count(finding.Note), "note"))
	out := []block{b.head(0, 180, "Findings", remark)}
	if len(d.Findings) == 0 {
		return append(out, b.paragraph("Nothing was found: every check holds.", tableText, 1))
	}
	const between = 2.4
	half := (b.pg.width - between) / 2
	for i := 0; i < len(d.Findings); i++ {
		c := b.card(&d.Findings[i], 0, b.pg.width)
		if i+1 < len(d.Findings) && b.short(&d.Findings[i], half) && b.short(&d.Findings[i+1], half) {
			c = beside(b.card(&d.Findings[i], 0, half), b.card(&d.Findings[i+1], half+between, half))
			i++
		}
		c.gap = 1.4
		if len(out) == 1 {
			c.h, c.draw = c.h+1.4, lowered(c.draw, 1.4)
		}
		out = append(out, c)
	}
	return out
}

// short reports whether a note may stand in half the width.
func (b *book) short(f *finding.Finding, half float64) bool {
	return f.Severity == finding.Note && len(wrap(f.Message, boxHead, half-cardText-cardRight)) <= 2 && len(wrap(f.Remedy, tableText, half-cardText-cardRight)) <= 2
}

// lowered draws a block further down, in the lower part of its height.
func lowered(draw func(p *pad, y, h float64), by float64) func(p *pad, y, h float64) {
	return func(p *pad, y, h float64) { draw(p, y+by, h-by) }
}

// Measures of a finding card, mm.
const (
	cardEdge  = 3.0
	cardToken = 7.0
	cardText  = 13.0
	cardRight = 2.5
	gaugeLong = 38.0
)

// card is one finding: edge and token by its gravity, the figure against its limit, and
// what helps.
func (b *book) card(f *finding.Finding, left, width float64) block {
	room := width - cardText - cardRight
	narrow := width < b.pg.width
	gauge := f.Limit != 0 && f.Value > 0 && !narrow
	place := ""
	if f.At.Line > 0 {
		place = fmt.Sprintf("%s:%d:%d", filepath.Base(f.At.File), f.At.Line, f.At.Col)
	}
	code := style{ink.Mono, 8, 3.4, ink.Mid}
	pl, cut := cutLine(place, code, 60)
	if cut {
		b.noteCut(place)
	}
	// the place stands at the right: under the gauge, beside the message, or in a line of
	// its own
	headSide, remedySide := pl.width()+4, 0.0
	switch {
	case narrow:
		headSide = 0
	case gauge:
		headSide = gaugeLong + 4
		remedySide = max(headSide, pl.width()+4)
	}
	head := wrap(f.Message, boxHead, room-headSide)
	remedy := wrap(f.Remedy, tableText, room-remedySide)
	textHigh := float64(len(head))*boxHead.lead + float64(len(remedy))*tableText.lead
	if narrow {
		textHigh += code.lead
	}
	h := max(textHigh+2.8, 9)
	if gauge {
		h = max(h, 11)
	}
	return block{h: h, draw: func(p *pad, y, h float64) {
		x := p.pg.l + left
		edge, lw, c := 1.2, cardLine, ink.Black
		switch f.Severity {
		case finding.Stop:
			edge = cardEdge
		case finding.Note:
			edge, c = 0, ink.Rule
		}
		p.frame(x, y, width, h, lw, c)
		if edge > 0 {
			p.fill(x, y, edge, h, ink.Black)
		}
		p.token(x+cardToken, y+h/2, f.Severity)
		base := y + (h-textHigh)/2 + rise*boxHead.lead
		p.lines(x+cardText, base, head, boxHead.lead)
		p.lines(x+cardText, base+float64(len(head))*boxHead.lead+0.1, remedy, tableText.lead)
		right := x + width - cardRight
		if gauge {
			p.limitGauge(right-gaugeLong, y+2.4, f.Value, f.Limit, f.Over)
		}
		if gauge || narrow {
			p.text(right, y+h-1.8, pl, ink.End)
		} else {
			p.text(right, base, pl, ink.End)
		}
	}}
}

// token is the sign of a finding: octagon, triangle or ring.
func (p *pad) token(x, y float64, s finding.Severity) {
	switch s {
	case finding.Stop:
		var pts []ink.Point
		for i := range 8 {
			a := math.Pi/8 + float64(i)*math.Pi/4
			pts = append(pts, ink.Point{X: x + 3*math.Cos(a), Y: y + 3*math.Sin(a)})
		}
		p.polygon(ink.Black, pts...)
		p.fill(x-1.7, y-0.5, 3.4, 1, ink.White)
	case finding.Caution:
		p.triangle(x, y, 5.2, ink.Black)
	default:
		p.circle(x, y, 2.4, 0.4, ink.Black)
		p.disc(x, y-1.1, 0.3, ink.Black)
		p.stroke(x, y-0.5, x, y+1.4, 0.45, ink.Black)
	}
}

// triangle is the warning sign, centred, of a height.
func (p *pad) triangle(x, y, high float64, c ink.Color) {
	half := high * 0.577
	top, foot := y-high/2, y+high/2
	q := (&ink.Path{}).Polygon(ink.Point{X: x, Y: top}, ink.Point{X: x + half, Y: foot}, ink.Point{X: x - half, Y: foot})
	p.c.Stroke(q, ink.Pen{Width: 0.5, Color: c})
	p.stroke(x, top+high*0.36, x, top+high*0.68, 0.5, c)
	p.disc(x, top+high*0.82, 0.32, c)
}

// limitGauge is a bar from nothing to the figure, with a tick at the limit: grey when
// the figure is inside, black when it is outside. over: the limit is a lower one.
func (p *pad) limitGauge(x, y, value, limit float64, over bool) {
	const high = 2.2
	most := max(value, limit)
	inside := value <= limit
	if over {
		inside = value >= limit
	}
	c := ink.Mid
	if !inside {
		c = ink.Black
	}
	p.fill(x, y, gaugeLong*value/most, high, c)
	p.stroke(x, y-0.3, x, y+high+0.3, 0.25, ink.Black)
	at := x + gaugeLong*limit/most
	if value > limit { // the tick stands on the bar
		p.stroke(at, y-0.7, at, y+high+0.7, 1.3, ink.White)
	}
	p.stroke(at, y-0.9, at, y+high+0.9, barLine, ink.Black)
}
