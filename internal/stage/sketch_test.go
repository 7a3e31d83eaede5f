package stage_test

import (
	"fmt"
	"slices"
	"sort"
	"strings"
	"testing"

	"gloamwright/internal/circuit"
	"gloamwright/symbols"
)

// spot is a place on the grid of a sketch.
type spot struct{ x, y int }

// drawnPins reads a sketch back: which pins its wires connect, as sets. Terminals of
// level wires belong to the side whose pins are of their own piece.
func drawnPins(t testing.TB, st *circuit.Stage, piece map[*circuit.Pin]int) [][]*circuit.Pin {
	t.Helper()
	type segment struct{ a, b spot }
	var segs []segment
	pins := map[*circuit.Pin][]spot{}
	put := func(p *circuit.Pin, at spot) {
		if p == nil {
			t.Fatalf("%s: a symbol has a pin that its part has not", st.Name)
		}
		pins[p] = append(pins[p], at)
	}
	wire := func(pts [][2]int) {
		for i := 1; i < len(pts); i++ {
			a, b := spot{pts[i-1][0], pts[i-1][1]}, spot{pts[i][0], pts[i][1]}
			if a.x != b.x && a.y != b.y {
				t.Errorf("%s: wire from %v to %v is not level or upright", st.Name, a, b)
			}
			segs = append(segs, segment{a, b})
		}
	}
	type ring struct {
		part *circuit.Part
		at   spot
	}
	var rings []ring
	var points []circuit.SketchItem
	turns := map[string]symbols.Turn{"V": symbols.V, "H": symbols.H, "U": symbols.U, "HU": symbols.HU, "B": symbols.V}
	large := map[string]string{"regulator3": "regulator_large", "comparator": "comparator_large", "photoswitch": "photoswitch_large"}
	for _, it := range st.Sketch.Items {
		at := spot{int(it.X), int(it.Y)}
		switch it.Op {
		case circuit.OpWire:
			wire(it.Pts)
		case circuit.OpUp, circuit.OpDown, circuit.OpIn:
			wire(it.Pts)
			end := it.Pts[len(it.Pts)-1]
			if it.Op == circuit.OpIn {
				end = it.Pts[0]
			}
			want := 3
			if it.Op == circuit.OpDown {
				want = 52
			}
			if end[1] != want {
				t.Errorf("%s: a lead ends at level %d, want %d", st.Name, end[1], want)
			}
			put(it.Part.Pin("in"), spot{end[0], end[1]})
		case circuit.OpMains:
			for i, y := range it.Ys {
				wire([][2]int{{int(it.X) + 7, y}, {int(it.X2), y}})
				put(it.Part.Pin(it.Names[i]), spot{int(it.X) + 7, y})
			}
		case circuit.OpTerminal:
			rings = append(rings, ring{it.Part, at})
		case circuit.OpPoint:
			points = append(points, it)
		case circuit.OpStub:
			put(it.Part.Pin(it.Name), spot{it.Pts[0][0], it.Pts[0][1]})
		case circuit.OpField:
			put(it.Part.Pin(it.Name), spot{at.x, at.y + int(it.Y2-it.Y)})
		case circuit.OpSymbol:
			if it.Part == nil {
				continue
			}
			if it.Symbol == "converter" {
				n := len(it.Ys)
				for i, y := range it.Ys {
					put(it.Part.Pin(it.Names[i]), spot{at.x - 4, at.y + y})
				}
				for i, y := range it.Ys2 {
					put(it.Part.Pin(it.Names[n+i]), spot{at.x + 4, at.y + y})
				}
				continue
			}
			name := it.Symbol
			if l := large[name]; l != "" {
				name = l
			}
			sym := symbols.ByID(name)
			if sym == nil {
				t.Fatalf("%s: no symbol %s", st.Name, it.Symbol)
			}
			for _, p := range sym.PinsAt(turns[it.Turn]) {
				pin := p.Name
				if n, ok := it.Pins[pin]; ok {
					pin = n
				}
				put(it.Part.Pin(pin), spot{at.x + p.X, at.y + p.Y})
			}
		}
	}
	on := func(s segment, p spot) bool {
		return min(s.a.x, s.b.x) <= p.x && p.x <= max(s.a.x, s.b.x) && min(s.a.y, s.b.y) <= p.y && p.y <= max(s.a.y, s.b.y)
	}
	// No wire runs through a symbol's middle.
	for _, it := range st.Sketch.Items {
		if it.Op != circuit.OpSymbol || it.Part == nil {
			continue
		}
		for _, g := range segs {
			if on(g, spot{int(it.X), int(it.Y)}) {
				t.Errorf("%s: a wire runs through %s", st.Name, it.Part.Key)
			}
		}
		for _, o := range st.Sketch.Items {
			if o.Op == circuit.OpSymbol && o.Part != nil && o.Part != it.Part && max(o.X-it.X, it.X-o.X) < 3 && max(o.Y-it.Y, it.Y-o.Y) < 4 {
				t.Errorf("%s: %s stands on %s", st.Name, it.Part.Key, o.Part.Key)
			}
		}
	}
	// Segments that share an end point, or where one ends on the other, are joined;
	// those that only cross are not.
	set := make([]int, len(segs))
	for i := range set {
		set[i] = i
	}
	var find func(i int) int
	find = func(i int) int {
		if set[i] != i {
			set[i] = find(set[i])
		}
		return set[i]
	}
	for i, a := range segs {
		for j, b := range segs {
			if on(b, a.a) || on(b, a.b) {
				set[find(i)] = find(j)
			}
		}
	}
	byNet := map[int][]*circuit.Pin{}
	var alone [][]*circuit.Pin
	var order []*circuit.Pin
	for p := range pins {
		order = append(order, p)
	}
	sort.Slice(order, func(i, j int) bool { return order[i].Part.Key+order[i].Name < order[j].Part.Key+order[j].Name })
	for _, p := range order {
		for _, at := range pins[p] {
			found := false
			for i, s := range segs {
				if on(s, at) {
					if !slices.Contains(byNet[find(i)], p) {
						byNet[find(i)] = append(byNet[find(i)], p)
					}
					found = true
				}
			}
			for _, q := range order {
				if q == p {
					continue
				}
				for _, to := range pins[q] {
					if to == at && !found {
						t.Errorf("%s: pins %s and %s touch without a wire", st.Name, p, q)
					}
				}
			}
			if !found {
				alone = append(alone, []*circuit.Pin{p})
			}
		}
	}
	for _, r := range rings {
		for _, side := range []spot{{r.at.x - 1, r.at.y}, {r.at.x + 1, r.at.y}} {
			for i, s := range segs {
				if !on(s, side) {
					continue
				}
				k := find(i)
				name := "out"
				if slices.ContainsFunc(byNet[k], func(p *circuit.Pin) bool { return piece[p] == piece[r.part.Pin("in")] }) {
					name = "in"
				}
				if p := r.part.Pin(name); !slices.Contains(byNet[k], p) {
					byNet[k] = append(byNet[k], p)
				}
			}
		}
	}
	for _, it := range points {
		at, hit := spot{int(it.X), int(it.Y)}, false
		for i, s := range segs {
			if on(s, at) {
				hit = true
				same := slices.ContainsFunc(byNet[find(i)], func(p *circuit.Pin) bool { return piece[p] == piece[it.TP.Red] })
				if !same {
					t.Errorf("%s: test point %s stands on another line than its pin %s", st.Name, it.TP.Shows, it.TP.Red)
				}
			}
		}
		if !hit {
			t.Errorf("%s: test point %s at %v stands on no wire", st.Name, it.TP.Shows, at)
		}
	}
	out := alone
	for i := range segs {
		if find(i) == i {
			out = append(out, byNet[i])
		}
	}
	return out
}

