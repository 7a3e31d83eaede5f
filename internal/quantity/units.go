package quantity

import (
	"cmp"
	"slices"
	"strings"
	"unicode"
	"unicode/utf8"
)

// Quantity is any of the types that hold a number in one unit.
type Quantity interface {
	Volt | Ampere | Ohm | Watt | Metre | SquareMM | Celsius | Second | AmpereHour |
		Lux | Lumen | Farad | Ratio | KelvinPerWatt
}

// unit is one unit of a dimension. A number n of it is (n·10^shift - zero)·factor of
// the dimension's own unit. No spelling stands in two dimensions.
type unit struct {
	symbol string // as printed
	also   []string
	shift  int
	factor fraction
	zero   float64
}

// fraction is an exact conversion factor; the zero fraction stands for 1. Kept as two
// whole numbers it rounds once where a decimal factor would round twice.
type fraction struct{ num, den float64 }

func (f fraction) of(v float64) float64 {
	if f == (fraction{}) {
		return v
	}
	return v * f.num / f.den
}

// dimension is what the units of one quantity have in common.
type dimension struct {
	noun     string   // "a length", for messages
	units    []unit   // the quantity's own unit first
	offer    []string // the units to propose when one is missing
	examples string   // complete values to propose when all is wrong
	compound bool     // "22 ft 6 in" adds up
}

// prefix is an SI prefix (ISO 80000-1, table 4). The micro sign U+00B5 stands for
// Greek mu too; fold maps one to the other.
type prefix struct {
	sign  string
	also  string // ASCII spelling
	power int
}

var (
	pico  = prefix{"p", "", -12}
	nano  = prefix{"n", "", -9}
	micro = prefix{"µ", "u", -6}
	milli = prefix{"m", "", -3}
	kilo  = prefix{"k", "", 3}
	mega  = prefix{"M", "", 6}
)

// withPrefixes returns u and u with each prefix before its symbol and before its
// other spellings. Words such as "volt" are spelt out and listed in words.
func withPrefixes(u unit, words []string, prefixes ...prefix) []unit {
	base := u
	base.also = append(slices.Clone(u.also), words...)
	units := []unit{base}
	for _, p := range prefixes {
		v := unit{symbol: p.sign + u.symbol, shift: u.shift + p.power, factor: u.factor}
		for _, a := range u.also {
			v.also = append(v.also, p.sign+a)
		}
		if p.also != "" {
			v.also = append(v.also, p.also+u.symbol)
			for _, a := range u.also {
				v.also = append(v.also, p.also+a)
			}
		}
		units = append(units, v)
	}
	return units
}

// Exact conversion factors of the units that are no decimal multiples.
const (
	secondsPerMinute = 60
	secondsPerDay    = 86400
	degFAtZeroC      = 32 // ISO 80000-5, annex
)

var (
	metresPerFoot  = fraction{3048, 10000} // ISO 80000-3, annex
	metresPerInch  = fraction{254, 10000}  // ISO 80000-3, annex
	celsiusPerDegF = fraction{5, 9}        // ISO 80000-5, annex
)

// The dimensions, in the order in which a unit is looked up when a message has to
// say what a wrong unit belongs to.
var (
	voltage = &dimension{noun: "a voltage", offer: []string{"V"}, examples: "24 V",
		units: withPrefixes(unit{symbol: "V"}, []string{"volt", "volts"}, milli, micro, kilo)}
	current = &dimension{noun: "a current", offer: []string{"A", "mA"}, examples: "2 A or 300 mA",
		units: withPrefixes(unit{symbol: "A"}, []string{"amp", "amps", "ampere", "amperes"}, milli, micro, nano, kilo)}
	resistance = &dimension{noun: "a resistance", offer: []string{"ohm", "kohm"}, examples: "10 ohm or 4.7 kΩ",
		units: withPrefixes(unit{symbol: "Ω", also: []string{"ohm"}}, []string{"ohms", "Ohm"}, milli, micro, kilo, mega)}
	power = &dimension{noun: "a power", offer: []string{"W"}, examples: "6 W",
		units: withPrefixes(unit{symbol: "W"}, []string{"watt", "watts"}, milli, micro, kilo)}
	length = &dimension{noun: "a length", offer: []string{"m", "ft"}, examples: "9 m or 30 ft", compound: true,
		units: []unit{
			{symbol: "m", also: []string{"metre", "metres", "meter", "meters"}},
			{symbol: "mm", shift: -3}, {symbol: "cm", shift: -2}, {symbol: "km", shift: 3},
			{symbol: "ft", also: []string{"foot", "feet", "'", "′"}, factor: metresPerFoot},
			{symbol: "in", also: []string{"inch", "inches", "\"", "″"}, factor: metresPerInch},
		}}
	area = &dimension{noun: "a cross-section", offer: []string{"mm²"}, examples: "1.5 mm²",
		units: []unit{{symbol: "mm²", also: []string{"mm2", "mm^2", "sqmm", "sq mm"}}}}
	temperature = &dimension{noun: "a temperature", offer: []string{"°C"}, examples: "5 °C",
		units: []unit{
			{symbol: "°C", also: []string{"degC", "deg C", "° C", "℃", "C"}},
			{symbol: "°F", also: []string{"degF", "deg F", "° F", "℉"}, factor: celsiusPerDegF, zero: degFAtZeroC},
		}}
	duration = &dimension{noun: "a duration", offer: []string{"h", "min", "s"}, examples: "4 h or 30 min", compound: true,
		units: []unit{
			{symbol: "s", also: []string{"sec", "second", "seconds"}}, {symbol: "ms", shift: -3},
			{symbol: "min", also: []string{"minute", "minutes"}, factor: fraction{secondsPerMinute, 1}},
			{symbol: "h", also: []string{"hr", "hrs", "hour", "hours"}, factor: fraction{SecondsPerHour, 1}},
			{symbol: "d", also: []string{"day", "days"}, factor: fraction{secondsPerDay, 1}},
		}}
	charge = &dimension{noun: "a battery capacity", offer: []string{"Ah"}, examples: "55 Ah",
		units: withPrefixes(unit{symbol: "Ah", also: []string{"A h", "A·h"}}, nil, milli)}
	illuminance = &dimension{noun: "an illuminance", offer: []string{"lx"}, examples: "10 lx",
		units: withPrefixes(unit{symbol: "lx"}, []string{"lux"}, milli, kilo)}
	flux = &dimension{noun: "a luminous flux", offer: []string{"lm"}, examples: "600 lm",
		units: withPrefixes(unit{symbol: "lm"}, []string{"lumen", "lumens"}, kilo)}
	capacitance = &dimension{noun: "a capacitance", offer: []string{"µF", "nF"}, examples: "47 uF or 100 nF",
		units: withPrefixes(unit{symbol: "F"}, []string{"farad", "farads"}, milli, micro, nano, pico)}
	ratio = &dimension{noun: "a percentage", offer: []string{"%"}, examples: "5 %",
		units: []unit{{symbol: "%", also: []string{"percent", "per cent", "pct"}, shift: -2}}}
	thermal = &dimension{noun: "a thermal resistance", offer: []string{"K/W"}, examples: "3 K/W",
		units: []unit{{symbol: "K/W", also: []string{"°C/W", "degC/W", "C/W"}}}}

	dimensions = []*dimension{voltage, current, resistance, power, length, area, temperature,
		duration, charge, illuminance, flux, capacitance, ratio, thermal}
)

