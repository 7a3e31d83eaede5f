package sheet

import (
	"fmt"
	"strings"

	"gloamwright/layout/ink"
)

// Measures of the notes and the scale bar, mm.
const (
	notesInset     = 5 // from the left frame line
	notesNumber    = 5.5
	notesSignal    = 21.5 // room for the signal word of a caution
	notesClear     = 5    // to the title block
	notesHeight    = 2.5
	notesLead      = 4
	notesPitch     = 4.25
	cautionPitch   = 5.25
	notesFirst     = 29.5 // usual first baseline, up from the frame's foot
	notesLast      = 8.5  // lowest last baseline, up from the frame's foot or the title block
	notesHighest   = 37   // highest first baseline, up from the frame's foot: the feet of circuits end above
	uprightHighest = 40   // the same, up from an upright sheet's title block

	scaleLength = 100
	scaleFoot   = 3.5 // up from the frame's foot or the title block
)

// Caution is a safety note on the sheet where the hazard is.
type Caution struct {
	Word string // DANGER, WARNING, CAUTION or NOTICE
	Text string
}

// base is the line that notes and scale bar stand on, and where notes end at the
// right: beside the title block, or over it and its warning on upright sheets.
func (f Format) base() (y, right, highest float64) {
	r, t := f.Frame(), f.TitleBlock()
	if f.upright {
		return t.Y - warningHeight, r.X + r.W - notesInset, uprightHighest
	}
	return r.Y + r.H, t.X - notesClear, notesHighest
}

// DrawScaleBar draws a line of exactly 100 mm, so that a reader can tell whether
// the print is at full size.
func (f Format) DrawScaleBar(c ink.Canvas) {
	base, _, _ := f.base()
	x, y := f.Frame().X+notesInset, base-scaleFoot
	c.Group(ink.Object{ID: "scale", Class: "scale", Title: "100 mm at full size"}, func() {
		stroke(c, middleWidth, x, y-2, x, y, x+scaleLength, y, x+scaleLength, y-2)
		for i, tick := range []float64{1, 1.5, 1} {
			at := x + scaleLength/4*float64(i+1)
			stroke(c, middleWidth, at, y-tick, at, y)
		}
		c.Text(ink.Point{X: x + scaleLength + 2.5, Y: y + 0.25}, "100 mm at full size", ink.Lettering(ink.Regular, notesHeight), ink.Start, ink.Black, false)
	})
}

// noteLine is one line to write: what stands at the margin and what follows.
type noteLine struct {
	head, text string
	face       ink.Face // of the head
	indent     float64  // of the text
	lead       float64  // down from the line before
}

// DrawNotes writes the cautions and then the numbered notes of a sheet over the
// scale bar, and returns the box that they take. Lines break to fit, and at line
// ends in the text. Notes that need more room than a sheet has are an error: they belong on fewer sheets or
// into fewer words.
func (f Format) DrawNotes(c ink.Canvas, cautions []Caution, notes []string) (ink.Rect, error) {
	base, right, highest := f.base()
	x := f.Frame().X + notesInset
	font := ink.Lettering(ink.Regular, notesHeight)
	var lines []noteLine
	add := func(head string, face ink.Face, indent, pitch float64, text string) {
		for part := range strings.SplitSeq(text, "\n") {
			for _, l := range ink.Wrap(part, font, right-x-indent) {
				lines = append(lines, noteLine{head, l, face, indent, pitch})
				head, pitch = "", notesLead
			}
		}
	}
	for _, k := range cautions {
		add(k.Word, ink.Bold, notesSignal, cautionPitch, k.Text)
	}
	if len(notes) > 0 {
		lines = append(lines, noteLine{head: "Notes", face: ink.Medium, lead: cautionPitch})
		for i, n := range notes {
			add(fmt.Sprint(i+1), ink.Regular, notesNumber, notesPitch, n)
		}
	}
	if len(lines) == 0 {
		return ink.Rect{}, nil
	}
	height := 0.0
	for _, l := range lines[1:] {
		height += l.lead
	}
	first := min(base-notesFirst, base-notesLast-height)
	if f.upright {
		first = base - notesLast - height
	}
	if first < base-highest {
		return ink.Rect{}, fmt.Errorf("the notes of a sheet need %.1f mm more height than there is", base-highest-first)
	}
	c.Group(ink.Object{ID: "notes", Class: "notes"}, func() {
		y := first
		for i, l := range lines {
			if i > 0 {
				y += l.lead
			}
			c.Text(ink.Point{X: x, Y: y}, l.head, ink.Lettering(l.face, notesHeight), ink.Start, ink.Black, false)
			c.Text(ink.Point{X: x + l.indent, Y: y}, l.text, font, ink.Start, ink.Black, false)
		}
	})
	return ink.Rect{X: x, Y: first - notesHeight, W: right - x, H: height + notesHeight}, nil
}

// Draw draws everything but the notes: frame, title block and scale bar.
func (f Format) Draw(c ink.Canvas, b TitleBlock) {
	f.DrawFrame(c)
	f.DrawTitleBlock(c, b)
	f.DrawScaleBar(c)
}
