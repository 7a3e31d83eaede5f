package packet

import (
	"strings"

	"gloamwright/layout/ink"
)

// writtenOn lists the texts of a sheet in the order in which they were drawn.
func writtenOn(r *ink.Recorder) []ink.Written {
	var out []ink.Written
	var walk func([]ink.Call)
	walk = func(calls []ink.Call) {
		for _, c := range calls {
			switch c := c.(type) {
			case ink.Written:
				out = append(out, c)
			case ink.Grouped:
				walk(c.Calls)
			}
		}
	}
	walk(r.Calls)
	return out
}

// sheetsOf are the recordings of the sheets of a section.
func sheetsOf(p *Packet, key string) []*ink.Recorder {
	var out []*ink.Recorder
	for i, s := range p.plans {
		if s.s.key == key {
			out = append(out, p.recorders[i])
		}
	}
	return out
}

// textOf is everything that is written on a section's sheets, with plain spaces.
func textOf(p *Packet, key string) string {
	var b strings.Builder
	for _, r := range sheetsOf(p, key) {
		for _, w := range writtenOn(r) {
			b.WriteString(w.Text)
			b.WriteByte(' ')
		}
	}
	return strings.Join(strings.Fields(strings.ReplaceAll(b.String(), noBreak, " ")), " ")
}

// countOf counts the texts of a section by what they say.
func countOf(p *Packet, key string) map[string]int {
	out := map[string]int{}
	for _, r := range sheetsOf(p, key) {
		for _, w := range writtenOn(r) {
			out[w.Text]++
		}
	}
	return out
}
