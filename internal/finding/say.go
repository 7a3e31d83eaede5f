package finding

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// slack is the share of a limit by which a figure may pass it: the rounding of the
// solution, not a tolerance of the trade.
const slack = 1e-9

// over reports whether v lies above limit.
func over[T ~float64](v, limit T) bool { return float64(v) > float64(limit)+margin(float64(limit)) }

// under reports whether v lies below limit.
func under[T ~float64](v, limit T) bool { return float64(v) < float64(limit)-margin(float64(limit)) }

func margin(limit float64) float64 { return slack * max(limit, -limit) }

// Digits of figures in messages: three significant ones, more only where a figure
// and its limit would read the same.
const (
	usualDigits = 3
	mostDigits  = 8
)

// say prints one figure.
func say[T quantity.Quantity](v T) string { return quantity.Format(v, usualDigits) }

// sayUp prints a figure that is at least needed, rounded up, sayDown one that is at most
// allowed, rounded down.
func sayUp[T quantity.Quantity](v T) string   { return say(rounded(v, math.Ceil)) }
func sayDown[T quantity.Quantity](v T) string { return say(rounded(v, math.Floor)) }

func rounded[T quantity.Quantity](v T, to func(float64) float64) T {
	x := float64(v)
	if x == 0 || math.IsNaN(x) || math.IsInf(x, 0) {
		return v
	}
	unit := math.Pow(10, math.Floor(math.Log10(math.Abs(x)))+1-usualDigits)
	n := math.Round(x / unit)
	if math.Abs(x/unit-n) > slack*math.Abs(n) {
		n = to(x / unit)
	}
	return T(n * unit)
}

// pair prints a figure and its limit, with as many digits as tell them apart.
func pair[T quantity.Quantity](v, limit T) (figure, bound string) {
	for d := usualDigits; d < mostDigits; d++ {
		figure, bound = quantity.Format(v, d), quantity.Format(limit, d)
		if figure != bound {
			return figure, bound
		}
	}
	return figure, bound
}

// percent returns a ratio in per cent, the unit of findings about shares.
func percent[T ~float64](r T) float64 { return float64(r) * 100 }

// count prints a number of things: "1 lamp", "3 lamps".
func count(n int, thing string) string {
	if n == 1 {
		return "1 " + thing
	}
	return fmt.Sprintf("%d %ss", n, thing)
}

// title returns how messages begin: "-E15, Workshop"; the name falls away if empty.
func title(designation, name string) string {
	if name == "" || name == designation {
		return designation
	}
	return designation + ", " + name
}

// designation returns the designation of a part that may be missing.
func designation(p *circuit.Part, otherwise string) string {
	if p == nil {
		return otherwise
	}
	return p.Designation
}

// wanted reports, by condition, whether a circuit must be lit.
func wanted(f *facts.Facts, circuit string) []bool {
	out := make([]bool, len(f.Conditions))
	for _, r := range f.Function {
		if r.Circuit != circuit {
			continue
		}
		for i := range out {
			out[i] = r.Wanted[i] && r.Known[i]
		}
		break
	}
	return out
}

// names joins names as prose: "a", "a and b", "a, b and c".
func names(list []string) string {
	switch len(list) {
	case 0:
		return ""
	case 1:
		return list[0]
	}
	return strings.Join(list[:len(list)-1], ", ") + " and " + list[len(list)-1]
}

// highest returns the highest voltage that the battery's terminals take, and when:
// over all conditions, and boost at the coldest room.
func highest(f *facts.Facts) (v quantity.Volt, when string) {
	for _, c := range f.Conditions {
		if c.BatteryV > v {
			v, when = c.BatteryV, c.Name
		}
	}
	if b := boostAtColdest(f); b > v {
		room := f.Site.Duty.BatteryRoom.Val.Low
		v, when = b, "boost at "+say(room)
	}
	return v, when
}

// usualReference is the temperature that charge voltages are stated for where the
// class is unknown: IEC 62485-2.
const usualReference quantity.Celsius = 20

// reference returns the temperature that float and boost are stated for: that of the
// battery's class.
func reference(f *facts.Facts) quantity.Celsius {
	if c := classOf(f); c != nil {
		return c.ChargeAt
	}
	return usualReference
}

// settingAt returns a charge setting at a temperature, as the charger gives it.
func settingAt(f *facts.Facts, setting quantity.Volt, t quantity.Celsius) quantity.Volt {
	if !f.Charger.Compensated {
		return setting
	}
	return setting + f.Charger.PerKelvin*quantity.Volt(t-reference(f))
}

// boostAtColdest returns the boost voltage at the coldest battery room; 0 without a
// charger.
func boostAtColdest(f *facts.Facts) quantity.Volt {
	c := f.Charger
	if c.Part == nil {
		return 0
	}
	return settingAt(f, max(c.Boost, c.Float), f.Site.Duty.BatteryRoom.Val.Low)
}

// number prints a figure without a type, as findings about any unit need it.
func number(v float64) string { return strconv.FormatFloat(v, 'g', usualDigits, 64) }

// apart prints two bare numbers with as many digits as tell them apart.
func apart(v, limit float64) (figure, bound string) {
	figure, bound = number(v), number(limit)
	for d := usualDigits + 1; figure == bound && d < mostDigits; d++ {
		figure, bound = strconv.FormatFloat(v, 'g', d, 64), strconv.FormatFloat(limit, 'g', d, 64)
	}
	return figure, bound
}
