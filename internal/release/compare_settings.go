package release

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
)

// settings finds what is to be set on parts, whether they stay or are new, and the
// trimmers of stages whose other parts or thresholds changed.
func (c *comparison) settings() {
	pairs(c.old.Parts, c.now.Parts, func(p *recordPart) string { return p.Designation }, func(o, n *recordPart) {
		if n == nil {
			return
		}
		for _, name := range circuit.SortedKeys(n.Values) {
			if !n.setting(name) {
				continue
			}
			was, is := "", n.Values[name].Text
			if o != nil {
				was = o.Values[name].Text
			}
			if c.replaced(n.Designation) {
				was = "" // the new one comes with another, or none
			}
			if was != is {
				c.do(design.WorkItem{Tool: design.Adjust, Do: "Set it: " + settingWords[name], Was: figureOf(was), Is: figureOf(is)}, n.Designation)
			}
		}
		if trims(n) {
			c.trimmer(n)
		}
	})
}

// settingWords says what a setting is.
var settingWords = map[string]string{
	"float": "float voltage", "boost": "boost voltage", "opens": "opens at", "recloses": "recloses at",
	"dark": "dark below", "light": "light above",
}

// figureOf drops the word in front of a setting: "float 27.3 V".
func figureOf(text string) string {
	return strings.TrimSpace(strings.TrimLeft(text, "abcdefghijklmnopqrstuvwxyz"))
}

func trims(p *recordPart) bool {
	return p.Kind == string(circuit.Preset) || p.Kind == string(circuit.Potentiometer)
}

// trimmer finds whether a trimmer must be turned: a part of its stage is another one,
// or the value that it sets, as far as two digits tell, has moved.
func (c *comparison) trimmer(p *recordPart) {
	moved := c.replaced(p.Designation)
	for _, q := range c.now.Parts {
		if q.Stage == p.Stage && q.Kind != string(circuit.Terminal) && q.Kind != string(circuit.Fuse) && c.replaced(q.Designation) {
			moved = true
		}
	}
	was, is := "", ""
	if c.senses(p.Stage) {
		was, is = twilight(c.old), twilight(c.now)
		moved = moved || was != is
	}
	if moved {
		c.do(design.WorkItem{Tool: design.Adjust, Do: "Turn it to its setting", Was: was, Is: is}, p.Designation)
	}
}

// replaced reports whether the part of that label is fitted new.
func (c *comparison) replaced(label string) bool {
	return slices.ContainsFunc(c.work[design.Replace], func(w design.WorkItem) bool {
		return len(w.Labels) == 1 && w.Labels[0] == label
	})
}

// senses reports whether a stage has a light sensor.
func (c *comparison) senses(stage string) bool {
	return slices.ContainsFunc(c.now.Parts, func(p recordPart) bool { return p.Stage == stage && p.Kind == string(circuit.LDR) })
}

// twilight prints the illuminance at which the lights come on.
func twilight(r *record) string {
	for _, t := range r.Thresholds {
		if t.Key == "dark" {
			return fmt.Sprintf("dark below %.2g %s", t.Value, t.Unit)
		}
	}
	return ""
}
