package stage

import (
	"slices"

	"gloamwright/internal/circuit"
)

// hostWidth is the widest sketch that takes a test point in: the sheet holds it still.
const hostWidth = 40

// hosted draws the test points of a rail beside a stage that is on that rail already, and
// reports whether it did: a block of their own would be an empty frame.
func (x *singles) hosted(g *group) bool {
	if len(g.list) > 0 || slices.ContainsFunc(g.nets, func(n *net) bool { return n.free() || len(n.ends) > 0 || x.host(n) == nil }) {
		return false
	}
	for _, n := range g.nets {
		host := x.host(n)
		x.b.cur, x.b.sk = host, host.Sketch
		host.Sketch.Width = x.alone(n, host.Sketch.Width)
	}
	return true
}

// leavesRight reports whether something of a sketch goes on beyond its right edge: a port,
// a lead or a cable to the stage beside it.
func leavesRight(k *circuit.Sketch) bool {
	return slices.ContainsFunc(k.Items, func(it circuit.SketchItem) bool {
		return it.Op == circuit.OpRight || it.X >= float64(k.Width) || it.X2 >= float64(k.Width) ||
			slices.ContainsFunc(it.Pts, func(p [2]int) bool { return p[0] >= k.Width })
	})
}

// host is the first stage in the main cabinet, where the terminals of test points are,
// whose sketch has a lead to the net's rail and room beside it; nil if there is none.
func (x *singles) host(n *net) *circuit.Stage {
	rail := x.b.rails[n.rail]
	for _, s := range x.b.C.Stages {
		if s.Sketch == nil || s.Place != x.b.places[cabinet] || s.Sketch.Width > hostWidth || leavesRight(s.Sketch) {
			continue
		}
		if slices.ContainsFunc(s.Sketch.Items, func(it circuit.SketchItem) bool {
			return it.Rail == rail.Name && (it.Op == circuit.OpUp || it.Op == circuit.OpDown)
		}) {
			return s
		}
	}
	return nil
}
