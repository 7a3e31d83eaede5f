package packet

import (
	"slices"
	"testing"

	"gloamwright/internal/circuit"
)

// Every terminal and bar has its row in the terminal plans, and only one; every cable
// core and wire that ends on it is named there.
func TestTerminalPlansHoldEveryTerminal(t *testing.T) {
	for _, name := range examples {
		d := example(t, name)
		p := built(t, d)
		rows := 0
		marked := map[string]int{}
		for _, s := range p.plans {
			if s.s.key != keyTerminals {
				continue
			}
			for _, b := range s.blocks {
				for _, m := range b.marks {
					marked[m]++
					rows++
				}
			}
		}
		want := 0
		for _, x := range d.Circuit.Parts {
			if x.Kind != circuit.Terminal && x.Kind != circuit.BusBar {
				continue
			}
			want++
			if n := marked[rowMark(x.Designation)]; n != 1 {
				t.Errorf("%s: terminal %s has %d rows", name, x.Designation, n)
			}
		}
		if rows != want {
			t.Errorf("%s: %d rows for %d terminals and bars", name, rows, want)
		}
		b := newBook(d, nil)
		ending := 0
		for _, s := range b.strips() {
			for _, x := range s.list {
				e := b.endsOn(x)
				ending += len(e.inside) + len(e.field)
			}
		}
		count := 0
		for _, c := range d.Circuit.Conductors {
			for _, end := range []*circuit.Pin{c.From, c.To} {
				if c.Rail == "" && end.Part.Kind == circuit.Terminal {
					count++
				}
			}
		}
		if ending != count {
			t.Errorf("%s: the plans name %d conductor ends on terminals, the circuit has %d", name, ending, count)
		}
	}
}

// Each rail that joins terminals of a strip is drawn as one bridge, and no two bridges
// share a lane where they overlap.
func TestBridgesFollowTheRails(t *testing.T) {
	for _, name := range examples {
		b := newBook(example(t, name), nil)
		for _, s := range b.strips() {
			lanes := b.bridges(s)
			dots := 0
			for i, row := range lanes {
				var used []int
				for _, l := range row {
					if slices.Contains(used, l.n) {
						t.Errorf("%s %s row %d: two bridges in lane %d", name, s.name, i, l.n)
					}
					used = append(used, l.n)
					if l.dot {
						dots++
					}
					if l.down && (i+1 == len(lanes) || !slices.ContainsFunc(lanes[i+1], func(m lane) bool { return m.n == l.n && m.up })) {
						t.Errorf("%s %s row %d: a bridge ends in nothing", name, s.name, i)
					}
				}
			}
			want := 0
			for _, r := range b.d.Circuit.Rails {
				on := 0
				for _, x := range s.list {
					if slices.ContainsFunc(r.Pins, func(n *circuit.Pin) bool { return n.Part == x }) {
						on++
					}
				}
				if on > 1 {
					want += on
				}
			}
			if dots != want {
				t.Errorf("%s %s: %d dots on bridges, the rails have %d terminals there", name, s.name, dots, want)
			}
		}
	}
}
