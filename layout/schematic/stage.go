package schematic

import (
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// sketcher draws one stage's sketch on a sheet.
type sketcher struct {
	b      *book
	sh     *Sheet
	sc     *scene
	x      *stageBox
	x0, y0 float64
	block0 *object // the block being drawn, for the contact inside it
}

func (k *sketcher) at(x, y float64) point { return point{k.x0 + x, k.y0 + y} }
func (k *sketcher) node(p [2]int) node    { return node{int(k.x0) + p[0], int(k.y0) + p[1]} }

func (k *sketcher) nodes(pts [][2]int) []node {
	var out []node
	for _, p := range pts {
		out = append(out, k.node(p))
	}
	return out
}

// drawStage draws a stage with its frame's left edge at x.
func (b *book) drawStage(sh *Sheet, p *plan, x *stageBox, left int) {
	k := &sketcher{b: b, sh: sh, sc: sh.scene, x: x, x0: float64(left), y0: rowRail}
	k.frame()
	for i := range x.st.Sketch.Items {
		k.item(&x.st.Sketch.Items[i])
	}
	pl := b.place("stage " + x.st.Name)
	pl.sheet, pl.at = sh, k.at(1, 7)
}

func (k *sketcher) item(it *circuit.SketchItem) {
	switch it.Op {
	case circuit.OpSymbol:
		k.symbol(it)
	case circuit.OpWire:
		k.sc.wire(it.Wire, k.nodes(it.Pts)...)
	case circuit.OpUp, circuit.OpIn:
		if len(it.Pts) > 1 { // else a terminal for what is wired later
			k.sc.wire(it.Wire, k.nodes(it.Pts)...)
		}
		end := it.Pts[len(it.Pts)-1]
		if it.Op == circuit.OpIn {
			end = it.Pts[0]
		}
		k.ring(it.Part, node{int(k.x0) + end[0], rowRingUpper}, false)
	case circuit.OpDown:
		if len(it.Pts) > 1 {
			k.sc.wire(it.Wire, k.nodes(it.Pts)...)
		}
		k.ring(it.Part, node{int(k.x0) + it.Pts[len(it.Pts)-1][0], rowRingLower}, false)
	case circuit.OpTerminal:
		k.ring(it.Part, k.node([2]int{int(it.X), int(it.Y)}), true)
	case circuit.OpBlock:
		k.block(it)
	case circuit.OpStub:
		o := k.sc.part(it.Part, "")
		o.add(&stroke{pts: points(k.nodes(it.Pts)), pen: normalPen})
		k.sc.pin(it.Part, it.Name, k.node(it.Pts[0]))
	case circuit.OpField:
		k.field(it)
	case circuit.OpPair:
		k.pair(it)
	case circuit.OpPlace:
		o := k.sc.object(classBoundary, "place-"+it.Place.Designation, it.Place.Designation+" "+it.Place.Name)
		a, c := k.at(it.X, it.Y), k.at(it.X2, it.Y2)
		boundary(o, a.X, a.Y, c.X, c.Y, "")
		o.add(textAt(a.X+0.8, a.Y+1.8, placeName(it.Place, it.X2-it.X-1.1), valueStyle, ink.Start))
	case circuit.OpPoint:
		k.b.probe(k.sh, it.TP, k.node([2]int{int(it.X), int(it.Y)}), it.Side)
	case circuit.OpNumber:
		p := k.at(it.X, it.Y)
		k.sc.number(it.Wire, textAt(p.X-0.5, p.Y, it.Wire.Number, wireStyle, ink.End))
	case circuit.OpCore:
		k.core(it)
	case circuit.OpMains:
		k.mains(it)
	}
}

func points(n []node) []point {
	var out []point
	for _, q := range n {
		out = append(out, q.point())
	}
	return out
}

// frame draws the stage's boundary, heading, place and purpose.
func (k *sketcher) frame() {
	st := k.x.st
	o := k.sc.object(classBoundary, "stage-"+st.Name, st.Heading, ink.Attr{Name: "stage", Value: st.Name})
	w := float64(st.Sketch.Width)
	boundary(o, k.x0, rowFrameTop, k.x0+w, rowFrameEnd, "")
	if k.x.head > 0 {
		k.sc.moved++
	}
	o.add(textAt(k.x0+k.x.head, rowHeading, k.x.headText, k.x.headSize, ink.Start))
	if st.Place != nil {
		room := k.clear(rowFrameTop, rowFrameTop+2) - 0.8 - 0.5
		o.add(textAt(k.x0+0.8, rowFrameTop+1.8, stagePlace(st.Place, room), valueStyle, ink.Start))
	}
	lines := st.Sketch.Purpose
	top := rowFrameEnd - 0.9 - linePitch*float64(len(lines)-1)
	room := k.clear(top-1, rowFrameEnd) - 0.8 - 0.5
	for i, s := range wrap(lines, room) {
		o.add(textAt(k.x0+0.8, rowFrameEnd-0.9-linePitch*float64(len(wrap(lines, room))-1-i), s, valueStyle, ink.Start))
	}
}

// clear is how far from the frame's left edge the band from y0 to y1 is free of
// wires.
func (k *sketcher) clear(y0, y1 float64) float64 {
	free := float64(k.x.st.Sketch.Width)
	for _, it := range k.x.st.Sketch.Items {
		pts := it.Pts
		if it.Op == circuit.OpUp || it.Op == circuit.OpIn || it.Op == circuit.OpDown || it.Op == circuit.OpWire {
			for i := 1; i < len(pts); i++ {
				a, c := pts[i-1], pts[i]
				lo, hi := float64(min(a[1], c[1]))+k.y0, float64(max(a[1], c[1]))+k.y0
				if x := float64(min(a[0], c[0])); hi >= y0 && lo <= y1 && x >= 0 {
					free = min(free, x)
				}
			}
		}
	}
	return free
}

// stagePlace is what the frame of a stage says of its place: the designation for
// the main cabinet, the name too for any other.
func stagePlace(p *circuit.Place, room float64) string {
	if p.Key == mainCabinet {
		return p.Designation
	}
	return placeName(p, room)
}

// mainCabinet is the key of the place that things without a place stand in.
const mainCabinet = "cabinet"

func placeName(p *circuit.Place, room float64) string {
	if s := p.Designation + " " + p.Name; width(s, valueStyle) <= room {
		return s
	}
	return p.Designation
}

// wrap breaks words into lines of at most room modules; the given lines are kept
// where they fit.
func wrap(lines []string, room float64) []string {
	fits := true
	for _, l := range lines {
		fits = fits && width(l, valueStyle) <= room
	}
	if fits {
		return lines
	}
	return ink.Wrap(strings.Join(lines, " "), valueStyle.font(), room*module)
}

// core writes the name, size and length of a core that runs apart.
func (k *sketcher) core(it *circuit.SketchItem) {
	c := it.Wire
	p := k.at(it.X+0.6, it.Y)
	o := k.sc.conductor(k.b, c)
	o.add(textAt(p.X, p.Y, c.Number, wireStyle, ink.Start))
	if c.Size.Area > 0 {
		o.add(textAt(p.X, p.Y+linePitch, c.Size.String(), valueStyle, ink.Start))
	}
	o.add(textAt(p.X, p.Y+2*linePitch, k.b.lengths.Format(c.Length), valueStyle, ink.Start))
}

// pair draws the upright oval of a cable and what is written at it.
func (k *sketcher) pair(it *circuit.SketchItem) {
	p := k.at(it.X, it.Y)
	o := k.sc.cable(it.Cable)
	o.add(&oval{at: p, rx: 0.45, ry: it.Y2})
	k.b.cableText(o, it.Cable, p.X-0.8, p.Y-it.Y2-4.6)
}

// cableText writes a cable's name and length, and under it cores and size.
func (b *book) cableText(o *object, c *circuit.Cable, x, y float64) {
	o.add(&line{at: point{x, y}, runs: []run{{s: c.Designation, st: nameStyle}, {s: b.lengths.Format(c.Length), st: valueStyle}}})
	if s := coresAndSize(c); s != "" {
		o.add(textAt(x, y+linePitch, s, valueStyle, ink.Start))
	}
}

// mains draws the boundary of the mains side: frame, rings, leads.
func (k *sketcher) mains(it *circuit.SketchItem) {
	o := k.sc.object(classBoundary, "mains-"+k.x.st.Name, "Mains side: licensed persons only", ink.Attr{Name: "stage", Value: k.x.st.Name})
	first, last := float64(it.Ys[0]), float64(it.Ys[len(it.Ys)-1])
	a, c := k.at(it.X, first-9), k.at(it.X+9, last+4)
	boundary(o, a.X, a.Y, c.X, c.Y, "")
	o.add(textAt(a.X+0.8, a.Y+1.8, "Mains", nameStyle, ink.Start))
	for i, s := range k.b.mainsText(k.x.st.Name) {
		o.add(textAt(a.X+0.8, a.Y+1.8+linePitch*float64(i+1), s, valueStyle, ink.Start))
	}
	for i, y := range it.Ys {
		name := it.Names[i]
		at := k.node([2]int{int(it.X) + 6, y})
		t := k.sc.object(classTerminal, "mains-"+k.x.st.Name+"-"+name, "Mains "+name,
			ink.Attr{Name: "part", Value: it.Part.Key}, ink.Attr{Name: "terminal", Value: name})
		k.sc.symbols = append(k.sc.symbols, &symbol{sym: &symbols.Terminal, at: at, turn: symbols.H, part: it.Part,
			pins: map[string]string{"1": "", "2": name}, obj: t})
		t.add(textAt(float64(at.X)-1.3, float64(at.Y)+textHeight/2, name, valueStyle, ink.End))
		k.sc.wire(nil, node{at.X + 1, at.Y}, k.node([2]int{int(it.X2), y})).name = "mains " + name
	}
}

// ring places a terminal; it is named when all of the sheet are placed.
func (k *sketcher) ring(t *circuit.Part, at node, level bool) { k.sc.ring(t, at, level) }
