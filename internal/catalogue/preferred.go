package catalogue

import (
	"fmt"
	"math"
)

// Series is a series of preferred values of IEC 60063: so many to the decade.
type Series int

// The series.
const (
	E6  Series = 6
	E12 Series = 12
	E24 Series = 24
	E48 Series = 48
	E96 Series = 96
)

// PreferredEvidence is the source of the series: IEC 60063, values read in a list
// after it.
var PreferredEvidence = Evidence{Source: "IEC 60063", Seen: true}

// e24 is the E24 series; E12 is every second and E6 every fourth value of it. Its
// values are fixed by the standard and not all equal to the rounded formula.
var e24 = [...]float64{
	1.0, 1.1, 1.2, 1.3, 1.5, 1.6, 1.8, 2.0, 2.2, 2.4, 2.7, 3.0,
	3.3, 3.6, 3.9, 4.3, 4.7, 5.1, 5.6, 6.2, 6.8, 7.5, 8.2, 9.1,
}

// Decade returns the values of the series between 1 and 10, ascending: fixed values
// up to E24; 10^(i/n) rounded to two places for E48 and E96.
func (s Series) Decade() []float64 {
	out := make([]float64, 0, int(s))
	if s <= E24 {
		for i := 0; i < len(e24); i += len(e24) / int(s) {
			out = append(out, e24[i])
		}
		return out
	}
	for i := range int(s) {
		out = append(out, math.Round(100*math.Pow(10, float64(i)/float64(s)))/100)
	}
	return out
}

// seriesSlack lets a value that equals a preferred one but for rounding count as it.
const seriesSlack = 1e-9

// AtLeast returns the smallest value of the series that is not below v; v is finite
// and above zero, else it panics, as do the methods below.
func (s Series) AtLeast(v float64) float64 {
	if !(v > 0) || math.IsInf(v, 1) {
		panic(fmt.Sprintf("catalogue: no preferred value for %v", v))
	}
	exp := math.Floor(math.Log10(v))
	for e := exp - 1; ; e++ {
		for _, d := range s.Decade() {
			if x := scaled(d, e); x >= v*(1-seriesSlack) {
				return x
			}
		}
	}
}

// AtMost returns the largest value of the series that is not above v; v > 0.
func (s Series) AtMost(v float64) float64 {
	up := s.AtLeast(v)
	if up <= v*(1+seriesSlack) {
		return up
	}
	return s.below(up)
}

// below returns the value of the series just under the member x.
func (s Series) below(x float64) float64 {
	exp := math.Floor(math.Log10(x * (1 + seriesSlack)))
	d := s.Decade()
	for i := len(d) - 1; i >= 0; i-- {
		if y := scaled(d[i], exp); y < x*(1-seriesSlack) {
			return y
		}
	}
	return scaled(d[len(d)-1], exp-1)
}

// Nearest returns the value of the series nearest to v by ratio; v > 0.
func (s Series) Nearest(v float64) float64 {
	lo, hi := s.AtMost(v), s.AtLeast(v)
	if v/lo <= hi/v {
		return lo
	}
	return hi
}

// Between returns the values of the series from lo to hi, ends included, ascending.
func (s Series) Between(lo, hi float64) []float64 {
	var out []float64
	for v := s.AtLeast(lo); v <= hi*(1+seriesSlack); v = s.AtLeast(v * (1 + 1e-6)) {
		out = append(out, v)
	}
	return out
}

// scaled returns d × 10^e without the rounding noise of a float power.
func scaled(d, e float64) float64 {
	if e < 0 {
		return d / math.Pow(10, -e)
	}
	return d * math.Pow(10, e)
}
