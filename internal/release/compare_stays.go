package release

import (
	"fmt"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
)

// stays counts what both records have and no work touches.
func (c *comparison) stays() {
	count := func(things, text string, labels []string, untouched func(string) bool) {
		if len(labels) == 0 {
			return
		}
		n := 0
		for _, l := range labels {
			if untouched(l) {
				n++
			}
		}
		c.out.Stays = append(c.out.Stays, design.Stay{Count: n, Of: len(labels), Things: things, Text: text})
	}
	physical := map[string]bool{} // touched by anything but a test
	for _, w := range c.out.Work {
		if w.Tool != design.TestAgain {
			for _, l := range w.Labels {
				physical[l] = true
			}
		}
	}
	idle := func(l string) bool { return !physical[l] }
	var cables, wires, fuses, lights, parts []string
	for _, w := range c.now.cables() {
		cables = append(cables, w.Label)
	}
	for _, w := range c.now.wires() {
		wires = append(wires, w.Number)
	}
	for _, f := range c.now.Fuses {
		fuses = append(fuses, f.Designation)
	}
	for _, p := range fitted(c.now) {
		switch p.Kind {
		case string(circuit.LuminaireLamp):
			lights = append(lights, p.Designation)
		case string(circuit.Terminal):
		default:
			parts = append(parts, p.Designation)
		}
	}
	cores := map[string][]string{}
	for _, w := range c.now.Conductors {
		cores[w.Run] = append(cores[w.Run], w.Number)
	}
	count("cables", "lengths, sizes, ends and labels", cables, func(l string) bool {
		for _, n := range cores[l] {
			if physical[n] {
				return false
			}
		}
		return idle(l)
	})
	count("wires", "sizes, ends and labels", wires, idle)
	count("fuses", "ratings and places", fuses, idle)
	count("lights", "kinds, places and labels", lights, idle)
	count("other parts", "values, settings and labels", parts, idle)
	if b, o := c.now.Battery, c.old.Battery; b != nil && o != nil && idle(b.Designation) {
		text := fmt.Sprintf("%.4g Ah still holds: %.3g Ah required", b.Capacity, b.Required)
		if was := fmt.Sprintf("%.3g", o.Required); was != fmt.Sprintf("%.3g", b.Required) {
			text += ", was " + was + " Ah"
		}
		c.out.Stays = append(c.out.Stays, design.Stay{Things: "Battery " + b.Designation, Text: text})
	}
	readings := 0
	shown := map[string]bool{}
	for _, k := range c.now.Conditions {
		shown[k.Name] = k.Number > 0
	}
	for _, t := range c.now.TestPoints {
		for k := range t.Readings {
			if shown[k] {
				readings++
			}
		}
	}
	if readings > 0 {
		c.out.Stays = append(c.out.Stays, design.Stay{
			Count: readings - len(c.out.Readings), Of: readings, Things: "readings",
			Text: fmt.Sprintf("bands as in revision %s; values as left stay valid", c.old.Job.Revision),
		})
	}
}
