package describe

import (
	"errors"
	"fmt"
	"strings"
	"unicode/utf8"

	"gopkg.in/yaml.v3"

	"gloamwright/internal/quantity"
)

// readPoints reads the legs of a circuit or branch in order from the board.
func (d *decoder) readPoints(n *yaml.Node) []*Leg {
	var legs []*Leg
	for _, p := range d.items(n, "points") {
		if branch, at, ok := d.branch(p); ok {
			d.hang(legs, branch, at)
			continue
		}
		if d.legs++; d.legs > maxLegs {
			if d.legs == maxLegs+1 {
				d.report(codeTooMany, "too many luminaires", d.src.of(p), fmt.Sprintf("A description has at most %d luminaires.", maxLegs))
			}
			continue
		}
		var leg *Leg
		if p.Kind == yaml.MappingNode {
			leg = d.legMapping(p)
		} else if s, ok := d.scalar(p, "A point"); ok {
			leg = d.legText(p, s)
		}
		if leg != nil {
			legs = append(legs, leg)
		}
	}
	return legs
}

// branch returns the list of a mapping {branch: [...]}.
func (d *decoder) branch(n *yaml.Node) (list *yaml.Node, at Span, ok bool) {
	if n.Kind != yaml.MappingNode || len(n.Content) == 0 {
		return nil, Span{}, false
	}
	key := follow(n.Content[0])
	if key.Kind != yaml.ScalarNode || key.Value != "branch" {
		return nil, Span{}, false
	}
	d.mapping(n, d.src.of(n), "A branch", []field{{"branch", true, func(e entry) { list = e.val }}})
	return list, d.src.of(n.Content[0]), true
}

// hang reads a side run and hangs it on the point before it.
func (d *decoder) hang(legs []*Leg, list *yaml.Node, at Span) {
	if list == nil {
		return
	}
	side := d.readPoints(list)
	if list.Kind == yaml.SequenceNode && len(list.Content) == 0 {
		d.report(codeNoPoints, "branch without points", at, "The branch lights nothing. List its luminaires, or remove it.")
	}
	if len(legs) == 0 {
		d.report(codeBranch, "branch without a point before it", at, "A branch hangs on the point before it in the list. Put that point first.")
		return
	}
	if len(side) > 0 {
		last := legs[len(legs)-1]
		last.Branches = append(last.Branches, side)
	}
}

// legMapping reads {leg: 9 m, luminaire: corridor, place: west door, cable: 2.5 mm²}.
func (d *decoder) legMapping(n *yaml.Node) *Leg {
	leg := &Leg{Pos: d.src.of(n)}
	d.mapping(n, leg.Pos, "A point", d.legFields(leg))
	return leg
}

func (d *decoder) legFields(leg *Leg) []field {
	return []field{
		{"leg", true, value(d, &leg.Length, Length, minLeg, maxLeg)},
		{"luminaire", true, d.text(&leg.Luminaire, checkIdentifier)},
		{"place", false, d.text(&leg.Place, place)},
		{"cable", false, value(d, &leg.Cable, Size, "0.05 mm²", "400 mm²")},
	}
}

func place(s string) error { return checkText(s, MaxName) }

// legText reads "9 m corridor at west door": length, luminaire, place.
func (d *decoder) legText(n *yaml.Node, s string) *Leg {
	leg := &Leg{Pos: d.src.of(n)}
	length, rest, err := quantity.Cut[quantity.Metre](s)
	if err != nil {
		d.fail(d.src.within(n, 0, utf8.RuneCountInString(s)), legError(s, err))
		return nil
	}
	start := utf8.RuneCountInString(s) - utf8.RuneCountInString(rest)
	written := strings.TrimSpace(strings.TrimSuffix(s, rest))
	leg.Length = At[quantity.Metre]{Val: length, Pos: d.src.within(n, 0, start), Given: true}
	if err := checkBounds(Length, length, written, minLeg, maxLeg); err != nil {
		d.fail(leg.Length.Pos, err)
	}
	lamp, spot, hasSpot := cutPlace(rest)
	if strings.TrimSpace(lamp) == "" {
		d.report(codePoint, "point without a luminaire", leg.Pos, fmt.Sprintf("%q does not say which luminaire hangs at the end: write %s lamp, or %s lamp at its place.", clip(s), written, written))
		return nil
	}
	leg.Luminaire = d.part(n, start, lamp)
	if err := checkIdentifier(leg.Luminaire.Val); err != nil {
		why := fmt.Sprintf("%q is not the name of a luminaire", clip(leg.Luminaire.Val))
		if first, after, more := strings.Cut(leg.Luminaire.Val, " "); more {
			why = fmt.Sprintf("%q is more than a luminaire; a place comes after \"at\": write %s %s at %s", clip(leg.Luminaire.Val), written, first, strings.TrimSpace(after))
		}
		d.report(codePoint, "bad point", leg.Luminaire.Pos, why+".")
		leg.Luminaire = At[string]{}
	}
	if !hasSpot {
		return leg
	}
	leg.Place = d.part(n, start+utf8.RuneCountInString(rest)-utf8.RuneCountInString(spot), spot)
	if leg.Place.Val == "" {
		d.report(codePoint, "point without its place", leg.Pos, fmt.Sprintf("%q ends with \"at\": name the place after it, or leave it out.", clip(s)))
	} else if err := place(leg.Place.Val); err != nil {
		d.fail(leg.Place.Pos, err)
		leg.Place = At[string]{}
	}
	return leg
}

// part returns the trimmed text that starts at character start of n's value.
func (d *decoder) part(n *yaml.Node, start int, text string) At[string] {
	trimmed := strings.TrimSpace(text)
	start += utf8.RuneCountInString(text) - utf8.RuneCountInString(strings.TrimLeft(text, " \t"))
	return At[string]{Val: trimmed, Pos: d.src.within(n, start, utf8.RuneCountInString(trimmed)), Given: true}
}

// cutPlace splits "corridor at west door" at the first word "at".
func cutPlace(s string) (lamp, place string, ok bool) {
	if lamp, place, ok = strings.Cut(s, " at "); ok {
		return lamp, place, true
	}
	if lamp, ok = strings.CutSuffix(s, " at"); ok {
		return lamp, "", true
	}
	return s, "", false
}

// legError turns the failure to read the length of a point into one about points. In
// "9 corridor at west door" the unit is missing, not misspelt.
func legError(s string, err error) error {
	var q *quantity.ParseError
	if !errors.As(err, &q) {
		return err
	}
	lamp, _, _ := cutPlace(s)
	words := strings.Fields(lamp)
	switch {
	case q.Problem == quantity.UnknownUnit && len(words) == 2:
		after := strings.TrimSpace(strings.TrimPrefix(strings.TrimSpace(s), words[0]))
		return &valueError{codeNoUnit, "missing unit", fmt.Sprintf("The length %q needs a unit: write \"%s m %s\" or \"%s ft %s\".", words[0], words[0], clip(after), words[0], clip(after))}
	case q.Problem == quantity.Malformed:
		return &valueError{codePoint, "bad point", fmt.Sprintf("%q is not a point: write length, luminaire and perhaps place, such as 9 m corridor at west door.", clip(s))}
	}
	return err
}
