package packet

// page is a sheet size with its margins and the field for text, in mm.
type page struct {
	name   string
	w, h   float64
	l, t   float64 // left edge and upper edge of the text
	width  float64 // width of the text
	bottom float64 // lower margin
}

// The sheets of the lists. Letter keeps the width of A4, so that both have the same
// columns and line breaks; sheets on their side keep the filing margin at the top.
var (
	a4          = page{"A4", 210, 297, 20, 10, 180, 10}
	a4Side      = page{"A4", 297, 210, 10, 20, 277, 10}
	letter      = page{"Letter", 215.9, 279.4, 20, 10, 180, 10}
	letterSide  = page{"Letter", 279.4, 215.9, 10, 20, 259.4, 10}
	bodyBelow   = 32.0 // the body begins below the head's upper edge
	footHeight  = 17.2 // of the foot with the line above it
	footClear   = 4.0  // between body and foot
	headTitle   = 18.0 // baselines below the head's upper edge
	headPurpose = 24.2
)

// top is where the body begins, end where it ends.
func (p page) top() float64   { return p.t + bodyBelow }
func (p page) end() float64   { return p.h - p.bottom - footHeight - footClear }
func (p page) right() float64 { return p.l + p.width }

// pages returns the upright and the sideways list sheet of a paper choice.
func pages(paper string) (upright, side page) {
	if paper == "ansi" {
		return letter, letterSide
	}
	return a4, a4Side
}
