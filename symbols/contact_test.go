package symbols

import (
	"bytes"
	"flag"
	"os"
	"path/filepath"
	"testing"

	"gloamwright/layout/ink"
)

var update = flag.Bool("update", false, "write the pictures anew")

// TestContactSheet keeps docs/symbols.svg true: a change of any symbol shows
// there, to be looked at before it is written with -update.
func TestContactSheet(t *testing.T) {
	var s *ink.SVG
	contactSheet(func(w, h float64) ink.Canvas {
		s = ink.NewSVG(w, h, "Symbols", "Every symbol of the catalogue, upright and level, on the grid of 2.5 mm")
		return s
	})
	got, err := s.Output()
	if err != nil {
		t.Fatal(err)
	}
	file := filepath.Join("..", "docs", "symbols.svg")
	if *update {
		if err := os.WriteFile(file, got, 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(got, want) {
		t.Error("docs/symbols.svg is not what the symbols draw; look at the change, then run with -update")
	}
}

// The cells of the contact sheet, in modules.
const (
	cellWidth  = 42
	cellHeight = 13
	columns    = 4
)

// sampleMarks fill the slots of symbols that have one.
var sampleMarks = map[string]string{"signal_lamp": "GN", "luminaire_tube": "LED", "cable_oval": "-W1"}

// contactSheet draws every symbol of the catalogue upright and level over the
// grid, with its ID.
func contactSheet(newCanvas func(w, h float64) ink.Canvas) {
	all := append(All(),
		Converter(3, false, []Pole{{"L", -2}, {"N", 0}, {"PE", 2}}, []Pole{{"+", -2}, {"-", 2}}),
		Converter(5, true, []Pole{{"L", -4}, {"N", -2}, {"PE", 4}}, []Pole{{"+", -4}, {"θ+", -2}, {"θ-", 2}, {"-", 4}}))
	rows := (len(all) + columns - 1) / columns
	c := newCanvas(columns*cellWidth*M, float64(rows*cellHeight)*M)
	for d := Up; d <= Right; d++ {
		at := ink.Point{X: M * (float64(columns-2)*cellWidth + 10 + 12*float64(d)), Y: M * (float64(rows*cellHeight) - cellHeight/2)}
		Probe(c, at, d, ink.Pen{Width: 0.25, Color: ink.Black}, "TP12")
	}
	for i, s := range all {
		column, row := i%columns*cellWidth, i/columns*cellHeight
		c.Group(ink.Object{ID: s.ID, Class: "symbol", Title: s.Name}, func() { contactCell(c, s, column, row) })
	}
}

func contactCell(c ink.Canvas, s *Symbol, column, row int) {
	pen := ink.Pen{Width: 0.25, Color: ink.Black}
	grid := ink.Pen{Width: 0.05, Color: ink.Rule}
	var lines ink.Path
	for x := 1; x < cellWidth-16; x++ {
		lines.Move(M*float64(column+x), M*float64(row+1)).Line(M*float64(column+x), M*float64(row+cellHeight-1))
	}
	for y := 1; y < cellHeight; y++ {
		lines.Move(M*float64(column+1), M*float64(row+y)).Line(M*float64(column+cellWidth-17), M*float64(row+y))
	}
	c.Stroke(&lines, grid)
	turns := []Turn{V, H}
	if s.Turns == Fixed {
		turns = turns[:1]
	}
	for i, t := range turns {
		x, y := column+7+i*12, row+cellHeight/2
		s.Draw(c, On(x, y, t), pen, sampleMarks[s.ID])
		for _, p := range s.PinsAt(t) {
			c.Fill(new(ink.Path).Circle(ink.Point{X: M * float64(x+p.X), Y: M * float64(y+p.Y)}, 0.4), ink.Dusk)
		}
	}
	at := func(y float64) ink.Point {
		return ink.Point{X: M * float64(column+cellWidth-15), Y: M * (float64(row) + y)}
	}
	c.Text(at(3), s.ID, ink.Lettering(ink.Medium, 2.5), ink.Start, ink.Black, false)
	c.Text(at(4.8), s.Name, ink.Lettering(ink.Regular, 1.8), ink.Start, ink.Black, false)
	c.Text(at(6.4), s.Letter+"  "+s.IEC, ink.Lettering(ink.Regular, 1.8), ink.Start, ink.Mid, false)
}
