package release

import (
	"strings"

	"gloamwright/internal/describe"
	"gloamwright/internal/design"
)

// moves gives the values of the old description the paths that the same things have
// in the new one: circuits follow their was:, luminaires are paired as for labels.
func moves(old, now *describe.Site) map[string]string {
	out := map[string]string{}
	same := renamings(old, now)
	for _, o := range old.Circuits {
		c := same[o.Name.Val]
		if c == nil {
			continue
		}
		from, to := "circuits."+o.Name.Val, "circuits."+c.Name.Val
		out[from] = to
		a, b := pointsOf(o), pointsOf(c)
		paired := map[string]bool{}
		for j, i := range match(a, b) {
			if i >= 0 {
				out[from+".points."+a[i].Path] = to + ".points." + b[j].Path
				paired[a[i].Path] = true
			}
		}
		for _, p := range a {
			if !paired[p.Path] {
				out[from+".points."+p.Path] = to + ".points." + p.Path + " " // no path of now
			}
		}
	}
	return out
}

// renamings returns, by the names in the old description, the circuits that are the
// same in the new one.
func renamings(old, now *describe.Site) map[string]*describe.Circuit {
	before := map[string]bool{}
	for _, c := range old.Circuits {
		before[c.Name.Val] = true
	}
	out := map[string]*describe.Circuit{}
	for _, c := range now.Circuits {
		switch {
		case before[c.Name.Val]:
			out[c.Name.Val] = c
		case c.Was.Given && before[c.Was.Val]:
			out[c.Was.Val] = c
		}
	}
	return out
}

// changedValues lists what differs between two descriptions, in the order of the new
// one, what is gone last.
func changedValues(old, now *describe.Site, schema *describe.Schema) ([]design.ValueChange, []scope) {
	move := moves(old, now)
	before := map[string]leaf{}
	var order []string
	thingsBefore, thingsNow := map[string]bool{}, map[string]bool{}
	for _, l := range leaves(old, schema) {
		if to, ok := move[l.thing]; ok && l.thing != "" {
			l.path = to + strings.TrimPrefix(l.path, l.thing)
			l.thing = to
		}
		before[l.path] = l
		order = append(order, l.path)
		thingsBefore[l.thing] = true
	}
	current := leaves(now, schema)
	seen := map[string]bool{}
	for _, l := range current {
		seen[l.path] = true
		thingsNow[l.thing] = true
	}
	var values []design.ValueChange
	var scopes []scope
	add := func(l leaf, was, is, why string) {
		values = append(values, design.ValueChange{Number: len(values) + 1, Path: strings.TrimSpace(l.path), What: l.what, Was: was, Is: is, Why: why})
		scopes = append(scopes, l.scope)
	}
	for _, l := range current {
		o, was := before[l.path]
		fresh := missing(l.thing, thingsBefore)
		switch {
		case l.head && fresh && worthALine(l.thing, thingsBefore):
			add(l, "", l.text, remark(now, l.at))
		case l.head || fresh:
		case !was:
			add(l, l.absent, written(now, l), remark(now, l.at))
		case o.text != l.text:
			why := remark(now, l.at)
			if why == remark(old, o.at) {
				why = ""
			}
			add(l, written(old, o), written(now, l), why)
		}
	}
	for _, path := range order {
		l := before[path]
		gone := missing(l.thing, thingsNow)
		switch {
		case seen[path]:
		case l.head && gone && worthALine(l.thing, thingsNow):
			add(l, l.text, "", "")
		case l.head || gone:
		default:
			add(l, written(old, l), l.absent, "")
		}
	}
	return values, scopes
}

// missing reports whether a thing is not among those there.
func missing(thing string, there map[string]bool) bool { return thing != "" && !there[thing] }

// worthALine reports whether a thing that is missing from there has a line of its own:
// a luminaire has not if its whole circuit is missing.
func worthALine(thing string, there map[string]bool) bool {
	circuit, _, point := strings.Cut(thing, ".points.")
	return !point || there[circuit]
}

// lineOf returns the line of a place; ok is false if there is none.
func lineOf(site *describe.Site, at describe.Span) (line string, ok bool) {
	lines := strings.Split(string(site.Sources[at.File]), "\n")
	if at.Line == 0 || at.Line > len(lines) {
		return "", false
	}
	return strings.TrimRight(strings.TrimPrefix(lines[at.Line-1], "\ufeff"), "\r"), true
}

// written returns a value as spelt returns it, unless it stands for a whole thing.
func written(site *describe.Site, l leaf) string {
	if l.head {
		return l.text
	}
	return spelt(site, l.at, l.text)
}

// spelt returns a value in the user's own spelling, "30 ft", where it stands in the
// description by itself, else text.
func spelt(site *describe.Site, at describe.Span, text string) string {
	line, ok := lineOf(site, at)
	r := []rune(line)
	if !ok || at.Col-1+at.Len > len(r) {
		return text
	}
	own := strings.TrimSpace(string(r[at.Col-1 : at.Col-1+at.Len]))
	if n := len(own); n > 1 && strings.ContainsRune(`"'[`, rune(own[0])) {
		own = strings.TrimSpace(own[1 : n-1])
	}
	if own == "" || strings.ContainsAny(own, "*&|>") { // an alias, or a text over several lines
		return text
	}
	return own
}

// remark returns the remark at the end of the line of a value.
func remark(site *describe.Site, at describe.Span) string {
	line, _ := lineOf(site, at)
	quote := rune(0)
	last := ' '
	for i, c := range line {
		switch {
		case quote != 0:
			if c == quote {
				quote = 0
			}
		case (c == '"' || c == '\'') && strings.ContainsRune(" [{,:", last):
			quote = c
		case c == '#' && (last == ' ' || last == '\t'):
			return strings.TrimSpace(line[i+1:])
		}
		last = c
	}
	return ""
}
