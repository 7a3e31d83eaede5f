package sizing

import (
	"math"
	"strconv"
	"strings"
)

// Working is how one value was found. Putting Substituted into a pocket calculator
// gives Value to at least three digits: numbers stand in it in the units that they
// carry, × ÷ + − √ ^ and brackets are the only operations, and "max" and "min" take
// the greater and the lesser. A value read from a table has its result behind "→".
type Working struct {
	For         string // designation, circuit or stage; the caller fills it in
	Name        string // what the value is
	Formula     string // in symbols
	Substituted string // the same with numbers and units
	Value       float64
	Unit        string
	Source      string
	Pinned      bool     // given by the user and checked, not chosen
	Uses        []string // names of the workings that feed this one
}

// named returns w with its name and subject set, for callers that tell apart several
// workings of one method.
func (w Working) Named(subject, name string) Working {
	w.For, w.Name = subject, name
	return w
}

// shownDigits is how many significant digits a number in a Working carries: enough
// that the calculator's result agrees with the program's.
const shownDigits = 6

// num prints a number in the unit as given, without picking a prefix.
func num(v float64, unit string) string {
	s := plain(v)
	if unit == "" {
		return s
	}
	return s + " " + unit
}

func plain(v float64) string {
	if math.IsInf(v, 0) || math.IsNaN(v) {
		return "∞"
	}
	s := strconv.FormatFloat(v, 'g', shownDigits, 64)
	if strings.ContainsRune(s, 'e') {
		d := shownDigits - 1 - int(math.Floor(math.Log10(math.Abs(v))))
		s = strconv.FormatFloat(v, 'f', max(d, 0), 64)
	}
	if strings.ContainsRune(s, '.') {
		s = strings.TrimRight(strings.TrimRight(s, "0"), ".")
	}
	return strings.Replace(s, "-", "−", 1)
}

// bracketed prints a number so that it can stand behind a sign.
func bracketed(v float64, unit string) string {
	if v < 0 {
		return "(" + num(v, unit) + ")"
	}
	return num(v, unit)
}

// join puts parts together with an operator.
func join(op string, parts ...string) string { return strings.Join(parts, " "+op+" ") }

// Digits prints the value of a Working with as many digits as a pocket calculator
// needs to agree with it.
func Digits(v float64) string { return plain(v) }
