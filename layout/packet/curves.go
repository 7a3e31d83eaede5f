package packet

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
)

// Times between which fuses are drawn, s.
const (
	shortestTime = 0.01
	longestTime  = 1e4
)

// curves is the sheet of pictures: which fuse opens first, and how long the lights
// last.
func (b *book) curves() *section {
	s := &section{key: keyCurves, title: "Curves: fuses and hours", document: "Curves", letter: "U", label: "See also",
		purpose: "Use this sheet to see which fuse opens first, and how long the lights last.",
		note:    fmt.Sprintf("%s and %s give the same figures as numbers.", b.upperSheets(keyFuses), b.sheets(keyBasis))}
	large, small := b.fusePaths()
	for _, path := range large {
		s.blocks = append(s.blocks, b.fusePlot(path)...)
	}
	s.blocks = append(s.blocks, b.hours()...)
	s.blocks = append(s.blocks, b.smallPlots(small)...)
	if len(s.blocks) == 0 {
		return nil
	}
	return s
}

// Measures of the fuse picture, mm.
const (
	fusePlotHeight = 78  // least
	fusePlotMost   = 165 // where the sheet leaves so much
	plotLeft       = 14
	plotRight      = 6
)

// fusePlot is the time-current picture of one path.
func (b *book) fusePlot(path *fusePath) []block {
	chain := path.chain
	leaf := chain[0]
	x, y := b.currentAxis(chain), logAxis(shortestTime, longestTime)
	wide := b.pg.width - plotLeft - plotRight
	lines := chainCurrents(chain)
	levels, most := stagger(lines, x, wide)
	over := above*float64(most+1) + 1.5
	title := "From the battery to " + leaf.Feeds
	const under = 6
	var marks []string
	for _, f := range path.leaves() {
		marks = append(marks, curveMark(f))
	}
	picture := block{h: over + fusePlotHeight + under, next: true, marks: marks, fill: true, most: over + fusePlotMost + under, draw: func(p *pad, top, h float64) {
		g := p.plot(x, y, ink.Rect{X: p.pg.l + plotLeft, Y: top + over, W: wide, H: h - over - under})
		for i, f := range slices.Backward(chain) {
			g.strip(f, i)
		}
		for i, f := range chain {
			g.stripEdges(f, i)
		}
		for i, l := range lines {
			g.upright(l.at, l.figure, l.words, levels[i])
		}
		g.selective(leaf)
		g.wires(chain)
		for _, f := range chain {
			g.fuseName(f)
		}
		g.close()
		p.write(p.pg.l, top+over-5, "s", noteText.in(ink.Mid), ink.Start)
	}}
	return []block{b.head(0, b.pg.width, title, "across: current in A; upwards: time in s"), picture,
		b.paragraph(strings.TrimSpace(alsoHolds(path)+" "+b.fuseWords(chain)), noteText, 0)}
}

// current is an upright line of the picture.
type current struct {
	at            float64
	figure, words string
}

// chainCurrents are the currents that matter on a chain: the load, the short at the
// last lamp, and the shorts at the fuses.
func chainCurrents(chain []*facts.Fuse) []current {
	var out []current
	add := func(v quantity.Ampere, words string) {
		if v > 0 {
			out = append(out, current{float64(v), figure(v), words})
		}
	}
	leaf := chain[0]
	add(leaf.LoadHigh, "load of "+leaf.Part.Designation)
	add(leaf.FarEnd, "short at last lamp")
	for _, f := range chain {
		add(f.Prospective, "short at "+f.Part.Designation)
	}
	slices.SortStableFunc(out, func(a, z current) int { return int(math.Copysign(1, a.at-z.at)) })
	return out
}

// stagger spreads the words of upright lines over levels so that none overlap.
func stagger(lines []current, x axis, wide float64) (levels []int, most int) {
	const clear = 2.5
	var ends []float64 // right end of what stands on each level
	for _, l := range lines {
		w := max(spans(l.figure, noteText.as(ink.Bold)).width(), spans(l.words, noteText).width())
		left := wide*x.at(l.at) - w/2
		level := 0
		for level < len(ends) && ends[level]+clear > left {
			level++
		}
		if level == len(ends) {
			ends = append(ends, 0)
		}
		ends[level] = left + w
		levels = append(levels, level)
		most = max(most, level)
	}
	return levels, most
}

// currentAxis holds the load of the last fuse and the shorts at the first.
func (b *book) currentAxis(chain []*facts.Fuse) axis {
	low, high := math.Inf(1), 0.0
	for _, f := range chain {
		high = max(high, float64(f.Prospective), 10*float64(f.Rating))
		low = min(low, float64(f.Rating))
	}
	if l := float64(chain[0].LoadHigh); l > 0 {
		low = min(low, l)
	}
	return logAxis(low*0.7, high*1.1)
}

// edge is one limit of a fuse as values: upright above its first point, level behind
// its last.
func edge(f *facts.Fuse, points []catalogue.GatePoint, most float64) []xy {
	var out []xy
	for i, g := range points {
		t := min(float64(g.Time), 1e9)
		at := g.Multiple * float64(f.Rating)
		if i == 0 {
			out = append(out, xy{at, max(t, longestTime)})
		}
		out = append(out, xy{at, t})
	}
	if n := len(out); n > 0 {
		out = append(out, xy{max(most, out[n-1].x), out[n-1].y})
	}
	return out
}

