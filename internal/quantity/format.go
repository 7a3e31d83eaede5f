package quantity

import (
	"math"
	"strconv"
	"strings"
)

// usualDigits is how many significant digits String prints at most.
const usualDigits = 4

// Format returns v with its unit and at most the given number of significant
// digits, without padding zeros: "24 V", "300 mA", "1.5 mm²". It picks the prefix.
// With digits 0 it prints as many as Parse needs to read exactly v again. A value
// that is not finite prints as "∞", "-∞" or "NaN" with the unit.
func Format[T Quantity](v T, digits int) string {
	d := dimensionOf[T]()
	x := float64(v)
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return notFinite(x) + " " + d.units[0].symbol
	}
	if d == duration {
		return formatDuration(x, digits)
	}
	dec := decimalOf(x, digits)
	u := d.printed(dec.magnitude())
	return dec.shifted(-u.shift) + " " + u.symbol
}

// Fixed returns v in its type's own unit with exactly the given number of decimals,
// for columns of readings: "24.30 V". A percentage counts its decimals after the
// conversion to per cent.
func Fixed[T Quantity](v T, decimals int) string {
	u := dimensionOf[T]().units[0]
	x := float64(v) * math.Pow10(-u.shift)
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return notFinite(x) + " " + u.symbol
	}
	text := strconv.FormatFloat(x, 'f', decimals, 64)
	if strings.Trim(text, "-0.") == "" {
		text = strings.TrimPrefix(text, "-")
	}
	return text + " " + u.symbol
}

func notFinite(x float64) string {
	switch {
	case math.IsNaN(x):
		return "NaN"
	case x < 0:
		return "-∞"
	}
	return "∞"
}

// printed returns the unit in which a value of the given decimal magnitude (0 for
// 1 to 9.99 of the quantity's own unit) reads best.
func (d *dimension) printed(magnitude int) *unit {
	switch d {
	case current:
		return d.step(magnitude, -9, -6, -3, 0)
	case voltage:
		if magnitude >= -1 { // 0.85 V, not 850 mV
			return &d.units[0]
		}
		return d.step(magnitude, -6, -3)
	case resistance, power:
		return d.step(magnitude, -6, -3, 0, 3, 6)
	case charge:
		return d.step(magnitude, -3, 0)
	case capacitance:
		return d.step(magnitude, -12, -9, -6, -3, 0)
	}
	return &d.units[0]
}

// step returns the unit with the largest of the given shifts (ascending) that leaves
// at least one digit before the point, or the smallest of them.
func (d *dimension) step(magnitude int, shifts ...int) *unit {
	best := &d.units[0]
	for i, s := range shifts {
		if i > 0 && s > magnitude {
			break
		}
		for j := range d.units {
			if d.units[j].shift == s && d.units[j].factor == (fraction{}) {
				best = &d.units[j]
				break
			}
		}
	}
	return best
}

// shortDuration is how many characters an exact number of hours or minutes may have.
const shortDuration = 6

// formatDuration prints hours from one hour up, minutes from two minutes up, else
// seconds or milliseconds. With digits 0 it falls back to seconds where the larger
// unit would not read back exactly, or only with a long number.
func formatDuration(x float64, digits int) string {
	type choice struct {
		from   float64
		symbol string
		per    float64
	}
	for _, c := range []choice{{SecondsPerHour, "h", SecondsPerHour}, {2 * secondsPerMinute, "min", secondsPerMinute}} {
		if math.Abs(x) < c.from {
			continue
		}
		dec := decimalOf(x/c.per, digits)
		text := dec.shifted(0)
		if back, err := strconv.ParseFloat(text, 64); digits == 0 && (err != nil || back*c.per != x || len(text) > shortDuration) {
			continue
		}
		return text + " " + c.symbol
	}
	dec := decimalOf(x, digits)
	if m := dec.magnitude(); m < 0 && x != 0 {
		return dec.shifted(3) + " ms"
	}
	return dec.shifted(0) + " s"
}

// decimal is a rounded decimal number: 0.digits · 10^point.
type decimal struct {
	negative bool
	digits   string // no trailing zeros; empty for zero
	point    int
}

// decimalOf rounds the finite x to n significant digits, or to the fewest that give
// x back when n is 0.
func decimalOf(x float64, n int) decimal {
	precision := n - 1
	if n <= 0 {
		precision = -1
	}
	text := strconv.FormatFloat(x, 'e', precision, 64)
	mantissa, exponent, _ := strings.Cut(text, "e")
	power, _ := strconv.Atoi(exponent)
	var d decimal
	d.digits, d.negative = strings.CutPrefix(mantissa, "-")
	d.digits = strings.TrimRight(strings.Replace(d.digits, ".", "", 1), "0")
	d.point = power + 1
	if d.digits == "" {
		return decimal{}
	}
	return d
}

// magnitude returns the power of ten of the first digit; 0 for zero.
func (d decimal) magnitude() int {
	if d.digits == "" {
		return 0
	}
	return d.point - 1
}

// plainDigits bounds the zeros that are written out; beyond it an exponent is used.
const plainDigits = 15

// shifted prints d·10^shift.
func (d decimal) shifted(shift int) string {
	if d.digits == "" {
		return "0"
	}
	point, n := d.point+shift, len(d.digits)
	sign := ""
	if d.negative {
		sign = "-"
	}
	switch {
	case point > max(n, plainDigits) || point < -plainDigits:
		text := sign + d.digits[:1]
		if n > 1 {
			text += "." + d.digits[1:]
		}
		return text + "e" + strconv.Itoa(point-1)
	case point <= 0:
		return sign + "0." + strings.Repeat("0", -point) + d.digits
	case point >= n:
		return sign + d.digits + strings.Repeat("0", point-n)
	}
	return sign + d.digits[:point] + "." + d.digits[point:]
}

// The String methods print a value with its unit and at most four significant
// digits. Use Format for more, or for all.

func (v Volt) String() string          { return Format(v, usualDigits) }
func (v Ampere) String() string        { return Format(v, usualDigits) }
func (v Ohm) String() string           { return Format(v, usualDigits) }
func (v Watt) String() string          { return Format(v, usualDigits) }
func (v Metre) String() string         { return Format(v, usualDigits) }
func (v SquareMM) String() string      { return Format(v, usualDigits) }
func (v Celsius) String() string       { return Format(v, usualDigits) }
func (v Second) String() string        { return Format(v, usualDigits) }
func (v AmpereHour) String() string    { return Format(v, usualDigits) }
func (v Lux) String() string           { return Format(v, usualDigits) }
func (v Lumen) String() string         { return Format(v, usualDigits) }
func (v Farad) String() string         { return Format(v, usualDigits) }
func (v Ratio) String() string         { return Format(v, usualDigits) }
func (v KelvinPerWatt) String() string { return Format(v, usualDigits) }
