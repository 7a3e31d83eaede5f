package release

import (
	"fmt"

	"gloamwright/internal/design"
	"gloamwright/internal/quantity"
)

// cables finds the cables to pull, to shorten, to move at their ends and to remove.
func (c *comparison) cables() {
	pairs(c.old.cables(), c.now.cables(), func(w *cable) string { return w.Label }, func(o, n *cable) {
		switch {
		case o == nil:
			c.do(design.WorkItem{Tool: design.ReCut, Do: "Pull the new cable", Is: c.cableText(n)}, n.Label)
		case n == nil:
			c.do(design.WorkItem{Tool: design.ReCut, Do: "Remove the cable", Was: c.cableText(o)}, o.Label)
		case !sameMake(o, n) || n.Cores[0].Length > o.Cores[0].Length:
			c.do(design.WorkItem{Tool: design.ReCut, Do: "Pull the new cable; remove the old", Was: c.cableText(o), Is: c.cableText(n)}, n.Label)
			c.touchCores(n)
		case n.Cores[0].Length < o.Cores[0].Length:
			c.do(design.WorkItem{Tool: design.ReCut, Do: "Shorten the cable", Was: c.length(o.Cores[0].Length), Is: c.length(n.Cores[0].Length)}, n.Label)
		}
		if o != nil && n != nil {
			pairs(o.Cores, n.Cores, func(w *recordWire) string { return w.Number }, func(a, b *recordWire) {
				if a != nil && b != nil && !c.out.Touched[b.Number] { // a cable pulled anew gets its ends with it
					c.ends(a, b)
				}
			})
		}
	})
}

// touchCores marks the cores of a cable that is pulled anew.
func (c *comparison) touchCores(w *cable) {
	for _, core := range w.Cores {
		c.out.Touched[core.Number] = true
	}
}

// sameMake reports whether the cable lying there can serve as the new one, its length
// left aside.
func sameMake(o, n *cable) bool {
	if len(o.Cores) != len(n.Cores) {
		return false
	}
	for i := range o.Cores {
		if o.Cores[i].Size != n.Cores[i].Size || o.Cores[i].Colour != n.Cores[i].Colour {
			return false
		}
	}
	return true
}

// pulled reports whether a cable that both records have is pulled anew.
func (c *comparison) pulled(o, n *cable) bool {
	return o != nil && n != nil && (!sameMake(o, n) || n.Cores[0].Length > o.Cores[0].Length)
}

// wires finds the single wires to make, to move at their ends and to remove.
func (c *comparison) wires() {
	pairs(c.old.wires(), c.now.wires(), func(w *recordWire) string { return w.Number }, func(o, n *recordWire) {
		switch {
		case o == nil:
			c.do(design.WorkItem{Tool: design.ReCut, Do: fmt.Sprintf("Fit the new wire from %s to %s", n.From, n.To), Is: c.wireText(n)}, n.Number)
		case n == nil:
			c.do(design.WorkItem{Tool: design.ReCut, Do: fmt.Sprintf("Remove the wire from %s to %s", o.From, o.To), Was: c.wireText(o)}, o.Number)
		case o.Size != n.Size || o.Colour != n.Colour || o.Length != n.Length:
			c.do(design.WorkItem{Tool: design.ReCut, Do: "Fit the new wire; remove the old", Was: c.wireText(o), Is: c.wireText(n)}, n.Number)
		default:
			c.ends(o, n)
		}
	})
}

func (c *comparison) wireText(w *recordWire) string {
	return fmt.Sprintf("%s %s, %s", w.Size, w.Colour, c.length(w.Length))
}

// cableText returns the make of a cable: "2 × 1.5 mm², 9 m".
func (c *comparison) cableText(w *cable) string {
	return fmt.Sprintf("%d × %s, %s", len(w.Cores), w.Cores[0].Size, c.length(w.Cores[0].Length))
}

// length prints a length of a record, m.
func (c *comparison) length(m float64) string { return c.names.lengths.Format(quantity.Metre(m)) }

// ends finds conductors that stay as they are but end elsewhere.
func (c *comparison) ends(o, n *recordWire) {
	for _, e := range [][2]string{{o.From, n.From}, {o.To, n.To}} {
		was, is := e[0], e[1]
		if was == is {
			continue
		}
		do := "Move one end"
		if a, b := partOf(was), partOf(is); a != b && was[len(a):] == is[len(b):] {
			do, was, is = "Move one end, to the same mark", a, b
		}
		c.do(design.WorkItem{Tool: design.ReTerminate, Do: do, Was: was, Is: is}, n.Number)
	}
}
