package main

import (
	"bytes"
	_ "embed"
	"fmt"
	"regexp"
	"strings"

	"gloamwright/internal/design"
	"gloamwright/internal/sizing"
)

//go:embed methods-head.md
var methodsHead string

// methods writes the methods with their formulas and sources: the standing part, what
// the code says about itself, and the formulas of the workings of some designs.
func methods(designs []*design.Design) ([]byte, error) {
	var b bytes.Buffer
	b.WriteString(methodsHead)
	p, _, err := readPackage("internal/endurance", 0)
	if err != nil {
		return nil, err
	}
	_, text, _ := strings.Cut(p.Doc, "# Method\n")
	b.WriteString(markdown(p, text, 3) + "\n")

	p, set, err := readPackage("internal/sizing", 0)
	if err != nil {
		return nil, err
	}
	b.WriteString("\n## Methods of sizing\n\nEach is one function of `internal/sizing`; the text is its own. A figure in it without another source is of the publication named.\n")
	functions(&b, p, set)
	formulas(&b, designs)
	return b.Bytes(), nil
}

// subject is what makes the name of a working speak of one part only.
var subject = regexp.MustCompile(`-[A-Z]+[0-9]+(:[0-9]+)?|[0-9.]+ (mm²|AWG)|period [0-9]+`)

// formulas writes every formula that the workings of the designs show, each once.
func formulas(b *bytes.Buffer, designs []*design.Design) {
	b.WriteString("\n## Formulas as they are printed\n\nThe workings of the packet, of results.json and of `gloamwright explain` show these formulas with their numbers put in. A pocket calculator gives each value;\na test does the same for all of them.\n")
	b.WriteString("\n| value | formula | unit | source |\n|---|---|---|---|\n")
	seen := map[string]bool{}
	for _, d := range designs {
		for _, w := range d.Workings {
			name := subject.ReplaceAllString(w.Name, "…")
			if key := name + "|" + w.Formula; !seen[key] {
				seen[key] = true
				fmt.Fprintf(b, "| %s | %s | %s | %s |\n", inCell(name), inCell(w.Formula), inCell(unitOf(w)), inCell(w.Source))
			}
		}
	}
}

func unitOf(w sizing.Working) string {
	if w.Unit == "" {
		return "1"
	}
	return w.Unit
}

// inCell keeps a text from ending a cell of a table.
func inCell(s string) string { return strings.ReplaceAll(s, "|", `\|`) }
