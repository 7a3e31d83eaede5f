package packet

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/layout/ink"
)

// foldFrom is the number of things from which a method that serves them stands once,
// with a row for each.
const foldFrom = 2

// methods lists the workings that follow one formula for different things, by their
// place in the Design.
func (b *book) methods() [][]int {
	var out [][]int
	at := map[string]int{}
	for i, w := range b.d.Workings {
		key := w.Formula + "|" + w.Unit + "|" + family(w.Name)
		k, ok := at[key]
		if !ok {
			k = len(out)
			at[key] = k
			out = append(out, nil)
		}
		out[k] = append(out[k], i)
	}
	return slices.DeleteFunc(out, func(m []int) bool {
		subjects := map[string]bool{}
		for _, i := range m {
			subjects[b.d.Workings[i].For] = true
		}
		return len(subjects) < foldFrom
	})
}

// family is a name without the designations and figures in it, that tell apart workings
// of one method.
func family(name string) string {
	words := strings.Split(glue(name), " ")
	return strings.Join(slices.DeleteFunc(words, special), " ")
}

// special reports whether a word names one thing or one figure.
func special(word string) bool {
	if len(findDesignations(word)) > 0 {
		return true
	}
	return word != "" && word[0] >= '0' && word[0] <= '9'
}

// methodName is the name of a method: what its workings differ in is left out.
func methodName(names []string) (name string, own []string) {
	differ := slices.ContainsFunc(names, func(n string) bool { return n != names[0] })
	if !differ {
		return names[0], make([]string, len(names))
	}
	for _, n := range names {
		var mine []string
		for _, w := range strings.Split(glue(n), " ") {
			if special(w) {
				mine = append(mine, strings.Trim(w, ","))
			}
		}
		own = append(own, strings.Join(mine, " "))
	}
	var words []string
	for _, w := range strings.Split(glue(names[0]), " ") {
		if special(w) {
			w = "…"
		}
		words = append(words, w)
	}
	return strings.Join(words, " "), own
}

// Columns of the rows of a method, mm.
const (
	methodWhat    = 44.0
	methodNumbers = 102.0
	methodResult  = 20.0
	methodRow     = 5.4
	methodAir     = 1.6
)

var methodText = style{ink.Regular, 8.75, 3.8, ink.Black}

// method is a formula with its source, and a row for each thing that it serves: the
// numbers put in and the result.
func (b *book) method(list, number []int, first bool) []block {
	ws := b.d.Workings
	var names, sources []string
	for _, i := range list {
		names = append(names, ws[i].Name)
		if !slices.Contains(sources, ws[i].Source) {
			sources = append(sources, ws[i].Source)
		}
	}
	name, own := methodName(names)
	room := b.pg.width - workNumber
	// where rows have different sources, letters lead to them
	said := sources[0]
	if len(sources) > 1 {
		var list []string
		for k, x := range sources {
			list = append(list, fmt.Sprintf("(%c) %s", 'a'+k, x))
		}
		said = strings.Join(list, "; ")
	}
	lines := follow(wrap(upper(name), tableText.as(ink.Bold), room), wrapLine(formulaLine(ws[list[0]].Formula), formulaText, room), room)
	lines = follow(lines, wrap(said, sourceText, room), room)
	h := 1 + float64(len(lines))*workLead + 0.8
	head := block{h: h, gap: 3, next: true, draw: func(p *pad, y, h float64) {
		p.lines(p.pg.l+workNumber, y+1+rise*workLead, lines, workLead)
		p.rule(p.pg.l, y+h, p.pg.width, cardLine, ink.Black)
	}}
	if first {
		head.gap = 0
	}
	t := &table{st: methodText, min: methodRow, air: methodAir, cols: []column{{w: workNumber}, {w: methodWhat}, {w: methodNumbers}, {w: methodResult, a: ink.End}}}
	var rows []block
	for k, i := range list {
		w := &ws[i]
		what := b.methodSubject(w.For, own[k])
		if w.Pinned {
			what += "; pinned: checked"
		}
		numbers := w.Substituted
		if len(sources) > 1 {
			numbers += fmt.Sprintf(" (%c)", 'a'+slices.Index(sources, w.Source))
		}
		result := bold(resultDigits(w.Value))
		if w.Unit != "" {
			result += noBreak + w.Unit
		}
		rows = append(rows, t.line(b, 0, row{cells: []cell{{text: fmt.Sprintf("W%d", number[i]), face: ink.MonoBold, strong: true}, txt(what), txt(numbers), txt(result)}}))
	}
	return append([]block{head}, under(head, together(rows))...)
}

// methodSubject is what a row is about: "-F101, Bunkroom corridor", and what its name
// adds.
func (b *book) methodSubject(subject, own string) string {
	out := upper(subject)
	for _, p := range b.d.Circuit.Parts {
		if p.Designation != subject {
			continue
		}
		out = subject
		if f := b.fuseOf(p); f != nil && f.Feeds != "" {
			out += ", " + f.Feeds
		}
	}
	if own != "" && own != subject {
		out += ": " + own
	}
	return out
}
