package ink

import "bytes"

// Picture is a drawing with proportions of its own, such as a firm's mark: filled
// shapes, or the dots of a PNG.
type Picture struct {
	W, H   float64 // in units of the shapes
	Shapes []Shape
	PNG    []byte // instead of shapes
}

// Shape is a filled path.
type Shape struct {
	Path  *Path
	Color Color
}

// Imager is a Canvas that can show the dots of a PNG; the back ends of this package
// can.
type Imager interface {
	// Image shows a PNG in r, stretched to it.
	Image(r Rect, png []byte)
}

// Fit is the largest box of the picture's proportions within w x h mm.
func (p *Picture) Fit(w, h float64) (float64, float64) {
	if p.W*h > w*p.H {
		return w, w * p.H / p.W
	}
	return h * p.W / p.H, h
}

// Draw draws the picture in r, stretched to it. A canvas that is no Imager leaves the
// dots of a PNG out.
func (p *Picture) Draw(c Canvas, r Rect) {
	if p.PNG != nil {
		if m, ok := c.(Imager); ok {
			m.Image(r, p.PNG)
		}
		return
	}
	for _, s := range p.Shapes {
		c.Fill(s.Path.Map(func(q Point) Point { return Point{r.X + q.X*r.W/p.W, r.Y + q.Y*r.H/p.H} }), s.Color)
	}
}

// Pictured is a call of Imager.Image.
type Pictured struct {
	Rect Rect
	PNG  []byte
}

func (m Pictured) replay(c Canvas) {
	if i, ok := c.(Imager); ok {
		i.Image(m.Rect, m.PNG)
	}
}

// Image implements Imager.
func (r *Recorder) Image(b Rect, png []byte) {
	if len(png) == 0 || !(b.W > 0 && b.H > 0) {
		r.fault("sheet %q: a picture without size or content", r.Title)
		return
	}
	r.add(Pictured{b, bytes.Clone(png)})
}
