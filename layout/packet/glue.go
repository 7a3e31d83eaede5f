package packet

import (
	"strings"
	"unicode/utf8"
)

const noBreak = "\u00A0"

// unitWords stand on the line of their number.
var unitWords = wordSet("mm² cm² m³/h mm km m ft V kA mA A Ah kΩ MΩ mΩ Ω kW mW W °C K/W K % lx lm Nm h min s ms days day hours hour AWG pc lb kg µF nF mF")

// numberedWords stand on the line of their number or letter.
var numberedWords = wordSet("Sheet Sheets sheet sheets Line Lines line lines Block Blocks block blocks " +
	"Condition Conditions condition conditions Place Places place places Revision revision")

func wordSet(s string) map[string]bool {
	set := map[string]bool{}
	for _, w := range strings.Fields(s) {
		set[w] = true
	}
	return set
}

// glue puts no-break spaces where a line must not end: between number and unit, at
// signs, between a word and its number, in thousands.
func glue(text string) string {
	var out strings.Builder
	last := 0
	for i := range len(text) {
		if text[i] != ' ' || !held(text[:i], text[i+1:]) {
			continue
		}
		out.WriteString(text[last:i])
		out.WriteString(noBreak)
		last = i + 1
	}
	if last == 0 {
		return text
	}
	out.WriteString(text[last:])
	return out.String()
}

// held reports whether the space between two texts must not end a line.
func held(before, after string) bool {
	if strings.HasPrefix(after, "×") {
		return true
	}
	if before == "" {
		return false
	}
	if r, _ := utf8.DecodeLastRuneInString(before); strings.ContainsRune("≤≥±×÷", r) {
		return true
	}
	if after == "" {
		return false
	}
	first, boundary := after[0], len(after) < 2 || !wordByte(after[1])
	switch {
	case digit(before[len(before)-1]) && (startsWithUnit(after) || threeDigits(after)):
		return true
	case digit(first):
		return lastWord(before) == "DC" || numbered(before)
	case first >= 'A' && first <= 'Z' && (boundary || digit(after[1])):
		return numbered(before)
	}
	return false
}

func digit(c byte) bool { return c >= '0' && c <= '9' }

func wordByte(c byte) bool {
	return digit(c) || c >= 'a' && c <= 'z' || c >= 'A' && c <= 'Z' || c == '_'
}

// startsWithUnit reports whether s is a unit and ends there, or goes on with a sign.
func startsWithUnit(s string) bool {
	const signs = " \t\n,.;:)/"
	n := strings.IndexAny(s, signs)
	if n < 0 {
		return unitWords[s]
	}
	if s[n] == '/' && !unitWords[s[:n]] { // the slash of m³/h
		if more := strings.IndexAny(s[n+1:], signs); more < 0 {
			n = len(s)
		} else {
			n += 1 + more
		}
	}
	return unitWords[s[:n]]
}

// threeDigits reports whether s begins with three digits and no more.
func threeDigits(s string) bool {
	return len(s) >= 3 && digit(s[0]) && digit(s[1]) && digit(s[2]) && (len(s) == 3 || !wordByte(s[3]))
}

func lastWord(s string) string {
	i := len(s)
	for i > 0 && wordByte(s[i-1]) {
		i--
	}
	return s[i:]
}

// numbered reports whether s ends with a word that a number or letter follows.
func numbered(s string) bool {
	w := lastWord(s)
	return numberedWords[w] || w == "point" && (strings.HasSuffix(s, "Hold point") || strings.HasSuffix(s, "hold point"))
}
