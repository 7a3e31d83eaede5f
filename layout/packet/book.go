package packet

import (
	"fmt"
	"slices"

	"gloamwright/internal/commission"
	"gloamwright/internal/design"
	"gloamwright/internal/quantity"
	"gloamwright/layout/ink"
	"gloamwright/layout/schematic"
)

// Keys of the sections.
const (
	keyCover      = "cover"
	keyChange     = "change-notice"
	keyCautions   = "cautions"
	keyBasis      = "design-basis"
	keyLegend     = "legend"
	keySchematic  = "schematic"
	keyParts      = "parts"
	keyLabels     = "labels"
	keyWires      = "wire-runs"
	keyCables     = "cables"
	keyTerminals  = "terminals"
	keyFuses      = "fuse-map"
	keyChecklist  = "commissioning"
	keyTestPoints = "test-points"
	keyMatrix     = "test-points-matrix"
	keyFaults     = "fault-finding"
	keyCurves     = "curves"
	keyWorkings   = "workings"
	keyRedLine    = "red-line"
)

// book is a packet in the making.
type book struct {
	d          *design.Design
	drawings   []*schematic.Sheet
	recordings map[*schematic.Sheet]*ink.Recorder
	pg, sidePg page
	lengths    quantity.LengthUnit
	refs       *refs
	cuts       []string
	symbols    map[string]ink.Target // of designations on the schematic
	keys       []contentLine         // of the cover
	blockOf    map[int]int           // block of the fault-finding table by fault group
	words      words
	lineNumber map[string]string  // of checklist lines that texts refer to, by key
	record     *commission.Record // the book is this record instead of a packet
}

func newBook(d *design.Design, drawings []*schematic.Sheet) *book {
	b := &book{d: d, drawings: drawings, refs: newRefs(), recordings: map[*schematic.Sheet]*ink.Recorder{}}
	b.pg, b.sidePg = pages(d.Site.Practice.Paper.Val)
	b.lengths = d.Site.Practice.LengthUnit()
	return b
}

// start forgets what a round of layout noted.
func (b *book) start() {
	b.cuts = nil
	b.refs.asked = map[string]bool{}
}

// noteCut remembers a text that had to be shortened.
func (b *book) noteCut(text string) {
	if !slices.Contains(b.cuts, text) {
		b.cuts = append(b.cuts, text)
	}
}

// revision is the revision letter; a draft says so.
func (b *book) revision() string {
	r := b.d.Site.Job.Revision.Val
	if !b.d.Issued {
		return r + ", draft"
	}
	return r
}

// kind is what the document is, pageWord what its sheets are called.
func (b *book) kind() string {
	if b.record != nil {
		return "commissioning record"
	}
	return "build packet"
}

func (b *book) pageWord() string {
	if b.record != nil {
		return "Record"
	}
	return "Sheet"
}

// contentLine is a line of the contents.
type contentLine struct{ key, title string }

// sections lists the packet in the order of work.
func (b *book) sections() []*section {
	if b.record != nil {
		return []*section{b.recordSection()}
	}
	out := []*section{nil} // the cover, made when the others are known
	add := func(list ...*section) {
		for _, s := range list {
			if s != nil {
				out = append(out, s)
			}
		}
	}
	b.numberBlocks()
	b.numberLines()
	add(b.changes(), b.cautions(), b.basis(), b.legend())
	add(b.schematicSections()...)
	add(b.parts(), b.labels(), b.wires(), b.cables(), b.terminals(), b.fuses(), b.checklist())
	add(b.testPoints(), b.matrix(), b.faultFinding(), b.curves(), b.workings(), b.redLine())
	b.keys = []contentLine{{keyCover, "Cover"}}
	for _, s := range out[1:] {
		if last := b.keys[len(b.keys)-1]; last.key == s.key {
			continue
		}
		title := s.title
		if s.key == keySchematic {
			title = fmt.Sprintf("Schematic, %s %s", counted(len(b.drawings), "sheet"), b.drawings[0].Paper.Name)
		}
		b.keys = append(b.keys, contentLine{s.key, title})
	}
	out[0] = b.cover()
	return out
}

// size is the trimmed size of a section's sheets.
func (b *book) size(s *section) (w, h float64) {
	switch {
	case s.drawing != nil:
		return s.drawing.Paper.W, s.drawing.Paper.H
	case s.side:
		return b.sidePg.w, b.sidePg.h
	}
	return b.pg.w, b.pg.h
}

func sortedKeys(m map[string]bool) []string {
	var out []string
	for k := range m {
		out = append(out, k)
	}
	slices.Sort(out)
	return out
}
