package packet

import (
	"fmt"

	"gloamwright/internal/design"
	"gloamwright/internal/facts"
	"gloamwright/layout/ink"
)

// Measures of the file of time-current pictures, mm.
const (
	pictureMargin = 10
	pictureGap    = 8
)

// TimeCurrent draws the time-current picture of every path from the battery to a
// lighting circuit, one below the other, as one SVG file: the gates of the fuses in
// series, the load, the shorts at the last lamp and at each fuse, and what the wires
// stand. The packet shows the worst path of each board large and the others small. It
// returns nil if no fuse has
// published opening times.
func TimeCurrent(d *design.Design) ([]byte, error) {
	b := newBook(d, nil)
	b.pg.l, b.pg.t = pictureMargin, pictureMargin
	var blocks []block
	high := 2. * pictureMargin
	for _, f := range d.Fuses {
		if !drawable(f) {
			continue
		}
		for i, bl := range b.fusePlot(&fusePath{chain: chainOf(f)}) {
			if i == 0 && len(blocks) > 0 {
				bl.gap = pictureGap
			}
			high += bl.gap + bl.h
			blocks = append(blocks, bl)
		}
	}
	if len(blocks) == 0 {
		return nil, nil
	}
	j := d.Site.Job
	svg := ink.NewSVG(b.pg.width+2*pictureMargin, high, fmt.Sprintf("%s, time and current", j.Number.Val),
		"Which fuse opens first on every path from the battery to a lighting circuit.")
	p := &pad{c: unlinked{svg}, pg: b.pg, b: b, n: 1, last: 1}
	y := float64(pictureMargin)
	for _, bl := range blocks {
		y += bl.gap
		bl.draw(p, y, bl.h)
		y += bl.h
	}
	return svg.Output()
}

// chainOf lists the fuses in series from a way to the battery, as many as have dashes
// of their own.
func chainOf(leaf *facts.Fuse) []*facts.Fuse {
	var chain []*facts.Fuse
	for f := leaf; f != nil && len(chain) < len(curveDashes); f = f.Before {
		chain = append(chain, f)
	}
	return chain
}

// unlinked is a canvas outside the packet: links to its sheets lead nowhere.
type unlinked struct{ ink.Canvas }

// Link does nothing.
func (unlinked) Link(ink.Rect, ink.Target) {}

// Mark does nothing.
func (unlinked) Mark(string, ink.Point) {}
