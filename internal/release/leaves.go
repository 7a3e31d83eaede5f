package release

import (
	"fmt"
	"slices"
	"strings"
	"unicode"
	"unicode/utf8"

	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
)

// leaf is one value of a description, or one thing in it that is new or gone.
type leaf struct {
	path, what, text string
	at               describe.Span
	scope            scope
	thing            string // path of the thing that it belongs to; "" if that is always there
	head             bool   // stands for the whole thing
	absent           string // what is said where it is not written
}

// scope says where in the plant a value acts first.
type scope struct {
	circuit, stage, lamp string
	paper                bool // on the documents only
}

// What is said of a value that is not written and has no default.
const (
	chosen      = "chosen" // by the program
	allStandard = "all standard"
)

// flat lists the values of a description, defaults included, so that writing a default
// out is no change.
type flat struct {
	site   *describe.Site
	schema *describe.Schema
	out    []leaf
}

func (f *flat) add(l leaf) {
	if l.text != "" {
		f.out = append(f.out, l)
	}
}

func leaves(site *describe.Site, schema *describe.Schema) []leaf {
	f := &flat{site: site, schema: schema}
	f.job()
	f.practice()
	f.duty()
	for _, s := range site.Stages {
		title := capital(s.Name.Val)
		if t, ok := describe.Get[any](s.Fields, "title"); ok {
			title = fmt.Sprint(t.Val)
		}
		f.thing("stages", s.Name, s.Kind, s.Fields, schema.Stages, title, scope{stage: s.Name.Val})
	}
	for _, l := range site.Luminaires {
		f.thing("luminaires", l.Name, l.Kind, l.Fields, schema.Luminaires, "Light type "+l.Name.Val, scope{lamp: l.Name.Val})
	}
	for _, c := range site.Circuits {
		f.circuit(c)
	}
	for _, p := range site.Parts {
		f.thing("parts", p.Name, p.Kind, p.Fields, schema.Parts, "Part "+p.Name.Val, scope{})
		for _, n := range p.Pins {
			path := "parts." + p.Name.Val
			f.add(leaf{path: path + ".pins." + n.Pin.Val, what: "Part " + p.Name.Val + ", pin " + n.Pin.Val, text: n.Net.Val, at: n.Net.Pos, thing: path})
		}
	}
	for _, t := range site.TestPoints {
		f.add(leaf{path: "test_points." + t.Name.Val, what: "Test point " + t.Name.Val, text: t.At_.Val, at: t.At_.Pos})
	}
	return f.out
}

func capital(s string) string {
	r, n := utf8.DecodeRuneInString(s)
	return string(unicode.ToUpper(r)) + s[n:]
}

// job leaves out revision and date: they differ between any two issues.
func (f *flat) job() {
	j := f.site.Job
	for _, v := range []struct {
		key, what string
		val       describe.At[string]
	}{
		{"number", "Job number", j.Number}, {"title", "Title", j.Title}, {"client", "Client", j.Client},
		{"site", "Site", j.Site}, {"prepared", "Prepared by", j.Prepared},
	} {
		f.add(leaf{path: "job." + v.key, what: v.what, text: v.val.Val, at: v.val.Pos, scope: scope{paper: true}})
	}
}

// value adds one value of any type that prints itself.
func value[T any](f *flat, path, what string, v describe.At[T], s scope) {
	f.add(leaf{path: path, what: what, text: textOf(v.Val), at: v.Pos, scope: s})
}

func textOf(v any) string {
	switch v := v.(type) {
	case bool:
		return map[bool]string{true: "yes", false: "no"}[v]
	case describe.Ref:
		if v.Port != "" {
			return v.Stage + "." + v.Port
		}
		return v.Stage
	case []describe.RatePoint:
		var parts []string
		for _, p := range v {
			parts = append(parts, fmt.Sprintf("%v %v", p.Time, p.Capacity))
		}
		return strings.Join(parts, ", ")
	case []quantity.WireSize:
		return joined(v)
	case []quantity.Ampere:
		return joined(v)
	case []quantity.AmpereHour:
		return joined(v)
	}
	return fmt.Sprint(v)
}

