package quantity

import (
	"math"
	"strings"
	"unicode"
	"unicode/utf8"
)

// Parse reads a number and its unit, such as "24 V", "1.5 mm2" or "22 ft 6 in".
// The space between them is optional. Units are those of T's dimension with their
// usual SI prefixes; U+00B5 and U+03BC, U+03A9 and U+2126 are the same letter. The
// error is always a *ParseError; the result is always finite.
func Parse[T Quantity](s string) (T, error) {
	v, rest, err := Cut[T](s)
	if err != nil {
		return 0, err
	}
	if strings.TrimSpace(rest) != "" {
		written := strings.TrimSpace(strings.TrimSuffix(s, rest))
		return 0, wanted[T](s, ParseError{Problem: Trailing, Why: strings.TrimSpace(rest), Write: `"` + written + `" alone`})
	}
	return v, nil
}

// Cut reads the quantity at the front of s and returns what follows it, as written.
// The error is always a *ParseError.
func Cut[T Quantity](s string) (v T, rest string, err error) {
	d := dimensionOf[T]()
	value, n, perr := d.cut(s)
	if perr != nil {
		return 0, s, perr
	}
	return T(value), dropRunes(s, n), nil
}

// wanted completes e with what T calls for.
func wanted[T Quantity](text string, e ParseError) *ParseError {
	return dimensionOf[T]().failure(text, e)
}

func (d *dimension) failure(text string, e ParseError) *ParseError {
	e.Text, e.Want, e.Examples = text, d.noun, d.examples
	return &e
}

// cut reads one quantity of dimension d at the front of text. It returns its value
// in d's own unit and how many runes it took.
func (d *dimension) cut(text string) (value float64, runes int, err *ParseError) {
	folded := fold(text)
	s := strings.TrimLeft(folded, " ")
	n, u, rest, err := d.cutTerm(text, s)
	if err != nil {
		return 0, 0, err
	}
	value = scale(n, u)
	for d.compound && value >= 0 {
		next, v, after, e := d.cutTerm(text, strings.TrimLeft(rest, " "))
		if e != nil || v.size() >= u.size() || !isDigit(next.raw[0]) {
			break
		}
		value += scale(next, v)
		u, rest = v, after
	}
	if math.IsInf(value, 0) {
		return 0, 0, d.failure(text, ParseError{Problem: TooLarge})
	}
	return value, utf8.RuneCountInString(folded) - utf8.RuneCountInString(rest), nil
}

// cutTerm reads one number and one unit of d at the front of s, the folded rest of
// text.
func (d *dimension) cutTerm(text, s string) (number, *unit, string, *ParseError) {
	n, comma, rest, ok := cutNumber(s)
	if !ok {
		return n, nil, s, d.failure(text, ParseError{Problem: Malformed})
	}
	if comma != "" {
		return n, nil, s, d.failure(text, ParseError{Problem: Comma, Write: withoutComma(n.raw, comma, rest)})
	}
	rest = strings.TrimLeft(rest, " ")
	sp, known := unitAt(rest)
	switch {
	case known && sp.dim == d:
		return n, sp.unit, rest[len(sp.text):], nil
	case known:
		return n, nil, s, d.failure(text, ParseError{Problem: WrongUnit, Unit: sp.text, Is: sp.dim.noun})
	}
	word := wordAt(rest)
	if word == "" {
		return n, nil, s, d.failure(text, ParseError{Problem: NoUnit, Write: d.proposals(n.raw)})
	}
	e := ParseError{Problem: UnknownUnit, Unit: word, Write: d.proposals(n.raw)}
	if near := d.nearCase(word); near != "" {
		e.Write = quote(n.raw, near)
	} else if letter, ok := letterForPoint(n.raw, word); ok && d == resistance {
		e.Write = letter
	}
	return n, nil, s, d.failure(text, e)
}

// size returns how many of the dimension's own unit u is, for ordering.
func (u *unit) size() float64 { return u.factor.of(math.Pow10(u.shift)) }

// scale converts n of unit u to the dimension's own unit.
func scale(n number, u *unit) float64 {
	return u.factor.of(n.times10(u.shift)-u.zero) + 0 // +0 turns a negative zero into zero
}

// wordAt returns the run of characters at the front of s that looks like a unit.
func wordAt(s string) string {
	if s == "" || strings.HasPrefix(s, "..") || strings.HasPrefix(s, "…") || isDigit(s[0]) {
		return ""
	}
	end := strings.IndexFunc(s, func(r rune) bool { return unicode.IsSpace(r) || r == ',' || r == '±' })
	if end < 0 {
		end = len(s)
	}
	if dots := strings.Index(s[:end], ".."); dots > 0 {
		end = dots
	}
	return s[:end]
}

// letterForPoint reads the workshop notation "4k7": the prefix stands for the point.
func letterForPoint(before, word string) (string, bool) {
	if len(word) < 2 || digits(word, 1) != len(word) {
		return "", false
	}
	switch word[0] {
	case 'k', 'K':
		return quote(before+"."+word[1:], "kΩ"), true
	case 'M':
		return quote(before+"."+word[1:], "MΩ"), true
	case 'R', 'r':
		return quote(before+"."+word[1:], "Ω"), true
	}
	return "", false
}

// proposals lists n with each unit that d offers: "9 m" or "9 ft".
func (d *dimension) proposals(n string) string {
	list := make([]string, len(d.offer))
	for i, u := range d.offer {
		list[i] = quote(n, u)
	}
	if len(list) < 2 {
		return strings.Join(list, "")
	}
	return strings.Join(list[:len(list)-1], ", ") + " or " + list[len(list)-1]
}

func quote(n, u string) string { return `"` + n + " " + u + `"` }

// withoutComma proposes the number with a point, and without any sign when the
// comma may part thousands.
func withoutComma(whole, comma, rest string) string {
	tail := ""
	if sp, ok := unitAt(strings.TrimLeft(rest, " ")); ok {
		tail = " " + sp.unit.symbol
	}
	fraction := comma[1:]
	switch {
	case strings.ContainsAny(fraction, ",."): // 1,500.5 or 1,500,000
		return `"` + whole + strings.ReplaceAll(comma, ",", "") + tail + `"`
	case strings.Contains(whole, "."): // 1.500,5
		return `"` + strings.ReplaceAll(whole, ".", "") + "." + fraction + tail + `"`
	}
	point := `"` + whole + "." + fraction + tail + `"`
	if len(fraction) == 3 {
		return point + ` or "` + whole + fraction + tail + `"`
	}
	return point
}

// dropRunes returns s without its first n runes.
func dropRunes(s string, n int) string {
	for ; n > 0; n-- {
		_, size := utf8.DecodeRuneInString(s)
		s = s[size:]
	}
	return s
}
