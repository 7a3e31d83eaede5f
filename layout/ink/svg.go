package ink

import (
	"bytes"
	"encoding/base64"
	"encoding/xml"
	"errors"
	"fmt"
	"hash/crc32"
	"math"
	"net/url"
	"slices"
	"strings"

	svgo "github.com/ajstarks/svgo/float"
)

// svgMiter is the limit PDF viewers use for mitred joins; SVG's own is 4.
const svgMiter = 10

// SVG is a Canvas that becomes one SVG file of the sheet's real size. The file
// stands alone: it carries the glyphs it uses, has no script and asks for
// nothing from elsewhere. On a dark screen the ink turns light; in print it stays
// as drawn.
type SVG struct {
	*Recorder
	description string
}

// NewSVG starts a sheet of w x h mm. Title names the picture, description says in
// a sentence what it shows.
func NewSVG(w, h float64, title, description string) *SVG {
	return &SVG{NewRecorder(w, h, title), description}
}

// Output is the finished file, or every fault of the sheet: what a Recorder
// reports and links to objects that are not on it.
//
// A link becomes an <a> to Target.File and Target.Anchor. One that leads only to
// a sheet of the packet is left out: nothing in an SVG answers to it.
func (s *SVG) Output() ([]byte, error) {
	if err := s.Err(); err != nil {
		return nil, err
	}
	d := &svgDoc{recording: s.Recorder}
	d.survey(s.Calls)
	slices.Sort(d.colors)
	var out bytes.Buffer
	d.svg = svgo.New(&out)
	d.svg.Decimals = 3
	d.svg.Startraw(attr("width", number(s.W)+"mm"), attr("height", number(s.H)+"mm"),
		attr("viewBox", "0 0 "+number(s.W)+" "+number(s.H)), attr("role", "img"), attr("xml:lang", language), attr("xml:space", "preserve"))
	d.svg.Title(Clean(s.Title))
	if s.description != "" {
		d.svg.Desc(Clean(s.description))
	}
	style, err := d.style()
	if err != nil {
		return nil, err
	}
	d.svg.Style("text/css", style)
	d.svg.Rect(0, 0, s.W, s.H, d.ink("paper", "fill", White)...)
	d.svg.Group(attr("fill", "none"), attr("stroke-miterlimit", number(svgMiter)))
	s.Replay(d)
	d.svg.Gend()
	d.svg.End()
	if err := errors.Join(d.faults...); err != nil {
		return nil, err
	}
	return out.Bytes(), nil
}

// svgDoc draws a recording, already judged, through svgo.
type svgDoc struct {
	recording *Recorder
	svg       *svgo.SVG
	colors    []Color                // used, without repeats
	runes     [len(faceNames)][]rune // used, by face
	families  [len(faceNames)]string
	faults    []error
}

// survey notes the colours and glyphs in use, which the head of the file needs.
func (d *svgDoc) survey(calls []Call) {
	color := func(c Color) {
		if !slices.Contains(d.colors, c) {
			d.colors = append(d.colors, c)
		}
	}
	color(White) // the paper
	for _, c := range calls {
		switch c := c.(type) {
		case Stroked:
			color(c.Pen.Color)
		case Filled:
			color(c.Color)
		case Written:
			color(c.Color)
			d.runes[c.Font.Face] = append(d.runes[c.Font.Face], []rune(c.Text)...)
		case Grouped:
			d.survey(c.Calls)
		}
	}
}

// language is that of all texts, as a screen reader is told.
const language = "en"

// hitBand is how wide a line is for a pointer, in mm: just under the pitch of 2.5 mm at
// which lines run side by side.
const hitBand = 2.2

// style writes the faces and the colours of dark screens. Plain attributes carry
// the colours of paper, so viewers without style sheets show those.
func (d *svgDoc) style() (string, error) {
	var b strings.Builder
	b.WriteString("\n:root{color-scheme:light dark}\n.link,.hit{fill:none;pointer-events:all}\n.along{stroke-width:" + number(hitBand) + ";pointer-events:stroke}\ntext{white-space:pre}\n")
	for face, runes := range d.runes {
		if len(runes) == 0 {
			continue
		}
		file, err := subsetFont(fontFile(Face(face)), &metrics(Face(face)).cmap, runes)
		if err != nil {
			return "", fmt.Errorf("face %s: %w", Face(face), err)
		}
		// The sum keeps subsets apart when several sheets are put in one page.
		d.families[face] = fmt.Sprintf("go-%s-%08x", Face(face), crc32.ChecksumIEEE(file))
		fmt.Fprintf(&b, "@font-face{font-family:%q;src:url(data:font/ttf;base64,%s) format(\"truetype\")}\n",
			d.families[face], base64.StdEncoding.EncodeToString(file))
	}
	// A window narrower than the sheet shows all of it; on paper and in editors it has its
	// real size.
	fmt.Fprintf(&b, "@page{size:%smm %smm;margin:0}\n", number(d.recording.W), number(d.recording.H))
	b.WriteString("@media screen{svg:root{max-width:100%;height:auto}}\n")
	b.WriteString("@media screen and (prefers-color-scheme:dark){\n")
	for _, c := range d.colors {
		fmt.Fprintf(&b, ".s%06X{stroke:#%06[2]X}.f%06[1]X{fill:#%06[2]X}\n", uint32(c), uint32(Dark(c)))
	}
	b.WriteString("}\n")
	return b.String(), nil
}

