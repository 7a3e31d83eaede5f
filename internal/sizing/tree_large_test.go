package sizing

import (
	"fmt"
	"math/rand/v2"
	"testing"

	"gloamwright/internal/quantity"
)

// siteTree is a generated site: boards in a chain of two levels, circuits of ten lamps.
func siteTree(lamps int, taper bool) *Tree {
	t := &Tree{Volts: 21.6, Ahead: 0.02, Taper: taper, Options: metricOptions(1, 1.5, 2.5, 4, 6, 10, 16, 25, 35, 50, 70, 95, 120)}
	for i := range t.Options {
		t.Options[i].Ampacity *= 40 // a site as large as this has several feeders in truth
	}
	t.Legs = append(t.Legs, Leg{Name: "battery cable", Parent: -1, Length: 2, Extra: 0.0005, MinVolt: 20})
	const perCircuit, perBoard = 10, 10
	board := 0
	for c := 0; c*perCircuit < lamps; c++ {
		if c > 0 && c%perBoard == 0 {
			t.Legs = append(t.Legs, Leg{Name: fmt.Sprint("feeder ", c), Parent: 0, Length: quantity.Metre(10 + c%23), Extra: 0.001})
			board = len(t.Legs) - 1
		}
		at := board
		for k := range perCircuit {
			l := Leg{
				Name: fmt.Sprintf("lamp %d.%d", c, k), Parent: at, Circuit: fmt.Sprint("circuit ", c),
				Length: quantity.Metre(3 + (c*7+k*5)%9), MinVolt: 20.52, Carry: 5, Loop: 1.5,
				Load: Load{Power: quantity.Watt(0.5 + float64((c+k)%4)/3)},
			}
			if k == 0 {
				l.Extra = 0.02
			}
			t.Legs = append(t.Legs, l)
			at = len(t.Legs) - 1
		}
	}
	return t
}

// TestChooseLarge holds the gap to the bound under two per cent, and the labels made
// in one search, which set its time, in proportion to the lamps.
func TestChooseLarge(t *testing.T) {
	for _, taper := range []bool{false, true} {
		var per []float64
		for _, n := range []int{200, 1000} {
			tree := siteTree(n, taper)
			r, err := tree.Choose()
			if err != nil {
				t.Fatalf("%d lamps: %v", n, err)
			}
			gap := r.Cost/r.Bound - 1
			t.Logf("taper %v, %d lamps: %.0f cm³, gap %.3f %%, proven %v", taper, n, r.Cost, 100*gap, r.Proven)
			if gap > 0.02 {
				t.Errorf("taper %v, %d lamps: %.2f %% above the bound", taper, n, 100*gap)
			}
			p, err := tree.plan()
			if err != nil {
				t.Fatal(err)
			}
			s := p.search(firstCap)
			s.relax(p.allowed)
			per = append(per, float64(p.work)/float64(n))
		}
		if per[1] > 1.5*per[0] {
			t.Errorf("taper %v: labels a lamp grow from %.0f to %.0f between 200 and 1000 lamps", taper, per[0], per[1])
		}
	}
}

// runsTree is a site of another kind: boards on boards, long circuits with branches,
// random lengths and loads.
func runsTree(lamps, perCircuit int, seed uint64) *Tree {
	r := rand.New(rand.NewPCG(seed, 1))
	t := siteTree(0, true)
	board := 0
	const perBoard = 6
	for n, c := 0, 0; n < lamps; c++ {
		if c > 0 && c%perBoard == 0 {
			at := 0
			if r.IntN(3) == 0 {
				at = board
			}
			t.Legs = append(t.Legs, Leg{Name: fmt.Sprint("feeder ", c), Parent: at, Length: quantity.Metre(5 + 20*r.Float64()), Extra: 0.001})
			board = len(t.Legs) - 1
		}
		first := len(t.Legs)
		for k := 0; k < perCircuit && n < lamps; k++ {
			l := Leg{
				Name: fmt.Sprintf("lamp %d.%d", c, k), Parent: board, Circuit: fmt.Sprint("circuit ", c),
				Length: quantity.Metre(1 + 8*r.Float64()), MinVolt: 20.52, Carry: 5, Loop: 1.5,
				Load: Load{Power: quantity.Watt(0.3 + 1.2*r.Float64())},
			}
			switch {
			case k == 0:
				l.Extra = 0.02
			case r.IntN(5) == 0:
				l.Parent = first + r.IntN(k)
			default:
				l.Parent = first + k - 1
			}
			t.Legs = append(t.Legs, l)
			n++
		}
	}
	return t
}

// TestChooseRuns holds the gap and the limits on those.
func TestChooseRuns(t *testing.T) {
	for _, n := range []int{30, 100, 300, 1000} {
		for _, per := range []int{10, 30} {
			tree := runsTree(n, per, uint64(n+per))
			r, err := tree.Choose()
			if err != nil {
				t.Fatalf("%d lamps: %v", n, err)
			}
			gap := r.Cost/r.Bound - 1
			t.Logf("%d lamps in circuits of %d: %.0f cm³, gap %.3f %%, proven %v", n, per, r.Cost, 100*gap, r.Proven)
			if gap > 0.02 {
				t.Errorf("%d lamps in circuits of %d: %.2f %% above the bound", n, per, 100*gap)
			}
			if _, _, ok := tree.meets(r.Sizes); !ok {
				t.Errorf("%d lamps in circuits of %d: the choice breaks a limit", n, per)
			}
		}
	}
}

func BenchmarkChoose(b *testing.B) {
	for _, n := range []int{30, 100, 300, 1000, 3000} {
		for _, kind := range []struct {
			name string
			tree *Tree
		}{{"one size", siteTree(n, false)}, {"taper", siteTree(n, true)}, {"taper in long runs", runsTree(n, 30, uint64(n))}} {
			b.Run(fmt.Sprint(kind.name, " ", n), func(b *testing.B) {
				var r *TreeResult
				for b.Loop() {
					var err error
					if r, err = kind.tree.Choose(); err != nil {
						b.Fatal(err)
					}
				}
				b.ReportMetric(100*(r.Cost/r.Bound-1), "%gap")
			})
		}
	}
}