func joined[T fmt.Stringer](list []T) string {
	var parts []string
	for _, v := range list {
		parts = append(parts, v.String())
	}
	return strings.Join(parts, ", ")
}

func (f *flat) practice() {
	p, all := &f.site.Practice, scope{}
	value(f, "practice.conductors", "Practice, conductor sizes", p.Conductors, all)
	value(f, "practice.paper", "Practice, paper", p.Paper, scope{paper: true})
	lengths := p.Lengths
	lengths.Val = p.LengthUnit().Symbol()
	value(f, "practice.lengths", "Practice, unit of lengths on paper", lengths, scope{paper: true})
	value(f, "practice.lamp_drop", "Practice, drop to the farthest light, at most", p.LampDrop, all)
	value(f, "practice.clear_within", "Practice, a fuse clears a far short within", p.ClearWithin, all)
	value(f, "practice.load_factor", "Practice, share of a fuse's rating loaded for long", p.LoadFactor, all)
	value(f, "practice.grouping", "Practice, loaded circuits run together", p.Grouping, all)
	value(f, "practice.taper", "Practice, legs of a circuit may get thinner", p.Taper, all)
	value(f, "practice.margin", "Practice, margin of the battery", p.Margin, all)
	value(f, "practice.ageing", "Practice, capacity left at the end of the battery's life", p.Ageing, all)
	value(f, "practice.colours.positive", "Practice, colour of plus", p.Positive, all)
	value(f, "practice.colours.negative", "Practice, colour of minus", p.Negative, all)
	f.add(leaf{path: "practice.sizes", what: "Practice, conductor sizes in stock", text: textOf(p.Sizes.Val), at: p.Sizes.Pos, absent: allStandard})
	f.add(leaf{path: "practice.fuses", what: "Practice, fuses in stock", text: textOf(p.Fuses.Val), at: p.Fuses.Pos, absent: allStandard})
	value(f, "practice.fuse_class", "Practice, class of fuse", p.FuseClass, all)
	f.add(leaf{path: "practice.blocks", what: "Practice, battery blocks in stock", text: textOf(p.Blocks.Val), at: p.Blocks.Pos, absent: allStandard})
	value(f, "practice.texts", "Practice, folder of standing texts", p.Texts, scope{paper: true})
	value(f, "practice.currency", "Practice, currency", p.Currency, scope{paper: true})
	for _, c := range p.Prices { // one that takes part in a choice can move what is chosen, anywhere
		value(f, "practice.prices."+c.Of.Val, "Practice, price of "+c.Of.Val, c.Cost, scope{paper: !c.Thing().Chooses})
	}
}

func (f *flat) duty() {
	d, all := &f.site.Duty, scope{}
	value(f, "duty.nominal", "Nominal voltage", d.Nominal, all)
	value(f, "duty.outage", "Outage that the lights last", d.Outage, all)
	value(f, "duty.recharge", "Recharge within", d.Recharge, all)
	value(f, "duty.battery_room", "Battery room", d.BatteryRoom, all)
	value(f, "duty.cable_ambient", "Ambient of the cables", d.CableAmbient, all)
}

// fieldWords says in words what a field is where its name alone would not do.
var fieldWords = map[string]string{
	"kind": "kind", "from": "fed from", "to": "charges", "along": "cable length", "cable": "cable size", "rated": "rating",
	"opens": "opens at", "recloses": "recloses at", "float": "float voltage", "boost": "boost voltage", "cells": "cell class",
	"dark_below": "dark below", "light_above": "light above", "own": "own current", "works": "working range", "flux": "luminous flux",
	"forward": "forward voltage of a LED", "series": "in series", "strings": "strings in parallel", "coil": "coil fed from", "built": "built as",
}

func words(field string) string {
	if w, ok := fieldWords[field]; ok {
		return w
	}
	return strings.ReplaceAll(field, "_", " ")
}

