package packet

import (
	"fmt"

	"gloamwright/internal/facts"
	"gloamwright/layout/ink"
)

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
