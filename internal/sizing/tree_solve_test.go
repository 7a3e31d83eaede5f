package sizing

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"gloamwright/internal/quantity"
)

// TestSolveQuadratic: one constant power behind a resistance has a closed form.
func TestSolveQuadratic(t *testing.T) {
	o := &Option{Size: quantity.WireSize{Area: 1}, PerMetre: 0.05}
	tree := Tree{Volts: 24, Legs: []Leg{{Parent: -1, Length: 10, Load: Load{Power: 60}, MinVolt: 12}}, Options: []Option{*o}}
	v, i, ok := tree.Solve([]*Option{o})
	if !ok {
		t.Fatal("no operating point")
	}
	want := (24 + math.Sqrt(24*24-4*1*60)) / 2
	near(t, "voltage", float64(v[0]), want, 1e-12)
	near(t, "current", float64(i[0]), 60/want, 1e-9)
	tree.Legs[0].Load.Power = 145 // above 24² ÷ 4 W
	if _, _, ok := tree.Solve([]*Option{o}); ok {
		t.Error("finds an operating point beyond voltage collapse")
	}
}

// TestSolveKirchhoff: on random trees the currents balance at every node, each leg
// obeys Ohm's law and each load its own.
func TestSolveKirchhoff(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 5))
	solved := 0
	for range 300 {
		tree := randomTree(r, 1+r.IntN(30))
		sizes := make([]*Option, len(tree.Legs))
		for i := range sizes {
			sizes[i] = &tree.Options[len(tree.Options)-1]
		}
		v, a, ok := tree.Solve(sizes)
		if !ok {
			continue
		}
		solved++
		for i := range tree.Legs {
			l := &tree.Legs[i]
			up, sum := tree.Volts, l.Load.Draws(v[i])
			if l.Parent >= 0 {
				up = v[l.Parent]
			}
			for j := range tree.Legs {
				if tree.Legs[j].Parent == i {
					sum += a[j]
				}
			}
			if d := math.Abs(float64(sum - a[i])); d > 1e-9 {
				t.Fatalf("leg %d: %v flows in, %v out", i, a[i], sum)
			}
			if d := math.Abs(float64(up-v[i]) - float64(a[i])*tree.ohms(i, sizes[i])); d > 1e-9 {
				t.Fatalf("leg %d: off Ohm's law by %g V", i, d)
			}
		}
	}
	if solved < 200 {
		t.Errorf("only %d trees had an operating point", solved)
	}
}

// plainTree is one circuit of two legs.
func plainTree() *Tree {
	return &Tree{
		Volts: 21, Ahead: 0.05, Options: metricOptions(1, 1.5, 2.5, 4),
		Legs: []Leg{
			{Name: "first", Parent: -1, Circuit: "hall", Length: 10, MinVolt: 20, Carry: 2, Load: Load{Power: 6}},
			{Name: "second", Parent: 0, Circuit: "hall", Length: 10, MinVolt: 20, Carry: 2, Load: Load{Power: 6}},
		},
	}
}

// TestBlockedNamesLimitAndRemedy: each limit on its own, with its remedy.
func TestBlockedNamesLimitAndRemedy(t *testing.T) {
	for _, c := range []struct {
		name  string
		upset func(*Tree)
		limit Limit
		says  string
	}{
		{"drop", func(t *Tree) { t.Legs[1].Length = 400 }, LimitDrop, "shorten the run from 410 m to"},
		{"pinned drop", func(t *Tree) {
			t.Legs[1].Length = 60
			t.Legs[1].Pinned = &t.Options[0]
			t.Legs[0].Pinned = &t.Options[0]
		}, LimitDrop, "1.5 mm² would do"},
		{"clearing", func(t *Tree) { t.Legs[1].Loop = 0.1 }, LimitClearing, "smaller fuse"},
		{"pinned clearing", func(t *Tree) {
			t.Legs[1].Loop = 0.4
			t.Legs[0].Pinned = &t.Options[0]
			t.Legs[1].Pinned = &t.Options[0]
		}, LimitClearing, "mm² would do"},
		{"ampacity", func(t *Tree) { t.Legs[0].Carry = 40 }, LimitAmpacity, "two ways"},
		{"pinned ampacity", func(t *Tree) { t.Legs[0].Carry = 11; t.Legs[0].Pinned = &t.Options[0] }, LimitAmpacity, "1.5 mm² would do"},
		{"least size", func(t *Tree) { t.Legs[0].Least = 6 }, LimitLeastSize, "6 mm²"},
		{"pinned least size", func(t *Tree) { t.Legs[0].Least = 2.5; t.Legs[0].Pinned = &t.Options[1] }, LimitLeastSize, "2.5 mm² would do"},
		{"collapse", func(t *Tree) { t.Legs[1].Load.Power = 900 }, LimitCollapse, "raise the system voltage"},
		{"no stock", func(t *Tree) { t.Options = nil }, LimitStock, "at least one"},
	} {
		tree := plainTree()
		c.upset(tree)
		r, err := tree.Choose()
		blocked(t, err, c.limit)
		if err != nil && !strings.Contains(err.Error(), c.says) {
			t.Errorf("%s: %q does not say %q", c.name, err, c.says)
		}
		if r != nil {
			for i := range tree.Legs {
				if p := tree.Legs[i].Pinned; p != nil && r.Sizes[i] != p {
					t.Errorf("%s: a pinned size was changed", c.name)
				}
			}
		}
	}
}

