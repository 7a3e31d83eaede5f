package audit

import (
	"testing"

	"gloamwright/layout/ink"
	"gloamwright/layout/sheet"
	"gloamwright/symbols"
)

// bench judges a sheet drawn by hand.
func bench(more func(r *ink.Recorder, line func(xy ...float64), dot func(x, y float64))) []Fault {
	return Judge([]Sheet{byHand(more)}, nil)
}

// byHand is a sheet drawn by hand: two resistors in a row, joined.
func byHand(more func(r *ink.Recorder, line func(xy ...float64), dot func(x, y float64))) Sheet {
	r := ink.NewRecorder(sheet.A3.W, sheet.A3.H, "")
	line := func(xy ...float64) {
		p := (&ink.Path{}).Move(xy[0]*module, xy[1]*module)
		for i := 2; i+1 < len(xy); i += 2 {
			p.Line(xy[i]*module, xy[i+1]*module)
		}
		r.Group(ink.Object{Class: "wire"}, func() { r.Stroke(p, ink.Pen{Width: 0.25}) })
	}
	dot := func(x, y float64) {
		r.Group(ink.Object{Class: "junction"}, func() { r.Fill((&ink.Path{}).Circle(ink.Point{X: x * module, Y: y * module}, 0.5), ink.Black) })
	}
	part := func(name string, x, y int) {
		r.Group(ink.Object{Class: "part", Data: []ink.Attr{{Name: "part", Value: name}}}, func() {
			symbols.Resistor.Draw(r, symbols.On(x, y, symbols.V), ink.Pen{Width: 0.25}, "")
			r.Text(ink.Point{X: float64(x)*module - 4, Y: float64(y) * module}, name, ink.Lettering(ink.Medium, 2.5), ink.End, ink.Black, false)
		})
	}
	part("-R1", 30, 30)
	part("-R2", 50, 30)
	line(30, 28, 30, 20, 50, 20, 50, 28) // pin 1 to pin 1
	line(30, 32, 30, 40, 50, 40, 50, 32) // pin 2 to pin 2
	if more != nil {
		more(r, line, dot)
	}
	return Sheet{Number: 1, Page: FromRecorder(r), Format: sheet.A3, Circuit: true}
}

// A sound sheet has no fault; each kind of damage is found under its own rule.
func TestRules(t *testing.T) {
	if f := bench(nil); len(f) > 0 {
		t.Fatalf("a sound sheet: %v", f)
	}
	type draw = func(r *ink.Recorder, line func(xy ...float64), dot func(x, y float64))
	for _, c := range []struct {
		rule Rule
		what string
		more draw
	}{
		{RuleGrid, "an end between grid lines", func(_ *ink.Recorder, line func(...float64), dot func(float64, float64)) {
			line(40, 20, 40, 25.5)
			dot(40, 20)
		}},
		{RuleSquare, "an oblique line", func(_ *ink.Recorder, line func(...float64), _ func(float64, float64)) { line(60, 20, 64, 25) }},
		{RuleWidth, "a line of 1 mm", func(r *ink.Recorder, _ func(...float64), _ func(float64, float64)) {
			r.Stroke((&ink.Path{}).Move(160, 60).Line(170, 60), ink.Pen{Width: 1})
		}},
		{RuleUnknown, "a curve", func(r *ink.Recorder, _ func(...float64), _ func(float64, float64)) {
			r.Stroke((&ink.Path{}).Move(160, 60).Quad(ink.Point{X: 170, Y: 60}, ink.Point{X: 170, Y: 70}), ink.Pen{Width: 0.25})
		}},
		{RuleField, "a line into the title block", func(_ *ink.Recorder, line func(...float64), _ func(float64, float64)) { line(150, 90, 150, 105) }},
		{RuleOverlap, "a line on another", func(_ *ink.Recorder, line func(...float64), _ func(float64, float64)) { line(35, 20, 40, 20) }},
		{RuleEnd, "a loose end", func(_ *ink.Recorder, line func(...float64), dot func(float64, float64)) {
			line(40, 20, 40, 25)
			dot(40, 20)
		}},
		{RuleDot, "a joint without a dot", func(_ *ink.Recorder, line func(...float64), dot func(float64, float64)) {
			line(40, 20, 40, 40)
			dot(40, 20)
		}},
		{RuleDot, "a dot on a plain line", func(_ *ink.Recorder, _ func(...float64), dot func(float64, float64)) { dot(40, 20) }},
		{RuleFour, "a joint of four", func(_ *ink.Recorder, line func(...float64), dot func(float64, float64)) {
			line(40, 15, 40, 20)
			line(40, 20, 40, 25)
			dot(40, 20)
		}},
		{RuleBody, "a line through a resistor", func(_ *ink.Recorder, line func(...float64), _ func(float64, float64)) { line(25, 30, 35, 30) }},
		{RuleCrossing, "a crossing half a module from a bend", func(_ *ink.Recorder, line func(...float64), _ func(float64, float64)) {
			line(30.5, 15, 30.5, 25)
		}},
		{RuleLoop, "a ring", func(_ *ink.Recorder, line func(...float64), dot func(float64, float64)) {
			line(35, 20, 35, 25, 45, 25, 45, 20)
			dot(35, 20)
			dot(45, 20)
		}},
		{RuleText, "a text on a line", func(r *ink.Recorder, _ func(...float64), _ func(float64, float64)) {
			r.Text(ink.Point{X: 90, Y: 51}, "over", ink.Lettering(ink.Regular, 2.5), ink.Start, ink.Black, false)
		}},
		{RuleHeight, "small print", func(r *ink.Recorder, _ func(...float64), _ func(float64, float64)) {
			r.Text(ink.Point{X: 200, Y: 80}, "small", ink.Lettering(ink.Regular, 1.8), ink.Start, ink.Black, false)
		}},
		{RuleName, "a symbol without a name", func(r *ink.Recorder, _ func(...float64), _ func(float64, float64)) {
			r.Group(ink.Object{Class: "part", Data: []ink.Attr{{Name: "part", Value: "-R3"}}}, func() {
				symbols.Resistor.Draw(r, symbols.On(70, 30, symbols.V), ink.Pen{Width: 0.25}, "")
			})
		}},
	} {
		found := false
		list := bench(c.more)
		for _, f := range list {
			found = found || f.Rule == c.rule
		}
		if !found {
			t.Errorf("%s: not found under %s, but %v", c.what, c.rule, list)
		}
	}
}
