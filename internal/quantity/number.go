package quantity

import (
	"math"
	"strconv"
	"strings"
)

// maxNumber bounds the characters of one number and maxPower its exponent, so that
// no text makes the conversion slow. Every float64 fits well inside.
const (
	maxNumber = 60
	maxPower  = 400
)

// number is a decimal number as written, split so that a power of ten can be
// applied without rounding twice.
type number struct {
	text     string // sign, digits and point
	exponent int
	raw      string // all of it, as in the text
}

// times10 returns n·10^shift correctly rounded; an infinity when it overflows.
func (n number) times10(shift int) float64 {
	v, err := strconv.ParseFloat(n.text+"e"+strconv.Itoa(n.exponent+shift), 64)
	if err != nil {
		return math.Inf(1)
	}
	return v
}

// cutNumber splits the number off the front of s, which is folded. It returns
// false when s does not start with one. A comma inside the number ends up in
// comma, with the digits behind it.
func cutNumber(s string) (n number, comma, rest string, ok bool) {
	i := 0
	if i < len(s) && (s[i] == '+' || s[i] == '-') {
		i++
	}
	first := i
	i = digits(s, i)
	whole := i - first
	if i+1 < len(s) && s[i] == '.' && isDigit(s[i+1]) {
		i = digits(s, i+1)
	} else if whole == 0 {
		return number{}, "", s, false
	}
	n.text = strings.TrimPrefix(s[:i], "+")
	if i+1 < len(s) && s[i] == ',' && isDigit(s[i+1]) {
		end := i
		for end+1 < len(s) && (s[end] == ',' || s[end] == '.') && isDigit(s[end+1]) {
			end = digits(s, end+1)
		}
		n.raw = s[:i]
		return n, s[i:end], s[end:], true
	}
	if j, power, found := cutExponent(s, i); found {
		n.exponent = power
		i = j
	}
	n.raw = s[:i]
	return n, "", s[i:], len(n.raw) <= maxNumber
}

// cutExponent reads "e3" or "E-3" at s[i:].
func cutExponent(s string, i int) (end, power int, ok bool) {
	if i >= len(s) || s[i] != 'e' && s[i] != 'E' {
		return i, 0, false
	}
	j := i + 1
	if j < len(s) && (s[j] == '+' || s[j] == '-') {
		j++
	}
	end = digits(s, j)
	if end == j {
		return i, 0, false
	}
	power, err := strconv.Atoi(s[i+1 : end])
	if err != nil || power > maxPower {
		power = maxPower
	}
	return end, max(power, -maxPower), true
}

func isDigit(b byte) bool { return '0' <= b && b <= '9' }

// digits returns the end of the run of digits in s that starts at i.
func digits(s string, i int) int {
	for i < len(s) && isDigit(s[i]) {
		i++
	}
	return i
}
