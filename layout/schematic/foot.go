package schematic

import (
	"fmt"
	"strconv"

	"gloamwright/internal/circuit"
	"gloamwright/internal/quantity"
	"gloamwright/internal/stage"
	"gloamwright/layout/ink"
)

// Rows of a board's foot below its top, in modules.
var footRows = [4]float64{2.1, 3.9, 5.7, 7.5}

// rowsShort is the number of rows of a sheet whose ways are short, three quarters of
// all: its foot stands higher, nearer to what it tells of. It stands in one of two
// places only, so that a luminaire more moves it rarely.
func (b *book) rowsShort() int { return (3*b.rows() + 3) / 4 }

// footTop is the upper edge of the foot of a board's sheet: under the last row.
func (b *book) footTop(s *boardSheet) float64 {
	for _, c := range s.columns {
		for _, p := range c.cores {
			for _, n := range p.pts {
				if n.Y > lampRow(b.rowsShort()-1) {
					return b.down(rowFoot)
				}
			}
		}
	}
	return float64(lampRow(b.rowsShort()))
}

// rowFoot is the foot's upper edge on a full sheet.
const rowFoot = 91

// foot prints what every way feeds.
func (b *book) foot(sh *Sheet, s *boardSheet, xs []int, end int) {
	o := sh.scene.object(classTable, "foot", "Ways of "+s.board.Title)
	top := b.footTop(s)
	o.add(segment(middlePen, colText, top, float64(end), top))
	for i, h := range []string{"Circuit", "Luminaires", "Lit when", "Far end"} {
		pen := thinPen
		if i == len(footRows)-1 {
			pen = middlePen
		}
		o.add(segment(pen, colText, top+footRows[i], float64(end), top+footRows[i]))
		o.add(textAt(colText, top+footRows[i]-0.5, h, valueStyle, ink.Start))
	}
	for i, c := range s.columns {
		x := float64(xs[i])
		room := float64(c.width) - 1.5
		for k, t := range b.footTexts(c) {
			st := valueStyle
			if k == 0 {
				st = nameStyle
			}
			o.add(textAt(x, top+footRows[k]-0.5, fit(t, st, room), st, ink.Start))
		}
	}
}

// footTexts are the four lines at the foot of a column.
func (b *book) footTexts(c *column) []string {
	w := c.way
	n := strconv.Itoa(w.Number) + " "
	switch {
	case w.Feeds != nil:
		t := []string{n + w.Feeds.Title, b.fuseLoad(w, b.boardWatt(w.Feeds)), "", ""}
		if tp := w.Feeds.TestPoint; tp != nil {
			t[3] = b.farVolts(tp)
		}
		return t
	case w.Lighting == nil:
		return []string{n + "spare"}
	}
	l := w.Lighting
	count := 0
	l.Walk(func(_, _ *circuit.Point) { count++ })
	load := strconv.Itoa(count)
	if s := b.fuseLoad(w, b.lightingWatt(l.Name)); s != "" {
		load += ", " + s
	}
	name := n + l.Name
	if c.kind == restColumn {
		name += ", continued"
	}
	t := []string{name, load, lit(l.Lit), ""}
	if l.TestPoint != nil {
		t[3] = b.farVolts(l.TestPoint)
	}
	return t
}

// fuseLoad is watts and amperes of a way.
func (b *book) fuseLoad(w *circuit.Way, watt quantity.Watt) string {
	if watt == 0 {
		return ""
	}
	s := watts(watt)
	for _, f := range b.d.Fuses {
		if f.Way == w && f.Design > 0 {
			s += fmt.Sprintf(", %.1f A", float64(f.Design))
		}
	}
	return s
}

// watts is a power as drawings print it: three figures.
func watts(w quantity.Watt) string { return quantity.Format(w, 3) }

func (b *book) lightingWatt(name string) quantity.Watt {
	var sum quantity.Watt
	for _, l := range b.d.Luminaires {
		if l.Circuit == name {
			sum += l.Watt
		}
	}
	return sum
}

func (b *book) boardWatt(bd *circuit.Board) quantity.Watt {
	var sum quantity.Watt
	for _, w := range bd.Ways {
		switch {
		case w.Lighting != nil:
			sum += b.lightingWatt(w.Lighting.Name)
		case w.Feeds != nil:
			sum += b.boardWatt(w.Feeds)
		}
	}
	return sum
}

// outageNight is the key of the condition that far-end readings are printed for.
const outageNight = "outage-night"

// farVolts is the typical reading at a far end in an outage at night.
func (b *book) farVolts(tp *circuit.TestPoint) string {
	if r := b.reading[tp]; r != nil {
		for i, c := range b.d.Conditions {
			if c.Key == outageNight && i < len(r.Bands) {
				return volts(r.Bands[i].Typical) + " at " + tp.Label
			}
		}
	}
	return "at " + tp.Label
}

// lampSymbol is the symbol of a luminaire type.
func (b *book) lampSymbol(name string) string {
	if k := b.lampKind(name); k != nil && k.Symbol != "" {
		return k.Symbol
	}
	return "lamp"
}

func (b *book) lampKind(name string) *stage.LuminaireKind {
	if b.d.Site == nil {
		return nil
	}
	for _, t := range b.d.Site.Luminaires {
		if t.Name.Val != name {
			continue
		}
		for _, k := range stage.LuminaireKinds() {
			if k.Name == t.Kind.Val {
				return k
			}
		}
	}
	return nil
}
