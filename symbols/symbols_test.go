package symbols

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"gloamwright/layout/ink"
)

var black = ink.Pen{Width: 0.25, Color: ink.Black}

// allowed is the turns a symbol may stand in.
func allowed(s *Symbol) (list []Turn) {
	for t := V; t <= HU; t++ {
		if s.Turns.Allows(t) {
			list = append(list, t)
		}
	}
	return list
}

// drawn records s at the origin, with its coordinates in modules.
func drawn(s *Symbol, t Turn) []ink.Call {
	r := ink.NewRecorder(100, 100, s.ID)
	s.Draw(r, Place{Turn: t, Scale: 1 / M}, black, "X")
	if err := r.Err(); err != nil {
		panic(err)
	}
	return r.Calls
}

// ends lists the ends of every stroke: the place, and the place the stroke goes
// to from there.
func ends(s *Symbol, t Turn) (list [][2]ink.Point) {
	for _, c := range drawn(s, t) {
		st, ok := c.(ink.Stroked)
		if !ok || st.Path.Verbs[len(st.Path.Verbs)-1] == ink.Close {
			continue
		}
		p := st.Path.Points
		list = append(list, [2]ink.Point{p[0], p[1]}, [2]ink.Point{p[len(p)-1], p[len(p)-2]})
	}
	return list
}

func close2(a, b ink.Point) bool { return math.Hypot(a.X-b.X, a.Y-b.Y) < 1e-9 }

// TestPins: a wire that arrives at a pin meets the end of one stroke, which goes
// on straight for at least 0.3 modules; pins of a part keep two modules apart.
func TestPins(t *testing.T) {
	for _, s := range All() {
		for _, turn := range allowed(s) {
			for i, p := range s.PinsAt(turn) {
				at := ink.Point{X: float64(p.X), Y: float64(p.Y)}
				dx, dy := p.Dir.Step()
				met := 0
				for _, e := range ends(s, turn) {
					if !close2(e[0], at) {
						continue
					}
					met++
					inward := (e[1].X-at.X)*-float64(dx) + (e[1].Y-at.Y)*-float64(dy)
					aside := math.Abs((e[1].X-at.X)*float64(dy)) + math.Abs((e[1].Y-at.Y)*float64(dx))
					if inward < 0.3-1e-9 || aside > 1e-9 {
						t.Errorf("%s turn %d pin %s: stroke goes to %v", s.ID, turn, p.Name, e[1])
					}
				}
				if met != 1 {
					t.Errorf("%s turn %d pin %s: end of %d strokes", s.ID, turn, p.Name, met)
				}
				for _, q := range s.PinsAt(turn)[:i] {
					if d := math.Hypot(float64(p.X-q.X), float64(p.Y-q.Y)); s.Turns != Node && d < 2 {
						t.Errorf("%s: pins %s and %s are %v apart", s.ID, p.Name, q.Name, d)
					}
					if p.Name == q.Name {
						t.Errorf("%s: two pins %s", s.ID, p.Name)
					}
				}
			}
		}
	}
}

// TestTurns: four quarter turns bring every point back, and each turned picture
// has the same strokes and pins as the upright one.
func TestTurns(t *testing.T) {
	p := ink.Point{X: 3, Y: 1}
	q := p
	for range 4 {
		q = H.Apply(q)
	}
	if q != p {
		t.Errorf("four turns bring %v to %v", p, q)
	}
	if HU.Apply(H.Apply(p)) != p || H.Apply(H.Apply(p)) != U.Apply(p) {
		t.Error("turns do not add up")
	}
	for _, s := range All() {
		count := func(turn Turn, f form) (n int) {
			for _, sh := range s.shapes {
				if sh.shows(turn) && sh.form != f {
					n++
				}
			}
			return n
		}
		for _, turn := range allowed(s) {
			own := inV
			if turn.level() {
				own = inH
			}
			if count(turn, own) != count(V, inV) {
				t.Errorf("%s turn %d: %d strokes, upright %d", s.ID, turn, count(turn, own), count(V, inV))
			}
		}
	}
	if d := Resistor.PinsAt(H); d[0] != (Pin{"1", -2, 0, Left}) || d[1] != (Pin{"2", 2, 0, Right}) {
		t.Errorf("level resistor: %v", d)
	}
	if d := Zener.PinsAt(U); d[1] != (Pin{"K", 0, -2, Up}) {
		t.Errorf("Zener upside down: %v", d)
	}
	if d := ReferenceLeaving.PinsAt(HU)[0]; d != (Pin{"1", 0, 0, Up}) {
		t.Errorf("reference pointing down: %v", d)
	}
}

