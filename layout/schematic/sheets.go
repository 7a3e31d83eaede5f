// Package schematic draws the circuit of a Design on sheets: an overview, the
// supply and control sheets between their rails, and the sheets of the
// distribution boards. Every sheet is drawn once into a scene; its drawing calls
// then serve the SVG file and the page of the packet alike.
package schematic

import (
	"fmt"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
	"gloamwright/layout/sheet"
)

// Sheet is one drawn sheet.
type Sheet struct {
	Number     int    // schematic sheet number, from 1
	Kind       string // document type, as the title block has it
	Title      string // of the job
	Supplement string // "Supply and battery"
	Paper      sheet.Format
	Firm       sheet.Firm // stands in the title block

	scene    *scene
	book     *book
	cautions []sheet.Caution
	notes    []string
	marks    []*place // objects that links lead to
}

// The document types of the sheets.
const (
	overviewDiagram = "Overview diagram"
	circuitDiagram  = "Circuit diagram"
)

// book is the set of sheets while it is drawn.
type book struct {
	d       *design.Design
	c       *circuit.Circuit
	paper   sheet.Format
	sheets  []*Sheet
	places  map[string]*place
	railOf  map[*circuit.Pin]*circuit.Rail
	railKey map[*circuit.Rail]string
	on      map[*circuit.Rail][]int // sheet numbers that draw pins of the rail
	reading map[*circuit.TestPoint]*facts.Reading
	current map[*circuit.Conductor]*facts.Conductor
	wiresAt map[*circuit.Pin][]string // numbers of the conductors that end there
	lengths quantity.LengthUnit

	boardSheets []*boardSheet
	over        *overview
}

// Sheets draws the schematic of d. It fails only when the circuit holds something
// that no sheet has room for; the error says what.
func Sheets(d *design.Design) ([]*Sheet, error) {
	b := newBook(d)
	if err := b.make(); err != nil {
		return nil, err
	}
	return b.sheets, nil
}

func newBook(d *design.Design) *book {
	b := &book{
		d: d, c: d.Circuit, paper: sheet.A3,
		places: map[string]*place{}, railOf: map[*circuit.Pin]*circuit.Rail{}, railKey: map[*circuit.Rail]string{},
		on: map[*circuit.Rail][]int{}, reading: map[*circuit.TestPoint]*facts.Reading{},
		current: map[*circuit.Conductor]*facts.Conductor{},
		wiresAt: map[*circuit.Pin][]string{},
	}
	if d.Site != nil {
		b.lengths = d.Site.Practice.LengthUnit()
		if d.Site.Practice.Paper.Val == "ansi" {
			b.paper = sheet.Tabloid
		}
	}
	for i, r := range b.c.Rails {
		b.railKey[r] = fmt.Sprintf("rail%d", i+1)
		for _, p := range r.Pins {
			b.railOf[p] = r
		}
	}
	for _, r := range d.Readings {
		b.reading[r.Point] = r
	}
	for _, c := range b.c.Conductors {
		b.wiresAt[c.From], b.wiresAt[c.To] = append(b.wiresAt[c.From], c.Number), append(b.wiresAt[c.To], c.Number)
	}
	for _, c := range d.Conductors {
		b.current[c.Conductor] = c
	}
	return b
}

// sheet starts the next sheet.
func (b *book) sheet(kind, supplement string) *Sheet {
	s := &Sheet{Number: len(b.sheets) + 1, Kind: kind, Supplement: supplement, Paper: b.paper, scene: newScene(b.lengths), book: b}
	if b.d.Site != nil {
		s.Title = b.d.Site.Job.Title.Val
	}
	b.sheets = append(b.sheets, s)
	return s
}

