package packet

import (
	"fmt"
	"strings"
	"unicode"

	"gloamwright/internal/sizing"
	"gloamwright/layout/ink"
)

// workings show how every value came about, so that a pocket calculator can check it.
func (b *book) workings() *section {
	s := &section{key: keyWorkings, title: "Workings", document: "Workings", letter: "C", label: "Before",
		purpose: "Use this sheet to check any figure with a pocket calculator.",
		note:    fmt.Sprintf("%s names the inputs. A number in a box is the one that every other sheet prints.", b.upperSheets(keyBasis))}
	number := map[string]int{}
	for i, w := range b.d.Workings {
		number[w.For+": "+w.Name] = i + 1
	}
	usedBy := make([][]string, len(b.d.Workings))
	for i, w := range b.d.Workings {
		for _, u := range w.Uses {
			if n := number[u]; n > 0 && n != i+1 {
				usedBy[n-1] = append(usedBy[n-1], fmt.Sprintf("W%d", i+1))
			}
		}
	}
	for _, g := range b.workingGroups() {
		s.blocks = append(s.blocks, b.head(0, b.pg.width, b.workingTitle(g.subject), ""))
		for k, i := range g.list {
			c := b.working(i+1, &b.d.Workings[i], usedBy[i])
			c.marks = []string{workingMark(b.d.Workings[i].For, b.d.Workings[i].Name)}
			if k == 0 {
				c.marks = append(c.marks, "working of "+g.subject)
			}
			s.blocks = append(s.blocks, c)
		}
	}
	return s
}

// workingGroup is the workings of one thing, by their place in the Design.
type workingGroup struct {
	subject string
	list    []int
}

// workingGroups keeps the workings of a thing together, in the order in which the things
// first appear.
func (b *book) workingGroups() []workingGroup {
	var out []workingGroup
	at := map[string]int{}
	for i, w := range b.d.Workings {
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

func workingMark(subject, name string) string { return "working " + subject + ": " + name }

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
	resultWide = 34.0
	resultHigh = 9.2
)

// working is one card: name, formula, the numbers put in, the source, and the result in
// its box.
func (b *book) working(n int, w *sizing.Working, usedBy []string) block {
	room := b.pg.width - workNumber - resultWide - 4
	name := wrap(upper(w.Name), tableText.as(ink.Bold), room)
	formula := wrapLine(formulaLine(w.Formula), formulaText, room)
	numbers := wrap(w.Substituted, numbersText, room)
	source := wrap(w.Source, sourceText, room)
	left := float64(len(name))*4.4 + float64(len(formula))*formulaText.lead + float64(len(numbers))*numbersText.lead + float64(len(source))*sourceText.lead
	under := ""
	switch {
	case w.Pinned:
		under = "pinned: checked"
	case len(usedBy) > 0:
		under = "used by " + strings.Join(usedBy[:min(2, len(usedBy))], ", ")
		if len(usedBy) > 2 {
			under += " …"
		}
	}
	right := resultHigh + 1.4
	if under != "" {
		right += 4
	}
	h := max(left, right) + 2
	return block{h: h, draw: func(p *pad, y, h float64) {
		l := p.pg.l
		p.write(l, y+rise*4.4+0.6, fmt.Sprintf("W%d", n), style{ink.MonoBold, 8.97, 4, ink.Black}, ink.Start)
		at := y + 0.6
		p.lines(l+workNumber, at+rise*4.4, name, 4.4)
		at += float64(len(name)) * 4.4
		p.lines(l+workNumber, at+rise*formulaText.lead, formula, formulaText.lead)
		at += float64(len(formula)) * formulaText.lead
		p.lines(l+workNumber, at+rise*numbersText.lead, numbers, numbersText.lead)
		at += float64(len(numbers)) * numbersText.lead
		p.lines(l+workNumber, at+rise*sourceText.lead, source, sourceText.lead)
		x := p.pg.right() - resultWide
		p.frame(x, y+1, resultWide-0.25, resultHigh, 0.5, ink.Black)
		p.result(p.pg.right()-3.5, y+1+resultHigh/2+1.65, w)
		if under != "" {
			p.fit(p.pg.right(), y+1+resultHigh+4, under, noteText, resultWide+2, ink.End)
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

// indexDrop is how far an index stands below the line, in em.
const indexDrop = 0.18

// indexSpace keeps the index clear of a leaning letter, mm.
const indexSpace = 0.3

// formulaLine sets a formula: letters in italics, words and signs upright, what follows
// an underscore as an index.
func formulaLine(f string) line {
	var out line
	put := func(s string, face ink.Face, index bool) {
		if s == "" {
			return
		}
		st := formulaText.as(face)
		if index {
			st.pt *= 0.72
		}
		for _, x := range fallBack(span{text: s, font: st.font(), color: ink.Black}) {
			if index {
				x.drop = formulaText.font().Size * indexDrop
				x.pre = indexSpace
			}
			if n := len(out); n > 0 && !index && x.font.Face != ink.Italic && out[n-1].font.Face == ink.Italic && s != noBreak && s != " " {
				x.pre = indexSpace // a leaning letter reaches over its right neighbour
			}
			out = out.add(x)
		}
	}
	runes := []rune(glue(f))
	for i := 0; i < len(runes); {
		r := runes[i]
		switch {
		case r == '_' && i > 0:
			j := i + 1
			for j < len(runes) && (unicode.IsLetter(runes[j]) || unicode.IsDigit(runes[j])) {
				j++
			}
			put(string(runes[i+1:j]), ink.Regular, true)
			i = j
		case unicode.IsLetter(r):
			j := i
			for j < len(runes) && unicode.IsLetter(runes[j]) {
				j++
			}
			face := ink.Italic
			if j-i > 1 && !(runes[i] == 'Δ' || runes[i] == 'Σ') {
				face = ink.Regular // a word, not a symbol
			}
			put(string(runes[i:j]), face, false)
			i = j
		default:
			put(string(r), ink.Regular, false)
			i++
		}
	}
	return out
}
