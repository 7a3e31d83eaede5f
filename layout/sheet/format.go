// Package sheet draws what every circuit diagram has around it: frame, zones,
// centring marks, title block, notes and the scale bar.
//
// Sheets follow ISO 5457, the title block ISO 7200; margins, zone counts and
// lettering are from memory of those standards. Lengths are millimetres from the
// upper left corner of the trimmed sheet.
package sheet

import (
	"fmt"

	"gloamwright/layout/ink"
)

// Measures of ISO 5457, mm.
const (
	filingMargin = 20 // left
	margin       = 10 // the other sides
	band         = 5  // width of the zone band outside the frame
	field        = 50 // length of a zone, counted from the middle of the sheet
	centringMark = 10 // reach from the outer edge of the band
)

// Line widths, mm (ISO 128-2).
const (
	frameWidth  = 0.7
	middleWidth = 0.35
)

// Format is a sheet size.
type Format struct {
	Name          string
	W, H          float64 // trimmed sheet, mm
	columns, rows int     // zones; even, half on each side of the middle
	// upright formats have zones along the top and the right side only, and their
	// title block takes the whole foot of the sheet.
	upright bool
}

// The formats: A4 upright and A3 on its side of ISO 216, and their North American
// neighbours Letter and Tabloid of ANSI/ASME Y14.1, laid out alike.
var (
	A4      = Format{"A4", 210, 297, 4, 6, true}
	A3      = Format{"A3", 420, 297, 8, 6, false}
	Letter  = Format{"Letter", 215.9, 279.4, 4, 6, true}
	Tabloid = Format{"Tabloid", 431.8, 279.4, 8, 6, false}
)

// Frame is the drawing space inside the margins.
func (f Format) Frame() ink.Rect {
	return ink.Rect{X: filingMargin, Y: margin, W: f.W - filingMargin - margin, H: f.H - 2*margin}
}

// TitleBlock is the lower right corner of the frame, which the title block takes.
func (f Format) TitleBlock() ink.Rect {
	r := f.Frame()
	return ink.Rect{X: r.X + r.W - blockWidth, Y: r.Y + r.H - blockHeight, W: blockWidth, H: blockHeight}
}

// breaks are the places where a new zone begins, between from and to, for a sheet
// whose middle is at middle: whole fields from the middle outward, the rest to
// the corner fields.
func breaks(middle float64, count int) []float64 {
	var out []float64
	for k := 1 - count/2; k < count/2; k++ {
		out = append(out, middle+float64(k)*field)
	}
	return out
}

// letters name the rows; I and O are left out, being too like figures.
const letters = "ABCDEFGHJKLMNPQRSTUVWXYZ"

// Zone names the zone of a place, such as "C4": rows by letters from the top,
// columns by figures from the left. Places outside the frame belong to the
// nearest zone.
func (f Format) Zone(x, y float64) string {
	index := func(at float64, list []float64) int {
		n := 0
		for _, b := range list {
			if at >= b {
				n++
			}
		}
		return n
	}
	return fmt.Sprintf("%c%d", letters[index(y, breaks(f.H/2, f.rows))], 1+index(x, breaks(f.W/2, f.columns)))
}

func stroke(c ink.Canvas, width float64, xy ...float64) {
	p := new(ink.Path).Move(xy[0], xy[1])
	for i := 2; i+1 < len(xy); i += 2 {
		p.Line(xy[i], xy[i+1])
	}
	c.Stroke(p, ink.Pen{Width: width, Color: ink.Black})
}

// zoneHeight is the height of zone letters and figures, mm.
const zoneHeight = 3.5

// DrawFrame draws frame, zone band and centring marks.
func (f Format) DrawFrame(c ink.Canvas) {
	c.Group(ink.Object{ID: "frame", Class: "frame"}, func() {
		r := f.Frame()
		right, bottom := r.X+r.W, r.Y+r.H
		f.drawZones(c, r)
		mx, my := f.W/2, f.H/2
		stroke(c, frameWidth, mx, r.Y-band, mx, r.Y-band+centringMark)
		reach := float64(centringMark)
		if f.upright { // the title block lies within: stop at the frame
			reach = band
		}
		stroke(c, frameWidth, mx, bottom+band, mx, bottom+band-reach)
		stroke(c, frameWidth, r.X-band, my, r.X-band+centringMark, my)
		stroke(c, frameWidth, right+band, my, right+band-centringMark, my)
		c.Stroke(new(ink.Path).Rect(r), ink.Pen{Width: frameWidth, Color: ink.Black})
	})
}

func (f Format) drawZones(c ink.Canvas, r ink.Rect) {
	right, bottom := r.X+r.W, r.Y+r.H
	tops, lefts := []float64{r.Y - band, bottom}, []float64{r.X - band, right} // bands along the top and bottom, left and right
	if f.upright {
		tops, lefts = tops[:1], lefts[1:]
		stroke(c, middleWidth, r.X, r.Y, r.X, r.Y-band, right+band, r.Y-band, right+band, bottom, right, bottom)
	} else {
		c.Stroke(new(ink.Path).Rect(ink.Rect{X: r.X - band, Y: r.Y - band, W: r.W + 2*band, H: r.H + 2*band}),
			ink.Pen{Width: middleWidth, Color: ink.Black})
	}
	font := ink.Lettering(ink.Regular, zoneHeight)
	for _, y := range tops {
		from := r.X
		for i, to := range append(breaks(f.W/2, f.columns), right) {
			c.Text(ink.Point{X: (from + to) / 2, Y: y + (band+zoneHeight)/2}, fmt.Sprint(i+1), font, ink.Middle, ink.Black, false)
			if to != f.W/2 && to != right { // the centring mark and the frame are lines enough
				stroke(c, middleWidth, to, y, to, y+band)
			}
			from = to
		}
	}
	for _, x := range lefts {
		from := r.Y
		for i, to := range append(breaks(f.H/2, f.rows), bottom) {
			c.Text(ink.Point{X: x + float64(band)/2, Y: (from + to + zoneHeight) / 2}, letters[i:i+1], font, ink.Middle, ink.Black, false)
			if to != f.H/2 && to != bottom {
				stroke(c, middleWidth, x, to, x+band, to)
			}
			from = to
		}
	}
}
