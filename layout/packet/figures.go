package packet

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"gloamwright/internal/circuit"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
)

// figure prints a quantity with three significant digits and its unit.
func figure[T quantity.Quantity](v T) string { return quantity.Format(v, 3) }

// bare drops the unit of a printed quantity.
func bare(s string) string {
	n, _, _ := strings.Cut(s, " ")
	return n
}

// thousands parts the digits of a whole number by threes from four digits on.
func thousands(v float64) string {
	s := strconv.FormatFloat(math.Round(v), 'f', 0, 64)
	for i := len(s) - 3; i > 0; i -= 3 {
		s = s[:i] + noBreak + s[i:]
	}
	return s
}

// pinName is a terminal as it is printed: the minus of a pole is a minus sign.
func pinName(p *circuit.Pin) string {
	if p == nil {
		return ""
	}
	s := p.String()
	if strings.HasSuffix(s, "-") {
		s = strings.TrimSuffix(s, "-") + "−"
	}
	return s
}

// volt prints a reading to expect with one decimal, the low one rounded down, the high
// one up; a dead point is 0.0 to 0.1.
func lowVolt(v quantity.Volt) string  { return tenths(math.Floor(float64(v)*10 + tiny)) }
func highVolt(v quantity.Volt) string { return tenths(math.Ceil(float64(v)*10 - tiny)) }
func typicalVolt(v quantity.Volt) string {
	return tenths(math.Round(float64(v) * 10))
}

// tiny keeps a value that is a tenth but for the last bits from being rounded away.
const tiny = 1e-6

func tenths(n float64) string {
	s := strconv.FormatFloat(n/10, 'f', 1, 64)
	if s == "-0.0" {
		s = "0.0"
	}
	return strings.Replace(s, "-", "−", 1)
}

// bandText is "24.3 to 25.6 V".
func pairText(b facts.Band) string { return lowVolt(b.Low) + " to " + highVolt(b.High) }

func bandText(b facts.Band) string { return pairText(b) + " V" }

// counted is "1 light", "22 lights".
func counted(n int, one string) string {
	if n == 1 {
		return "1 " + one
	}
	return fmt.Sprintf("%d %ss", n, one)
}

// listed joins words: "a", "a and b", "a, b and c".
func listed(list []string) string {
	switch len(list) {
	case 0:
		return ""
	case 1:
		return list[0]
	}
	return strings.Join(list[:len(list)-1], ", ") + " and " + list[len(list)-1]
}

// upper makes the first letter a capital.
func upper(s string) string {
	for i, r := range s {
		if i == 0 {
			return strings.ToUpper(string(r)) + s[len(string(r)):]
		}
	}
	return s
}

// degrees prints a range of temperatures: "5 °C to 30 °C".
func degrees(r quantity.Range[quantity.Celsius]) string {
	return fmt.Sprintf("%v to %v", r.Low, r.High)
}

// shown lists the conditions that are printed, in order of energising.
func (b *book) shown() []*facts.Condition {
	var out []*facts.Condition
	for _, c := range b.d.Conditions {
		if c.Shown {
			out = append(out, c)
		}
	}
	return out
}

// conditionIndex is the place of a condition in the slices by condition.
func (b *book) conditionIndex(c *facts.Condition) int {
	for i, x := range b.d.Conditions {
		if x == c {
			return i
		}
	}
	return -1
}

// outward prints a bound of a band with so many decimals, rounded away from the band's
// middle.
func outward(v float64, decimals int, up bool) string {
	k := math.Pow(10, float64(decimals))
	if up {
		v = math.Ceil(v*k-tiny) / k
	} else {
		v = math.Floor(v*k+tiny) / k
	}
	s := strconv.FormatFloat(v, 'f', decimals, 64)
	if strings.Trim(s, "-0.") == "" {
		s = strings.TrimPrefix(s, "-")
	}
	return strings.Replace(s, "-", "−", 1)
}