// holdsSketch compares what the sketch of every stage connects with the circuit.
func holdsSketch(t testing.TB, c *circuit.Circuit) {
	t.Helper()
	piece := c.Pieces()
	for _, st := range c.Stages {
		if st.Sketch == nil {
			continue
		}
		nets := drawnPins(t, st, piece)
		first := map[int]int{}
		for i, list := range nets {
			for _, p := range list {
				if piece[p] != piece[list[0]] {
					t.Errorf("%s: drawn together, though not connected: %s and %s", st.Name, list[0], p)
				}
				if j, seen := first[piece[p]]; seen && j != i {
					t.Errorf("%s: connected, though drawn apart: %s and %s", st.Name, names(nets[j]), names(list))
				}
				first[piece[p]] = i
			}
		}
		for _, it := range st.Sketch.Items {
			for _, q := range it.Pts {
				if q[0] < -11 || q[0] > st.Sketch.Width || q[1] < 0 || q[1] > 56 {
					t.Errorf("%s: a wire leaves the frame at %v", st.Name, q)
				}
			}
		}
	}
}

func names(list []*circuit.Pin) string {
	var out []string
	for _, p := range list {
		out = append(out, fmt.Sprint(p.Part.Key, ":", p.Name))
	}
	return strings.Join(out, ", ")
}