// boxes are the bounds laid down for some symbols, in modules.
func TestBounds(t *testing.T) {
	for _, c := range []struct {
		s              *Symbol
		l, top, r, bot float64
	}{
		{&Resistor, -0.5, -2, 0.5, 2}, {&LDR, -0.5, -2, 1.9, 2}, {&NTC, -1.7, -2, 1.25, 2}, {&Inductor, 0, -2, 0.375, 2},
		{&LED, -1, -2, 1.85, 2}, {&MakeContact, -1.1, -2, 0, 2}, {&BreakContact, 0, -2, 1.01, 2}, {&CoilAttached, -2, -2, 5, 2},
		{&MakeContactOnDelay, -1.639, -2, 0, 2}, {&Lamp, -1.5, -2, 1.5, 2}, {&Buzzer, -0.25, -2, 1, 2},
		{&EarthFunctional, -1.22, 0, 1.22, 1.8}, {&EarthProtective, -1.1, 0, 1.1, 2.45}, {&TestPoint, -0.2, -0.3, 1.3, 0.3},
	} {
		b := c.s.Bounds(V)
		for i, v := range [][2]float64{{b.X, c.l}, {b.Y, c.top}, {b.X + b.W, c.r}, {b.Y + b.H, c.bot}} {
			if math.Abs(v[0]-v[1]) > 0.002 {
				t.Errorf("%s side %d: %v, want %v", c.s.ID, i, v[0], v[1])
			}
		}
	}
	if b := Resistor.Body(H); b != (ink.Rect{X: -1.5, Y: -0.5, W: 3, H: 1}) {
		t.Errorf("level body of a resistor: %v", b)
	}
	if b := Crossing.Body(V); b != (ink.Rect{}) {
		t.Errorf("a crossing has the body %v", b)
	}
	// Parts in a current path stand four modules apart without touching leads.
	for _, s := range All() {
		if (s.Turns == Turnable || s.Turns == Contact) && len(s.Pins) == 2 {
			if b := s.Bounds(V); b.X < -3 || b.X+b.W > 3 {
				t.Errorf("%s reaches its neighbour's lead: %v", s.ID, b)
			}
		}
	}
}

// TestDistinct: no two symbols have the same strokes, but for the pairs that
// their text or their use tells apart.
func TestDistinct(t *testing.T) {
	pair := map[string]bool{"lamp signal_lamp": true, "voltmeter ammeter": true, "ntc varistor": true}
	seen := map[string]string{}
	ids := map[string]bool{}
	for _, s := range All() {
		var b strings.Builder
		for _, c := range drawn(s, V) {
			switch c := c.(type) {
			case ink.Stroked:
				fmt.Fprint(&b, "s", c.Pen, c.Path.Verbs, c.Path.Points)
			case ink.Filled:
				fmt.Fprint(&b, "f", c.Path.Verbs, c.Path.Points)
			}
		}
		if other, twice := seen[b.String()]; twice && !pair[other+" "+s.ID] {
			t.Errorf("%s looks like %s", s.ID, other)
		}
		seen[b.String()] = s.ID
		if ids[s.ID] || ByID(s.ID) != s {
			t.Errorf("ID %s", s.ID)
		}
		ids[s.ID] = true
		if s.Name == "" || len(s.Letter) > 1 || s.IEC != "" && (len(s.IEC) != 6 || s.IEC[0] != 'S') {
			t.Errorf("%s: name %q letter %q number %q", s.ID, s.Name, s.Letter, s.IEC)
		}
	}
	if len(ids) != 72+4 {
		t.Errorf("%d symbols, want 72 and four blocks of six modules", len(ids))
	}
	if ByID("none") != nil {
		t.Error("unknown ID found")
	}
}

// TestLettering: 2.5 mm and more, but for the small blocks.
func TestLettering(t *testing.T) {
	for _, s := range All() {
		for _, sh := range s.shapes {
			if sh.path != nil {
				continue
			}
			smallBlock := s == &Regulator3 || s == &Comparator || s == &Photoswitch
			if sh.height != normal && sh.height != large && !(smallBlock && sh.height == small) {
				t.Errorf("%s: text %q is %v modules high", s.ID, sh.text, sh.height)
			}
		}
	}
	// A meter's letter stands in the middle of its ring in every turn.
	for _, turn := range allowed(&Voltmeter) {
		for _, c := range drawn(&Voltmeter, turn) {
			if w, ok := c.(ink.Written); ok {
				b := ink.TextBox(w.At, w.Text, w.Font, w.Anchor, w.Turn)
				if math.Hypot(b.X+b.W/2, b.Y+b.H/2) > 0.05 {
					t.Errorf("turn %d: letter at %v", turn, b)
				}
			}
		}
	}
}

