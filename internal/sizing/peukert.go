package sizing

import (
	"math"

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
