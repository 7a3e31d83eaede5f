package sizing

import (
	"fmt"
	"math"
	"strconv"
	"strings"
	"unicode"
)

// calculator evaluates what a Working prints, as a person with a pocket calculator
// would: it skips units, and takes what stands behind the last arrow as read from a
// table.
type calculator struct {
	in  []rune
	pos int
}

func calculate(s string) (v float64, err error) {
	if i := strings.LastIndex(s, "→"); i >= 0 {
		s = s[i+len("→"):]
		if j := strings.LastIndex(s, "= "); j >= 0 {
			s = s[j+len("= "):]
		}
	}
	c := &calculator{in: []rune(s)}
	defer func() {
		if r := recover(); r != nil {
			err = fmt.Errorf("%v in %q", r, s)
		}
	}()
	v = c.sum()
	c.space()
	if c.pos < len(c.in) {
		return 0, fmt.Errorf("stopped at %q in %q", string(c.in[c.pos:]), s)
	}
	return v, nil
}

func (c *calculator) space() {
	for c.pos < len(c.in) && c.in[c.pos] == ' ' {
		c.pos++
	}
}

// take consumes a rune if it comes next.
func (c *calculator) take(r rune) bool {
	c.space()
	if c.pos < len(c.in) && c.in[c.pos] == r {
		c.pos++
		return true
	}
	return false
}

func (c *calculator) sum() float64 {
	v := c.product()
	for {
		switch {
		case c.take('+'):
			v += c.product()
		case c.take('−'):
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
		case c.take('×'):
			v *= c.power()
		case c.take('÷'):
			v /= c.power()
		default:
			return v
		}
	}
}

func (c *calculator) power() float64 {
	v := c.atom()
	if c.take('^') {
		v = math.Pow(v, c.atom())
	}
	return v
}

func (c *calculator) atom() float64 {
	if c.take('−') {
		return -c.atom()
	}
	if c.take('√') {
		return math.Sqrt(c.atom())
	}
	for _, f := range []string{"max", "min", "ln"} {
		if strings.HasPrefix(string(c.in[c.pos:]), f+"(") {
			c.pos += len(f)
			return c.function(f)
		}
	}
	if c.take('(') {
		v := c.sum()
		if !c.take(')') {
			panic("missing bracket")
		}
		return v
	}
	start := c.pos
	for c.pos < len(c.in) && (unicode.IsDigit(c.in[c.pos]) || c.in[c.pos] == '.') {
		c.pos++
	}
	v, err := strconv.ParseFloat(string(c.in[start:c.pos]), 64)
	if err != nil {
		panic("no number at " + string(c.in[start:]))
	}
	c.unit()
	return v
}

// unit skips a unit behind a number.
func (c *calculator) unit() {
	at := c.pos
	c.space()
	for c.pos < len(c.in) && (unicode.IsLetter(c.in[c.pos]) || strings.ContainsRune("°Ωµ²³·⁻¹/%½", c.in[c.pos])) {
		c.pos++
		at = c.pos
	}
	c.pos = at
}

func (c *calculator) function(name string) float64 {
	c.take('(')
	v := c.sum()
	for c.take(';') {
		w := c.sum()
		if name == "max" {
			v = math.Max(v, w)
		} else {
			v = math.Min(v, w)
		}
	}
	if !c.take(')') {
		panic("missing bracket")
	}
	if name == "ln" {
		return math.Log(v)
	}
	return v
}