// make plans the breaks, which give every thing its sheet, and draws the sheets.
func (b *book) make() error {
	stages, err := b.planStages()
	if err != nil {
		return err
	}
	boards, err := b.planBoards()
	if err != nil {
		return err
	}
	b.boardSheets = boards
	overviews := b.planOverview()
	for _, title := range overviews {
		b.sheet(overviewDiagram, title)
	}
	first := len(b.sheets) + 1
	for i, s := range stages {
		for _, x := range s.boxes {
			b.drawnOn(first+i, x.st.Parts)
		}
	}
	for i, s := range boards {
		bd := s.board
		s.number = first + len(stages) + i
		if s.rests {
			continue
		}
		b.drawnOn(s.number, []*circuit.Part{bd.Plus, bd.Minus})
	}
	for _, s := range stages {
		if err := b.drawStages(b.sheet(circuitDiagram, s.title), s); err != nil {
			return err
		}
	}
	for _, s := range boards {
		if err := b.drawBoard(b.sheet(circuitDiagram, s.title), s); err != nil {
			return err
		}
	}
	legend := b.sheet(legendDiagram, "Legend")
	for i := range overviews {
		if err := b.drawOverview(b.sheets[i], i); err != nil {
			return err
		}
	}
	for _, s := range b.sheets {
		if s == legend { // the last: it tells what the others show
			if err := b.drawLegend(s); err != nil {
				return err
			}
		}
		s.scene.finish(b)
		if c := b.d.Changes; c != nil && s.scene.markChanged(c.Touched) {
			if err := b.note(s, s.cautions, append([]string{"A filled triangle marks what revision " + c.To + " changes."}, s.notes...)); err != nil {
				return err
			}
		}
	}
	for _, name := range circuit.SortedKeys(b.places) {
		if pl := b.places[name]; pl.sheet != nil && pl.anchor != "" {
			pl.sheet.marks = append(pl.sheet.marks, pl)
		}
	}
	return nil
}

// drawnOn notes that a sheet draws the rail pins of some parts.
func (b *book) drawnOn(number int, parts []*circuit.Part) {
	for _, p := range parts {
		for _, n := range p.Pins {
			r := b.railOf[n]
			if r == nil {
				continue
			}
			if l := b.on[r]; len(l) == 0 || l[len(l)-1] != number {
				b.on[r] = append(l, number)
			}
		}
	}
}

// neighbours returns the sheets before and after number that draw rail r; 0 for none.
func (b *book) neighbours(r *circuit.Rail, number int) (before, after int) {
	for _, n := range b.on[r] {
		if n < number {
			before = n
		}
		if n > number && after == 0 {
			after = n
		}
	}
	return before, after
}

// railRefer draws the reference by which a rail leaves or enters a sheet; other is
// the sheet that it goes on to or comes from.
func (b *book) railRefer(sh *Sheet, r *circuit.Rail, other int, at node) (*object, *place) {
	out := other > sh.Number
	from, to := other, sh.Number
	turn := byte('W')
	if out {
		from, to, turn = sh.Number, other, 'E'
	}
	return b.refer(sh, fmt.Sprintf("%s-%d-%d", b.railKey[r], from, to), r.Name, out, turn, at)
}

// Circuit reports whether the sheet is a circuit diagram; the others are overviews.
func (s *Sheet) Circuit() bool { return s.Kind == circuitDiagram }

// Moved is how many labels found their first place taken and stand in another.
func (s *Sheet) Moved() int { return s.scene.moved }

// Options says how a sheet is shown.
type Options struct {
	// Number and Of are printed in the title block; zero means the schematic's own.
	Number, Of int
	// Target tells where a link to an object of schematic sheet number leads.
	// Without it links lead to the SVG files.
	Target func(number int, object string) ink.Target
}

// Draw draws the sheet with frame and title block.
func (s *Sheet) Draw(c ink.Canvas, o Options) {
	if o.Number == 0 {
		o.Number, o.Of = s.Number, len(s.book.sheets)
	}
	target := o.Target
	if target == nil {
		target = fileTarget
	}
	p := &painter{c: c, goTo: func(pl *place) (ink.Target, bool) {
		if pl == nil || pl.sheet == nil {
			return ink.Target{}, false
		}
		return target(pl.sheet.Number, pl.anchor), true
	}}
	s.drawFrame(c, o)
	for _, pl := range s.marks {
		c.Mark(pl.anchor, mm(pl.at))
	}
	for _, obj := range s.scene.objects {
		if len(obj.items) == 0 {
			continue
		}
		c.Group(obj.Object, func() {
			for _, d := range obj.items {
				d.draw(p)
			}
		})
	}
}

// FileName is the SVG file of a sheet.
func FileName(number int) string { return fmt.Sprintf("schematic-%d.svg", number) }

func fileTarget(number int, object string) ink.Target {
	return ink.Target{File: FileName(number), Anchor: object}
}
