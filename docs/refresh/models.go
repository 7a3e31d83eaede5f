package main

import (
	"bytes"
	"fmt"

	"gloamwright/internal/network"
)

// models writes the device models of the network, so that results.json can be solved
// again by other means.
func models() []byte {
	var b bytes.Buffer
	b.WriteString("# Device models\n\nThe laws by which the circuit is solved. `results.json` lists every element with its model, its nets and its numbers under `network`; with the\npositions and voltages under `conditions` anyone can check or repeat the solution. Voltages are against net 0, L−.\n")
	for _, m := range network.Models() {
		fmt.Fprintf(&b, "\n## %s\n\n%s\n\nPins:", m.Name, m.Doc)
		for i, p := range m.Pins {
			if i > 0 {
				b.WriteString(",")
			}
			fmt.Fprintf(&b, " `%s`", p.Name)
			if p.Optional {
				b.WriteString(" (may be left out)")
			}
		}
		fmt.Fprintf(&b, ".\n\nLaw: %s\n\nSource: %s.\n", m.Law, m.Source)
		if m.Memory != "" {
			fmt.Fprintf(&b, "\nPositions: %s.\n", m.Memory)
		}
		if len(m.Params) == 0 {
			continue
		}
		b.WriteString("\n| number | unit | without it | what it is |\n|---|---|---|---|\n")
		for _, p := range m.Params {
			def := fmt.Sprintf("%g", p.Default)
			if p.Required {
				def = "required"
			}
			fmt.Fprintf(&b, "| `%s` | %s | %s | %s |\n", p.Name, p.Unit, def, p.Doc)
		}
	}
	return b.Bytes()
}
