package sheet

import (
	"fmt"

	"gloamwright/layout/ink"
)

// Measures of the title block, mm.
const (
	blockWidth  = 180 // ISO 7200: at most 180
	blockHeight = 36
	blockRow    = 9
	cellPad     = 1.5 // left of a cell's text
	cellEnd     = 0.5 // least clear space right of it

	captionHeight   = 1.8
	captionBaseline = 2.8 // from the top of its row
	contentHeight   = 3.5
	contentBaseline = 7.375
	titleHeight     = 5
	titleBaseline   = 6.4 // leaves the tails of letters inside the row

	warningHeight = 4 // black bar on top of the block
	warningText   = 2.5
)

// TitleBlock is what a sheet says about itself: the fields of ISO 7200.
type TitleBlock struct {
	Owner      string
	Title      string
	Supplement string // supplementary title: the stages or the place shown
	Status     string
	Type       string // document type
	Language   string // ISO 639 code
	Size       string // paper size; empty for that of the format
	Creator    string
	Approved   string // empty to sign by hand
	Date       string // of issue, ISO 8601
	Revision   string
	ID         string // identification number
	Reference  string // technical reference: who knows
	Class      string // classification
	Sheet, Of  int
	Firm       Firm   // who drew it; zero for none
	Warning    string // written white on a black bar over the block; empty for none
}

// Firm is who made a document: its name, and its mark if it has one.
type Firm struct {
	Name string
	Logo *ink.Picture
}

// Most that a firm's mark takes in the field of the creator, mm.
const (
	logoWidth  = 20
	logoHeight = 7
	logoInset  = 1
)

// drawLogo draws the firm's mark at the right of the creator's field and returns the
// width that it takes there.
func (b TitleBlock) drawLogo(c ink.Canvas, block ink.Rect) float64 {
	if b.Firm.Logo == nil {
		return 0
	}
	w, h := b.Firm.Logo.Fit(logoWidth, logoHeight)
	const field, row = 60, 2 // of the creator
	b.Firm.Logo.Draw(c, ink.Rect{X: block.X + field - logoInset - w, Y: block.Y + row*blockRow + (blockRow-h)/2, W: w, H: h})
	return w + logoInset
}

// creator is the creator with the firm.
func (b TitleBlock) creator() string {
	if b.Firm.Name == "" || b.Creator == "" {
		return b.Creator + b.Firm.Name
	}
	return b.Creator + ", " + b.Firm.Name
}

// cell is one field: its name in data attributes, caption, place in the block and
// content.
type cell struct {
	field, caption string
	x, width       float64
	row            int
	text           string
	face           ink.Face
}

func (b TitleBlock) cells() []cell {
	const r, m = ink.Regular, ink.Medium
	return []cell{
		{"owner", "Owner", 0, 60, 0, b.Owner, r},
		{"title", "", 60, 90, 0, b.Title, m},
		{"status", "Status", 150, 30, 0, b.Status, m},
		{"type", "Document type", 0, 60, 1, b.Type, r},
		{"supplement", "Supplementary title", 60, 60, 1, b.Supplement, m},
		{"language", "Language", 120, 30, 1, b.Language, r},
		{"size", "Size", 150, 30, 1, b.Size, r},
		{"creator", "Created by", 0, 60, 2, b.creator(), r},
		{"approved", "Approved by", 60, 60, 2, b.Approved, r},
		{"date", "Date of issue", 120, 30, 2, b.Date, r},
		{"revision", "Revision", 150, 30, 2, b.Revision, m},
		{"id", "Identification number", 0, 60, 3, b.ID, m},
		{"reference", "Technical reference", 60, 60, 3, b.Reference, r},
		{"class", "Class", 120, 30, 3, b.Class, r},
		{"sheet", "Sheet", 150, 30, 3, fmt.Sprintf("%d / %d", b.Sheet, b.Of), m},
	}
}

// lettering is the heights a content may be set in, largest first (ISO 3098); one
// that fits in none is cut.
var lettering = []float64{titleHeight, contentHeight, 2.5, captionHeight}

// fitted is the font and the text that stand within width mm, starting from the
// given height.
func fitted(s string, face ink.Face, height, width float64) (ink.Font, string) {
	f := ink.Lettering(face, height)
	for _, h := range lettering {
		if h > height {
			continue
		}
		f = ink.Lettering(face, h)
		if ink.Width(s, f) <= width {
			break
		}
	}
	return f, ink.Cut(s, f, width)
}

// DrawTitleBlock draws the title block in the lower right corner of the frame.
// Content too long for its field is set smaller, down to 1.8 mm, then cut.
func (f Format) DrawTitleBlock(c ink.Canvas, b TitleBlock) {
	if b.Size == "" {
		b.Size = f.Name
	}
	r := f.TitleBlock()
	c.Group(ink.Object{ID: "title-block", Class: "title-block"}, func() {
		bottom := r.Y + r.H
		for row := 1; row < blockHeight/blockRow; row++ {
			y := r.Y + float64(row*blockRow)
			stroke(c, middleWidth, r.X, y, r.X+r.W, y)
		}
		stroke(c, middleWidth, r.X+60, r.Y, r.X+60, bottom)
		stroke(c, middleWidth, r.X+150, r.Y, r.X+150, bottom)
		stroke(c, middleWidth, r.X+120, r.Y+blockRow, r.X+120, bottom)
		logo := b.drawLogo(c, r)
		for _, k := range b.cells() {
			if k.field == "creator" {
				k.width -= logo
			}
			k.draw(c, r)
		}
		stroke(c, frameWidth, r.X, bottom, r.X, r.Y, r.X+r.W, r.Y)
		if b.Warning != "" {
			drawWarning(c, r, b.Warning)
		}
	})
}

func (k cell) draw(c ink.Canvas, block ink.Rect) {
	x, y := block.X+k.x+cellPad, block.Y+float64(k.row*blockRow)
	height, baseline := float64(contentHeight), contentBaseline
	if k.caption == "" {
		height, baseline = titleHeight, titleBaseline
	} else {
		c.Text(ink.Point{X: x, Y: y + captionBaseline}, k.caption, ink.Lettering(ink.Regular, captionHeight), ink.Start, ink.Black, false)
	}
	c.Group(ink.Object{Class: "field", Data: []ink.Attr{{Name: "field", Value: k.field}}}, func() {
		font, s := fitted(k.text, k.face, height, k.width-cellPad-cellEnd)
		c.Text(ink.Point{X: x, Y: y + baseline}, s, font, ink.Start, ink.Black, false)
	})
}

// drawWarning writes the words once in each third of a black bar.
func drawWarning(c ink.Canvas, block ink.Rect, words string) {
	bar := ink.Rect{X: block.X, Y: block.Y - warningHeight, W: block.W, H: warningHeight}
	c.Fill(new(ink.Path).Rect(bar), ink.Black)
	font, s := fitted(words, ink.Bold, warningText, bar.W/3-2*cellPad)
	for i := range 3 {
		at := ink.Point{X: bar.X + bar.W*(2*float64(i)+1)/6, Y: bar.Y + (warningHeight+ink.CapHeight(font))/2}
		c.Text(at, s, font, ink.Middle, ink.White, false)
	}
}
