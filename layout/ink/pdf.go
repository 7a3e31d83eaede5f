package ink

import (
	"bytes"
	"crypto/sha256"
	"errors"
	"fmt"
	"slices"
	"time"

	"github.com/jung-kurt/gofpdf"
)

// pointsPerMM turns millimetres into the points PDF counts in.
const pointsPerMM = 72 / 25.4

// Info is what a document tells about itself.
type Info struct {
	Title    string
	Author   string
	Subject  string
	Keywords string
	Date     time.Time // of issue, the only time in the file; the Unix epoch stands for none
}

// PDF is a Book that becomes one PDF document. The same sheets and Info give the
// same bytes, whatever else was made in the process.
type PDF struct {
	info   Info
	sheets []*Recorder
}

// NewPDF starts a document.
func NewPDF(info Info) *PDF { return &PDF{info: info} }

// Sheet implements Book. Sheets may be drawn in any order, and until Output.
func (p *PDF) Sheet(w, h float64, title string) Canvas {
	r := NewRecorder(w, h, title)
	p.sheets = append(p.sheets, r)
	return r
}

// Output is the finished document, or every fault of its sheets: what a Recorder
// reports, links that lead nowhere and names marked twice on a sheet.
func (p *PDF) Output() ([]byte, error) {
	if len(p.sheets) == 0 {
		return nil, errors.New("document without sheets")
	}
	var faults []error
	for _, s := range p.sheets {
		faults = append(faults, s.Err())
	}
	if err := errors.Join(faults...); err != nil {
		return nil, err
	}
	d := &pdfDoc{marks: findMarks(p.sheets), runes: findRunes(p.sheets)}
	d.f = gofpdf.NewCustom(&gofpdf.InitType{UnitStr: "mm", Size: gofpdf.SizeType{Wd: p.sheets[0].W, Ht: p.sheets[0].H}})
	d.f.SetCatalogSort(true)
	d.f.SetMargins(0, 0, 0)
	d.f.SetAutoPageBreak(false, 0)
	date := p.info.Date.UTC()
	if date.IsZero() { // for which gofpdf would read the clock
		date = time.Unix(0, 0).UTC()
	}
	d.f.SetCreationDate(date)
	d.f.SetModificationDate(date)
	d.f.SetProducer("Gloamwright", false)
	d.f.SetTitle(Clean(p.info.Title), true)
	d.f.SetAuthor(Clean(p.info.Author), true)
	d.f.SetSubject(Clean(p.info.Subject), true)
	d.f.SetKeywords(Clean(p.info.Keywords), true)
	d.f.SetDisplayMode("fullpage", "single")
	d.f.SetLineCapStyle("butt")
	d.f.SetLineJoinStyle("miter")
	for i, s := range p.sheets {
		// "P" whatever the proportions: "L" would swap the sides.
		d.f.AddPageFormat("P", gofpdf.SizeType{Wd: s.W, Ht: s.H})
		d.page = i + 1
		s.Replay(d)
	}
	d.resolve(p.sheets)
	d.bookmark(p.sheets)
	if err := errors.Join(d.faults...); err != nil {
		return nil, err
	}
	var out bytes.Buffer
	if err := d.f.Output(&out); err != nil {
		return nil, fmt.Errorf("writing the document: %w", err)
	}
	return out.Bytes(), nil
}

// place is a point of a sheet of the document, sheets counted from 1.
type place struct {
	sheet int
	y     float64
}

// findMarks lists the marked places by sheet and name; sheet 0 stands for the
// first sheet that bears the name.
func findMarks(sheets []*Recorder) map[markKey]place {
	marks := map[markKey]place{}
	var walk func(n int, calls []Call)
	walk = func(n int, calls []Call) {
		for _, c := range calls {
			switch c := c.(type) {
			case Grouped:
				walk(n, c.Calls)
			case Marked:
				for _, k := range []markKey{{n, c.Name}, {0, c.Name}} {
					if _, taken := marks[k]; !taken {
						marks[k] = place{n, c.At.Y}
					}
				}
			}
		}
	}
	for i, s := range sheets {
		walk(i+1, s.Calls)
	}
	return marks
}

// findRunes lists what is written in each face, sign for sign.
func findRunes(sheets []*Recorder) (out [len(faceNames)][]rune) {
	var seen [len(faceNames)]map[rune]bool
	for i := range seen {
		seen[i] = map[rune]bool{}
	}
	var walk func(calls []Call)
	walk = func(calls []Call) {
		for _, c := range calls {
			switch c := c.(type) {
			case Grouped:
				walk(c.Calls)
			case Written:
				f := c.Font.Face
				for _, r := range c.Text {
					if !seen[f][r] {
						seen[f][r] = true
						out[f] = append(out[f], r)
					}
				}
			}
		}
	}
	for _, s := range sheets {
		walk(s.Calls)
	}
	return out
}

type markKey struct {
	sheet int
	name  string
}

// pdfDoc draws recordings, already judged, on gofpdf. gofpdf keeps a state that
// drifts from the viewer's across transforms and pages, so every stroke sets all
// it needs.
type pdfDoc struct {
	f      *gofpdf.Fpdf
	page   int
	loaded [len(faceNames)]bool
	marks  map[markKey]place
	runes  [len(faceNames)][]rune // written in each face
	links  []pendingLink
	faults []error
}

