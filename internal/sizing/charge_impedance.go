package sizing

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// ImpedanceInput states what the output-impedance resistor of a linear charger must do.
type ImpedanceInput struct {
	Set      quantity.Volt   // output without load, before the diode
	Ratio    float64         // Set over the regulator's reference: 1 + R2 ÷ R1
	Diode    quantity.Volt   // drop of the blocking diode
	Empty    quantity.Volt   // battery at rest, empty
	Full     quantity.Volt   // battery at rest, full
	Most     quantity.Ampere // that regulator, supply and battery bear
	Need     quantity.Ampere // mean current that returns the charge in time, standing load included
	Changing quantity.Ampere // load that comes and goes at float
	Steady   quantity.Volt   // by which the float voltage may follow it
	Pinned   quantity.Ohm    // given by the user; 0: choose
}

// ChargeImpedance chooses the resistor Rs in the output-impedance position of an
// adjustable regulator, whose output then has Z = Rs × (1 + R2 ÷ R1). The current
// falls with the battery's rising voltage, so its mean over the charge is the
// logarithmic mean of the currents at both ends (exponential approach). The greatest
// E24 value is taken that still returns the charge in time and keeps the float voltage
// steady, for it heats least; below the value at which the current into an empty
// battery passes a limit nothing fits.
func ChargeImpedance(in ImpedanceInput) (quantity.Ohm, []Working, error) {
	first, last := float64(in.Set-in.Diode-in.Empty), float64(in.Set-in.Diode-in.Full)
	mean := logMean(first, last)
	least := first / float64(in.Most) / in.Ratio
	need := max(float64(in.Need), leastNeed)
	most := mean / need / in.Ratio
	steady := float64(in.Steady) / float64(in.Changing) / in.Ratio
	const source = "output impedance of the adjustable regulator (datasheet application)"
	ws := []Working{{
		Name: "output-impedance resistor, at least", Formula: "R_s ≥ (U_set − U_D − U_empty) ÷ I_max ÷ (1 + R2 ÷ R1)",
		Substituted: fmt.Sprintf("(%s − %s − %s) ÷ %s ÷ %s", num(float64(in.Set), "V"), num(float64(in.Diode), "V"), num(float64(in.Empty), "V"), num(float64(in.Most), "A"), num(in.Ratio, "")),
		Value:       least, Unit: "Ω", Source: source,
	}, {
		Name: "mean of the charging voltage", Formula: "ΔU = (U_1 − U_2) ÷ ln(U_1 ÷ U_2), U_1 = U_set − U_D − U_empty, U_2 = U_set − U_D − U_full",
		Substituted: fmt.Sprintf("%s V, %s V → %s V", num(first, ""), num(last, ""), num(mean, "")),
		Value:       mean, Unit: "V", Source: "logarithmic mean of an exponential approach",
	}, {
		Name: "output-impedance resistor, at most", Formula: "R_s ≤ ΔU ÷ I_need ÷ (1 + R2 ÷ R1)",
		Substituted: fmt.Sprintf("%s ÷ %s ÷ %s", num(mean, "V"), num(need, "A"), num(in.Ratio, "")),
		Value:       most, Unit: "Ω", Source: source, Uses: []string{"mean of the charging voltage"},
	}}
	if in.Pinned > 0 {
		return in.Pinned, ws, impedanceVerdict(in, least, most, first, mean)
	}
	if err := impedanceVerdict(in, least, most, first, mean); err != nil {
		return quantity.Ohm(catalogue.E24.AtLeast(max(least, leastSense))), ws, err
	}
	bound, fit := most, 0.0
	if in.Changing > 0 && steady < most {
		bound = steady
		ws = append(ws, Working{
			Name: "output-impedance resistor for a steady float", Formula: "R_s ≤ ΔU_float ÷ ΔI ÷ (1 + R2 ÷ R1)",
			Substituted: fmt.Sprintf("%s ÷ %s ÷ %s", num(float64(in.Steady), "V"), num(float64(in.Changing), "A"), num(in.Ratio, "")),
			Value:       steady, Unit: "Ω", Source: source,
		})
	}
	if fit = catalogue.E24.AtMost(bound); fit < least {
		fit = catalogue.E24.AtLeast(least)
	}
	ws = append(ws, Working{
		Name: "output-impedance resistor fitted", Formula: "largest E24 value that suits all, not below the least",
		Substituted: fmt.Sprintf("%s to %s → %s", num(least, "Ω"), num(bound, "Ω"), num(fit, "Ω")),
		Value:       fit, Unit: "Ω", Source: catalogue.PreferredEvidence.String(),
		Uses: []string{"output-impedance resistor, at least", "output-impedance resistor, at most"},
	})
	return quantity.Ohm(fit), ws, nil
}

// leastNeed is a current below which nothing has to be charged.
const leastNeed = 1e-3

// leastSense is the smallest resistor worth fitting: below it leads and joints count.
const leastSense = 0.05

func impedanceVerdict(in ImpedanceInput, least, most, first, mean float64) error {
	at := func(v, r float64) quantity.Ampere { return quantity.Ampere(v / r / in.Ratio) }
	switch r := float64(in.Pinned); {
	case first <= 0 || mean <= 0:
		return &BlockedError{
			Limit: LimitChargeVolt, Subject: "what the setting gives behind the diode, over the battery at rest", Value: float64(in.Set - in.Diode), Bound: float64(max(in.Empty, in.Full)), Unit: "V",
			Frees: fmt.Sprintf("set the float voltage more than %s higher", num(float64(max(in.Empty, in.Full)-in.Set+in.Diode), "V")),
		}
	case r > 0 && r < least:
		return &BlockedError{
			Limit: LimitCharge, Subject: "the current into an empty battery", Value: float64(at(first, r)), Bound: float64(in.Most), Unit: "A",
			Frees: fmt.Sprintf("fit at least %v", quantity.Ohm(catalogue.E24.AtLeast(least))),
		}
	case r > most:
		return &BlockedError{
			Limit: LimitCharge, Subject: "the mean charging current", Value: float64(at(mean, r)), Bound: float64(in.Need), Unit: "A",
			Frees: fmt.Sprintf("fit at most %v, or allow a longer recharge", quantity.Ohm(catalogue.E24.AtMost(most))),
		}
	case r == 0 && catalogue.E24.AtLeast(least) > most:
		return &BlockedError{
			Limit: LimitCharge, Subject: "the mean charging current", Value: float64(at(mean, catalogue.E24.AtLeast(least))), Bound: float64(in.Need), Unit: "A",
			Frees: "allow a longer recharge, or take a stronger transformer supply or a packaged charger",
		}
	}
	return nil
}

// logMean is the logarithmic mean; 0 unless both are positive.
func logMean(a, b float64) float64 {
	switch {
	case a <= 0 || b <= 0:
		return 0
	case math.Abs(a-b) < 1e-9*a:
		return a
	}
	return (a - b) / math.Log(a/b)
}
