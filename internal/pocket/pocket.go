// Package pocket is the pocket calculator with which tests check what a Working
// prints. It knows what a person needs to know to key it in: the operations
// × ÷ + − √ ^ and brackets, max, min and ln, and that words and units are not keyed.
package pocket

import (
	"fmt"
	"math"
	"strconv"
	"strings"
	"unicode/utf8"
)

// Result returns the value of what a Working substituted: what stands behind the last
// arrow, if there is one, read from a table; else the whole. Every equals sign on the
// way must hold to the digits that are printed.
func Result(s string) (float64, error) {
	before, read, arrow := cutLast(s, "→")
	if arrow {
		if err := equalities(before); err != nil {
			return 0, err
		}
		s = read
	}
	if err := equalities(s); err != nil {
		return 0, err
	}
	if _, last, ok := cutLast(s, " = "); ok {
		s = last
	}
	return calculate(s)
}

func cutLast(s, sep string) (before, after string, found bool) {
	i := strings.LastIndex(s, sep)
	if i < 0 {
		return "", s, false
	}
	return s[:i], s[i+len(sep):], true
}

// printedDigits is the relative error that the digits of an intermediate result leave.
const printedDigits = 1e-3

// equalities checks the sides of every equals sign that have a value on both.
func equalities(s string) error {
	parts := strings.Split(s, " = ")
	for i := 1; i < len(parts); i++ {
		a, errA := calculate(parts[i-1])
		b, errB := calculate(parts[i])
		if errA != nil || errB != nil {
			return fmt.Errorf("%q: %w", s, firstOf(errA, errB))
		}
		if math.Abs(a-b) > printedDigits*math.Max(math.Abs(a), math.Abs(b)) {
			return fmt.Errorf("%q: %g is not %g", s, a, b)
		}
	}
	return nil
}

func firstOf(a, b error) error {
	if a != nil {
		return a
	}
	return b
}

// calculator reads one expression.
type calculator struct{ rest string }

// mistake is what ends the reading of an expression.
type mistake struct{ text string }

func calculate(s string) (v float64, err error) {
	c := &calculator{s}
	defer func() {
		if m, ok := recover().(mistake); ok {
			err = fmt.Errorf("%s in %q", m.text, s)
		}
	}()
	v = c.sum()
	if c.space(); c.rest != "" {
		return 0, fmt.Errorf("%q is left over of %q", c.rest, s)
	}
	return v, nil
}

func (c *calculator) space() { c.rest = strings.TrimLeft(c.rest, " ") }

// take takes a word that comes next.
func (c *calculator) take(word string) bool {
	c.space()
	after, ok := strings.CutPrefix(c.rest, word)
	if ok {
		c.rest = after
	}
	return ok
}

func (c *calculator) sum() float64 {
	v := c.product()
	for {
		switch {
		case c.take("+ "):
			v += c.product()
		case c.take("− "):
			v -= c.product()
		default:
			return v
		}
	}
}

func (c *calculator) product() float64 {
	v := c.power()
	for {
		switch {
		case c.take("× "):
			v *= c.power()
		case c.take("÷ "):
			v /= c.power()
		default:
			return v
		}
	}
}

func (c *calculator) power() float64 {
	v := c.atom()
	if c.take("^") {
		return math.Pow(v, c.atom())
	}
	return v
}

func (c *calculator) atom() float64 {
	switch {
	case c.take("−"):
		return -c.atom()
	case c.take("√"):
		return math.Sqrt(c.atom())
	case c.take("max("):
		return c.list(math.Max)
	case c.take("min("):
		return c.list(math.Min)
	case c.take("ln("):
		return math.Log(c.list(nil))
	case c.take("("):
		return c.list(nil)
	case c.take("∞"):
		c.words()
		return math.Inf(1)
	}
	end := strings.IndexFunc(c.rest, func(r rune) bool { return (r < '0' || r > '9') && r != '.' })
	if end < 0 {
		end = len(c.rest)
	}
	v, err := strconv.ParseFloat(c.rest[:end], 64)
	if err != nil {
		panic(mistake{fmt.Sprintf("no number at %q", c.rest)})
	}
	c.rest = c.rest[end:]
	c.words()
	return v
}

// list reads values up to the closing bracket.
func (c *calculator) list(of func(a, b float64) float64) float64 {
	v := c.sum()
	for of != nil && c.take(";") {
		v = of(v, c.sum())
	}
	if !c.take(")") {
		panic(mistake{fmt.Sprintf("no bracket closes before %q", c.rest)})
	}
	c.words()
	return v
}

// words passes over unit and words behind a number, up to the next operation.
func (c *calculator) words() {
	end := len(c.rest)
	for _, sign := range []string{" + ", " − ", " × ", " ÷ ", " ; ", ")", "^"} {
		if i := strings.Index(c.rest, sign); i >= 0 {
			end = min(end, i)
		}
	}
	if said := strings.TrimRight(c.rest[:end], " "); strings.ContainsAny(lastRune(said), "+−×÷") {
		panic(mistake{fmt.Sprintf("nothing stands behind %q", said)})
	}
	c.rest = c.rest[end:]
}

func lastRune(s string) string {
	_, n := utf8.DecodeLastRuneInString(s)
	return s[len(s)-n:]
}
