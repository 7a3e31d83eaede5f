package main

import (
	"bytes"
	_ "embed"
	"fmt"
	"strings"

	"gloamwright/internal/describe"
	"gloamwright/internal/stage"
)

//go:embed description-head.md
var descriptionHead string

// description writes the reference of the description language: the standing part,
// then every stage and luminaire kind as the program knows it.
func description() []byte {
	var b bytes.Buffer
	before, after, _ := strings.Cut(descriptionHead, "PRICED THINGS\n")
	b.WriteString(before)
	priced(&b)
	b.WriteString(after)
	s := stage.Schema()
	b.WriteString("\n## Stage kinds\n")
	for _, k := range s.Stages {
		kind(&b, k)
	}
	b.WriteString("\n## Luminaire kinds\n")
	for _, k := range s.Luminaires {
		kind(&b, k)
	}
	if len(s.Parts) > 0 {
		b.WriteString("\n## Single parts\n")
		for _, k := range s.Parts {
			kind(&b, k)
		}
	}
	return b.Bytes()
}

// priced writes the table of what can have a price.
func priced(b *bytes.Buffer) {
	b.WriteString("| such as | what stands behind the word | what it is | takes part in a choice |\n|---|---|---|---|\n")
	for _, t := range describe.PricedThings() {
		follows, chooses := t.Follows, "–"
		if follows == "" {
			follows = "–"
		}
		if t.Chooses {
			chooses = "yes"
		}
		fmt.Fprintf(b, "| `%s` | %s | %s | %s |\n", t.Example, follows, t.Doc, chooses)
	}
}

func kind(b *bytes.Buffer, k describe.Kind) {
	fmt.Fprintf(b, "\n### %s\n\n%s\n", k.Name, k.Doc)
	if len(k.Ports) > 0 {
		b.WriteString("\nPorts:")
		for i, p := range k.Ports {
			sep := ";"
			if i == 0 {
				sep = ""
			}
			way := "gives"
			if p.Sink {
				way = "takes"
			}
			fmt.Fprintf(b, "%s `%s` (%s; %s)", sep, p.Name, way, p.Doc)
		}
		b.WriteString(".\n")
	}
	b.WriteString("\n| key | holds | without it | what it is |\n|---|---|---|---|\n")
	for _, f := range k.Fields {
		without := f.Default
		switch {
		case f.Required:
			without = "required"
		case without == "":
			without = "–"
		}
		holds := f.Type.String()
		if len(f.Choices) > 0 {
			holds = strings.Join(f.Choices, ", ")
		}
		if f.Min != "" && f.Max != "" {
			holds += fmt.Sprintf(", %s to %s", f.Min, f.Max)
		}
		fmt.Fprintf(b, "| `%s` | %s | %s | %s |\n", f.Name, holds, without, f.Doc)
	}
}