// TestTextInside: the words of a block stay inside its outline.
func TestTextInside(t *testing.T) {
	for _, s := range []*Symbol{&RegulatorLarge, &ComparatorLarge, &PhotoswitchLarge, &Regulator3, &Comparator, &OpAmp, &Photoswitch, &UndervoltageRelease} {
		outline := drawn(s, V)[0].(ink.Stroked).Path.Bounds()
		for _, c := range drawn(s, V) {
			if w, ok := c.(ink.Written); ok {
				b := ink.TextBox(w.At, w.Text, w.Font, w.Anchor, w.Turn)
				const clear = 0.12 // modules, 0.3 mm
				if b.X < outline.X+clear || b.Y < outline.Y+clear || b.X+b.W > outline.X+outline.W-clear || b.Y+b.H > outline.Y+outline.H-clear {
					t.Errorf("%s: %q at %v leaves the outline %v", s.ID, w.Text, b, outline)
				}
			}
		}
	}
}

// blade is the oblique stroke of a contact: the line that starts at the hinge.
func blade(t *testing.T, s *Symbol, turn Turn) (hinge, tip ink.Point) {
	t.Helper()
	for _, c := range drawn(s, turn) {
		st, ok := c.(ink.Stroked)
		if !ok || len(st.Path.Points) != 2 {
			continue
		}
		if a, b := st.Path.Points[0], st.Path.Points[1]; close2(a, turn.Apply(ink.Point{Y: 1})) && a.X != b.X && a.Y != b.Y {
			return a, b
		}
	}
	t.Fatalf("%s has no blade", s.ID)
	return
}

// TestContactsMoveRight: when actuated, contacts move to the right in upright
// circuits and up in level ones, the convention of IEC 61082-1 (direction from
// memory): make contacts rest to the left or below, break contacts lean to the
// right or above.
func TestContactsMoveRight(t *testing.T) {
	makes := []*Symbol{&MakeContact, &CircuitBreaker, &Disconnector, &SwitchDisconnector, &FuseSwitchDisconnector,
		&PushButtonMake, &ManualSwitch, &LatchingSwitch, &MakeContactOnDelay}
	for _, s := range makes {
		if s.Turns.Allows(U) || s.Turns.Allows(HU) || !s.Turns.Allows(H) {
			t.Errorf("%s may stand upside down", s.ID)
		}
		if _, tip := blade(t, s, V); tip.X >= 0 {
			t.Errorf("%s: tip at %v", s.ID, tip)
		}
		if _, tip := blade(t, s, H); tip.Y <= 0 {
			t.Errorf("%s level: tip at %v", s.ID, tip)
		}
		hinge, tip := blade(t, s, V)
		if gap := fromLine(ink.Point{Y: -1}, hinge, tip); gap < 0.9 {
			t.Errorf("%s: %v modules of air", s.ID, gap)
		}
	}
	for _, s := range []*Symbol{&BreakContact, &PushButtonBreak} {
		hinge, tip := blade(t, s, V)
		if tip.X <= 0 {
			t.Errorf("%s: tip at %v", s.ID, tip)
		}
		if gap := fromLine(ink.Point{X: 0.9, Y: -1}, hinge, tip); gap > 0.05 {
			t.Errorf("%s does not touch: %v", s.ID, gap)
		}
		if _, tip := blade(t, s, H); tip.Y >= 0 {
			t.Errorf("%s level: tip at %v", s.ID, tip)
		}
	}
	hinge, tip := blade(t, &ChangeoverContact, V)
	if gap := fromLine(ink.Point{X: -0.63, Y: -1}, hinge, tip); gap > 0.05 {
		t.Errorf("change-over does not touch NC: %v", gap)
	}
}

// fromLine is the distance of p from the line through a and b.
func fromLine(p, a, b ink.Point) float64 {
	dx, dy := b.X-a.X, b.Y-a.Y
	return math.Abs((p.X-a.X)*dy-(p.Y-a.Y)*dx) / math.Hypot(dx, dy)
}

