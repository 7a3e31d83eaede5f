package packet

import (
	"unicode"

	"gloamwright/layout/ink"
)

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
