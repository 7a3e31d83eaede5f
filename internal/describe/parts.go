package describe

import (
	"fmt"
	"strings"
	"unicode"

	"gopkg.in/yaml.v3"
)

// readParts reads single parts on any nets.
func (d *decoder) readParts(e entry) {
	items := d.items(e.val, "parts")
	first := map[string]Span{}
	for _, n := range items[:d.few(len(items), maxSingles, e.at, "parts")] {
		p := &SinglePart{Pos: d.src.of(n)}
		what := "A part"
		if name := textOf(n, "name"); name != "" {
			what = "The part " + clip(name)
		}
		d.kind(n, p.Pos, what, "part", d.schema.Parts, &p.Kind, &p.Fields, []field{
			{"name", true, d.text(&p.Name, checkIdentifier)},
			{"pins", true, func(e entry) { d.readPins(e, p) }},
		}, nil)
		if p.Name.Given {
			if was, twice := first[p.Name.Val]; twice {
				d.report(codeTwice, "name used twice", p.Name.Pos, fmt.Sprintf("Two parts are called %s. Give each its own name.", p.Name.Val), Related{was, "first used here"})
			} else {
				first[p.Name.Val] = p.Name.Pos
			}
		}
		d.site.Parts = append(d.site.Parts, p)
	}
}

// readPins reads {A: store.plus, K: spur}. The ports of a part kind are its pins.
func (d *decoder) readPins(e entry, p *SinglePart) {
	k := kindNamed(d.schema.Parts, p.Kind.Val)
	for _, pin := range d.entries(e.val, "pins") {
		if k != nil && len(k.Ports) > 0 && k.port(pin.key) == nil {
			d.unknown(codePort, "unknown pin", pin.at, fmt.Sprintf("A %s has no pin %q.", k.Name, clip(pin.key)), pin.key, "Pins", append(k.sides(false), k.sides(true)...))
			continue
		}
		net, ok := d.netName(pin.val, "A pin")
		if ok {
			p.Pins = append(p.Pins, PinNet{At[string]{Val: pin.key, Pos: pin.at, Given: true}, net})
		}
	}
	if k == nil {
		return
	}
	for _, port := range k.Ports {
		found := false
		for _, pin := range p.Pins {
			found = found || pin.Pin.Val == port.Name
		}
		if !found && e.val.Kind == yaml.MappingNode {
			d.report(codeMissingKey, "missing pin", e.at, fmt.Sprintf("Pin %s of the %s is on no net.", port.Name, k.Name))
		}
	}
}

// netName reads the name of a net: stage.port, or a free name.
func (d *decoder) netName(n *yaml.Node, what string) (At[string], bool) {
	s, ok := d.scalar(n, what)
	if !ok {
		return At[string]{}, false
	}
	at := d.src.of(n)
	r := []rune(s)
	good := len(r) > 0 && len(r) <= MaxName && strings.Count(s, ".") <= 1
	for _, c := range r {
		good = good && (unicode.IsLetter(c) || unicode.IsMark(c) || unicode.IsDigit(c) || strings.ContainsRune("+-−_./", c))
	}
	if !good {
		d.report(codeName, "bad name", at, fmt.Sprintf("%q does not name a net: write stage.port, such as store.plus, or a word of your own.", clip(s)))
		return At[string]{}, false
	}
	return At[string]{Val: s, Pos: at, Given: true}, true
}

// readTestPoints reads the test points besides those that every stage brings.
func (d *decoder) readTestPoints(e entry) {
	items := d.items(e.val, "test_points")
	first := map[string]Span{}
	for _, n := range items[:d.few(len(items), maxSingles, e.at, "test points")] {
		t := &ExtraTestPoint{Pos: d.src.of(n)}
		d.mapping(n, t.Pos, "A test point", []field{
			{"name", true, d.text(&t.Name, place)},
			{"at", true, func(e entry) { t.At_, _ = d.netName(e.val, "at") }},
		})
		if was, twice := first[t.Name.Val]; twice && t.Name.Given {
			d.report(codeTwice, "name used twice", t.Name.Pos, fmt.Sprintf("Two test points are called %s. Give each its own name.", t.Name.Val), Related{was, "first used here"})
		} else if t.Name.Given {
			first[t.Name.Val] = t.Name.Pos
		}
		d.site.TestPoints = append(d.site.TestPoints, t)
	}
}
