package ink

import (
	"errors"
	"runtime"
	"sync"
	"time"
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

// PDF is a Book that becomes one PDF document (ISO 32000-1). The same sheets and Info
// give the same bytes, whatever else was made in the process.
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

// Numbers of the objects that are not counted: the page tree and what all pages draw
// with. Page n is object 2n+1, its content the one behind it.
const (
	pagesObject     = 1
	resourcesObject = 2
)

func pageObject(n int) int { return 2*n + 1 }

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
	d := &pdfDoc{sheets: p.sheets, marks: findMarks(p.sheets)}
	d.reserve(pageObject(len(p.sheets)) + 1)
	if err := d.fonts(); err != nil {
		return nil, err
	}
	if err := d.pictures(); err != nil {
		return nil, err
	}
	pages := make([]*pdfPage, len(p.sheets))
	each(len(pages), func(i int) {
		pages[i] = d.draw(i + 1)
	})
	for i, g := range pages {
		faults = append(faults, g.faults...)
		d.objects[pageObject(i+1)] = g.dictionary()
		d.objects[pageObject(i+1)+1] = g.packed
	}
	if err := errors.Join(faults...); err != nil {
		return nil, err
	}
	d.tree()
	catalog := d.catalog(d.bookmarks())
	return d.file(catalog, d.about(p.info)), nil
}

// each calls f with 0 to n-1, several at once. What f does must not depend on order.
func each(n int, f func(i int)) {
	next := make(chan int)
	var all sync.WaitGroup
	for range min(runtime.GOMAXPROCS(0), n) {
		all.Go(func() {
			for i := range next {
				f(i)
			}
		})
	}
	for i := range n {
		next <- i
	}
	close(next)
	all.Wait()
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
	for i, s := range sheets {
		walk(s.Calls, func(c Call) {
			if m, ok := c.(Marked); ok {
				for _, k := range []markKey{{i + 1, m.Name}, {0, m.Name}} {
					if _, taken := marks[k]; !taken {
						marks[k] = place{i + 1, m.At.Y}
					}
				}
			}
		})
	}
	return marks
}

type markKey struct {
	sheet int
	name  string
}

// walk calls f with every call, those in groups too, groups themselves not.
func walk(calls []Call, f func(Call)) {
	for _, c := range calls {
		if g, ok := c.(Grouped); ok {
			walk(g.Calls, f)
			continue
		}
		f(c)
	}
}
