package describe

import (
	"errors"
	"fmt"
	"slices"
	"strconv"
	"strings"

	"gloamwright/internal/quantity"
)

// typeInfo is how values of one field type are read, bounded and named.
type typeInfo struct {
	name    string // "a voltage"
	example string
	parse   func(string) (any, error)
	bound   Type                // type of Min and Max; 0: it has none
	ends    func(any) []float64 // the numbers that bounds apply to
}

func scalarType[T quantity.Quantity](self Type, name, example string) typeInfo {
	return typeInfo{name, example,
		func(s string) (any, error) { v, err := quantity.Parse[T](s); return v, err }, self,
		func(v any) []float64 { return []float64{float64(v.(T))} }}
}

func rangeType[T quantity.Quantity](bound Type, name, example string) typeInfo {
	return typeInfo{name, example,
		func(s string) (any, error) { v, err := quantity.ParseRange[T](s); return v, err }, bound,
		func(v any) []float64 {
			r := v.(quantity.Range[T])
			return []float64{float64(r.Low), float64(r.High)}
		}}
}

// types is indexed by Type. Choice, StageRef and Curve need more than a text and are
// read by field.go.
var types = [...]typeInfo{
	Voltage:     scalarType[quantity.Volt](Voltage, "a voltage", "24 V"),
	Current:     scalarType[quantity.Ampere](Current, "a current", "300 mA"),
	Power:       scalarType[quantity.Watt](Power, "a power", "6 W"),
	Length:      scalarType[quantity.Metre](Length, "a length", "9 m"),
	Temperature: scalarType[quantity.Celsius](Temperature, "a temperature", "-5 °C"),
	Duration:    scalarType[quantity.Second](Duration, "a duration", "4 h"),
	Illuminance: scalarType[quantity.Lux](Illuminance, "an illuminance", "10 lx"),
	Flux:        scalarType[quantity.Lumen](Flux, "a luminous flux", "600 lm"),
	Resistance:  scalarType[quantity.Ohm](Resistance, "a resistance", "4.7 kΩ"),
	Capacitance: scalarType[quantity.Farad](Capacitance, "a capacitance", "47 µF"),
	Capacity:    scalarType[quantity.AmpereHour](Capacity, "a battery capacity", "55 Ah"),
	Percent:     scalarType[quantity.Ratio](Percent, "a percentage", "5 %"),
	ThermalRes:  scalarType[quantity.KelvinPerWatt](ThermalRes, "a thermal resistance", "3 K/W"),
	Size: {"a conductor size", "1.5 mm²",
		func(s string) (any, error) { v, err := quantity.ParseWireSize(s); return v, err }, Size,
		func(v any) []float64 { return []float64{float64(v.(quantity.WireSize).Area)} }},
	Count: {"a whole number", "8", func(s string) (any, error) { v, err := parseCount(s); return v, err }, Count,
		func(v any) []float64 { return []float64{float64(v.(int))} }},
	Text:             {"a text", "north wall", func(s string) (any, error) { return s, checkText(s, maxText) }, 0, nil},
	Choice:           {"one of its choices", "", nil, 0, nil},
	Bool:             {"yes or no", "yes", func(s string) (any, error) { v, err := parseBool(s); return v, err }, 0, nil},
	StageRef:         {"a stage", "store", nil, 0, nil},
	VoltageRange:     rangeType[quantity.Volt](Voltage, "a voltage range", "18 V..32 V"),
	TemperatureRange: rangeType[quantity.Celsius](Temperature, "a temperature range", "5 °C..30 °C"),
	Mains: {"a mains voltage with its tolerance", "230 V ± 10 %",
		func(s string) (any, error) { v, err := quantity.ParseToleranced[quantity.Volt](s); return v, err }, Voltage,
		func(v any) []float64 { return []float64{float64(v.(quantity.Toleranced[quantity.Volt]).Nominal)} }},
	VoltAmp: {"a voltage and a current", "24 V 0.5 A",
		func(s string) (any, error) { v, err := quantity.ParseRating(s); return v, err }, VoltAmp,
		func(v any) []float64 {
			r := v.(quantity.Rating)
			return []float64{float64(r.Volt), float64(r.Ampere)}
		}},
	Curve: {"a list of discharge times and capacities", "[20 h 55 Ah, 5 h 47 Ah]", nil, 0, nil},
}

func (t Type) valid() bool { return t >= Voltage && t <= Curve }

// String names what a field of type t holds: "a voltage".
func (t Type) String() string {
	if !t.valid() {
		return "no type"
	}
	return types[t].name
}

// Example returns a value of type t as a user would write it.
func (t Type) Example() string {
	if !t.valid() {
		return ""
	}
	return types[t].example
}

// valueError is a text that is not what a field holds.
type valueError struct{ code, summary, detail string }

func (e *valueError) Error() string { return e.detail }

