package network

import (
	"fmt"
	"strings"
)

// referenceShapes are the functions that the laws use.
const referenceShapes = "Every law gives the currents of an element from the voltages v of its nets against net 0. " +
	"Where a law names pins 1 and 2 or + and −, v alone is the voltage of the first pin against the second.\n\n" +
	"Every net has besides 1 TΩ to net 0. A faulty element that is open carries no current; a shorted one has 1 mΩ between its two pins.\n\n" +
	"Corners are rounded so that slopes are continuous:\n\n" +
	"- round(u, w) is 0 for u ≤ −w, (u + w)²/(4·w) for −w < u < w, and u for u ≥ w;\n" +
	"- clamp(u, a, b, w) = a + round(u − a, w) − round(u − b, w);\n" +
	"- min(a, b, w) = a − round(a − b, w);\n" +
	"- fade(v, full) is 0 for v ≤ 0, 3t² − 2t³ with t = v/full between, and 1 for v ≥ full;\n" +
	"- joint: the cubic that has the value and the slope of the law at both ends of a stretch.\n\n"

// Reference returns the reference of all models in Markdown: pins, parameters with
// units and defaults, law, source.
func Reference() string {
	var b strings.Builder
	b.WriteString(referenceShapes)
	for _, m := range Models() {
		fmt.Fprintf(&b, "## %s\n\n%s\n\n", m.Name, m.Doc)
		var names []string
		for _, p := range m.Pins {
			name := "`" + p.Name + "`"
			if p.Optional {
				name += " (may be left out)"
			}
			names = append(names, name)
		}
		fmt.Fprintf(&b, "Pins: %s.\n\n", strings.Join(names, ", "))
		if len(m.Params) > 0 {
			b.WriteString("| parameter | unit | default | meaning |\n|---|---|---|---|\n")
		}
		for _, p := range m.Params {
			def := fmt.Sprintf("%.4g", p.Default)
			switch {
			case p.Required:
				def = "required"
			case p.Min > 0 && p.Default < p.Min:
				def = "–"
			}
			unit := p.Unit
			if unit == "" {
				unit = "1"
			}
			fmt.Fprintf(&b, "| `%s` | %s | %s | %s |\n", p.Name, unit, def, p.Doc)
		}
		if len(m.Params) > 0 {
			b.WriteString("\n")
		}
		fmt.Fprintf(&b, "Law: %s.\n\n", m.Law)
		if m.Memory != "" {
			on, off := m.positions()
			rest := off
			if m.rest {
				rest = on
			}
			fmt.Fprintf(&b, "Memory: %s or %s; at rest %s.\n\n", on, off, rest)
		}
		fmt.Fprintf(&b, "Source: %s.\n\n", m.Source)
	}
	return strings.TrimSuffix(b.String(), "\n")
}
