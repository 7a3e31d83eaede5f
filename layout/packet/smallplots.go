package packet

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
)

// fusePath is the picture of a chain of fuses, from the way to the battery, and the
// fuses whose picture would be the same.
type fusePath struct {
	chain []*facts.Fuse
	same  []*facts.Fuse // other ways, in the order of the fuses
}

// leaves are the fuses of all circuits that a picture stands for.
func (f *fusePath) leaves() []*facts.Fuse { return append([]*facts.Fuse{f.chain[0]}, f.same...) }

// fusePaths lists a picture for each path from the battery to a lighting circuit. large
// has one a board: that way whose fuse parts from the one before it up to the least
// current. small has the others. Paths that draw the same picture share one.
func (b *book) fusePaths() (large, small []*fusePath) {
	for _, bd := range b.d.Circuit.Boards {
		var leaf *facts.Fuse
		for _, f := range b.d.Fuses {
			if f.Board != bd || !drawable(f) {
				continue
			}
			if leaf == nil || f.DiscriminatesTo < leaf.DiscriminatesTo || f.DiscriminatesTo == leaf.DiscriminatesTo && f.Rating > leaf.Rating {
				leaf = f
			}
		}
		if leaf != nil {
			large = append(large, &fusePath{chain: chainOf(leaf)})
		}
	}
	for _, f := range b.d.Fuses {
		if !drawable(f) || slices.ContainsFunc(large, func(p *fusePath) bool { return p.chain[0] == f }) {
			continue
		}
		chain := chainOf(f)
		alike := func(p *fusePath) bool { return sameDrawing(p.chain, chain) }
		if i := slices.IndexFunc(large, alike); i >= 0 {
			large[i].same = append(large[i].same, f)
		} else if i := slices.IndexFunc(small, alike); i >= 0 {
			small[i].same = append(small[i].same, f)
		} else {
			small = append(small, &fusePath{chain: chain})
		}
	}
	return large, small
}

// drawable reports whether a fuse is at the head of a path that can be drawn.
func drawable(f *facts.Fuse) bool {
	return f.Way != nil && f.Way.Lighting != nil && len(f.Slowest) > 0
}

// sameWithin is the ratio of two currents that fall on one line of a picture: a line's
// width of 0.5 mm where a decade is 20 mm long is 6 %.
const sameWithin = 1.06

// sameDrawing reports whether two chains draw one picture: the same fuses upstream,
// equal ratings and wires, and currents that lie within a line's width.
func sameDrawing(a, z []*facts.Fuse) bool {
	if len(a) != len(z) {
		return false
	}
	near := func(x, y quantity.Ampere) bool {
		return x == y || x > 0 && y > 0 && max(x, y) <= sameWithin*min(x, y)
	}
	for i := range a {
		x, y := a[i], z[i]
		if i > 0 && x != y || x.Rating != y.Rating || x.Class != y.Class || x.CableSize != y.CableSize ||
			!near(x.LoadHigh, y.LoadHigh) || !near(x.FarEnd, y.FarEnd) || !near(x.Prospective, y.Prospective) || !near(x.DiscriminatesTo, y.DiscriminatesTo) {
			return false
		}
	}
	return true
}

// Measures of a small picture, mm.
const (
	smallWide  = 87.5 // half of an upright A4's width; Letter has as much
	smallLeft  = 11.0
	smallRight = 3.0
	smallRows  = 3    // a sheet
	smallSpare = 17.0 // of a row: title, figures, axis, gap
	smallWords = 20.0 // head and foot of the list
	smallOver  = 4.6  // figures of one level over the frame
	smallUnder = 5.0
)

