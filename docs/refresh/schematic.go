package main

import (
	"bytes"
	"fmt"
	"path/filepath"
	"strings"

	"gloamwright/internal/job"
	"gloamwright/layout/ink"
	"gloamwright/layout/schematic"
	"gloamwright/layout/schematic/audit"
)

// drawings writes the rules that every sheet is held to and the quality numbers of the
// sheets of the examples and starters.
func drawings() ([]byte, error) {
	var b bytes.Buffer
	b.WriteString(`# The schematic's quality

Both lists are read from the finished drawing: a reader that shares no code with the layout recognises the symbols by their strokes and follows the lines as a
person would.

## Rules

A sheet that breaks one is not delivered. The tests hold the sheets of all examples, all starters and 200 generated sites to them, as drawn and as written to the
files, and damage copies of the sheets in every way to see that the reader finds it.

| rule | asks for |
|---|---|
`)
	for _, r := range audit.Rules {
		fmt.Fprintf(&b, "| %s | %s |\n", r.Rule, r.What)
	}
	b.WriteString(`
## Numbers

How well a sheet reads. The score of a sheet is the sum of weight times distance over the numbers; the distance of a number from its target is the part by which it
exceeds its limit or falls short of it, divided by the limit, and 0 within. 0 is a sheet that meets every target. A test fails if the score of a sheet below grows by
more than 2 %. Targets and weights are common practice; crossings weigh most, as readers trip over them most (Purchase 1997).

| | number | target | weight |
|---|---|---|---|
`)
	for _, t := range audit.Targets {
		fmt.Fprintf(&b, "| %s | %s | %s | %g |\n", t.Symbol, t.Meaning, t.Limit, t.Weight)
	}
	b.WriteString(`
- **X** Lines that cross without a joint. Left out, and counted under *rails* and *pairs*, are two that the form of a sheet brings: leads over rails and bars, which run the
  width of what hangs on them; and on a board's sheet the L+ core of a side run over the L− core of the pair that it leaves. Three pairs of cores that meet at the
  two terminals of a luminaire, two of them going down side by side, cannot be drawn without one core passing over its neighbour. A crossing too many on a board's
  sheet, where the limit is 0, counts as a third: the limit of the other sheets.
- **B** Corners without a joint, over the lines between neighbouring ends: pins, dots, test points, references, ends of rails. A corner between two pins that face one
  another, parts in series in a branch between the rails, counts a second time.
- **Lr** For up to three ends half the perimeter of their box is the least length that joins them; for more, where nothing is that short, the shortest tree from end to end
  stands in its place. Nets of rails and bars are left out: their length would hide the rest.
- **A** Symbols that have a peer on the sheet: one of the same class letter that stands the same way. A symbol is in line if it is on the level of another that stands the same
  way, or over or under another on one upright; not if it misses the row of a peer of its stage by less than a symbol's height.
- **F** References from stage to stage in the description, as the energy or the signal goes, to the stages of the sheet.
- **U** The box around circuit and tables. Rails and leads that go on elsewhere reach the edge wherever the rest stands: their width does not count, nor do notes and title
  block. A board of one way, or the rest of a circuit, does not fill a sheet. The shape is width over height, against the same of the field.
- **R** The two cores of a cable are one reference.
- **K** Labels are the texts outside tables and notes. Most have a place kept for them; the others take the first place that is free.
- **Y** Stages of the same kind and parts, and circuits of the same tree and luminaire kinds, of the whole set, drawn as the first of them.

| description | sheet |`)
	for _, t := range audit.Targets {
		fmt.Fprintf(&b, " %s |", t.Symbol)
	}
	b.WriteString(" rails | pairs | shape | score |\n|---|---|" + strings.Repeat("---|", len(audit.Targets)+4) + "\n")
	for _, pattern := range []string{"examples/*.yaml", "templates/starters/*.yaml"} {
		names, err := filepath.Glob(pattern)
		if err != nil {
			return nil, err
		}
		for _, name := range names {
			if err := sheetRows(&b, name); err != nil {
				return nil, fmt.Errorf("%s: %w", name, err)
			}
		}
	}
	return b.Bytes(), nil
}

// sheetRows writes a row for each circuit sheet of a description.
func sheetRows(b *bytes.Buffer, name string) error {
	d, err := job.Load(name, nil)
	if err != nil {
		return err
	}
	sheets, err := schematic.Sheets(d)
	if err != nil {
		return err
	}
	var list []audit.Sheet
	for _, s := range sheets {
		r := ink.NewRecorder(s.Paper.W, s.Paper.H, s.Supplement)
		s.Draw(r, schematic.Options{})
		if err := r.Err(); err != nil {
			return err
		}
		list = append(list, audit.Sheet{Number: s.Number, Page: audit.FromRecorder(r), Format: s.Paper, Circuit: s.Circuit(), Moved: s.Moved()})
	}
	for _, q := range audit.Measure(list, audit.FromDesign(d)) {
		fmt.Fprintf(b, "| %s | %d %s |", strings.TrimSuffix(filepath.Base(name), ".yaml"), q.Sheet, sheets[q.Sheet-1].Supplement)
		for _, t := range audit.Targets {
			fmt.Fprintf(b, " %s |", t.Print(q))
		}
		fmt.Fprintf(b, " %d | %d | %.2f | %.2f |\n", q.OverRails, q.Leaving, q.Aspect, q.Score())
	}
	return nil
}
