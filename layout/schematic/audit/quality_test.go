package audit

import (
	"math"
	"testing"

	"gloamwright/layout/ink"
	"gloamwright/symbols"
)

// The numbers of sheets drawn by hand, counted by hand.
func TestMeasure(t *testing.T) {
	resistor := func(r *ink.Recorder, name string, x, y int) {
		r.Group(ink.Object{Class: "part", Data: []ink.Attr{{Name: "part", Value: name}}}, func() {
			symbols.Resistor.Draw(r, symbols.On(x, y, symbols.V), ink.Pen{Width: 0.25}, "")
			r.Text(ink.Point{X: float64(x)*module - 4, Y: float64(y) * module}, name, ink.Lettering(ink.Medium, 2.5), ink.End, ink.Black, false)
		})
	}
	for _, c := range []struct {
		what string
		more func(r *ink.Recorder, line func(xy ...float64), dot func(x, y float64))
		want Quality
	}{
		// Two lines of 8 + 20 + 8 modules, two corners each; their pins are 20 apart.
		{"two resistors in a row, joined at both ends", nil, Quality{Lines: 2, Bends: 2, Length: 1.8, Symbols: 2, Aligned: 1}},
		// A third resistor 2 modules lower hangs between the two: two joints, so six lines of
		// which four have a corner. Each net of three pins: 8 + 20 + 8 + 10 or 6 modules; the
		// box of its pins is 20 wide and 2 high. The other two miss the row of the third.
		{"a third, not quite in the row", func(r *ink.Recorder, line func(...float64), dot func(float64, float64)) {
			resistor(r, "-R3", 40, 32)
			line(40, 20, 40, 30)
			line(40, 34, 40, 40)
			dot(40, 20)
			dot(40, 40)
		}, Quality{Lines: 6, Bends: 4.0 / 6, Length: 88.0 / 44, Symbols: 3, Aligned: 0}},
		// In series under the first, shifted by 4: two corners between facing pins. The line
		// is 2 + 4 + 6 modules, its box 4 by 8.
		{"a part in series off the axis", func(r *ink.Recorder, line func(...float64), _ func(float64, float64)) {
			resistor(r, "-R3", 90, 30)
			resistor(r, "-R4", 94, 42)
			line(90, 32, 90, 34, 94, 34, 94, 40)
		}, Quality{Lines: 3, Bends: 2, InBranches: 2, Length: 84.0 / 52, Symbols: 4, Aligned: 0.75}},
		// A line from end to end of the sheet's pair over both uprights: two crossings.
		{"crossings", func(r *ink.Recorder, line func(...float64), _ func(float64, float64)) {
			resistor(r, "-R3", 20, 30)
			resistor(r, "-R4", 60, 30)
			line(20, 28, 20, 24, 60, 24, 60, 28)
		}, Quality{Crossings: 2, Lines: 3, Bends: 2, Length: 120.0 / 80, Symbols: 4, Aligned: 1}},
	} {
		q := Measure([]Sheet{byHand(c.more)}, &Known{})[0]
		w := c.want
		if q.Crossings != w.Crossings || q.Lines != w.Lines || !close(q.Bends, w.Bends) || q.InBranches != w.InBranches ||
			!close(q.Length, w.Length) || q.Symbols != w.Symbols || !close(q.Aligned, w.Aligned) {
			t.Errorf("%s: %+v, not %+v", c.what, q, w)
		}
	}
}

func close(a, b float64) bool { return math.Abs(a-b) < 1e-9 }

// The score counts shares of the limits by which a number is out, times its weight.
func TestScore(t *testing.T) {
	good := Quality{Length: 1, Aligned: 1, Flow: 1, Used: 0.6, Aspect: 1, Equal: 1}
	for _, c := range []struct {
		what   string
		change func(q *Quality)
		want   float64
	}{
		{"all targets met", func(*Quality) {}, 0},
		{"six crossings, three above the limit", func(q *Quality) { q.Crossings = 6 }, 10},
		{"one crossing on a board's sheet", func(q *Quality) { q.Crossings, q.Board = 1, true }, 10.0 / 3},
		{"0.45 bends a line", func(q *Quality) { q.Bends = 0.45 }, 4 * 0.5},
		{"81 % in line", func(q *Quality) { q.Aligned = 0.81 }, 3 * 0.1},
		{"a third of the field", func(q *Quality) { q.Used = 0.3 }, 2 * (0.15 / 0.45)},
		{"half as wide again as the field", func(q *Quality) { q.Aspect = 1.5 }, 2},
		{"half of the equal things unlike", func(q *Quality) { q.Equal = 0.5 }, 1},
	} {
		q := good
		c.change(&q)
		if !close(q.Score(), c.want) {
			t.Errorf("%s: score %g, not %g", c.what, q.Score(), c.want)
		}
	}
}
