package results

import (
	"math"
	"strconv"
)

// Significant digits of numbers. Network figures keep all digits of a float64, so that
// currents computed again from voltages and resistances still add up to zero within a
// nanoampere at leads of a milliohm; readings keep enough for any meter, other figures
// enough for any purpose.
const (
	networkDigits = 17
	readingDigits = 9
	figureDigits  = 6
)

// to returns v rounded to a number of significant digits; nil if v is no finite number.
func to[T ~float64](v T, digits int) *float64 {
	x := float64(v)
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return nil
	}
	r, err := strconv.ParseFloat(strconv.FormatFloat(x, 'e', digits-1, 64), 64)
	if err != nil { // rounding up the greatest float64 only
		return &x
	}
	if r == 0 {
		r = 0 // no negative zero
	}
	return &r
}

// figure returns v rounded for most purposes; nil if v is no finite number.
func figure[T ~float64](v T) *float64 { return to(v, figureDigits) }

// positive returns v rounded, or nil where v is not above zero and zero stands for
// "none".
func positive[T ~float64](v T) *float64 {
	if v <= 0 {
		return nil
	}
	return figure(v)
}

// list returns s, or an empty list in place of nil, so that a list is never null.
func list[T any](s []T) []T {
	if s == nil {
		return []T{}
	}
	return s
}
