package release

import (
	"slices"

	"gloamwright/internal/circuit"
	"gloamwright/internal/design"
)

// labels finds the labels to print and to take off. A cable that is pulled anew needs
// its labels anew as well.
func (c *comparison) labels() {
	l := c.out
	pairs(c.old.Parts, c.now.Parts, func(p *recordPart) string { return p.Designation }, func(o, n *recordPart) {
		switch {
		case o == nil && n.fitted():
			l.New.Parts = append(l.New.Parts, n.Designation)
			c.label("Fit the label: "+kindWord(n), n.Designation)
		case n == nil && o.fitted():
			l.Gone.Parts = append(l.Gone.Parts, o.Designation)
			c.unlabel(o.Designation)
		}
	})
	pairs(c.old.cables(), c.now.cables(), func(w *cable) string { return w.Label }, func(o, n *cable) {
		switch {
		case n == nil:
			l.Gone.Cables = append(l.Gone.Cables, o.Label)
			c.unlabel(o.Label)
			for _, core := range o.Cores {
				l.Gone.Wires = append(l.Gone.Wires, core.Number)
				c.out.Touched[core.Number] = true
			}
		case o == nil || c.pulled(o, n):
			l.New.Cables = append(l.New.Cables, n.Label)
			c.label("Fit flags at both ends, sleeves on the cores", n.Label)
			for _, core := range n.Cores {
				l.New.Wires = append(l.New.Wires, core.Number)
			}
			c.touchCores(n)
		}
	})
	pairs(c.old.wires(), c.now.wires(), func(w *recordWire) string { return w.Number }, func(o, n *recordWire) {
		switch {
		case n == nil:
			l.Gone.Wires = append(l.Gone.Wires, o.Number)
		case o == nil || o.Size != n.Size || o.Colour != n.Colour || o.Length != n.Length:
			l.New.Wires = append(l.New.Wires, n.Number)
			c.label("Fit sleeves at both ends", n.Number)
		}
	})
	pairs(c.old.TestPoints, c.now.TestPoints, func(t *recordPoint) string { return t.Label }, func(o, n *recordPoint) {
		switch {
		case o == nil:
			l.New.Points = append(l.New.Points, n.Label)
			c.do(design.WorkItem{Tool: design.Relabel, Do: "Fit the dot", Is: n.Terminal}, n.Label)
		case n == nil:
			l.Gone.Points = append(l.Gone.Points, o.Label)
			c.unlabel(o.Label)
		case o.Terminal != n.Terminal:
			c.do(design.WorkItem{Tool: design.Relabel, Do: "Move the dot", Was: o.Terminal, Is: n.Terminal}, n.Label)
		}
	})
	for _, list := range []*design.LabelList{&l.New, &l.Gone} {
		for _, s := range [][]string{list.Parts, list.Cables, list.Wires, list.Points} {
			slices.SortFunc(s, compareLabels)
		}
	}
}

func kindWord(p *recordPart) string {
	switch p.Kind {
	case string(circuit.Terminal):
		return "tag at the terminal"
	case string(circuit.LuminaireLamp):
		return "at the light"
	}
	return "beside the device"
}

func (c *comparison) label(do, label string) {
	c.do(design.WorkItem{Tool: design.Relabel, Do: do}, label)
}

func (c *comparison) unlabel(label string) { c.label("Take the label off", label) }
