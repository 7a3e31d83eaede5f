package packet

import (
	"math"
	"slices"
	"testing"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/facts"
	"gloamwright/layout/ink"
)

func TestAxisTicks(t *testing.T) {
	near := func(got, want []float64) bool {
		return slices.EqualFunc(got, want, func(a, z float64) bool { return math.Abs(a-z) < 1e-9*math.Max(1, math.Abs(z)) })
	}
	for _, c := range []struct {
		name string
		got  axis
		want []float64
	}{
		{"per cent", linearAxis(0, 100, 4), []float64{0, 25, 50, 75, 100}},
		{"volts", linearAxis(21.1, 25.6, 6), []float64{21, 22, 23, 24, 25, 26}},
		{"hours of a day", hourAxis(24), []float64{0, 4, 8, 12, 16, 20, 24}},
		{"short outage", hourAxis(5.5), []float64{0, 1, 2, 3, 4, 5, 6}},
		{"amperes", logAxis(0.6, 30), []float64{0.5, 1, 2, 5, 10, 20, 50}},
		{"seconds", logAxis(0.01, 1e4), []float64{0.01, 0.1, 1, 10, 100, 1000, 10000}},
	} {
		if !near(c.got.ticks, c.want) {
			t.Errorf("%s: ticks %v, want %v", c.name, c.got.ticks, c.want)
		}
		if a, z := c.got.at(c.got.min), c.got.at(c.got.max); math.Abs(a) > 1e-9 || math.Abs(z-1) > 1e-9 {
			t.Errorf("%s: the ends stand at %v and %v of the axis", c.name, a, z)
		}
	}
}

func TestClipping(t *testing.T) {
	r := ink.Rect{X: 0, Y: 0, W: 10, H: 10}
	across := clipLine([]ink.Point{{X: -5, Y: 5}, {X: 15, Y: 5}}, r)
	if len(across) != 1 || across[0][0] != (ink.Point{X: 0, Y: 5}) || across[0][1] != (ink.Point{X: 10, Y: 5}) {
		t.Errorf("a line across is cut to %v", across)
	}
	twice := clipLine([]ink.Point{{X: 2, Y: 5}, {X: 5, Y: 15}, {X: 8, Y: 5}}, r)
	if len(twice) != 2 {
		t.Errorf("a line that leaves and comes back is %d pieces, want 2", len(twice))
	}
	if out := clipLine([]ink.Point{{X: -5, Y: -5}, {X: -1, Y: -9}}, r); len(out) != 0 {
		t.Errorf("a line outside leaves %v", out)
	}
	area := func(p []ink.Point) float64 {
		sum := 0.0
		for i, a := range p {
			b := p[(i+1)%len(p)]
			sum += a.X*b.Y - b.X*a.Y
		}
		return math.Abs(sum) / 2
	}
	half := clipPolygon([]ink.Point{{X: 5, Y: -20}, {X: 25, Y: -20}, {X: 25, Y: 30}, {X: 5, Y: 30}}, r)
	if a := area(half); math.Abs(a-50) > 1e-9 {
		t.Errorf("half of the frame has an area of %v, want 50", a)
	}
}

// The edges of a strip pass through the limits of the standard: ISO 8820-3, type C: at
// 135 % a fuse opens after 0.75 s at the earliest and within 30 min, at 600 % between
// 20 ms and 100 ms (from memory).
func TestStripFollowsTheGates(t *testing.T) {
	class := catalogue.FuseBlade
	gates, _ := class.Gates(2)
	f := &facts.Fuse{Rating: 2, Class: class, Fastest: gates.Fastest, Slowest: gates.Slowest}
	slow, fast := edge(f, f.Slowest, 1000), edge(f, f.Fastest, 1000)
	has := func(list []xy, x, y float64) bool {
		return slices.ContainsFunc(list, func(v xy) bool { return math.Abs(v.x-x) < 1e-9 && math.Abs(v.y-y) < 1e-9 })
	}
	for _, c := range []struct {
		list []xy
		x, y float64
	}{{fast, 2.7, 0.75}, {slow, 2.7, 1800}, {fast, 12, 0.02}, {slow, 12, 0.1}, {slow, 1000, 0.1}, {fast, 1000, 0.02}} {
		if !has(c.list, c.x, c.y) {
			t.Errorf("no point at %v A, %v s in %v", c.x, c.y, c.list)
		}
	}
	if at := slowAt(slow, 0.5); math.Abs(at-7) > 1e-6 { // 350 %: within 0.5 s
		t.Errorf("the slow edge passes 0.5 s at %v A, want 7 A", at)
	}
	if first := slow[0]; first.y < longestTime {
		t.Errorf("the slow edge begins at %v s, inside the picture", first.y)
	}
}