var stripGreys = []ink.Color{ink.Tint, stripPale, stripGrey}

// strip fills the area in which a fuse may open.
func (g *plot) strip(f *facts.Fuse, i int) {
	fast, slow := edge(f, f.Fastest, g.x.max), edge(f, f.Slowest, g.x.max)
	if len(fast) == 0 || len(slow) == 0 {
		return
	}
	poly := slices.Clone(fast)
	for _, v := range slices.Backward(slow) {
		poly = append(poly, v)
	}
	g.area(poly, stripGreys[i])
}

// stripEdges draws when a fuse opens at the earliest and at the latest.
func (g *plot) stripEdges(f *facts.Fuse, i int) {
	g.curve(edge(f, f.Fastest, g.x.max), 0.35, curveDashes[i])
	g.curve(edge(f, f.Slowest, g.x.max), 0.5, curveDashes[i])
}

func (g *plot) fuseName(f *facts.Fuse) {
	g.name(g.besideStrip(f), f.Part.Designation, figure(f.Rating))
}

// besideStrip lists places on the right edge of a strip, for its name.
func (g *plot) besideStrip(f *facts.Fuse) []xy {
	var at []xy
	slow := edge(f, f.Slowest, g.x.max)
	if len(slow) == 0 {
		return nil // its opening times are not known; the words below say so
	}
	for _, t := range []float64{3000, 1500, 700, 300, 100, 30, 10} {
		at = append(at, xy{slowAt(slow, t), t})
	}
	return at
}

// slowAt is the current at which an edge passes a time.
func slowAt(e []xy, t float64) float64 {
	for i := 1; i < len(e); i++ {
		a, z := e[i-1], e[i]
		if a.y >= t && z.y <= t && a.y > z.y {
			share := math.Log(a.y/t) / math.Log(a.y/z.y)
			return a.x * math.Pow(z.x/a.x, share)
		}
	}
	return e[0].x
}

// selective marks up to which current the last fuse surely opens first.
func (g *plot) selective(f *facts.Fuse) {
	if f.Before == nil || f.DiscriminatesTo <= 0 {
		return
	}
	at := float64(f.DiscriminatesTo)
	foot, top := g.at(xy{at, g.y.min}), g.at(xy{at, 0.3})
	g.p.stroke(foot.X, foot.Y, foot.X, top.Y, barLine, ink.Black)
	g.fixed(foot.X-1.2, foot.Y-1.6, "selective to "+figure(f.DiscriminatesTo), noteText, ink.End)
}

// wires draws how long the cable behind each fuse stands a current: k²S² of
// IEC 60364-4-43, which holds up to 5 s.
func (g *plot) wires(chain []*facts.Fuse) {
	var done []quantity.WireSize
	type named struct {
		at   []xy
		size string
	}
	var names []named
	for _, f := range chain {
		if f.Withstand <= 0 || f.FarEnd <= 0 || slices.Contains(done, f.CableSize) {
			continue
		}
		done = append(done, f.CableSize)
		energy := float64(f.FarEnd) * float64(f.FarEnd) * float64(f.Withstand) // the same at every current
		from := math.Sqrt(energy / float64(catalogue.AdiabaticLimit))
		to := math.Sqrt(energy / shortestTime)
		g.curve([]xy{{from, float64(catalogue.AdiabaticLimit)}, {to, shortestTime}}, barLine, nil)
		var at []xy
		for _, share := range []float64{0, 0.15, 0.3, 0.45, 0.6} {
			at = append(at, xy{from * math.Pow(to/from, share), float64(catalogue.AdiabaticLimit) * math.Pow(shortestTime/float64(catalogue.AdiabaticLimit), share)})
		}
		names = append(names, named{at, f.CableSize.String()})
	}
	for _, n := range names { // when all lines are known
		g.name(n.at, n.size)
	}
}

// fuseWords says how to read the picture.
func (b *book) fuseWords(chain []*facts.Fuse) string {
	var out []string
	out = append(out, "A strip is where a fuse may open: left edge at the earliest, right edge at the latest.")
	for i, f := range chain[:len(chain)-1] {
		up := chain[i+1]
		if f.DiscriminatesTo <= 0 {
			continue
		}
		if f.DiscriminatesTo >= f.Prospective {
			out = append(out, fmt.Sprintf("%s opens before %s at every current that can flow.", f.Part.Designation, up.Part.Designation))
			continue
		}
		out = append(out, fmt.Sprintf("Up to %s %s opens before %s for certain; above it both may open.", bold(figure(f.DiscriminatesTo)), f.Part.Designation, up.Part.Designation))
	}
	for _, f := range chain {
		if len(f.Slowest) == 0 {
			out = append(out, fmt.Sprintf("The opening times of %s, %s, are not in the tables: it has no strip.", bold(f.Part.Designation), figure(f.Rating)))
		}
	}
	out = append(out, "A wire line is what the wire stands, up to 5 s.")
	var sources []string
	for _, f := range chain {
		if f.Class == nil {
			continue
		}
		if _, e := f.Class.Gates(f.Rating); e.Source != "" && !slices.Contains(sources, e.Source) {
			sources = append(sources, e.Source)
		}
	}
	sources = append(sources, "IEC 60364-4-43 (wire)")
	return strings.Join(out, " ") + " Sources: " + strings.Join(sources, "; ") + "."
}