// thing adds a stage, luminaire type or single part with its fields.
func (f *flat) thing(group string, name, kind describe.At[string], fields describe.Fields, kinds []describe.Kind, title string, s scope) {
	path := group + "." + name.Val
	f.add(leaf{path: path, what: title, text: kind.Val, at: name.Pos, scope: s, thing: path, head: true})
	i := slices.IndexFunc(kinds, func(k describe.Kind) bool { return k.Name == kind.Val })
	if i < 0 {
		return
	}
	f.add(leaf{path: path + ".kind", what: title + ", kind", text: kind.Val, at: kind.Pos, scope: s, thing: path})
	for _, field := range kinds[i].Fields {
		v, ok := describe.Get[any](fields, field.Name)
		if !ok || field.Name == "way" && !v.Given { // else the way that the register kept
			continue
		}
		l := leaf{path: path + "." + field.Name, what: title + ", " + words(field.Name), text: textOf(v.Val), at: v.Pos, scope: s, thing: path}
		if l.scope.paper = field.Name == "title" || field.Name == "place"; !l.scope.paper {
			l.absent = chosen
		}
		f.add(l)
	}
}

func (f *flat) circuit(c *describe.Circuit) {
	path, name, s := "circuits."+c.Name.Val, c.Name.Val, scope{circuit: c.Name.Val}
	in := func(l leaf) {
		l.thing = path
		if l.scope == (scope{}) {
			l.scope = s
		}
		f.add(l)
	}
	in(leaf{path: path, what: "Circuit " + name, text: fmt.Sprintf("%d lights on %s", len(c.NamedLegs()), c.Board.Val), at: c.Pos, head: true})
	in(leaf{path: path + ".name", what: "Name of a circuit", text: name, at: c.Name.Pos, scope: scope{paper: true}})
	in(leaf{path: path + ".board", what: name + ", board", text: c.Board.Val, at: c.Board.Pos})
	in(leaf{path: path + ".lit", what: name + ", lit", text: c.Lit.Val, at: c.Lit.Pos})
	if c.Fuse.Given {
		in(leaf{absent: chosen, path: path + ".fuse", what: name + ", fuse", text: c.Fuse.Val.String(), at: c.Fuse.Pos})
	}
	if c.Cable.Given {
		in(leaf{absent: chosen, path: path + ".cable", what: name + ", cable size", text: c.Cable.Val.String(), at: c.Cable.Pos})
	}
	if c.Way.Given {
		in(leaf{absent: chosen, path: path + ".way", what: name + ", way", text: fmt.Sprint(c.Way.Val), at: c.Way.Pos})
	}
	for _, n := range c.NamedLegs() {
		p, light := path+".points."+n.Path, fmt.Sprintf("light %s", n.Path)
		if n.Leg.Place.Val != "" {
			light = n.Leg.Place.Val
		}
		point := func(l leaf) {
			l.thing = p
			if l.scope == (scope{}) {
				l.scope = s
			}
			f.add(l)
		}
		leg := n.Leg
		point(leaf{path: p, what: name + ", " + light, text: spelt(f.site, leg.Length.Pos, leg.Length.Val.String()) + " " + leg.Luminaire.Val, at: leg.Pos, head: true})
		point(leaf{path: p + ".leg", what: name + ", cable to " + light, text: leg.Length.Val.String(), at: leg.Length.Pos})
		point(leaf{path: p + ".luminaire", what: name + ", light at " + light, text: leg.Luminaire.Val, at: leg.Luminaire.Pos})
		point(leaf{path: p + ".place", what: name + ", place of light " + n.Path, text: leg.Place.Val, at: leg.Place.Pos, scope: scope{paper: true}})
		if leg.Cable.Given {
			point(leaf{absent: chosen, path: p + ".cable", what: name + ", cable size to " + light, text: leg.Cable.Val.String(), at: leg.Cable.Pos})
		}
	}
}
