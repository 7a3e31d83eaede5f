package schematic

import (
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

const (
	labelGap  = 0.6 // from a symbol's body to its label
	labelRoom = 6.0 // width that stacked ratings are packed into
	blockRoom = 8.0 // the same, under a block
)

// symbol draws a part's symbol with its designation and ratings.
func (k *sketcher) symbol(it *circuit.SketchItem) {
	at := k.node([2]int{int(it.X), int(it.Y)})
	if it.Part == nil { // a contact inside a block
		k.block0.add(&symbolMark{symbolNamed(it.Symbol), at, turnOf(it.Turn), ""})
		return
	}
	if it.Symbol == "converter" {
		k.converter(it)
		return
	}
	role := ""
	if it.Symbol == "coil" || it.Symbol == "make" || it.Symbol == "break" {
		role = it.Symbol
		if it.Symbol != "coil" {
			role += " " + it.Pins["1"] + "-" + it.Pins["2"]
		}
	}
	o := k.sc.part(it.Part, role)
	y := &symbol{sym: symbolNamed(it.Symbol), at: at, turn: turnOf(it.Turn), part: it.Part, pins: it.Pins, obj: o, mark: signalColour(it.Part)}
	k.sc.symbols = append(k.sc.symbols, y)
	h := reach(y.sym, y.turn)
	lines := k.labelLines(it)
	x, yy := float64(at.X), float64(at.Y)
	switch {
	case it.Turn == "B" && it.Label == "A" || it.Turn == "B" && it.Label == "B":
		o.add(textAt(x-h.left, yy-h.top-0.7, it.Part.Designation, nameStyle, ink.Start))
		a, tx := ink.Start, x-h.left
		if it.Symbol == "regulator3" { // its lead comes down in the middle
			a, tx = ink.End, x-labelGap
		}
		for i, s := range lines[1:] {
			o.add(textAt(tx, yy+h.bottom+1.7+linePitch*float64(i), s, valueStyle, a))
		}
	case it.Label == "L" || it.Label == "R":
		a, tx := ink.End, x-h.left-labelGap
		if it.Label == "R" {
			a, tx = ink.Start, x+h.right+labelGap
		}
		ty := yy - 0.2
		if it.Symbol == "coil" {
			ty += 0.4
		}
		labelStack(o, lines, tx, ty, a)
	case it.Label == "A":
		labelStack(o, lines, x, yy-h.top-labelGap-linePitch*float64(len(lines)-1), ink.Middle)
	case it.Label == "B":
		labelStack(o, lines, x, yy+h.bottom+1.7, ink.Middle)
	case it.Label == "C":
		k.contact(it, o, at)
	}
	if it.Symbol == "coil" {
		pl := k.b.place("coil " + it.Part.Designation)
		pl.sheet, pl.at, pl.anchor = k.sh, at.point(), o.ID
		o.add(textAt(x-0.5, yy-2.1, "A1", valueStyle, ink.End), textAt(x-0.5, yy+3.2, "A2", valueStyle, ink.End))
	}
}

// labelLines are the designation and the ratings of a part, one a line; beside a
// symbol, a rating wider than the room to the next line or symbol is broken at its
// spaces.
func (k *sketcher) labelLines(it *circuit.SketchItem) []string {
	values := valueLines(it.Part, labelRoom)
	if c := signalColour(it.Part); c != "" { // the symbol bears it
		values = slices.DeleteFunc(values, func(s string) bool { return s == c })
	}
	lines := []string{it.Part.Designation}
	if it.Label != "L" && it.Label != "R" {
		return append(lines, values...)
	}
	room := k.beside(it, len(values))
	for _, v := range values {
		for _, w := range strings.Split(bind(v), " ") { // words stay whole
			room = max(room, width(w, valueStyle)+0.01)
		}
		for _, l := range ink.Wrap(bind(v), valueStyle.font(), room*module) {
			lines = append(lines, strings.ReplaceAll(l, noBreak, " "))
		}
	}
	return lines
}

// noBreak is the space at which no line breaks.
const noBreak = "\u00A0"

// bind keeps numbers and their units on one line.
func bind(s string) string {
	words := strings.Split(s, " ")
	out := words[0]
	for i := 1; i < len(words); i++ {
		gap := " "
		if w := words[i-1]; w != "" && w[len(w)-1] >= '0' && w[len(w)-1] <= '9' {
			gap = noBreak
		}
		out += gap + words[i]
	}
	return out
}

// beside is the room for a label left or right of a symbol, to the next wire, symbol
// or the frame, over the height of its lines.
func (k *sketcher) beside(it *circuit.SketchItem, values int) float64 {
	h := reach(symbolNamed(it.Symbol), turnOf(it.Turn))
	top, bottom := it.Y-1.4, it.Y+linePitch*float64(values)+0.2
	left, right := 0.0, float64(k.x.st.Sketch.Width)
	from, to := it.X-h.left-labelGap, it.X+h.right+labelGap
	block := func(x0, x1, y0, y1 float64) {
		if y1 < top || y0 > bottom {
			return
		}
		if x1 < it.X {
			left = max(left, x1)
		}
		if x0 > it.X {
			right = min(right, x0)
		}
	}
	for i := range k.x.st.Sketch.Items {
		o := &k.x.st.Sketch.Items[i]
		for n := 1; n < len(o.Pts); n++ {
			a, z := o.Pts[n-1], o.Pts[n]
			block(float64(min(a[0], z[0])), float64(max(a[0], z[0])), float64(min(a[1], z[1])), float64(max(a[1], z[1])))
		}
		if o.Op == circuit.OpSymbol && o.Part != nil && o.Part != it.Part && o.Symbol != "converter" {
			r := reach(symbolNamed(o.Symbol), turnOf(o.Turn))
			block(o.X-r.left, o.X+r.right, o.Y-r.top, o.Y+r.bottom)
		}
	}
	const clear = 0.35
	if it.Label == "R" {
		return right - to - clear
	}
	return from - left - clear
}

func labelStack(o *object, lines []string, x, y float64, a ink.Anchor) {
	for i, s := range lines {
		st := valueStyle
		if i == 0 {
			st = nameStyle
		}
		o.add(textAt(x, y+linePitch*float64(i), s, st, a))
	}
}

// contact marks a detached contact: designation and place of the coil over it, its
// terminal marks under it.
func (k *sketcher) contact(it *circuit.SketchItem, o *object, at node) {
	x, y := float64(at.X), float64(at.Y)
	marks := [2]string{it.Pins["1"], it.Pins["2"]}
	pl := k.b.place("contact " + it.Part.Designation + " " + marks[0] + "-" + marks[1])
	pl.sheet, pl.at, pl.anchor = k.sh, at.point(), o.ID
	top := y - 1.3 - reach(symbolNamed(it.Symbol), turnOf(it.Turn)).top
	coil := &line{at: point{x, top}, anchor: ink.Middle, runs: []run{{to: k.b.place("coil " + it.Part.Designation)}}}
	o.add(textAt(x, top-linePitch, it.Part.Designation, nameStyle, ink.Middle), coil)
	o.add(textAt(x-2.6, y+1.8, marks[0], valueStyle, ink.Middle), textAt(x+2.6, y+1.8, marks[1], valueStyle, ink.Middle))
}

// block draws a device as a plain box with designation over and ratings beside its
// minus lead.
func (k *sketcher) block(it *circuit.SketchItem) {
	o := k.sc.part(it.Part, "")
	k.block0 = o
	a, c := k.at(it.X, it.Y), k.at(it.X2, it.Y2)
	o.add(box(normalPen, a.X, a.Y, c.X, c.Y))
	o.add(textAt(a.X, a.Y-0.7, it.Part.Designation, nameStyle, ink.Start))
	for i, s := range valueLines(it.Part, blockRoom) {
		o.add(textAt((a.X+c.X)/2+1, c.Y+2.2+linePitch*float64(i), s, valueStyle, ink.Start))
	}
}

// field draws the part of a cut-off that watches the voltage: a box U<, its link to
// the contact, its lead to L−.
func (k *sketcher) field(it *circuit.SketchItem) {
	p := k.node([2]int{int(it.X), int(it.Y)})
	o := k.sc.part(it.Part, "")
	o.add(&symbolMark{&symbols.UndervoltageRelease, p, symbols.V, ""})
	k.sc.pin(it.Part, it.Name, node{p.X, p.Y + int(it.Y2-it.Y)})
}

// converter draws a packaged supply or charger.
func (k *sketcher) converter(it *circuit.SketchItem) {
	p := k.node([2]int{int(it.X), int(it.Y)})
	poles := func(names []string, rows []int) (out []symbols.Pole) {
		for i, r := range rows {
			out = append(out, symbols.Pole{Name: names[i], Row: r})
		}
		return out
	}
	n := len(it.Ys)
	s := symbols.Converter(int(it.Y2), it.Name == "theta", poles(it.Names[:n], it.Ys), poles(it.Names[n:], it.Ys2))
	o := k.sc.part(it.Part, "")
	k.sc.symbols = append(k.sc.symbols, &symbol{sym: s, at: p, turn: symbols.V, part: it.Part, obj: o})
	x, y := float64(p.X)-3, float64(p.Y)
	o.add(textAt(x, y-it.Y2-0.7, it.Part.Designation, nameStyle, ink.Start))
	for i, s := range valueLines(it.Part, blockRoom) {
		o.add(textAt(x, y+it.Y2+1.7+linePitch*float64(i), s, valueStyle, ink.Start))
	}
}

// pin notes a pin that is drawn without a symbol of its own.
func (s *scene) pin(p *circuit.Part, name string, at node) {
	o := s.part(p, "")
	for _, y := range s.symbols {
		if y.obj == o && y.fixed != nil {
			y.fixed = append(y.fixed, pinAt{at, p, name, ""})
			return
		}
	}
	s.symbols = append(s.symbols, &symbol{part: p, obj: o, fixed: []pinAt{{at, p, name, ""}}})
}

// partName is a part's name in data attributes.
func partName(p *circuit.Part) string {
	if p.Kind == circuit.MainsConnection {
		return p.Key
	}
	return p.Designation
}

// signalColour is the mark in a signal lamp's slot.
func signalColour(p *circuit.Part) string {
	if p.Kind == circuit.SignalLamp {
		for _, v := range p.Values {
			if v.Name == "colour" {
				return v.Text
			}
		}
	}
	return ""
}
