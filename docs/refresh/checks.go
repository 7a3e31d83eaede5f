package main

import (
	"bytes"
	"fmt"
	"strconv"

	networked "gloamwright/internal/network/published"
	"gloamwright/internal/sizing/published"
)

// digits is how many digits of our figure stand beside a printed one.
const digits = 6

// checks writes every external check: a printed figure and the program's own.
func checks() ([]byte, error) {
	var b bytes.Buffer
	list := published.All()
	examples := map[string]bool{}
	for _, c := range list {
		examples[c.ID] = true
	}
	circuits := networked.All()
	b.WriteString("# External checks\n\nWorked examples and tables that other people have printed, beside what this program's own functions give with the example's own constants. The tests run every\none: a figure of a sizing method must round to the printed answer, one of a solved circuit lie within what the printed digits leave.\n\n**read**: on the page, or one that reproduces it. **read in a companion archive**: in an archive of the book's solved examples, not on the printed page.\n**from memory**: not read.\n")
	fmt.Fprintf(&b, "\n%d examples and tables with %d figures for the sizing methods, %d circuits for the solver.\n", len(examples), len(list), len(circuits))
	b.WriteString("\nBesides: preferred values and tables against their standards in the tests of `internal/catalogue`; every condition of every example solved a second time by\na dense root finder that shares no code with the solver and reads results.json alone; random networks against gonum's dense solution; superposition,\nreciprocity and power balance on random networks.\n")
	b.WriteString("\n## Sizing methods\n")
	topic := ""
	for _, c := range list {
		if c.Topic != topic {
			topic = c.Topic
			fmt.Fprintf(&b, "\n### %s\n\n| what | source | | ours | theirs | unit |\n|---|---|---|---|---|---|\n", topic)
		}
		fmt.Fprintf(&b, "| %s | %s | %s | %s | %s | %s |\n", inCell(c.Quantity), inCell(c.Source), c.Seen, number(c.Ours()), c.Printed, inCell(c.Unit))
	}
	b.WriteString("\n## Circuits\n\nThe last column is how far ours may be off by the printed digits and the example's own roundings.\n\n| what | source | | ours | theirs | unit | within |\n|---|---|---|---|---|---|---|\n")
	for _, e := range circuits {
		r, err := e.Solve()
		if err != nil {
			return nil, err
		}
		for _, p := range e.Reads {
			fmt.Fprintf(&b, "| %s | %s | %s | %s | %s | %s | %.2g |\n", inCell(p.What), inCell(e.Source), e.Seen, number(p.Ours(r)), number(p.Value), p.Unit(), p.Tolerance)
		}
	}
	return b.Bytes(), nil
}

func number(v float64) string { return strconv.FormatFloat(v, 'g', digits, 64) }
