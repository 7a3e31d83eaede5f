package quantity

import (
	"math"
	"strconv"
	"strings"
)

// LengthUnit is the unit in which the lengths of a job are printed and cut. The zero
// value is metres.
type LengthUnit int

// The units of a cutting list.
const (
	InMetres LengthUnit = iota
	InFeet
)

// A tape measure in feet reads inches, so a length below shortFeet is printed in
// whole inches; common practice, no source.
const shortFeet = 3

// Symbol is the unit's symbol, "m" or "ft".
func (u LengthUnit) Symbol() string {
	if u == InFeet {
		return "ft"
	}
	return "m"
}

// Of is the length as a number of the unit.
func (u LengthUnit) Of(l Metre) float64 {
	if u == InFeet {
		return float64(l) * metresPerFoot.den / metresPerFoot.num
	}
	return float64(l)
}

// Metres is the length that x of the unit is.
func (u LengthUnit) Metres(x float64) Metre {
	if u == InFeet {
		return Metre(metresPerFoot.of(x))
	}
	return Metre(x)
}

// Down is the longest length that Format prints in full and that is not above l: what
// a limit must be rounded to.
func (u LengthUnit) Down(l Metre) Metre {
	if u == InFeet && u.Of(l) < shortFeet {
		inches := math.Floor(float64(l) * metresPerInch.den / metresPerInch.num)
		return Metre(metresPerInch.of(inches))
	}
	unit := math.Pow10(u.decimals())
	return u.Metres(math.Floor(u.Of(l)*unit) / unit)
}

// Format prints a length as a fitter measures it: "9.25 m" to the centimetre, or
// "22.5 ft" to the tenth of a foot and "10 in" below a yard.
func (u LengthUnit) Format(l Metre) string {
	if inches, ok := u.inches(l); ok {
		return inches
	}
	return trimmed(u.Of(l), u.decimals()) + " " + u.Symbol()
}

// Column prints a length for a column whose head names the unit: always one decimal,
// two where centimetres count; below a yard in feet with its own unit, "10 in".
func (u LengthUnit) Column(l Metre) string {
	if inches, ok := u.inches(l); ok {
		return inches
	}
	text := trimmed(u.Of(l), u.decimals())
	if !strings.Contains(text, ".") {
		text += ".0"
	}
	return text
}

func (u LengthUnit) decimals() int {
	if u == InFeet {
		return 1
	}
	return 2
}

// inches prints a short length of a job in feet.
func (u LengthUnit) inches(l Metre) (string, bool) {
	if u != InFeet || u.Of(l) >= shortFeet || l <= 0 {
		return "", false
	}
	n := math.Round(float64(l) * metresPerInch.den / metresPerInch.num)
	return strconv.Itoa(int(math.Max(n, 1))) + " in", true
}

// trimmed prints x with at most n decimals and no zeros after them.
func trimmed(x float64, n int) string {
	text := strconv.FormatFloat(x, 'f', n, 64)
	if n > 0 {
		text = strings.TrimRight(strings.TrimRight(text, "0"), ".")
	}
	if text == "-0" {
		return "0"
	}
	return text
}
