package stage

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
)

// Levels that the leads of neighbouring stages meet at, in modules below the L+
// rail, and the two ends of a stage's leads.
const (
	rawLevel   = 16 // raw plus of a transformer supply
	coilLevel1 = 24 // first coil feed
	coilLevel2 = 34 // second coil feed, output of a photocell
	coilLevel3 = 14 // third coil feed
	feedRow    = 20 // diode of a coil feed that comes down from a rail
	pairLevel  = 27 // sensor pair of a charger, and 31
	upEnd      = 3  // an upward lead ends here
	downEnd    = 52 // a downward lead ends here
)

// cabinet is the key of the main cabinet's terminal strip.
const cabinet = "cabinet"

// sketch starts the drawing of the current stage.
func (b *Build) sketch(width int, purpose ...string) {
	b.sk = &circuit.Sketch{Width: width, Purpose: purpose}
}

func (b *Build) add(it circuit.SketchItem) { b.sk.Items = append(b.sk.Items, it) }

// symbol places a part's symbol; pins maps symbol pins to part pins where they differ.
func (b *Build) symbol(name string, p *circuit.Part, x, y float64, turn, label string, pins ...string) {
	it := circuit.SketchItem{Op: circuit.OpSymbol, Symbol: name, Part: p, X: x, Y: y, Turn: turn, Label: label}
	if len(pins) > 0 {
		it.Pins = map[string]string{}
		for i := 0; i+1 < len(pins); i += 2 {
			it.Pins[pins[i]] = pins[i+1]
		}
	}
	b.add(it)
}

// line draws a wire of right angles; w is nil for a track that bears no number.
func (b *Build) line(w *circuit.Conductor, xy ...int) {
	b.add(circuit.SketchItem{Op: circuit.OpWire, Wire: w, Pts: points(xy)})
}

func points(xy []int) [][2]int {
	var out [][2]int
	for i := 0; i+1 < len(xy); i += 2 {
		out = append(out, [2]int{xy[i], xy[i+1]})
	}
	return out
}

// lead joins a pin to a rail through a new terminal and draws it; op is OpUp,
// OpIn or OpDown, rail a rail key. It returns the wire between pin and terminal.
func (b *Build) lead(op circuit.Op, local string, pin *circuit.Pin, rail string, xy ...int) *circuit.Conductor {
	r := b.rails[rail]
	t := b.Terminal(cabinet, local)
	t.Lower = op == circuit.OpDown
	var w *circuit.Conductor
	if op == circuit.OpIn {
		w = b.Wire(t.Pin("in"), pin, r.Positive, leadLength)
	} else {
		w = b.Wire(pin, t.Pin("in"), r.Positive, leadLength)
	}
	b.onRail(r, t.Pin("out"))
	b.add(circuit.SketchItem{Op: op, Part: t, Wire: w, Rail: r.Name, Pts: points(xy)})
	return w
}

// number prints w's number at a place.
func (b *Build) number(w *circuit.Conductor, x, y float64) {
	b.add(circuit.SketchItem{Op: circuit.OpNumber, Wire: w, X: x, Y: y})
}

// point draws a test point.
func (b *Build) point(tp *circuit.TestPoint, x, y float64, side string) {
	b.add(circuit.SketchItem{Op: circuit.OpPoint, TP: tp, X: x, Y: y, Side: side})
}

// mains adds the mains boundary of the current stage: a frame with rings at the
// levels ys, named names, whose leads run to x.
func (b *Build) mains(p *circuit.Part, names []string, x int, ys ...int) {
	m := b.Part("mains", circuit.MainsConnection, "Mains connection", names...)
	for _, n := range names {
		b.Join(m.Pin(n), p.Pin(n))
	}
	b.add(circuit.SketchItem{Op: circuit.OpMains, Part: m, X: -11, X2: float64(x), Ys: ys, Names: names})
}

// converter draws a packaged supply as a block of half height h with the part's
// pins at the given levels left and right, counted from its middle.
func (b *Build) converter(p *circuit.Part, x, y, h float64, left, right []string, ly, ry []int, theta bool) {
	it := circuit.SketchItem{Op: circuit.OpSymbol, Symbol: "converter", Part: p, X: x, Y: y, Y2: h, Turn: "B",
		Names: append(append([]string{}, left...), right...), Ys: ly, Ys2: ry}
	if theta {
		it.Name = "theta"
	}
	b.add(it)
}

// output ends a stage's signal, whose track reaches x at level y, at the port on the
// right edge. When several things take from it, it goes up at column col to a rail of
// its own.
func (b *Build) output(s *describe.Stage, port string, pin *circuit.Pin, y, x, col int) {
	key := s.Name.Val + "." + port
	if b.rails[key] != nil {
		w := b.lead(circuit.OpUp, port, pin, key, x, y, col, y, col, upEnd)
		b.number(w, float64(col), 9)
		return
	}
	b.add(circuit.SketchItem{Op: circuit.OpWire, Name: port, Pts: points([]int{x, y, b.sk.Width, y})})
	b.add(circuit.SketchItem{Op: circuit.OpRight, Name: port, Y: float64(y)})
	b.outs[key] = pin
}

// hangTwo draws two parts with pins 1 and 2 one under the other, from a plus rail down to
// L−.
func (b *Build) hangTwo(from, upperSymbol string, upper *circuit.Part, lowerSymbol string, lower *circuit.Part) {
	up := b.lead(circuit.OpUp, "plus", upper.Pin("1"), from, 12, 12, 12, upEnd)
	b.symbol(upperSymbol, upper, 12, 14, "V", "L")
	b.line(b.Wire(upper.Pin("2"), lower.Pin("1"), true, bridgeLength), 12, 16, 12, 24)
	b.symbol(lowerSymbol, lower, 12, 26, "V", "L")
	down := b.lead(circuit.OpDown, "minus", lower.Pin("2"), Minus, 12, 28, 12, downEnd)
	b.number(up, 12, 9)
	b.number(down, 12, 42)
}
