package packet

import (
	"fmt"
	"slices"
	"strings"

	"gloamwright/internal/sizing"
	"gloamwright/layout/ink"
)

// workings show how every value came about, so that a pocket calculator can check it.
// A method that serves many things stands once, with a row for each of them.
func (b *book) workings() *section {
	s := &section{key: keyWorkings, title: "Workings", document: "Workings", letter: "C", label: "Before",
		purpose: "Use this sheet to check any figure with a pocket calculator.",
		note:    fmt.Sprintf("%s names the inputs. A result in bold is the one that every other sheet prints.", b.upperSheets(keyBasis))}
	methods := b.methods()
	folded := map[int]bool{}
	for _, m := range methods {
		for _, i := range m {
			folded[i] = true
		}
	}
	groups := b.workingGroups(folded)
	// numbers count in the order of print
	number := make([]int, len(b.d.Workings))
	n := 0
	for _, g := range groups {
		for _, i := range g.list {
			n++
			number[i] = n
		}
	}
	for _, m := range methods {
		for _, i := range m {
			n++
			number[i] = n
		}
	}
	usedBy := b.workingsUsedBy(number)
	for _, g := range groups {
		head := b.head(0, b.pg.width, b.workingTitle(g.subject), "")
		s.blocks = append(s.blocks, head)
		for _, i := range g.list {
			s.blocks = append(s.blocks, b.working(number[i], &b.d.Workings[i], usedBy[i]))
		}
	}
	for k, m := range methods {
		if k == 0 {
			s.blocks = append(s.blocks, b.head(0, b.pg.width, "One method, many things", "the formula stands once; each row puts its own numbers in"))
		}
		s.blocks = append(s.blocks, b.method(m, number, k == 0)...)
	}
	return s
}

// workingsUsedBy lists the numbers of the workings that each one feeds, rising.
func (b *book) workingsUsedBy(number []int) [][]int {
	at := map[string]int{}
	for i, w := range b.d.Workings {
		at[w.For+": "+w.Name] = i + 1
	}
	out := make([][]int, len(b.d.Workings))
	for i, w := range b.d.Workings {
		for _, u := range w.Uses {
			if k := at[u]; k > 0 && k != i+1 {
				out[k-1] = append(out[k-1], number[i])
			}
		}
	}
	for _, list := range out {
		slices.Sort(list)
	}
	return out
}

// workingGroup is the workings of one thing, by their place in the Design.
type workingGroup struct {
	subject string
	list    []int
}

// workingGroups keeps the workings of a thing together that stand on their own, in the
// order in which the things first appear.
func (b *book) workingGroups(folded map[int]bool) []workingGroup {
	var out []workingGroup
	at := map[string]int{}
	for i, w := range b.d.Workings {
		if folded[i] {
			continue
		}
		k, ok := at[w.For]
		if !ok {
			k = len(out)
			at[w.For] = k
			out = append(out, workingGroup{subject: w.For})
		}
		out[k].list = append(out[k].list, i)
	}
	return out
}

// workingTitle names what a group of workings is about: "Battery -G1".
func (b *book) workingTitle(subject string) string {
	for _, p := range b.d.Circuit.Parts {
		if p.Designation == subject {
			name, _, _ := strings.Cut(p.Description, ",")
			name = strings.TrimSuffix(name, " and holder")
			if f := b.fuseOf(p); f != nil && f.Feeds != "" {
				return name + " " + subject + ", feeds " + f.Feeds
			}
			return name + " " + subject
		}
	}
	return upper(subject)
}

// Measures of a working, mm.
const (
	workNumber = 14.0
	workLead   = 4.2
	resultWide = 34.0
	resultHigh = 7.2
)

var workingNumber = style{ink.MonoBold, 8.97, 4, ink.Black}

// follow sets lines behind others: on the last of them if all fits there, else below.
func follow(list, more []line, room float64) []line {
	const gap = 3.0
	n := len(list) - 1
	if n < 0 || len(more) != 1 || list[n].width()+gap+more[0].width() > room {
		return append(list, more...)
	}
	more[0][0].pre = gap
	list[n] = append(list[n], more[0]...)
	return list
}

// working is one card: name, formula, the numbers put in, the source, and the result in
// its box.
func (b *book) working(n int, w *sizing.Working, usedBy []int) block {
	room := b.pg.width - workNumber - resultWide - 4
	lines := wrap(upper(w.Name), tableText.as(ink.Bold), room)
	lines = follow(lines, wrapLine(formulaLine(w.Formula), formulaText, room), room)
	numbers := wrap(w.Substituted, numbersText, room)
	lines = append(lines, follow(numbers, wrap(w.Source, sourceText, room), room)...)
	under := ""
	switch {
	case w.Pinned:
		under = "pinned: checked"
	case len(usedBy) > 0:
		under = fmt.Sprintf("used by W%d", usedBy[0])
		if len(usedBy) > 1 {
			under = fmt.Sprintf("used by W%d, %d more", usedBy[0], len(usedBy)-1)
		}
		if len(usedBy) == 2 {
			under = fmt.Sprintf("used by W%d, W%d", usedBy[0], usedBy[1])
		}
	}
	h := max(float64(len(lines))*workLead, resultHigh+1)
	if under != "" {
		h = max(h, resultHigh+4.2)
	}
	return block{h: h + 1.4, draw: func(p *pad, y, h float64) {
		l := p.pg.l
		p.write(l, y+0.7+rise*workLead, fmt.Sprintf("W%d", n), workingNumber, ink.Start)
		p.lines(l+workNumber, y+0.7+rise*workLead, lines, workLead)
		x := p.pg.right() - resultWide
		p.frame(x, y+0.8, resultWide-0.25, resultHigh, 0.5, ink.Black)
		p.result(p.pg.right()-3, y+0.8+resultHigh/2+1.6, w)
		if under != "" {
			p.fit(p.pg.right(), y+0.8+resultHigh+3.2, under, noteText, resultWide+2, ink.End)
		}
		p.rule(l, y+h, p.pg.width, hairline, ink.Rule)
	}}
}

// result prints the value with as many digits as a calculator needs to agree.
func (p *pad) result(right, y float64, w *sizing.Working) {
	unit := spans(w.Unit, style{ink.Regular, 10, 4, ink.Black})
	value := spans(resultDigits(w.Value), style{ink.Bold, 13, 5, ink.Black})
	if w.Unit != "" {
		right -= p.text(right, y, unit, ink.End) + 1.2
	}
	p.text(right, y, value, ink.End)
}

// resultDigits prints a result with four significant digits at most; whole thousands
// stay whole.
func resultDigits(v float64) string {
	s := fmt.Sprintf("%.4g", v)
	if strings.ContainsRune(s, 'e') {
		s = sizing.Digits(v)
	}
	return strings.Replace(s, "-", "−", 1)
}
