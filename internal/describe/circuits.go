package describe

import (
	"fmt"

	"gopkg.in/yaml.v3"
)

// litWords say when a circuit must be lit.
var litWords = []string{"outage-night", "outage", "night", "always"}

// minLeg and maxLeg bound one leg of cable: a jumper, and far more than an
// extra-low-voltage circuit can carry.
const (
	minLeg = "0.05 m"
	maxLeg = "2 km"
)

func (d *decoder) readCircuits(e entry) {
	items := d.items(e.val, "circuits")
	if e.val.Kind == yaml.SequenceNode && len(items) == 0 {
		d.report(codeNoCircuits, "no circuits", e.at, "Nothing is to be lit. Add at least one circuit, such as {name: Stair, board: board, lit: outage-night, points: [9 m lamp]}.")
	}
	first := map[string]Span{}
	for _, n := range items[:d.few(len(items), maxWays, e.at, "circuits")] {
		c := d.readCircuit(n)
		if c.Name.Given {
			if was, twice := first[c.Name.Val]; twice {
				d.report(codeTwice, "name used twice", c.Name.Pos, fmt.Sprintf("Two circuits are called %s. Give each its own name; labels follow it.", c.Name.Val),
					Related{was, "first used here"})
			} else {
				first[c.Name.Val] = c.Name.Pos
			}
		}
		d.site.Circuits = append(d.site.Circuits, c)
	}
}

func (d *decoder) readCircuit(n *yaml.Node) *Circuit {
	c := &Circuit{Pos: d.src.of(n), Lit: At[string]{Val: litWords[0]}}
	var points *entry
	what := "A circuit"
	if name := textOf(n, "name"); name != "" {
		what = "The circuit " + clip(name)
	}
	d.mapping(n, c.Pos, what, d.circuitFields(c, func(e entry) { points = &e }))
	if points == nil {
		return c
	}
	c.Points = d.readPoints(points.val)
	if len(points.val.Content) == 0 && points.val.Kind == yaml.SequenceNode {
		d.report(codeNoPoints, "circuit without points", points.at, what+" lights nothing. List its luminaires from the board on, such as [9 m lamp, 4 m lamp].")
	}
	return c
}

func (d *decoder) circuitFields(c *Circuit, points func(entry)) []field {
	return []field{
		{"name", true, d.text(&c.Name, func(s string) error { return checkLabel(s, circuitExtra) })},
		{"board", true, d.text(&c.Board, checkIdentifier)},
		{"lit", false, d.choice(&c.Lit, litWords...)},
		{"was", false, d.text(&c.Was, func(s string) error { return checkLabel(s, circuitExtra) })},
		{"fuse", false, value(d, &c.Fuse, Current, "30 mA", "200 A")},
		{"cable", false, value(d, &c.Cable, Size, "0.05 mm²", "400 mm²")},
		{"way", false, value(d, &c.Way, Count, "1", "200")},
		{"points", true, points},
	}
}

// textOf returns the single value of a key of n, for messages; "" if there is none.
func textOf(n *yaml.Node, key string) string {
	if n.Kind != yaml.MappingNode {
		return ""
	}
	for i := 0; i+1 < len(n.Content); i += 2 {
		if n.Content[i].Value == key && n.Content[i+1].Kind == yaml.ScalarNode {
			return n.Content[i+1].Value
		}
	}
	return ""
}
