package sizing

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// ResistanceAt brings the resistance r, which holds at from, to temperature to. The
// resistance of a metal is proportional to its temperature above zero °C below zero
// (IEC 60028: 234.5 for copper; 1/α − 20 for a coefficient α at 20 °C).
func ResistanceAt(r quantity.Ohm, from, to quantity.Celsius, zero float64) (quantity.Ohm, Working) {
	v := float64(r) * (zero + float64(to)) / (zero + float64(from))
	return quantity.Ohm(v), Working{
		Name:    "resistance at temperature",
		Formula: "R(t) = R(t₀) × (T + t) ÷ (T + t₀)",
		Substituted: num(float64(r), "Ω") + " × (" + num(zero, "") + " + " + bracketed(float64(to), "°C") +
			") ÷ (" + num(zero, "") + " + " + bracketed(float64(from), "°C") + ")",
		Value: v, Unit: "Ω", Source: "IEC 60028 temperature law",
	}
}

// PerMetre returns the resistance of one metre of a conductor at temperature t:
// the limit of its table at 20 °C and the law of IEC 60028.
func PerMetre(c catalogue.Conductor, t quantity.Celsius) quantity.Ohm {
	r, _ := ResistanceAt(c.PerKM/metresPerKM, catalogue.ReferenceTemperature, t, catalogue.CopperZero)
	return r
}

const metresPerKM = 1000

// RunInput is a cable of two conductors.
type RunInput struct {
	Conductor catalogue.Conductor
	Length    quantity.Metre   // one way
	At        quantity.Celsius // conductor temperature
}

// Loop returns the resistance of both conductors of a run in series: the table's
// limit at 20 °C (IEC 60228 or ASTM B258) and the temperature law of IEC 60028.
func Loop(in RunInput) (quantity.Ohm, Working) {
	v := 2 * float64(in.Length) * float64(PerMetre(in.Conductor, in.At))
	return quantity.Ohm(v), Working{
		Name:    "loop resistance",
		Formula: "R = 2 × L × r₂₀ ÷ 1000 × (234.5 + t) ÷ (234.5 + 20)",
		Substituted: "2 × " + num(float64(in.Length), "m") + " × " + num(float64(in.Conductor.PerKM), "Ω/km") +
			" ÷ 1000 × (234.5 + " + bracketed(float64(in.At), "°C") + ") ÷ (234.5 + 20)",
		Value: v, Unit: "Ω", Source: in.Conductor.Source + "; IEC 60028",
	}
}

// LeastAreaInput states a loop and the drop that it may have.
type LeastAreaInput struct {
	Resistivity float64       // Ω·mm²/m at working temperature
	Moment      float64       // sum of current × one-way distance, A·m
	Drop        quantity.Volt // at most
}

// LeastArea returns the area of both conductors of a two-wire distributor at which
// the far end drops exactly Drop: the moment rule of distribution handbooks,
// S = 2 ρ Σ(I·l) ÷ ΔU.
func LeastArea(in LeastAreaInput) (quantity.SquareMM, Working) {
	v := 2 * in.Resistivity * in.Moment / float64(in.Drop)
	return quantity.SquareMM(v), Working{
		Name:    "least area for the drop",
		Formula: "S = 2 × ρ × Σ(I × l) ÷ ΔU",
		Substituted: "2 × " + num(in.Resistivity, "Ω·mm²/m") + " × " + num(in.Moment, "A·m") +
			" ÷ " + num(float64(in.Drop), "V"),
		Value: v, Unit: "mm²", Source: "moment rule for two-wire distributors",
	}
}
