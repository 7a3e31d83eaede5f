package schematic

import (
	"gloamwright/layout/ink"
	"gloamwright/layout/sheet"
)

// notForConstruction is what sheets carry while a stop finding stands.
const notForConstruction = "NOT FOR CONSTRUCTION"

// drawFrame draws frame, zones, title block, scale bar, cautions and notes.
func (s *Sheet) drawFrame(c ink.Canvas, o Options) {
	d := s.book.d
	b := sheet.TitleBlock{Supplement: s.Supplement, Status: "Draft", Type: s.Kind, Language: "en", Class: "SELV",
		Sheet: o.Number, Of: o.Of, Firm: s.Firm}
	if d.Site != nil {
		j := d.Site.Job
		b.Owner, b.Title, b.ID = j.Client.Val, j.Title.Val, j.Number.Val+"-E"
		b.Creator, b.Reference = j.Prepared.Val, j.Prepared.Val
		b.Date, b.Revision = j.Date.Val, j.Revision.Val
	}
	if d.Issued {
		b.Status = "Issued"
	}
	if !d.ForConstruction() {
		b.Warning = notForConstruction
	}
	s.Paper.Draw(c, b)
	// The notes were tried when the sheet was made; they fit.
	_, _ = s.Paper.DrawNotes(c, s.cautions, s.notes)
}
