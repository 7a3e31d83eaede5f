package quantity

import (
	"fmt"
	"math"
	"strconv"
	"strings"
)

// The law of ASTM B258: gauge 36 is 0.127 mm (0.005 in) thick, gauge 4/0 is 11.684 mm
// (0.46 in), and the 39 steps between them are in geometric progression, so that one
// step is a factor of 92^(1/39).
const (
	gauge36Diameter = 0.127
	gaugeRatio      = 92.0
	gaugeSteps      = 39.0
	thinnestGauge   = 40
	thickestGauge   = -3 // 4/0
)

// gaugeArea returns the cross-section of gauge n, where 0 is 1/0 and -3 is 4/0.
func gaugeArea(n int) SquareMM {
	d := gauge36Diameter * math.Pow(gaugeRatio, (36-float64(n))/gaugeSteps)
	return SquareMM(math.Pi / 4 * d * d)
}

const (
	wireNoun     = "a conductor size"
	wireExamples = "1.5 mm² or 16 AWG"
)

// ParseWireSize reads a conductor size: a cross-section such as "1.5 mm²" or a gauge
// of ASTM B258 such as "16 AWG", "AWG 16" or "4/0 AWG". Gauges run from 40 to 4/0.
// It does not ask whether the size is made. The error is always a *ParseError.
func ParseWireSize(s string) (WireSize, error) {
	fail := func(e ParseError) (WireSize, error) {
		e.Text, e.Want, e.Examples = s, wireNoun, wireExamples
		return WireSize{}, &e
	}
	if gauge, ok := cutAWG(s); ok {
		n, ok := gaugeNumber(gauge)
		if !ok {
			return fail(ParseError{Problem: BadValue, Why: "is no gauge of ASTM B258: they run from 40 AWG (thin) to 1 AWG, then 1/0 to 4/0 AWG (thick)"})
		}
		return WireSize{Area: gaugeArea(n), Gauge: gaugeText(n)}, nil
	}
	a, err := Parse[SquareMM](s)
	if err == nil && a <= 0 {
		return fail(ParseError{Problem: BadValue, Why: "is no conductor: the size is above zero"})
	}
	if err == nil {
		return WireSize{Area: a}, nil
	}
	e := *err.(*ParseError)
	bare := strings.TrimSpace(s)
	_, gauge := gaugeNumber(bare)
	switch {
	case gauge && strings.HasSuffix(bare, "/0"):
		e.Problem, e.Write = NoUnit, quote(bare, "AWG")
	case gauge:
		e.Write = quote(bare, "mm²") + " or " + quote(bare, "AWG")
	case e.Problem == UnknownUnit:
		e.Write = ""
	}
	return fail(e)
}

// cutAWG returns what stands with the letters AWG.
func cutAWG(s string) (string, bool) {
	t := strings.TrimSpace(fold(s))
	if len(t) < len("AWG") {
		return "", false
	}
	if front := len(t) - len("AWG"); strings.EqualFold(t[front:], "AWG") {
		return strings.TrimSpace(t[:front]), true
	}
	if strings.EqualFold(t[:len("AWG")], "AWG") {
		return strings.TrimSpace(t[len("AWG"):]), true
	}
	return "", false
}

// gaugeNumber reads "16" as 16 and "4/0" as -3.
func gaugeNumber(s string) (int, bool) {
	zeros, aught := strings.CutSuffix(s, "/0")
	n, err := strconv.Atoi(zeros)
	if err != nil || digits(zeros, 0) != len(zeros) {
		return 0, false
	}
	if aught {
		return 1 - n, 1 <= n && 1-n >= thickestGauge
	}
	return n, n <= thinnestGauge
}

func gaugeText(n int) string {
	if n <= 0 {
		return strconv.Itoa(1-n) + "/0"
	}
	return strconv.Itoa(n)
}

// String returns "1.5 mm²" or "16 AWG".
func (w WireSize) String() string {
	if w.Gauge != "" {
		return w.Gauge + " AWG"
	}
	return w.Area.String()
}

const (
	ratingNoun     = "a voltage and a current"
	ratingExamples = "24 V 0.5 A"
)

// ParseRating reads a voltage and a current, such as "24 V 0.5 A". The error is
// always a *ParseError.
func ParseRating(s string) (Rating, error) {
	fail := func(e ParseError) (Rating, error) {
		e.Text, e.Want, e.Examples = s, ratingNoun, ratingExamples
		return Rating{}, &e
	}
	v, rest, err := Cut[Volt](s)
	if err != nil {
		e := *err.(*ParseError)
		if a, volts, err := Cut[Ampere](s); err == nil {
			if v, err := Parse[Volt](volts); err == nil {
				return fail(ParseError{Problem: BadValue, Why: fmt.Sprintf("has the current first: write %q", Rating{v, a})})
			}
		}
		if e.Problem == NoUnit {
			e.Write = ""
		}
		return fail(e)
	}
	if strings.TrimSpace(rest) == "" {
		return fail(ParseError{Problem: BadValue, Why: "says no current: write both, such as " + ratingExamples})
	}
	a, err := Parse[Ampere](rest)
	if err != nil {
		e := *err.(*ParseError)
		e.Write = ""
		return fail(e)
	}
	return Rating{Volt: v, Ampere: a}, nil
}

// String returns "24 V 0.5 A". The current stays in amperes.
func (r Rating) String() string {
	dec := decimalOf(float64(r.Ampere), usualDigits)
	return r.Volt.String() + " " + dec.shifted(0) + " A"
}
