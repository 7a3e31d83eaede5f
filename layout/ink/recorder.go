package ink

import (
	"errors"
	"fmt"
	"math"
	"regexp"
	"strconv"
	"strings"
	"unicode"
)

// Call is one recorded call of a Canvas: Stroked, Filled, Written, Grouped,
// Linked, Marked or Pictured.
type Call interface{ replay(Canvas) }

// The calls a Recorder keeps.
type (
	// Stroked is a call of Canvas.Stroke.
	Stroked struct {
		Path *Path
		Pen  Pen
	}
	// Filled is a call of Canvas.Fill.
	Filled struct {
		Path  *Path
		Color Color
	}
	// Written is a call of Canvas.Text. Text is as Clean leaves it.
	Written struct {
		At     Point
		Text   string
		Font   Font
		Anchor Anchor
		Color  Color
		Turn   bool
	}
	// Grouped is a call of Canvas.Group with what was drawn inside.
	Grouped struct {
		Object Object
		Calls  []Call
	}
	// Linked is a call of Canvas.Link.
	Linked struct {
		Rect   Rect
		Target Target
	}
	// Marked is a call of Canvas.Mark.
	Marked struct {
		Name string
		At   Point
	}
)

func (s Stroked) replay(c Canvas) { c.Stroke(s.Path, s.Pen) }
func (f Filled) replay(c Canvas)  { c.Fill(f.Path, f.Color) }
func (w Written) replay(c Canvas) { c.Text(w.At, w.Text, w.Font, w.Anchor, w.Color, w.Turn) }
func (l Linked) replay(c Canvas)  { c.Link(l.Rect, l.Target) }
func (m Marked) replay(c Canvas)  { c.Mark(m.Name, m.At) }
func (g Grouped) replay(c Canvas) {
	c.Group(g.Object, func() {
		for _, call := range g.Calls {
			call.replay(c)
		}
	})
}

// Recorder is a Canvas that remembers its calls. The other back ends draw from
// such a recording, so a sheet is judged once, here, and sheets of a book may be
// drawn in any order.
type Recorder struct {
	W, H  float64 // size of the sheet, mm
	Title string
	Calls []Call

	open   [][]Call // calls of the groups that are being drawn, outermost first
	faults []error
	ids    map[string]bool // of objects
	marks  map[string]bool
}

// NewRecorder starts a recording of a sheet of w x h mm.
func NewRecorder(w, h float64, title string) *Recorder {
	r := &Recorder{W: w, H: h, Title: title, ids: map[string]bool{}, marks: map[string]bool{}}
	if !(w > 0 && h > 0) || math.IsInf(w+h, 0) {
		r.fault("sheet %q: size %v x %v mm cannot be drawn", title, w, h)
	}
	return r
}

// Err reports everything that was drawn wrongly, joined: places that are not
// numbers, pens without width, signs that the face lacks, repeated object IDs.
func (r *Recorder) Err() error { return errors.Join(r.faults...) }

// Replay draws the recording on c.
func (r *Recorder) Replay(c Canvas) {
	for _, call := range r.Calls {
		call.replay(c)
	}
}

func (r *Recorder) fault(format string, args ...any) {
	r.faults = append(r.faults, fmt.Errorf(format, args...))
}

func (r *Recorder) add(c Call) {
	if n := len(r.open); n > 0 {
		r.open[n-1] = append(r.open[n-1], c)
		return
	}
	r.Calls = append(r.Calls, c)
}

// Stroke implements Canvas. An empty path draws nothing.
func (r *Recorder) Stroke(p *Path, pen Pen) {
	if !r.sound(p) {
		return
	}
	good := pen.Width > 0 && !math.IsInf(pen.Width, 0)
	var dash []float64
	sum := 0.0
	for _, d := range pen.Dash {
		good = good && d >= 0 && !math.IsInf(d, 0)
		sum += d
		dash = append(dash, d)
	}
	if !good || len(dash) > 0 && sum == 0 {
		r.fault("sheet %q: pen of width %v mm, dashes %v cannot be drawn", r.Title, pen.Width, pen.Dash)
		return
	}
	pen.Dash = dash
	r.add(Stroked{p.Map(same), pen})
}

// Fill implements Canvas. An empty path draws nothing.
func (r *Recorder) Fill(p *Path, c Color) {
	if r.sound(p) {
		r.add(Filled{p.Map(same), c})
	}
}

// Text implements Canvas. An empty text draws nothing.
func (r *Recorder) Text(at Point, s string, f Font, a Anchor, c Color, turn bool) {
	s = Clean(s)
	switch {
	case s == "":
		return
	case !finite(at.X, at.Y, f.Size) || f.Size <= 0 || int(f.Face) >= len(faceNames) || a > End:
		r.fault("sheet %q: text %q at (%v, %v), size %v mm cannot be drawn", r.Title, s, at.X, at.Y, f.Size)
		return
	}
	if lost := Missing(s, f.Face); len(lost) > 0 {
		r.fault("sheet %q: text %q at (%.1f, %.1f): the type face has no sign %s", r.Title, s, at.X, at.Y, runeNames(lost))
		return
	}
	r.add(Written{at, s, f, a, c, turn})
}

// dataName is what the name of a data attribute may be.
var dataName = regexp.MustCompile(`^[a-z][a-z0-9-]*$`)

