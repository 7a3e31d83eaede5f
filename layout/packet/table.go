package packet

import (
	"gloamwright/layout/ink"
)

// column is one column of a table.
type column struct {
	head   string
	w      float64
	a      ink.Anchor
	indent float64 // of text that begins at the left
	pad    float64 // free at the right; padding if 0
}

// table is a set of columns with the style of its rows.
type table struct {
	cols []column
	st   style
	min  float64 // least height of a row that is only printed
	air  float64 // of a row beyond its lines; rowAir if 0
}

// kinds of cells.
type cellKind uint8

const (
	cellText cellKind = iota
	cellTick
	cellBlank
	cellDot     // a full dot
	cellRing    // an empty ring
	cellTwo     // OK and Not
	cellNothing // nothing is drawn, not even the air
)

// cell is one field of a row.
type cell struct {
	kind   cellKind
	text   string
	face   ink.Face
	strong bool // face holds
	span   int  // columns beyond its own that it covers
	most   int  // lines at most; 0: as many as it takes
	tail   string
	frame  float64 // width of a blank narrower than its column, its tail after it
}

func txt(s string) cell       { return cell{text: s} }
func fat(s string) cell       { return cell{text: s, face: ink.Bold, strong: true} }
func half(s string) cell      { return cell{text: s, face: ink.Medium, strong: true} }
func tickBox() cell           { return cell{kind: cellTick} }
func writeIn() cell           { return cell{kind: cellBlank} }
func none() cell              { return cell{kind: cellNothing} }
func over(c cell, n int) cell { c.span = n; return c }

// upTo limits the lines of a cell.
func upTo(c cell, n int) cell { c.most = n; return c }

// row is what a row needs besides its cells.
type row struct {
	cells   []cell
	changed bool
	marks   []string
	topic   string
	heavy   bool // a black line under it
	bare    bool // no line under it
}

func (t *table) width() float64 {
	w := 0.0
	for _, c := range t.cols {
		w += c.w
	}
	return w
}

// head is the row of column heads, 0.5 rule under it.
func (t *table) head(x float64) block {
	var set [][]line
	n := 1
	for _, c := range t.cols {
		l := wrap(c.head, columnHead, c.w-t.side(c))
		set = append(set, l)
		n = max(n, len(l))
	}
	h := float64(n)*columnHead.lead + 1.9
	return block{h: h, next: true, draw: func(p *pad, y, h float64) {
		left := p.pg.l + x
		at := left
		for i, c := range t.cols {
			base := y + h - 1.4 - float64(len(set[i])-1)*columnHead.lead
			for k, l := range set[i] {
				p.text(t.place(c, at), base+float64(k)*columnHead.lead, l, c.a)
			}
			at += c.w
		}
		p.rule(left, y+h, at-left, headLine, ink.Black)
	}}
}

// side is what a cell keeps free of its column.
func (t *table) side(c column) float64 {
	switch c.a {
	case ink.Middle:
		return 0.6
	case ink.End:
		return t.rightPad(c)
	}
	return c.indent + t.rightPad(c)
}

func (t *table) rightPad(c column) float64 {
	if c.pad > 0 {
		return c.pad
	}
	return padding
}

// place is where text of a column stands.
func (t *table) place(c column, x float64) float64 {
	switch c.a {
	case ink.Middle:
		return x + c.w/2
	case ink.End:
		return x + c.w - t.rightPad(c)
	}
	return x + c.indent
}