// TestRemedyFrees: the shorter run that the message proposes does fit.
func TestRemedyFrees(t *testing.T) {
	tree := plainTree()
	tree.Legs[1].Length = 400
	_, err := tree.Choose()
	if err == nil {
		t.Fatal("fits")
	}
	_, tail, _ := strings.Cut(err.Error(), "to ")
	var to float64
	if _, err := fmt.Sscanf(tail[strings.LastIndex(tail[:strings.Index(tail, " m")], " ")+1:], "%g m", &to); err != nil {
		t.Fatalf("%v in %q", err, tail)
	}
	for _, c := range []struct {
		f    float64
		fits bool
	}{{0.998, true}, {1.01, false}} {
		tree := plainTree()
		tree.Legs[1].Length = 400
		for i := range tree.Legs {
			tree.Legs[i].Length *= quantity.Metre(c.f * to / 410)
		}
		if _, err := tree.Choose(); (err == nil) != c.fits {
			t.Errorf("at %.3f of the proposed length: %v", c.f, err)
		}
	}
}

// TestCheckJudgesGivenSizes: Check neither changes nor forgives.
func TestCheckJudgesGivenSizes(t *testing.T) {
	tree := plainTree()
	thin, thick := &tree.Options[0], &tree.Options[3]
	tree.Legs[1].Length = 90
	if _, err := tree.Check([]*Option{thin, thin}); err == nil {
		t.Error("1 mm² over 100 m passes")
	}
	if r, err := tree.Check([]*Option{thick, thick}); err != nil || r.Volts[1] < 20 {
		t.Errorf("4 mm²: %v %v", r.Volts, err)
	}
}

// TestFormIsChecked: trees that cannot be meant are refused.
func TestFormIsChecked(t *testing.T) {
	for name, upset := range map[string]func(*Tree){
		"parent after":  func(t *Tree) { t.Legs[0].Parent = 1 },
		"two heads":     func(t *Tree) { t.Legs[1].Parent = -1 },
		"other circuit": func(t *Tree) { t.Legs[1].Circuit = "stair" },
		"no least volt": func(t *Tree) { t.Legs[1].MinVolt = 0 },
		"feeds back":    func(t *Tree) { t.Legs[1].Load = Load{Current: -1} },
	} {
		tree := plainTree()
		upset(tree)
		if _, err := tree.Choose(); err == nil {
			t.Errorf("%s passes", name)
		}
	}
}

// TestPrices: with prices the cheapest is chosen, not the least copper.
func TestPrices(t *testing.T) {
	tree := plainTree()
	r, err := tree.Choose()
	if err != nil || r.Sizes[0].Size.Area != 1 {
		t.Fatalf("least copper: %v %v", r.Sizes[0].Size, err)
	}
	for i, p := range []float64{3, 1, 2, 4} {
		tree.Options[i].Price = p
	}
	r, err = tree.Choose()
	if err != nil || r.Sizes[0].Size.Area != 1.5 || math.Abs(r.Cost-20) > 1e-9 {
		t.Errorf("least cost: %v for %v, %v", r.Sizes[0].Size, r.Cost, err)
	}
}