type pendingLink struct {
	id, page int
	target   Target
}

func rgb(c Color) (r, g, b int) { return int(c >> 16 & 0xFF), int(c >> 8 & 0xFF), int(c & 0xFF) }

// Stroke implements Canvas.
func (d *pdfDoc) Stroke(p *Path, pen Pen) {
	d.f.SetDrawColor(rgb(pen.Color))
	d.f.SetLineWidth(pen.Width)
	d.f.SetDashPattern(pen.Dash, 0)
	d.draw(p, "S")
}

// Fill implements Canvas.
func (d *pdfDoc) Fill(p *Path, c Color) {
	d.f.SetFillColor(rgb(c))
	d.draw(p, "f")
}

func (d *pdfDoc) draw(p *Path, operator string) {
	i := 0
	for _, v := range p.Verbs {
		q := p.Points[i:]
		switch v {
		case MoveTo:
			d.f.MoveTo(q[0].X, q[0].Y)
			i++
		case LineTo:
			d.f.LineTo(q[0].X, q[0].Y)
			i++
		case CubicTo:
			d.f.CurveBezierCubicTo(q[0].X, q[0].Y, q[1].X, q[1].Y, q[2].X, q[2].Y)
			i += 3
		case Close:
			d.f.ClosePath()
		}
	}
	d.f.DrawPath(operator)
}

// Text implements Canvas.
func (d *pdfDoc) Text(at Point, s string, f Font, a Anchor, c Color, turn bool) {
	d.font(f)
	d.f.SetTextColor(rgb(c))
	shift := 0.0
	if a != Start {
		shift = anchorShift(a, Width(s, f))
	}
	if !turn {
		d.f.Text(at.X-shift, at.Y, s)
		return
	}
	d.f.TransformBegin()
	d.f.TransformRotate(90, at.X, at.Y)
	d.f.Text(at.X-shift, at.Y, s)
	d.f.TransformEnd()
}

// font selects f. A face that is new is given to the document as a subset: gofpdf takes
// long to read a whole one, and writes into the slice it is given, so that a shared one
// would carry over from document to document (TestSameBytesAfterOtherDocuments).
func (d *pdfDoc) font(f Font) {
	name := f.Face.String()
	if !d.loaded[f.Face] {
		file, err := subsetFont(fontFile(f.Face), &metrics(f.Face).cmap, d.runes[f.Face])
		if err != nil {
			d.faults = append(d.faults, fmt.Errorf("face %s: %w", name, err))
			file = slices.Clone(fontFile(f.Face))
		}
		d.f.AddUTF8FontFromBytes(name, "", file)
		d.loaded[f.Face] = true
	}
	d.f.SetFont(name, "", f.Size*pointsPerMM)
}

// Group implements Canvas: the content only.
func (d *pdfDoc) Group(_ Object, draw func()) { draw() }

// Image implements Imager. Equal pictures stand in the document once.
func (d *pdfDoc) Image(r Rect, png []byte) {
	name := fmt.Sprintf("%x", sha256.Sum256(png))
	kind := gofpdf.ImageOptions{ImageType: "PNG"}
	if d.f.GetImageInfo(name) == nil {
		d.f.RegisterImageOptionsReader(name, kind, bytes.NewReader(png))
	}
	if err := d.f.Error(); err != nil {
		d.faults = append(d.faults, fmt.Errorf("picture: %w", err))
		d.f.ClearError()
		return
	}
	d.f.ImageOptions(name, r.X, r.Y, r.W, r.H, false, kind, 0, "")
}

// Link implements Canvas. Targets are looked up when all sheets are drawn.
func (d *pdfDoc) Link(r Rect, t Target) {
	id := d.f.AddLink()
	d.f.Link(r.X, r.Y, r.W, r.H, id)
	d.links = append(d.links, pendingLink{id, d.page, t})
}

// Mark implements Canvas; findMarks has read it already.
func (d *pdfDoc) Mark(string, Point) {}

// resolve leads every link to its place.
func (d *pdfDoc) resolve(sheets []*Recorder) {
	for _, l := range d.links {
		t := l.target
		to, found := d.marks[markKey{t.Sheet, t.Anchor}]
		if t.Anchor == "" && t.Sheet >= 1 && t.Sheet <= len(sheets) {
			to, found = place{sheet: t.Sheet}, true
		}
		if !found {
			d.faults = append(d.faults, fmt.Errorf("sheet %q: link to %q on sheet %d leads nowhere",
				sheets[l.page-1].Title, t.Anchor, t.Sheet))
			continue
		}
		d.f.SetLink(l.id, to.y, to.sheet)
	}
}

// bookmark adds one bookmark a titled sheet. gofpdf counts the height of every
// bookmark from the top of the last sheet, which the offset makes good.
func (d *pdfDoc) bookmark(sheets []*Recorder) {
	d.font(Font{Regular, 3}) // gofpdf writes titles in Unicode only while such a font is chosen
	last := sheets[len(sheets)-1]
	for i, s := range sheets {
		if s.Title == "" {
			continue
		}
		d.f.SetPage(i + 1)
		d.f.Bookmark(Clean(s.Title), 0, last.H-s.H)
	}
	d.f.SetPage(len(sheets)) // gofpdf ends the document at the page it is on
}
