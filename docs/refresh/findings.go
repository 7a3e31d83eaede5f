package main

import (
	"bytes"
	"fmt"

	"gloamwright/internal/finding"
)

// findings writes the list of checks from the code.
func findings() []byte {
	var b bytes.Buffer
	b.WriteString("# Findings\n\nEvery check that the program runs on every job. A **stop** must not be built: the documents carry NOT FOR CONSTRUCTION and\n`issue` refuses. A **caution** needs care, a **note** is worth knowing. Each finding names the part, the place in the description,\nthe figure and the limit, the source, and a remedy with its own figure.\n")
	for _, c := range finding.All() {
		fmt.Fprintf(&b, "\n## %s: %s\n\n%s\n\nSource: %s.\n", c.Name, c.Title, c.Doc, c.Source)
	}
	return b.Bytes()
}