// Group implements Canvas.
func (r *Recorder) Group(o Object, draw func()) {
	if o.ID != "" && r.ids[o.ID] {
		r.fault("sheet %q: two objects have the ID %q", r.Title, o.ID)
	}
	if o.ID != "" {
		r.ids[o.ID] = true
	}
	if strings.ContainsFunc(o.ID, unicode.IsSpace) {
		r.fault("sheet %q: object ID %q has a space", r.Title, o.ID)
	}
	for _, a := range o.Data {
		if !dataName.MatchString(a.Name) {
			r.fault("sheet %q: object %q has a data attribute with the name %q", r.Title, o.ID, a.Name)
		}
	}
	r.open = append(r.open, nil)
	draw()
	last := len(r.open) - 1
	calls := r.open[last]
	r.open = r.open[:last]
	o.Data = append([]Attr(nil), o.Data...)
	r.add(Grouped{o, calls})
}

// Link implements Canvas.
func (r *Recorder) Link(box Rect, t Target) {
	if !finite(box.X, box.Y, box.W, box.H) || box.W <= 0 || box.H <= 0 {
		r.fault("sheet %q: link area %v cannot be drawn", r.Title, box)
		return
	}
	r.add(Linked{box, t})
}

// Mark implements Canvas.
func (r *Recorder) Mark(name string, at Point) {
	if name == "" || !finite(at.X, at.Y) {
		r.fault("sheet %q: mark %q at (%v, %v) cannot be drawn", r.Title, name, at.X, at.Y)
		return
	}
	if r.marks[name] {
		r.fault("sheet %q: two places are marked %q", r.Title, name)
	}
	r.marks[name] = true
	r.add(Marked{name, at})
}

// sound reports whether p can be drawn; a path that begins without Move or holds
// a place that is not a number is remembered as a fault.
func (r *Recorder) sound(p *Path) bool {
	if p == nil || len(p.Verbs) == 0 {
		return false
	}
	want := 0
	for _, v := range p.Verbs {
		switch v {
		case MoveTo, LineTo:
			want++
		case CubicTo:
			want += 3
		}
	}
	good := p.Verbs[0] == MoveTo && want == len(p.Points)
	for _, q := range p.Points {
		good = good && finite(q.X, q.Y)
	}
	if !good {
		r.fault("sheet %q: path with points %v cannot be drawn", r.Title, p.Points)
	}
	return good
}

func same(p Point) Point { return p }

func finite(v ...float64) bool {
	for _, x := range v {
		if math.IsNaN(x) || math.IsInf(x, 0) {
			return false
		}
	}
	return true
}

func runeNames(list []rune) string {
	names := make([]string, len(list))
	for i, r := range list {
		names[i] = fmt.Sprintf("%q (%U)", r, r)
	}
	return strings.Join(names, ", ")
}

// String prints the recording, one call a line, groups indented: readable in a
// test's difference.
func (r *Recorder) String() string {
	var b strings.Builder
	fmt.Fprintf(&b, "sheet %s x %s %q\n", number(r.W), number(r.H), r.Title)
	dump(&b, r.Calls, "")
	return b.String()
}

func dump(b *strings.Builder, calls []Call, indent string) {
	for _, c := range calls {
		b.WriteString(indent)
		switch c := c.(type) {
		case Stroked:
			fmt.Fprintf(b, "stroke %s %06X", number(c.Pen.Width), uint32(c.Pen.Color))
			for _, d := range c.Pen.Dash {
				b.WriteString(" -" + number(d))
			}
			fmt.Fprintf(b, ": %s\n", pathData(c.Path))
		case Filled:
			fmt.Fprintf(b, "fill %06X: %s\n", uint32(c.Color), pathData(c.Path))
		case Written:
			turned := ""
			if c.Turn {
				turned = " turned"
			}
			fmt.Fprintf(b, "text %s,%s %s %s %s%s %06X: %q\n", number(c.At.X), number(c.At.Y), c.Font.Face,
				number(c.Font.Size), [...]string{"start", "middle", "end"}[c.Anchor], turned, uint32(c.Color), c.Text)
		case Grouped:
			fmt.Fprintf(b, "group %s#%s %q", c.Object.Class, c.Object.ID, c.Object.Title)
			for _, a := range c.Object.Data {
				fmt.Fprintf(b, " %s=%q", a.Name, a.Value)
			}
			b.WriteString("\n")
			dump(b, c.Calls, indent+"  ")
		case Linked:
			fmt.Fprintf(b, "link %s,%s %sx%s: file %q sheet %d anchor %q\n", number(c.Rect.X), number(c.Rect.Y),
				number(c.Rect.W), number(c.Rect.H), c.Target.File, c.Target.Sheet, c.Target.Anchor)
		case Marked:
			fmt.Fprintf(b, "mark %s,%s %q\n", number(c.At.X), number(c.At.Y), c.Name)
		}
	}
}

// number writes millimetres with at most three decimals, without trailing zeros
// and without a minus before zero.
func number(v float64) string {
	s := strconv.FormatFloat(v, 'f', 3, 64)
	s = strings.TrimRight(strings.TrimRight(s, "0"), ".")
	if s == "-0" {
		return "0"
	}
	return s
}

// pathData writes a path in the notation of SVG path data, absolute commands.
func pathData(p *Path) string {
	var b strings.Builder
	i := 0
	write := func(letter byte, n int) {
		b.WriteByte(letter)
		for k := range n {
			if k > 0 {
				b.WriteByte(' ')
			}
			b.WriteString(number(p.Points[i].X))
			b.WriteByte(' ')
			b.WriteString(number(p.Points[i].Y))
			i++
		}
	}
	for _, v := range p.Verbs {
		switch v {
		case MoveTo:
			write('M', 1)
		case LineTo:
			write('L', 1)
		case CubicTo:
			write('C', 3)
		case Close:
			b.WriteByte('Z')
		}
	}
	return b.String()
}
