package schematic

import (
	"fmt"
	"strings"
	"testing"

	"gloamwright/internal/describe"
	"gloamwright/internal/sitegen"
)

// crowded is a site with more stages than a sheet has room for: nine switches in
// series, six relays with a photocell and a test switch each, twelve lamps, boards on
// boards.
func crowded() []byte {
	var s strings.Builder
	s.WriteString("gloamwright: 1\njob: {number: CR-1, title: Crowded}\nduty: {nominal: 24 V, outage: 4 h}\nstages:\n" +
		"  charger: {kind: charger, to: store, mains: 230 V ± 10 %}\n  store: {kind: battery, cells: vrla-agm}\n")
	from := "store"
	for i := range 9 {
		fmt.Fprintf(&s, "  q%d: {kind: isolator, from: %s}\n", i, from)
		from = fmt.Sprintf("q%d", i)
	}
	for i := range 6 {
		fmt.Fprintf(&s, "  sup%d: {kind: regulated-supply, mains: 230 V ± 10 %%}\n  try%[1]d: {kind: test-switch, from: sup%[1]d}\n"+
			"  r%[1]d: {kind: changeover-relay, coil: try%[1]d, from: %s}\n"+
			"  dusk%[1]d: {kind: photocell, built: comparator, from: q%[1]d, holds: r%[1]d, place: Gable %[1]d}\n"+
			"  b%[1]d: {kind: distribution-board, from: r%[1]d.break, ways: 14}\n  c%[1]d: {kind: distribution-board, from: b%[1]d, along: 10 m, ways: 4}\n", i, from)
	}
	for i := range 12 {
		fmt.Fprintf(&s, "  lamp%d: {kind: indicator, from: q%d}\n", i, i%9)
	}
	s.WriteString("luminaires:\n  a: {kind: led-driver, power: 1 W, works: 18 V..32 V}\ncircuits:\n")
	for i := range 6 {
		fmt.Fprintf(&s, "  - {name: B%d, board: b%[1]d, lit: outage-night, points: [3 m a]}\n  - {name: C%[1]d, board: c%[1]d, lit: outage-night, points: [3 m a]}\n", i)
	}
	return []byte(s.String())
}

// planned lays the overview of a description out.
func planned(t *testing.T, src []byte) *book {
	t.Helper()
	b := newBook(dressed(t, parsed(t, src)))
	if err := b.make(); err != nil {
		t.Fatal(err)
	}
	return b
}

// The overview of every site shows every stage and connection, with lines that are
// clear of blocks and of one another.
func TestOverviews(t *testing.T) {
	list := samples(t)
	list["crowded"] = crowded()
	count := 60
	if testing.Short() {
		count = 12
	}
	for i := range count {
		n, o := sitegen.Varied(i)
		list[fmt.Sprintf("site %d", i)] = sitegen.Site(n, o)
	}
	for name, src := range list {
		b := planned(t, src)
		everyStageIsABlock(t, name, b)
		linesAreClear(t, name, b)
	}
}

// everyStageIsABlock checks that every stage of the description is a block, and every
// connection that the description states a line or a reference.
func everyStageIsABlock(t *testing.T, name string, b *book) {
	o := b.over
	blocks, boards, joined := map[string]int{}, map[string]int{}, map[string]bool{}
	for _, s := range o.sheets {
		for _, v := range s.list {
			blocks[v.name]++
		}
		for _, a := range s.arcs {
			if s.onTrunk(o, a) || len(a.pts) > 1 {
				joined[a.from.name+" "+a.to.name] = true
			}
		}
		for _, v := range s.list {
			in, out := s.stubs(v)
			for _, a := range append(in, out...) {
				joined[a.from.name+" "+a.to.name] = true
			}
		}
	}
	for _, list := range append(o.pages, o.beside) {
		for _, k := range list {
			boards[k.board.Name]++
			if k.board.Parent != nil {
				joined[k.board.Parent.Board.Name+" "+k.board.Name] = k.from == fromOver || k.from == byName || len(k.line) > 1
			}
		}
	}
	for _, st := range b.d.Site.Stages {
		n := st.Name.Val
		isBoard := st.Kind.Val == "distribution-board"
		if !isBoard && blocks[n] != 1 || isBoard && boards[n] != 1 && (blocks[n] != 1 || len(o.pages) > 0) {
			t.Errorf("%s: %s has %d blocks, %d lists", name, n, blocks[n], boards[n])
		}
		for _, f := range fieldsOf(st.Kind.Val) {
			r, ok := describe.Get[describe.Ref](st.Fields, f.Name)
			if !ok {
				continue
			}
			key := r.Val.Stage + " " + n
			if f.Feeds {
				key = n + " " + r.Val.Stage
			}
			if !joined[key] {
				t.Errorf("%s: no line from %s", name, strings.Replace(key, " ", " to ", 1))
			}
		}
	}
}

// linesAreClear checks that no line runs through a block, and no two lie on one
// another.
func linesAreClear(t *testing.T, name string, b *book) {
	for n, s := range b.over.sheets {
		var blocks []rect
		for _, v := range s.list {
			blocks = append(blocks, s.rect(v))
			if v.sensor != nil {
				blocks = append(blocks, s.sensorRect(v))
			}
		}
		for i, r := range blocks {
			for _, q := range blocks[:i] {
				if r.x0 < q.x1 && q.x0 < r.x1 && r.y0 < q.y1 && q.y0 < r.y1 {
					t.Errorf("%s sheet %d: blocks at %v and %v overlap", name, n+1, r, q)
				}
			}
		}
		pieces := map[[2]node]string{}
		take := func(who string, pts []node) {
			for i := 1; i < len(pts); i++ {
				d := dirOf(pts[i-1], pts[i])
				for at := pts[i-1]; at != pts[i]; at = at.add(d, 1) {
					next := at.add(d, 1)
					key := [2]node{at, next}
					if d == west || d == north {
						key = [2]node{next, at}
					}
					if other, taken := pieces[key]; taken {
						t.Errorf("%s sheet %d: %s lies on %s at %v", name, n+1, who, other, at)
					}
					pieces[key] = who
					for _, r := range blocks {
						if at.X > r.x0 && at.X < r.x1 && at.Y > r.y0 && at.Y < r.y1 {
							t.Errorf("%s sheet %d: %s runs through the block at %v", name, n+1, who, r)
						}
					}
				}
			}
		}
		rail, foot := s.trunk(b.over)
		take("the rail", rail)
		take("the battery's line", foot)
		for _, a := range s.arcs {
			take(a.from.name+" to "+a.to.name, a.pts)
		}
		if s.lost > 0 {
			t.Logf("%s sheet %d: %d lines became references", name, n+1, s.lost)
		}
	}
}

// A site of ten boards, boards fed from boards, shows them all with their feeders.
func TestTenBoards(t *testing.T) {
	b := planned(t, sitegen.Site(100, sitegen.Options{Shape: sitegen.Boards}))
	n := 0
	for _, page := range b.over.pages {
		for _, k := range page {
			n++
			if k.board.Parent != nil && k.from == byLine {
				a, z := k.line[0], k.line[len(k.line)-1]
				if a.X >= z.X {
					t.Errorf("the feeder of %s runs from %v to %v", k.board.Title, a, z)
				}
			}
		}
	}
	if want := len(b.c.Boards); n != want || n < 7 {
		t.Errorf("%d of %d boards are shown", n, want)
	}
}
