package packet

import (
	"gloamwright/internal/finding"
	"gloamwright/layout/ink"
	"gloamwright/symbols"
	"gloamwright/templates"
)

// legend says what marks, references and colours mean.
func (b *book) legend() *section {
	s := &section{key: keyLegend, title: "Legend", document: "Legend", letter: "G", label: "See also",
		purpose: "Use this sheet to read every mark, reference and colour of this packet.",
		note:    "What begins with a dash is the name of a thing, and stands on the thing itself."}
	s.blocks = append(s.blocks, b.legendColumns()...)
	s.blocks = append(s.blocks, b.symbolLegend()...)
	return s
}

// Measures of the two columns of the legend, mm.
const (
	legendWide  = 87.5
	legendRight = 92.5 // left edge of the right column
	legendGap   = 4.0  // above a group
)

// legendColumns sets the groups in two columns, left and right in turn; a new pair of
// columns begins when one is full.
func (b *book) legendColumns() []block {
	type piece struct {
		y    float64
		list []block
	}
	var out []block
	var pieces []piece
	var high [2]float64
	flush := func() {
		if len(pieces) == 0 {
			return
		}
		now := pieces
		out = append(out, block{h: max(high[0], high[1]), gap: legendGap, draw: func(p *pad, y, _ float64) {
			for _, x := range now {
				at := y + x.y
				for _, r := range x.list {
					r.draw(p, at, r.h)
					at += r.h
				}
			}
		}})
		pieces, high = nil, [2]float64{}
	}
	for i := range b.words.texts.Legend {
		side := i % 2
		list := b.legendGroup(&b.words.texts.Legend[i], float64(side)*legendRight)
		h := 0.0
		for _, x := range list {
			h += x.h
		}
		y := high[side]
		if y > 0 {
			y += legendGap
		}
		if y+h > b.pg.end()-b.pg.top() {
			flush()
			y = 0
		}
		pieces = append(pieces, piece{y, list})
		high[side] = y + h
	}
	flush()
	return out
}

// legendGroup is one group of signs, at x.
func (b *book) legendGroup(g *templates.LegendGroup, x float64) []block {
	out := []block{b.head(x, legendWide, b.say(g.Title, nil), "")}
	const signAt = 27.0
	put := func(text string, st style) {
		lines := wrap(text, st, legendWide)
		out = append(out, block{h: float64(len(lines))*st.lead + 2, draw: func(p *pad, y, h float64) {
			p.lines(p.pg.l+x, y+1+rise*st.lead, lines, st.lead)
		}})
	}
	if g.Remark != "" {
		put(b.say(g.Remark, nil), remarkText)
	}
	for _, r := range g.Rows {
		sign := b.say(r.Sign, nil)
		lines := wrap(b.say(r.Means, nil), tableText, legendWide-signAt)
		words := wrap(bold(sign), tableText, signAt-2)
		h := max(7, float64(max(len(lines), len(words)))*tableText.lead+2.5)
		out = append(out, block{h: h, draw: func(p *pad, y, h float64) {
			at := p.pg.l + x
			if !p.sign(sign, at+6, y+h/2) {
				p.lines(at, y+(h-float64(len(words))*tableText.lead)/2+rise*tableText.lead, words, tableText.lead)
			}
			p.lines(at+signAt, y+(h-float64(len(lines))*tableText.lead)/2+rise*tableText.lead, lines, tableText.lead)
			p.rule(at, y+h, legendWide, hairline, ink.Rule)
		}})
	}
	return out
}

// sign draws one of the small pictures that the legend knows by name.
func (p *pad) sign(name string, x, y float64) bool {
	switch name {
	case "tick":
		p.tick(x, y)
	case "two":
		p.tick(x-3, y)
		p.tick(x+4, y)
	case "blank":
		p.blank(x-6, y-2.6, 20, 5.2)
	case "bar":
		p.stroke(x, y-2.6, x, y+2.6, barLine, ink.Black)
	case "hold":
		p.fill(x-6, y-2.4, 20, 4.8, ink.Black)
		p.write(x-4.5, y+1.4, "STOP", style{ink.Bold, 10, 4, ink.White}, ink.Start)
	case "dot":
		p.disc(x, y, 1.5, ink.Black)
	case "ring":
		p.circle(x, y, 1.4, 0.3, ink.Black)
	case "stop":
		p.token(x, y, finding.Stop)
	case "caution":
		p.token(x, y, finding.Caution)
	case "note":
		p.token(x, y, finding.Note)
	default:
		return false
	}
	return true
}

// symbolLegend shows the symbols that the schematic uses, with their names.
func (b *book) symbolLegend() []block {
	var used []*symbols.Symbol
	seen := map[string]bool{}
	for _, s := range b.drawings {
		for _, id := range symbolIDs(b.recorded(s)) {
			if !seen[id] {
				seen[id] = true
				if y := symbols.ByID(id); y != nil {
					used = append(used, y)
				}
			}
		}
	}
	if len(used) == 0 {
		return nil
	}
	const columns, high, scale = 4, 13.6, 0.7
	out := []block{b.head(0, b.pg.width, "Symbols on the schematic", "IEC 60617; on "+b.sheets(keySchematic))}
	each := b.pg.width / columns
	var rows []block
	for i := 0; i < len(used); i += columns {
		row := used[i:min(len(used), i+columns)]
		rows = append(rows, block{h: high, draw: func(p *pad, y, h float64) {
			for k, u := range row {
				x := p.pg.l + float64(k)*each
				turn := legendTurn(u)
				box := u.Bounds(turn)
				at := symbols.Place{Turn: turn, Scale: scale}
				fit := min(1, 18/(box.W*symbols.M*scale), (high-2)/(box.H*symbols.M*scale))
				at.Scale *= fit
				m := symbols.M * at.Scale
				at.At = ink.Point{X: x + 9.5 - (box.X+box.W/2)*m, Y: y + h/2 - (box.Y+box.H/2)*m}
				u.Draw(p.c, at, ink.Pen{Width: 0.3, Color: ink.Black}, "")
				lines := wrap(upper(u.Name), tableText, each-21)
				p.lines(x+20, y+(h-float64(len(lines))*tableText.lead)/2+rise*tableText.lead, lines, tableText.lead)
			}
			p.rule(p.pg.l, y+h, p.pg.width, hairline, ink.Rule)
		}})
	}
	return append(out, together(rows)...)
}

// legendTurn is the turn in which the legend shows a symbol: lying, as current runs on
// paper, but a symbol with words in it stands as it is recorded.
func legendTurn(u *symbols.Symbol) symbols.Turn {
	var r ink.Recorder
	u.Draw(&r, symbols.Place{Turn: symbols.H, Scale: 1}, ink.Pen{Width: hairline, Color: ink.Black}, "")
	for _, c := range r.Calls {
		if w, ok := c.(ink.Written); ok && len([]rune(w.Text)) > 2 {
			return symbols.V
		}
	}
	return symbols.H
}

// symbolIDs lists the symbols of a drawing in the order in which they are drawn.
func symbolIDs(r *ink.Recorder) []string {
	var out []string
	var walk func(calls []ink.Call)
	walk = func(calls []ink.Call) {
		for _, c := range calls {
			g, ok := c.(ink.Grouped)
			if !ok {
				continue
			}
			for _, a := range g.Object.Data {
				if a.Name == "symbol" {
					out = append(out, a.Value)
				}
			}
			walk(g.Calls)
		}
	}
	walk(r.Calls)
	return out
}
