package quantity

import (
	"fmt"
	"strings"
)

// ParseRange reads two quantities of one kind joined by "..", such as "18 V..32 V";
// both carry their unit. The low end comes first; the ends may be equal. The error is
// always a *ParseError.
func ParseRange[T Quantity](s string) (Range[T], error) {
	low, high, found := cutDots(s)
	if !found {
		return Range[T]{}, notRange[T](s)
	}
	h, err := Parse[T](high)
	if err != nil {
		return Range[T]{}, inRange[T](s, err)
	}
	l, err := Parse[T](low)
	if err != nil {
		pe := inRange[T](s, err)
		if pe.Problem == NoUnit {
			pe.Write = fmt.Sprintf("\"%s %s..%s\"", strings.TrimSpace(low), unitOf[T](high), strings.TrimSpace(high))
		}
		return Range[T]{}, pe
	}
	if l > h {
		return Range[T]{}, inRange[T](s, &ParseError{Problem: Reversed,
			Write: `"` + strings.TrimSpace(high) + ".." + strings.TrimSpace(low) + `"`})
	}
	return Range[T]{Low: l, High: h}, nil
}

// cutDots splits s at the dots between two ends: "..", "..." or "…".
func cutDots(s string) (low, high string, ok bool) {
	if low, high, ok = strings.Cut(s, "…"); ok {
		return low, high, true
	}
	low, high, ok = strings.Cut(s, "..")
	return low, strings.TrimPrefix(high, "."), ok
}

// unitOf returns the symbol of the unit in s, which parses as a T.
func unitOf[T Quantity](s string) string {
	d := dimensionOf[T]()
	_, u, _, err := d.cutTerm(s, strings.TrimLeft(fold(s), " "))
	if err != nil {
		return d.units[0].symbol
	}
	return u.symbol
}

// rangeExamples names a range of T in messages.
func rangeExamples[T Quantity]() string {
	switch dimensionOf[T]() {
	case voltage:
		return "18 V..32 V"
	case temperature:
		return "5 °C..30 °C"
	}
	example := dimensionOf[T]().examples
	return example + ".." + example
}

// inRange turns the failure of one end into one of the whole text.
func inRange[T Quantity](s string, err error) *ParseError {
	pe := *err.(*ParseError)
	pe.Want = "a range from " + dimensionOf[T]().noun + " to another"
	pe.Examples = rangeExamples[T]()
	if pe.Problem != WrongUnit {
		pe.Text = s
	}
	return &pe
}

// notRange explains a text without dots, which may be one value or another way of
// writing a range.
func notRange[T Quantity](s string) *ParseError {
	pe := inRange[T](s, &ParseError{Problem: BadValue})
	low, rest, err := Cut[T](s)
	if err != nil {
		pe.Problem = Malformed
		return pe
	}
	rest = strings.TrimSpace(rest)
	if rest == "" {
		pe.Why = "is a single value; a range belongs here, such as " + pe.Examples
		return pe
	}
	for _, joint := range []string{"-", "–", "—", "to", "until", "bis"} {
		if high, err := Parse[T](strings.TrimPrefix(rest, joint)); strings.HasPrefix(rest, joint) && err == nil {
			pe.Why = fmt.Sprintf("is no range: join the two ends with two dots, as in \"%s..%s\"", Format(low, 0), Format(high, 0))
			return pe
		}
	}
	pe.Problem = Malformed
	return pe
}

// String returns "18 V..32 V".
func (r Range[T]) String() string { return fmt.Sprintf("%v..%v", r.Low, r.High) }

// maxTolerance keeps the low end of a toleranced value above zero.
const maxTolerance = Ratio(1)

// ParseToleranced reads a nominal value with a symmetrical tolerance in per cent,
// such as "230 V ± 10 %"; "+-" and "+/-" stand for "±". The error is always a
// *ParseError.
func ParseToleranced[T Quantity](s string) (Toleranced[T], error) {
	example := dimensionOf[T]().examples + " ± 10 %"
	if dimensionOf[T]() == voltage {
		example = "230 V ± 10 %"
	}
	fail := func(e ParseError) (Toleranced[T], error) {
		e.Want, e.Examples = dimensionOf[T]().noun+" with its tolerance", example
		if e.Text == "" {
			e.Text = s
		}
		return Toleranced[T]{}, &e
	}
	nominal, rest, err := Cut[T](s)
	if err != nil {
		pe := *err.(*ParseError)
		if pe.Problem == NoUnit {
			pe.Write = ""
		}
		return fail(pe)
	}
	rest = strings.TrimSpace(rest)
	if rest == "" {
		return fail(ParseError{Problem: BadValue, Why: fmt.Sprintf("says no tolerance: write %q, with the supply's own figure", Format(nominal, 0)+" ± 10 %")})
	}
	for _, sign := range []string{"±", "+-", "+/-"} {
		after, ok := strings.CutPrefix(rest, sign)
		if !ok {
			continue
		}
		plus, err := Parse[Ratio](after)
		if err != nil {
			pe := *err.(*ParseError)
			pe.Text = strings.TrimSpace(after)
			pe.Want, pe.Examples = ratio.noun, ratio.examples
			return Toleranced[T]{}, &pe
		}
		if plus < 0 || plus >= maxTolerance {
			return fail(ParseError{Problem: BadValue, Why: "has a tolerance outside 0 % to 100 %"})
		}
		return Toleranced[T]{Nominal: nominal, Plus: plus}, nil
	}
	return fail(ParseError{Problem: Trailing, Why: rest, Write: `"` + Format(nominal, 0) + ` ± 10 %"`})
}

// String returns "230 V ± 10 %".
func (t Toleranced[T]) String() string { return fmt.Sprintf("%v ± %v", t.Nominal, t.Plus) }