// TestPolarity: the long plate of a cell is at plus, the bar of a diode at K, and
// complementary transistors have opposite arrows.
func TestPolarity(t *testing.T) {
	for _, s := range []*Symbol{&Cell, &Battery} {
		if s.Pins[0].Name != "+" || s.Pins[0].Y != -2 {
			t.Errorf("%s: pins %v", s.ID, s.Pins)
		}
		var plates []ink.Rect // level strokes through the middle, from the top
		for _, c := range drawn(s, V) {
			if st, ok := c.(ink.Stroked); ok {
				if b := st.Path.Bounds(); b.H == 0 && b.W > 1 {
					plates = append(plates, b)
				}
			}
		}
		if len(plates) < 2 || plates[0].W <= plates[1].W || plates[0].Y >= plates[1].Y {
			t.Errorf("%s: plates %v", s.ID, plates)
		}
	}
	for _, s := range []*Symbol{&Diode, &Zener, &Schottky, &LED} {
		bar := s.shapes[2].path.Bounds()
		if s.Pins[1].Name != "K" || s.Pins[1].Y <= 0 || bar.Y+bar.H/2 < 0.4 || bar.W < 2 {
			t.Errorf("%s: bar at %v", s.ID, bar)
		}
	}
	// The first point of each arrowhead is its tip; the base or channel is at x = 0.
	toBase := func(s *Symbol) bool {
		for _, sh := range s.shapes {
			if sh.fill {
				p := sh.path.Points
				return math.Abs(p[0].X) < math.Abs(p[1].X)
			}
		}
		t.Fatalf("%s has no arrow", s.ID)
		return false
	}
	if toBase(&NPN) || !toBase(&PNP) || !toBase(&NMOS) || toBase(&PMOS) {
		t.Error("an arrow of a transistor points the wrong way")
	}
}

// TestHeavyAndDashed: heavy strokes are twice as wide, links begin and end with a
// whole dash.
func TestHeavyAndDashed(t *testing.T) {
	widths, dashes := map[float64]int{}, 0
	for _, c := range drawn(&Battery, V) {
		if st, ok := c.(ink.Stroked); ok {
			widths[st.Pen.Width]++
			if d := st.Pen.Dash; d != nil {
				dashes++
				n := (st.Path.Length() - d[0]) / (d[0] + d[1])
				if math.Abs(n-math.Round(n)) > 1e-9 {
					t.Errorf("link of %v with dashes %v", st.Path.Length(), d)
				}
			}
		}
	}
	if widths[0.5] != 2 || len(widths) != 2 || dashes != 1 {
		t.Errorf("widths %v, %d dashed", widths, dashes)
	}
}

func TestConverter(t *testing.T) {
	c := Converter(5, true, []Pole{{"L", -4}, {"N", -2}, {"PE", 4}}, []Pole{{"+", -4}, {"-", 4}})
	want := []Pin{{"L", -4, -4, Left}, {"N", -4, -2, Left}, {"PE", -4, 4, Left}, {"+", 4, -4, Right}, {"-", 4, 4, Right}}
	for i, p := range c.PinsAt(V) {
		if p != want[i] {
			t.Errorf("pin %v, want %v", p, want[i])
		}
	}
	if b := c.Body(V); b != (ink.Rect{X: -3, Y: -5, W: 6, H: 10}) {
		t.Errorf("body %v", b)
	}
	defer func() {
		if recover() == nil {
			t.Error("pole outside the block accepted")
		}
	}()
	Converter(3, false, []Pole{{"L", 3}}, nil)
}

// TestProbe: the ring lies where the layout expects it and the tag beyond it.
func TestProbe(t *testing.T) {
	at := ink.Point{X: 100, Y: 100}
	for d := Up; d <= Right; d++ {
		r := ink.NewRecorder(200, 200, "probe")
		Probe(r, at, d, black, "TP1")
		var ringBox, tagBox ink.Rect
		for i, c := range r.Calls {
			switch c := c.(type) {
			case ink.Stroked:
				if c.Path.Verbs[len(c.Path.Verbs)-1] == ink.Close {
					ringBox = c.Path.Bounds()
				}
			case ink.Filled:
				if i > 0 {
					tagBox = c.Path.Bounds()
				}
			}
		}
		whole := ProbeBox(at, d, "TP1")
		for _, b := range []ink.Rect{ringBox, tagBox} {
			if b.W == 0 || b.X < whole.X-1e-9 || b.X+b.W > whole.X+whole.W+1e-9 || b.Y < whole.Y-1e-9 || b.Y+b.H > whole.Y+whole.H+1e-9 {
				t.Errorf("%d: %v outside %v", d, b, whole)
			}
		}
		if (d == Left) != (tagBox.X < ringBox.X) {
			t.Errorf("%d: tag at %v, ring at %v", d, tagBox, ringBox)
		}
		if math.Abs(tagBox.H-4.3) > 1e-9 {
			t.Errorf("tag %v mm high", tagBox.H)
		}
	}
}
