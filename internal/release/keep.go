package release

import (
	"fmt"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
)

// Keep prepares the design of a site whose earlier revisions gave labels: circuits
// and feeders that the user did not pin stay on their ways, and every label given is
// returned under the key that its thing has now. Labels whose things are gone stay
// under keys that no thing has, so that they are not given again. A renaming that
// names no issued circuit is reported. A nil register keeps nothing.
func (r *Register) Keep(site *describe.Site) (circuit.Labels, describe.List) {
	if r == nil {
		return nil, nil
	}
	r.keepWays(site)
	k := &keeper{reg: r, names: map[string]string{}, legs: map[string]map[string]string{}}
	var list describe.List
	for _, c := range site.Circuits {
		switch old := r.former(c); {
		case old != "":
			k.circuit(old, c)
		case c.Was.Given:
			list = append(list, describe.Diagnostic{
				Severity: describe.Error, Code: codeNoSuchCircuit, Summary: "former name never issued", At: c.Was.Pos,
				Detail: fmt.Sprintf("Revision %s has no circuit %s whose labels could follow. Its circuits: %s.",
					r.Last(), c.Was.Val, strings.Join(circuit.SortedKeys(r.Ways), ", ")),
			})
		}
	}
	return k.labels(), list
}

// former returns the name under which a circuit was issued; "" if it never was.
func (r *Register) former(c *describe.Circuit) string {
	if _, ok := r.Ways[c.Name.Val]; ok {
		return c.Name.Val
	}
	if _, ok := r.Ways[c.Was.Val]; ok && c.Was.Given {
		return c.Was.Val
	}
	return ""
}

// keepWays puts what hangs on a way back on the way that it had, unless the user gave
// it another or gave that way to something else.
func (r *Register) keepWays(site *describe.Site) {
	boards := map[string]*describe.Stage{}
	taken := map[Way]bool{}
	for _, s := range site.Stages {
		if _, ok := describe.Get[int](s.Fields, "ways"); ok {
			boards[s.Name.Val] = s
		}
		if from, way, ok := feederOf(s); ok && way.Given {
			taken[Way{from, way.Val}] = true
		}
	}
	for _, c := range site.Circuits {
		if c.Way.Given {
			taken[Way{c.Board.Val, c.Way.Val}] = true
		}
	}
	free := func(w Way, board string) bool {
		s := boards[board]
		if s == nil || w.Board != board || w.Number == 0 || taken[w] {
			return false
		}
		n, _ := describe.Get[int](s.Fields, "ways")
		return w.Number <= n.Val
	}
	for _, c := range site.Circuits {
		if w := r.Ways[r.former(c)]; !c.Way.Given && free(w, c.Board.Val) {
			c.Way.Val = w.Number
			taken[w] = true
		}
	}
	for _, s := range site.Stages {
		from, way, ok := feederOf(s)
		if w := r.Feeders[s.Name.Val]; ok && !way.Given && free(w, from) {
			s.Fields.Set("way", describe.At[any]{Val: w.Number})
			taken[w] = true
		}
	}
}

// feederOf returns the board that feeds s and the way that s hangs on, if s is a
// board fed by another.
func feederOf(s *describe.Stage) (from string, way describe.At[int], ok bool) {
	if _, board := describe.Get[int](s.Fields, "ways"); !board {
		return "", way, false
	}
	ref, _ := describe.Get[describe.Ref](s.Fields, "from")
	way, _ = describe.Get[int](s.Fields, "way")
	return ref.Val.Stage, way, true
}

// keeper carries labels from the keys of the register to those of a description.
type keeper struct {
	reg   *Register
	names map[string]string            // circuit: old name to new
	legs  map[string]map[string]string // by old circuit name: old leg name to new
}

func (k *keeper) circuit(old string, c *describe.Circuit) {
	points, now := k.reg.Points[old], pointsOf(c)
	legs := map[string]string{}
	for j, i := range match(points, now) {
		if i >= 0 {
			legs[points[i].Name] = now[j].Name
		}
	}
	k.names[old], k.legs[old] = c.Name.Val, legs
}

func (k *keeper) labels() circuit.Labels {
	out := circuit.Labels{}
	for _, id := range circuit.SortedKeys(k.reg.Labels) {
		sort, key := sortOf(id)
		if now, ok := k.key(sort, key); ok {
			out[sort+"/"+now] = k.reg.Labels[id]
		} else {
			out[retiredKey(sort, k.reg.Labels[id])] = k.reg.Labels[id]
		}
	}
	for _, g := range k.reg.Retired {
		out[retiredKey(g.Sort, g.Label)] = g.Label
	}
	return out
}

// retiredKey is a key that no thing has: no stage has an empty name.
func retiredKey(sort, label string) string { return sort + "//" + label }

// circuitPrefix begins the keys of everything beyond the terminals of a way.
const circuitPrefix = "circuit/"

// key returns the key that the thing has now; ok is false if it is gone, or if its
// label follows from that of another thing.
func (k *keeper) key(sort, key string) (now string, ok bool) {
	if sort == "wire" && strings.Contains(key, circuitPrefix) {
		return "", false // the core of a leg: its number follows from the luminaire's
	}
	rest, inCircuit := strings.CutPrefix(key, circuitPrefix)
	if !inCircuit {
		return key, true
	}
	old, rest, _ := strings.Cut(rest, "/")
	name, ok := k.names[old]
	if !ok {
		_, gone := k.reg.Ways[old] // else a stage that bears the name "circuit"
		return key, !gone
	}
	switch sort {
	case "part":
		leg, ok := k.legs[old][rest]
		return circuitPrefix + name + "/" + leg, ok
	case "cable":
		leg, ok := k.legs[old][strings.TrimPrefix(rest, "leg/")]
		return circuitPrefix + name + "/leg/" + leg, ok
	}
	return circuitPrefix + name + "/" + rest, true
}