// diagnose returns code, summary and detail of an error of reading one value.
func diagnose(err error) (code, summary, detail string) {
	var v *valueError
	if errors.As(err, &v) {
		return v.code, v.summary, v.detail
	}
	var q *quantity.ParseError
	if !errors.As(err, &q) {
		return codeQuantity, "bad value", sentence(err.Error())
	}
	detail = sentence(q.Error())
	switch q.Problem {
	case quantity.NoUnit:
		return codeNoUnit, "missing unit", detail
	case quantity.WrongUnit:
		return codeWrongUnit, "wrong unit", detail
	case quantity.UnknownUnit:
		return codeUnknownUnit, "unknown unit", detail
	case quantity.Comma:
		return codeQuantity, "comma in a number", detail
	}
	return codeQuantity, "bad value", detail
}

// sentence ends s with a full stop.
func sentence(s string) string {
	if strings.HasSuffix(s, ".") || strings.HasSuffix(s, "?") {
		return s
	}
	return s + "."
}

// parseCount reads a whole number without sign or unit.
func parseCount(s string) (int, error) {
	fail := func(why string) (int, error) {
		return 0, &valueError{codeCount, "bad number", fmt.Sprintf("%q %s.", clip(s), why)}
	}
	if s == "" || strings.Trim(s, "0123456789") != "" {
		return fail("is not a whole number: write digits alone, such as 8")
	}
	n, err := strconv.Atoi(s)
	if err != nil {
		return fail("is too large")
	}
	return n, nil
}

// parseBool reads yes or no; true and false are the same.
func parseBool(s string) (bool, error) {
	switch strings.ToLower(s) {
	case "yes", "true":
		return true, nil
	case "no", "false":
		return false, nil
	}
	return false, &valueError{codeChoice, "not a choice", fmt.Sprintf("%q is neither yes nor no.", clip(s))}
}

// parseChoice reads one of choices.
func parseChoice(s string, choices []string) (string, error) {
	if slices.Contains(choices, s) {
		return s, nil
	}
	detail := fmt.Sprintf("%q is not a choice here. ", clip(s))
	if near := nearest(s, choices); near != "" {
		detail += "Did you mean " + near + "? "
	}
	return "", &valueError{codeChoice, "not a choice", detail + "Choices: " + listed(choices) + "."}
}

// parseRatePoint reads "20 h 55 Ah".
func parseRatePoint(s string) (RatePoint, error) {
	bad := func(why string) (RatePoint, error) {
		return RatePoint{}, &valueError{codeQuantity, "bad value",
			fmt.Sprintf("%q %s: write the discharge time and the capacity at it, such as 20 h 55 Ah.", clip(s), why)}
	}
	t, rest, err := quantity.Cut[quantity.Second](s)
	if err != nil {
		return bad("does not start with a time")
	}
	c, err := quantity.Parse[quantity.AmpereHour](rest)
	if err != nil {
		return bad("does not end with a capacity")
	}
	if t <= 0 || c <= 0 {
		return bad("is not above zero")
	}
	return RatePoint{Time: t, Capacity: c}, nil
}

// MaxELV is the highest DC voltage that this program designs for: 60 V ripple-free,
// the bound up to which extra-low voltage needs no basic protection in dry places
// (IEC 61140 with IEC 60364-4-41, clause 414.4.5; from memory).
const MaxELV quantity.Volt = 60

// checkELV refuses a voltage that the system would hold above extra-low voltage.
func checkELV(t Type, v any) error {
	var u quantity.Volt
	switch t {
	case Voltage:
		u = v.(quantity.Volt)
	case VoltAmp:
		u = v.(quantity.Rating).Volt
	case VoltageRange: // a lamp may stand more; it must not need more
		u = v.(quantity.Range[quantity.Volt]).Low
	}
	if u <= MaxELV && -u <= MaxELV {
		return nil
	}
	return &valueError{codeVoltage, "above extra-low voltage",
		fmt.Sprintf("%v is above extra-low voltage: at most %v DC (IEC 61140). This program does not design anything above it.", u, MaxELV)}
}

// checkBounds refuses v outside low..high, each written as a user would, empty for
// none. The schema has been validated, so they parse.
func checkBounds(t Type, v any, text, low, high string) error {
	info := types[t]
	if info.bound == 0 || low == "" && high == "" {
		return nil
	}
	ends := info.ends(v)
	least, most := boundEnds(info.bound, low, len(ends)), boundEnds(info.bound, high, len(ends))
	for i, x := range ends {
		if least != nil && x < least[i] || most != nil && x > most[i] {
			return &valueError{codeRange, "out of range", fmt.Sprintf("%q is out of range: %s.", clip(text), between(low, high))}
		}
	}
	return nil
}

func boundEnds(t Type, s string, n int) []float64 {
	if s == "" {
		return nil
	}
	v, err := types[t].parse(s)
	if err != nil {
		return nil
	}
	ends := types[t].ends(v)
	for len(ends) < n {
		ends = append(ends, ends[0])
	}
	return ends
}

func between(low, high string) string {
	switch {
	case low == "":
		return "at most " + high
	case high == "":
		return "at least " + low
	}
	return "from " + low + " to " + high
}
