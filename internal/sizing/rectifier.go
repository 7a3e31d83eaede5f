package sizing

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// Bridge names how a transformer is rectified.
type Bridge struct {
	Diodes int  // in the path of the current: 1 half-wave or centre-tapped, 2 bridge
	Pulses int  // per period: 1 half-wave, 2 full-wave
	Half   bool // centre-tapped: half the secondary drives each diode
}

// The usual rectifiers.
var (
	HalfWave     = Bridge{Diodes: 1, Pulses: 1}
	CentreTapped = Bridge{Diodes: 1, Pulses: 2, Half: true}
	FullBridge   = Bridge{Diodes: 2, Pulses: 2}
)

// Peak returns the peak behind a rectifier without load: √2 times the secondary
// voltage less the diode drops (electronics textbooks).
func Peak(b Bridge, secondary, diode quantity.Volt) (quantity.Volt, Working) {
	part := 1.0
	if b.Half {
		part = 0.5
	}
	v := math.Sqrt2*part*float64(secondary) - float64(b.Diodes)*float64(diode)
	return quantity.Volt(v), Working{
		Name: "peak behind the rectifier", Formula: "U_p = √2 × U × part − n × U_D",
		Substituted: fmt.Sprintf("√(2) × %s × %s − %d × %s", num(float64(secondary), "V"), num(part, ""), b.Diodes, num(float64(diode), "V")),
		Value:       v, Unit: "V", Source: "peak rectifier (electronics textbooks)",
	}
}

// RippleInput states a reservoir capacitor and its load.
type RippleInput struct {
	Rectifier Bridge
	Frequency float64 // of the mains, Hz
	Capacitor quantity.Farad
	Current   quantity.Ampere
}

// Ripple returns the peak-to-peak ripple across a reservoir, I ÷ (f × C) with f the
// pulse frequency: the capacitor alone feeds the load between pulses (electronics
// textbooks; high by the conduction time).
func Ripple(in RippleInput) (quantity.Volt, Working) {
	f := in.Frequency * float64(in.Rectifier.Pulses)
	v := float64(in.Current) / (f * float64(in.Capacitor))
	return quantity.Volt(v), Working{
		Name: "ripple", Formula: "U_r = I ÷ (p × f × C)",
		Substituted: fmt.Sprintf("%s ÷ (%d × %s × %s)", num(float64(in.Current), "A"), in.Rectifier.Pulses, num(in.Frequency, "Hz"), num(float64(in.Capacitor), "F")),
		Value:       v, Unit: "V", Source: "reservoir capacitor (electronics textbooks)",
	}
}

// TransformerInput states what a transformer feeds through a bridge and reservoir.
type TransformerInput struct {
	DC     quantity.Volt   // at the reservoir
	Load   quantity.Ampere // mean
	Factor float64         // effective current ÷ mean current of the winding; 0 means 1.8
	Stock  []float64       // VA; empty: the standard ratings
}

// windingFactor is the effective current of a winding behind a bridge with a
// reservoir as a multiple of the mean load current (common practice 1.6 to 1.8).
const windingFactor = 1.8

// TransformerRating returns the next standard rating in VA of a transformer that
// feeds a bridge with reservoir: U_DC × I × k, for the winding carries the peaks of
// the charging current (common practice).
func TransformerRating(in TransformerInput) (va float64, w Working, err error) {
	k := in.Factor
	if k == 0 {
		k = windingFactor
	}
	stock := in.Stock
	if len(stock) == 0 {
		stock = catalogue.TransformerRatings
	}
	need := float64(in.DC) * float64(in.Load) * k
	w = Working{Name: "transformer rating", Formula: "S ≥ U_DC × I × k, next standard rating", Unit: "VA", Source: "common practice, no source"}
	va, ok := catalogue.NextRating(stock, need)
	if !ok {
		return 0, w, &BlockedError{
			Limit: LimitLoad, Subject: "the transformer rating", Value: need, Bound: stock[len(stock)-1], Unit: "VA",
			Frees: "take a packaged switch-mode supply",
		}
	}
	w.Value = va
	w.Substituted = fmt.Sprintf("%s × %s × %s = %s → %s", num(float64(in.DC), "V"), num(float64(in.Load), "A"), num(k, ""), num(need, "VA"), num(va, "VA"))
	return va, w, nil
}