// smallPlots are the pictures of the paths that no large one shows, two a row, on the
// same axes.
func (b *book) smallPlots(list []*fusePath) []block {
	if len(list) == 0 {
		return nil
	}
	x := b.sharedAxis(list)
	head := b.head(0, b.pg.width, "Other paths from the battery to a lamp", "all on the same axes; across: current in A; upwards: time in s")
	out := []block{head}
	for i := 0; i < len(list); i += 2 {
		row := b.smallPlot(list[i], x, 0)
		if i+1 < len(list) {
			row = beside(row, b.smallPlot(list[i+1], x, b.pg.width-smallWide))
		}
		row.gap = 2.5
		out = append(out, row)
	}
	out[len(out)-1].next = true
	return append(out, b.paragraph("Strips and wire lines as in the large pictures, the bold figure at a strip is the fuse. Dotted upright lines, from the left: load, short at the last lamp, shorts at the fuses from the circuit to the battery, as they differ.", noteText, 0.5))
}

// sharedAxis holds the currents of all paths; only whole decades have a tick.
func (b *book) sharedAxis(list []*fusePath) axis {
	a := axis{min: math.Inf(1), log: true}
	for _, p := range list {
		own := b.currentAxis(p.chain)
		a.min, a.max = min(a.min, own.min), max(a.max, own.max)
	}
	for e := math.Ceil(math.Log10(a.min) - tiny); math.Pow(10, e) <= a.max*(1+tiny); e++ {
		a.ticks = append(a.ticks, math.Pow(10, e))
	}
	return a
}

// smallTitle names the circuits of a picture with their fuses.
func smallTitle(p *fusePath) string {
	var names []string
	for _, f := range p.leaves() {
		names = append(names, f.Part.Designation+noBreak+bold(f.Feeds))
	}
	return strings.Join(names, ", ")
}

// smallPlot is one small picture at x0 from the left margin.
func (b *book) smallPlot(path *fusePath, x axis, x0 float64) block {
	title := wrap(smallTitle(path), noteText, smallWide-1)
	y := logAxis(shortestTime, longestTime)
	lines := chainCurrents(path.chain)
	for i := range lines {
		lines[i].words = ""
	}
	wide := smallWide - smallLeft - smallRight
	high := (b.pg.end()-b.pg.top()-smallWords)/smallRows - smallSpare
	levels, most := stagger(lines, x, wide)
	over := noteText.lead*float64(len(title)) + 1 + smallOver*float64(most+1)
	var marks []string
	for _, f := range path.leaves() {
		marks = append(marks, curveMark(f))
	}
	return block{h: over + high + smallUnder, marks: marks, draw: func(p *pad, top, _ float64) {
		left := p.pg.l + x0
		p.lines(left, top+rise*noteText.lead, title, noteText.lead)
		g := p.plot(x, y, ink.Rect{X: left + smallLeft, Y: top + over, W: wide, H: high})
		for i, f := range slices.Backward(path.chain) {
			g.strip(f, i)
		}
		for i, f := range path.chain {
			g.stripEdges(f, i)
		}
		for i, l := range lines {
			at := g.at(xy{l.at, g.y.min})
			base := g.frame.Y - 1.4 - smallOver*float64(levels[i])
			p.stroke(at.X, base+0.6, at.X, at.Y, 0.35, ink.Black, dashDots...)
			g.remember([]ink.Point{{X: at.X, Y: g.frame.Y}, at})
			g.patch(at.X, base, l.figure, noteText, ink.Middle)
		}
		g.selective(path.chain[0])
		g.wires(path.chain)
		for _, f := range path.chain {
			g.name(g.besideStrip(f), figure(f.Rating))
		}
		g.close()
	}}
}

// curveMark names the picture of a circuit's path.
func curveMark(f *facts.Fuse) string { return "curve " + f.Part.Designation }

// alsoHolds says for which other circuits a large picture stands.
func alsoHolds(p *fusePath) string {
	if len(p.same) == 0 {
		return ""
	}
	var names []string
	for _, f := range p.same {
		names = append(names, fmt.Sprintf("%s (%s)", f.Feeds, f.Part.Designation))
	}
	return "The same picture holds for " + listed(names) + "."
}
