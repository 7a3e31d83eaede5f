package release

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
)

// settingNames lists, by part kind, the values that a technician sets on the part that
// is there; any other value belongs to the part.
var settingNames = map[string][]string{
	string(circuit.ChargerUnit): {"float", "boost"},
	string(circuit.CutOff):      {"opens", "recloses"},
	string(circuit.PhotoSwitch): {"dark", "light"},
}

func (p *recordPart) setting(name string) bool { return slices.Contains(settingNames[p.Kind], name) }

// parts finds the parts to fit, to change and to remove. Fuses are found apart.
func (c *comparison) parts() {
	oldLamps, nowLamps := lampsOf(c.old), lampsOf(c.now)
	pairs(fitted(c.old), fitted(c.now), func(p *recordPart) string { return p.Designation }, func(o, n *recordPart) {
		switch {
		case o == nil:
			c.do(design.WorkItem{Tool: design.Replace, Do: "Fit the new " + n.name(), Is: n.all()}, n.Designation)
		case n == nil:
			c.do(design.WorkItem{Tool: design.Replace, Do: "Remove the " + o.name(), Was: o.all()}, o.Designation)
		default:
			was, is := differing(o, n)
			if was == "" && is == "" {
				was, is = differingLamps(oldLamps[o.Designation], nowLamps[n.Designation])
			}
			if was != "" || is != "" {
				c.do(design.WorkItem{Tool: design.Replace, Do: "Fit the new " + n.name() + "; remove the old", Was: was, Is: is}, n.Designation)
			}
		}
	})
}

// fitted returns the parts of a record that are fitted one by one, without fuses.
func fitted(r *record) []recordPart {
	var out []recordPart
	for _, p := range r.Parts {
		if p.fitted() && p.Kind != string(circuit.Fuse) {
			out = append(out, p)
		}
	}
	return out
}

func lampsOf(r *record) map[string]*recordLamp {
	out := map[string]*recordLamp{}
	for i := range r.Luminaires {
		out[r.Luminaires[i].Designation] = &r.Luminaires[i]
	}
	return out
}

// name says what a part is, within a sentence.
func (p *recordPart) name() string {
	switch p.Kind {
	case string(circuit.LuminaireLamp):
		return "light"
	case string(circuit.Terminal):
		return "terminal"
	}
	short, _, _ := strings.Cut(p.Description, ",")
	return lower(short)
}

func lower(s string) string {
	if len(s) > 1 && strings.ToUpper(s[1:2]) == s[1:2] {
		return s // an abbreviation
	}
	return strings.ToLower(s[:min(1, len(s))]) + s[min(1, len(s)):]
}

// all prints the values that belong to a part.
func (p *recordPart) all() string {
	var out []string
	for _, name := range circuit.SortedKeys(p.Values) {
		if !p.setting(name) {
			out = append(out, p.Values[name].Text)
		}
	}
	return strings.Join(out, ", ")
}

// differing prints the values that differ and belong to the part; both are empty if
// the part that is there serves. What a luminaire type is called makes no difference.
func differing(o, n *recordPart) (was, is string) {
	names := map[string]bool{}
	for name := range o.Values {
		names[name] = true
	}
	for name := range n.Values {
		names[name] = true
	}
	var before, after []string
	for _, name := range circuit.SortedKeys(names) {
		a, b := o.Values[name].Text, n.Values[name].Text
		if a == b || n.setting(name) {
			continue
		}
		if a != "" {
			before = append(before, a)
		}
		if b != "" {
			after = append(after, b)
		}
	}
	if len(before)+len(after) > 0 {
		return strings.Join(before, ", "), strings.Join(after, ", ")
	}
	if o.Kind != n.Kind || o.Description != n.Description && n.Kind != string(circuit.LuminaireLamp) {
		return o.Description, n.Description
	}
	if o.Requirement != n.Requirement {
		return pickText(o.Requirement), pickText(n.Requirement)
	}
	return "", ""
}

func pickText(requirement string) string {
	if requirement == "" {
		return "nothing further required"
	}
	return requirement
}

// differingLamps compares what the values of a luminaire's part do not hold.
func differingLamps(o, n *recordLamp) (was, is string) {
	if o == nil || n == nil {
		return "", ""
	}
	a, b := o.text(), n.text()
	if a == b {
		return "", ""
	}
	return a, b
}

func (l *recordLamp) text() string {
	return fmt.Sprintf("%s, %.4g W, %.4g V to %.4g V", l.Kind, l.Power, l.Low, l.High)
}