// attr is one attribute in the form svgo passes on as it is.
func attr(name, value string) string {
	var b bytes.Buffer
	xml.Escape(&b, []byte(value)) // a bytes.Buffer takes everything
	return name + `="` + b.String() + `"`
}

// ink is a colour as a class for dark screens and an attribute for all others.
func (d *svgDoc) ink(class, property string, c Color) []string {
	name := fmt.Sprintf("%c%06X", property[0], uint32(c))
	return []string{attr("class", strings.TrimSpace(class+" "+name)), attr(property, fmt.Sprintf("#%06X", uint32(c)))}
}

// Stroke implements Canvas.
func (d *svgDoc) Stroke(p *Path, pen Pen) {
	a := append(d.ink("", "stroke", pen.Color), attr("stroke-width", number(pen.Width)))
	if len(pen.Dash) > 0 {
		dash := make([]string, len(pen.Dash))
		for i, v := range pen.Dash {
			dash[i] = number(v)
		}
		a = append(a, attr("stroke-dasharray", strings.Join(dash, " ")))
	}
	d.svg.Path(pathData(p), a...)
}

// Fill implements Canvas.
func (d *svgDoc) Fill(p *Path, c Color) { d.svg.Path(pathData(p), d.ink("", "fill", c)...) }

// Image implements Imager: the file carries the picture.
func (d *svgDoc) Image(r Rect, png []byte) {
	// svgo knows pictures of whole sizes alone
	fmt.Fprintf(d.svg.Writer, `<image x="%s" y="%s" width="%s" height="%s" preserveAspectRatio="none" xlink:href="data:image/png;base64,%s"/>`+"\n",
		number(r.X), number(r.Y), number(r.W), number(r.H), base64.StdEncoding.EncodeToString(png))
}

// Text implements Canvas.
func (d *svgDoc) Text(at Point, s string, f Font, a Anchor, c Color, turn bool) {
	generic := "sans-serif"
	if f.Face == Mono || f.Face == MonoBold {
		generic = "monospace"
	}
	list := append(d.ink("", "fill", c), attr("font-family", d.families[f.Face]+", "+generic), attr("font-size", number(f.Size)))
	if a != Start {
		list = append(list, attr("text-anchor", [...]string{"start", "middle", "end"}[a]))
	}
	if turn {
		list = append(list, attr("transform", "rotate(-90 "+number(at.X)+" "+number(at.Y)+")"))
	}
	d.svg.Text(rounded(at.X), rounded(at.Y), s, list...)
}

// rounded is v at the digits svgo prints, without a minus before zero.
func rounded(v float64) float64 {
	v = math.Round(v*1000) / 1000
	if v == 0 {
		return 0
	}
	return v
}

// Group implements Canvas.
func (d *svgDoc) Group(o Object, draw func()) {
	var list []string
	if o.ID != "" {
		list = append(list, attr("id", o.ID))
	}
	if o.Class != "" {
		list = append(list, attr("class", o.Class))
	}
	for _, a := range o.Data {
		list = append(list, attr("data-"+a.Name, Clean(a.Value)))
	}
	d.svg.Group(list...)
	if o.Title != "" {
		d.svg.Title(Clean(o.Title))
	}
	if o.Hit != nil {
		class := "hit"
		if o.Along {
			class = "along"
		}
		d.svg.Path(pathData(o.Hit), attr("class", class))
	}
	draw()
	d.svg.Gend()
}

// Link implements Canvas.
func (d *svgDoc) Link(r Rect, t Target) {
	here := d.recording.ids[t.Anchor] || d.recording.marks[t.Anchor]
	switch {
	case t.File == "" && (t.Anchor == "" || t.Sheet > 0 && !here):
		return // leads to a sheet of the packet
	case t.File == "" && !here:
		d.faults = append(d.faults, fmt.Errorf("sheet %q: link to %q leads nowhere", d.recording.Title, t.Anchor))
		return
	}
	to := url.URL{Path: t.File, Fragment: t.Anchor}
	var href bytes.Buffer
	xml.Escape(&href, []byte(to.String()))
	d.svg.Link(href.String(), strings.TrimPrefix(t.File+" "+t.Anchor, " "))
	d.svg.Path(pathData(new(Path).Rect(r)), attr("class", "link"), attr("pointer-events", "all"))
	d.svg.LinkEnd()
}

// Mark implements Canvas. The ID of an object serves as its own mark.
func (d *svgDoc) Mark(name string, at Point) {
	if !d.recording.ids[name] {
		d.svg.Path("M"+number(at.X)+" "+number(at.Y)+"h0", attr("id", name))
	}
}

// Dark is the colour that stands for c on a dark screen: the same hue, lightness
// turned over and kept off pure black and white.
func Dark(c Color) Color {
	const low, high = 0.08, 0.92 // lightness of what was white and black
	r, g, b := float64(c>>16&0xFF)/255, float64(c>>8&0xFF)/255, float64(c&0xFF)/255
	top, bottom := max(r, g, b), min(r, g, b)
	light := (top + bottom) / 2
	turned := high - light*(high-low)
	// In the HSL model a colour is its grey plus a share of the widest spread that
	// its lightness allows; keep the share.
	spread := func(l float64) float64 { return 1 - math.Abs(2*l-1) }
	scale := 0.0
	if spread(light) > 0 {
		scale = spread(turned) / spread(light)
	}
	part := func(v float64) Color { return Color(math.Round(min(max(turned+(v-light)*scale, 0), 1) * 255)) }
	return part(r)<<16 | part(g)<<8 | part(b)
}