// dimensionOf returns the dimension of T.
func dimensionOf[T Quantity]() *dimension {
	var zero T
	switch any(zero).(type) {
	case Volt:
		return voltage
	case Ampere:
		return current
	case Ohm:
		return resistance
	case Watt:
		return power
	case Metre:
		return length
	case SquareMM:
		return area
	case Celsius:
		return temperature
	case Second:
		return duration
	case AmpereHour:
		return charge
	case Lux:
		return illuminance
	case Lumen:
		return flux
	case Farad:
		return capacitance
	case Ratio:
		return ratio
	default:
		return thermal
	}
}

// spelling is one way to write a unit.
type spelling struct {
	text string
	unit *unit
	dim  *dimension
}

// spellings holds every spelling of every unit, the longest first.
var spellings = allSpellings()

func allSpellings() []spelling {
	var all []spelling
	for _, d := range dimensions {
		for i := range d.units {
			u := &d.units[i]
			all = append(all, spelling{u.symbol, u, d})
			for _, a := range u.also {
				all = append(all, spelling{a, u, d})
			}
		}
	}
	slices.SortStableFunc(all, func(a, b spelling) int { return cmp.Compare(len(b.text), len(a.text)) })
	return all
}

// unitAt returns the longest unit spelling that s starts with and that ends where
// a word ends. The text s is folded.
func unitAt(s string) (spelling, bool) {
	for _, sp := range spellings {
		if strings.HasPrefix(s, sp.text) && wordEnds(sp.text, s[len(sp.text):]) {
			return sp, true
		}
	}
	return spelling{}, false
}

// wordEnds reports whether the unit u is complete when rest follows it.
func wordEnds(u, rest string) bool {
	r, _ := utf8.DecodeRuneInString(rest)
	if rest == "" || strings.ContainsAny(u[len(u)-1:], "'\"%") || u == "′" || u == "″" {
		return true
	}
	if r < utf8.RuneSelf && isDigit(byte(r)) { // 1h30min
		return true
	}
	return !unicode.IsLetter(r) && !unicode.IsNumber(r) && !strings.ContainsRune("/^°·Ω", r)
}

// nearCase finds the spelling in d that differs from text in capitals only.
func (d *dimension) nearCase(text string) string {
	for i := range d.units {
		u := &d.units[i]
		if strings.EqualFold(u.symbol, text) {
			return u.symbol
		}
		for _, a := range u.also {
			if strings.EqualFold(a, text) {
				return u.symbol
			}
		}
	}
	return ""
}

// fold maps look-alike characters to the one that the tables use, rune for rune.
func fold(s string) string {
	return strings.Map(func(r rune) rune {
		switch r {
		case '\u03bc': // Greek mu
			return 'µ'
		case '\u2126': // ohm sign
			return 'Ω'
		case 'º', '˚': // ordinal indicator and ring, typed for a degree sign
			return '°'
		case '\u2212': // minus sign
			return '-'
		case '\u00a0', '\u2009', '\u202f', '\t': // spaces that do not break, and tabs
			return ' '
		case '’':
			return '\''
		case '”':
			return '"'
		}
		return r
	}, s)
}
