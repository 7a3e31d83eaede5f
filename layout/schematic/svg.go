package schematic

import (
	"fmt"

	"gloamwright/layout/ink"
)

// SVG is the sheet as a file of its own. Its links lead to the other sheets' files.
func (s *Sheet) SVG() ([]byte, error) {
	c := ink.NewSVG(s.Paper.W, s.Paper.H, s.caption(), s.description())
	s.Draw(c, Options{})
	return c.Output()
}

// caption is the sheet's title for a window or a screen reader.
func (s *Sheet) caption() string {
	return fmt.Sprintf("%s: %s, sheet %d of %d", s.Title, s.Supplement, s.Number, len(s.book.sheets))
}

// description says in a sentence what the sheet shows.
func (s *Sheet) description() string {
	parts, points := 0, 0
	for _, o := range s.scene.objects {
		switch o.Class {
		case classPart:
			parts++
		case classTestPoint:
			points++
		}
	}
	return fmt.Sprintf("%s with %d symbols and %d test points.", s.Kind, parts, points)
}
