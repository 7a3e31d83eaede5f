package packet

import "gloamwright/layout/ink"

// mmPerPoint is the typographic point.
const mmPerPoint = 25.4 / 72

// style is a role of text: face, size in points, distance of lines in mm, colour.
type style struct {
	face  ink.Face
	pt    float64
	lead  float64
	color ink.Color
}

func (s style) font() ink.Font { return ink.Font{Face: s.face, Size: s.pt * mmPerPoint} }

// as is s in another face.
func (s style) as(f ink.Face) style { s.face = f; return s }

// in is s in another colour.
func (s style) in(c ink.Color) style { s.color = c; return s }

// The roles.
var (
	coverTitle   = style{ink.Bold, 30, 11, ink.Black}
	coverPlace   = style{ink.Regular, 13, 5.6, ink.Black}
	coverClient  = style{ink.Regular, 11, 5.2, ink.Mid}
	promise      = style{ink.Regular, 11, 5.2, ink.Black}
	sheetTitle   = style{ink.Bold, 17, 7, ink.Black}
	purposeText  = style{ink.Regular, 10.5, 4.8, ink.Black}
	cautionHead  = style{ink.Bold, 11, 4.9, ink.Black}
	cautionText  = style{ink.Regular, 11, 4.9, ink.Black}
	sectionHead  = style{ink.Bold, 11.5, 5, ink.Black}
	groupHead    = style{ink.Bold, 9.5, 4, ink.Black}
	groupRemark  = style{ink.Regular, 8.5, 3.7, ink.Black}
	lineText     = style{ink.Regular, 10, 4.2, ink.Black} // checklist
	tableText    = style{ink.Regular, 9.25, 4, ink.Black}
	denseText    = style{ink.Regular, 9.25, 3.9, ink.Black}
	columnHead   = style{ink.Bold, 8, 3.3, ink.Black}
	formulaText  = style{ink.Italic, 10.5, 4.9, ink.Black}
	numbersText  = style{ink.Regular, 9.5, 4.3, ink.Black}
	sourceText   = style{ink.Regular, 8.5, 3.8, ink.Mid}
	noteText     = style{ink.Regular, 8.5, 3.7, ink.Black}
	remarkText   = style{ink.Regular, 8.5, 3.7, ink.Mid}
	blankCaption = style{ink.Regular, 7.5, 3, ink.Mid}
	guideText    = style{ink.Regular, 7, 3, ink.Rule}
	footCaption  = style{ink.Regular, 7, 3, ink.Mid}
	footValue    = style{ink.Medium, 8.5, 3.7, ink.Black}
	statusText   = style{ink.Bold, 8, 3.3, ink.Black}
	boxHead      = style{ink.Bold, 9.5, 4, ink.Black}
)

// Line widths, mm.
const (
	hairline  = 0.18
	cardLine  = 0.25
	blankLine = 0.35
	tickLine  = 0.4
	headLine  = 0.5
	barLine   = 0.7
	warnLine  = 0.9
)

// Sizes of what the pen fills, mm.
const (
	tickSize = 4.5
	tickRow  = 7.0 // least height of a row with a tick box
	blankRow = 8.0 // least height of a row with a blank
	plainRow = 6.0 // least height of a row that is only printed
	padding  = 1.5 // kept free at the right of a cell
	rowAir   = 2.5 // of a row beyond its lines
	tightAir = 1.8 // the same in tables that are only read
	tightRow = 5.8 // least height of their rows
	rise     = 0.765
)

// Short names for the sides of columns.
const (
	midAnchor = ink.Middle
	endAnchor = ink.End
)