// line sets a row. x is the table's place right of the text's left edge.
func (t *table) line(b *book, x float64, r row) block {
	type setCell struct {
		cell
		col   column
		at    float64
		lines []line
	}
	var set []setCell
	n, least := 1, t.min
	at, i := x, 0
	for _, c := range r.cells {
		col := t.cols[i]
		for k := 1; k <= c.span; k++ {
			col.w += t.cols[i+k].w
		}
		s := setCell{cell: c, col: col, at: at}
		switch c.kind {
		case cellText:
			st := t.st
			if c.strong {
				st.face = c.face
			}
			w := col.w - t.side(col)
			if c.most > 0 {
				var cut bool
				if s.lines, cut = cutLines(c.text, st, w, c.most); cut {
					b.noteCut(c.text)
				}
			} else {
				s.lines = wrap(c.text, st, w)
			}
			n = max(n, len(s.lines))
		case cellTick, cellTwo:
			least = max(least, tickRow)
		case cellBlank:
			least = max(least, blankRow)
		}
		set = append(set, s)
		at += col.w
		i += 1 + c.span
	}
	air := t.air
	if air == 0 {
		air = rowAir
	}
	h := max(least, float64(n)*t.st.lead+air)
	return block{h: h, marks: r.marks, topic: r.topic, draw: func(p *pad, y, h float64) {
		first := y + (h-float64(n)*t.st.lead)/2 + rise*t.st.lead
		if !r.bare {
			c, w := ink.Rule, hairline
			if r.heavy {
				c, w = ink.Black, cardLine
			}
			p.rule(p.pg.l+x, y+h, t.width(), w, c)
		}
		for _, s := range set {
			left := p.pg.l + s.at
			mid := left + s.col.w/2
			switch s.kind {
			case cellText:
				for k, l := range s.lines {
					p.text(t.place(s.col, left), first+float64(k)*t.st.lead, l, s.col.a)
				}
			case cellTick:
				p.tick(mid, y+h/2)
			case cellTwo:
				p.tick(mid-4.75, y+h/2)
				p.tick(mid+4.75, y+h/2)
			case cellBlank:
				w := s.col.w
				if s.frame > 0 {
					w = s.frame
				}
				p.blank(left, y, w, h)
				if s.tail != "" {
					p.write(left+w+1.2, y+h/2+1.1, s.tail, noteText, ink.Start)
				}
			case cellDot:
				p.disc(mid, y+h/2, 1.5, ink.Black)
			case cellRing:
				p.circle(mid, y+h/2, 1.4, 0.3, ink.Black)
			}
		}
		if r.changed {
			p.changed(y, h)
		}
	}}
}

// section head over a 0.5 rule: name at the left, remark at the right.
func (b *book) head(x, w float64, name, remark string) block {
	l, cut := cutLine(remark, remarkText, w-spans(name, sectionHead).width()-4)
	if cut {
		b.noteCut(remark)
	}
	return block{h: 6.6, gap: 4.5, next: true, draw: func(p *pad, y, h float64) {
		p.write(p.pg.l+x, y+4.4, name, sectionHead, ink.Start)
		if remark != "" {
			p.text(p.pg.l+x+w, y+4.4, l, ink.End)
		}
		p.rule(p.pg.l+x, y+h, w, headLine, ink.Black)
	}}
}

// band is the head of a group of rows.
func (b *book) band(name, remark string, gap float64) block {
	return block{h: 6.5, gap: gap, next: true, group: true, draw: func(p *pad, y, h float64) {
		p.fill(p.pg.l, y, p.pg.width, h, ink.Tint)
		w := p.fit(p.pg.l+1.5, y+4.4, name, groupHead, p.pg.width-3, ink.Start)
		if remark != "" {
			p.fit(p.pg.right()-1.5, y+4.4, remark, groupRemark, p.pg.width-7-w, ink.End)
		}
	}}
}

// groupGap is clear above a group's band; the first one follows the column heads.
func groupGap(first bool) float64 {
	if first {
		return 0
	}
	return 2.4
}

// paragraph is running text over the whole width.
func (b *book) paragraph(text string, st style, gap float64) block {
	return b.paragraphIn(text, st, gap, b.pg.width)
}

// paragraphIn is running text of a width.
func (b *book) paragraphIn(text string, st style, gap, width float64) block {
	lines := wrap(text, st, width)
	return block{h: float64(len(lines))*st.lead + 1, gap: gap, draw: func(p *pad, y, h float64) {
		p.lines(p.pg.l, y+rise*st.lead+0.5, lines, st.lead)
	}}
}
