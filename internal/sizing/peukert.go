package sizing

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// PeukertExponent returns n of Peukert's law I^n × t = const from two discharges: the
// capacity at a rated time, and the time that a given current lasts (handbook method
// for battery monitors): n = log(t₂ ÷ t₁) ÷ log(I₁ ÷ I₂).
func PeukertExponent(capacity quantity.AmpereHour, rated quantity.Second, current quantity.Ampere, lasts quantity.Second) float64 {
	i1 := float64(capacity) / rated.Hours()
	return math.Log(float64(lasts/rated)) / math.Log(i1/float64(current))
}

// PeukertTime returns how long a current lasts by Peukert's law: t = H × (C ÷ (I × H))^n
// with the capacity C at the rated time H. The one-ampere form has H = C in hours.
func PeukertTime(capacity quantity.AmpereHour, rated quantity.Second, current quantity.Ampere, n float64) quantity.Second {
	return rated * quantity.Second(math.Pow(float64(capacity)/(float64(current)*rated.Hours()), n))
}

// Peukert exponents that cells can have: a note on Peukert's law gives 1.05 (glass
// mat) to 1.6 (flooded) for discharges of hours; lithium cells reach down to 1.00, and
// below one hour the classes' own tables rise to 2.4.
const (
	peukertLow  = 1.0
	peukertHigh = 2.5
)

// PlausibleRates checks a capacity table that a user gives: times must rise, and each
// step from one line to the next must follow Peukert's law with an exponent that
// cells can have. It returns a *BlockedError that names the step.
func PlausibleRates(rates []catalogue.RatePoint) error {
	for i := 1; i < len(rates); i++ {
		a, b := rates[i-1], rates[i]
		if b.Time <= a.Time {
			return fmt.Errorf("the capacity table must list rising times: %v does not come after %v", b.Time, a.Time)
		}
		capacity := quantity.AmpereHour(b.Fraction)
		current := quantity.Ampere(float64(a.Fraction) / a.Time.Hours())
		n := PeukertExponent(capacity, b.Time, current, a.Time)
		bound := peukertHigh
		if n < 1 {
			bound = peukertLow
		}
		if n < peukertLow-slack || n > peukertHigh || math.IsNaN(n) {
			return &BlockedError{
				Limit: LimitCapacity, Subject: fmt.Sprintf("the Peukert exponent between %v and %v of the capacity table", a.Time, b.Time),
				Value: n, Bound: bound, Frees: "check the two lines against the maker's sheet",
			}
		}
	}
	return nil
}
