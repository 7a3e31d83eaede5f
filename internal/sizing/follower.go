package sizing

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// FollowerInput states a transistor that a light resistor drives into a coil: base
// fed through a resistor from plus, the cell from base to minus, so that a dark cell
// lets it conduct.
type FollowerInput struct {
	Transistor catalogue.Transistor
	Low, High  quantity.Volt // of the supply
	Coil       quantity.Ohm
	Dark       quantity.Ohm // of the cell at the dark threshold
	Ambient    quantity.Celsius
	PerKelvin  float64 // derating of the transistor above 25 °C, W/K; 0: the class's
}

// transistorDerate is the derating of small TO-18 and TO-92 transistors, W/K: the
// larger of the two figures read (TO-92).
const transistorDerate = 0.005

// FollowerBase returns the greatest E24 base resistor at which the transistor
// saturates in the dark: coil current over forced gain plus what the cell takes,
// (U − U_BE) ÷ (U ÷ R_coil ÷ β + U_BE ÷ R_cell). At dusk the transistor passes slowly
// through half voltage and half current and gives off U² ÷ (4 R_coil), which it must
// bear (transistor switch, electronics textbooks).
func FollowerBase(in FollowerInput) (quantity.Ohm, []Working, error) {
	t := in.Transistor
	u, ube := float64(in.Low), float64(t.Base)
	r := (u - ube) / (u/float64(in.Coil)/t.Forced + ube/float64(in.Dark))
	fit := catalogue.E24.AtMost(r)
	heat := quantity.Watt(float64(in.High) * float64(in.High) / (4 * float64(in.Coil)))
	source := "transistor switch (electronics textbooks); " + t.Evidence.String()
	ws := []Working{{
		Name: "base resistor", Formula: "R ≤ (U − U_BE) ÷ (U ÷ R_coil ÷ β + U_BE ÷ R_cell), E24 value not above",
		Substituted: fmt.Sprintf("(%s − %s) ÷ (%s ÷ %s ÷ %s + %s ÷ %s) = %s → %s", num(u, "V"), num(ube, "V"), num(u, "V"),
			num(float64(in.Coil), "Ω"), num(t.Forced, ""), num(ube, "V"), num(float64(in.Dark), "Ω"), num(r, "Ω"), num(fit, "Ω")),
		Value: fit, Unit: "Ω", Source: source,
	}, {
		Name: "heat of the transistor at dusk", Formula: "P = U^2 ÷ (4 × R_coil)",
		Substituted: fmt.Sprintf("%s ^2 ÷ (4 × %s)", num(float64(in.High), "V"), num(float64(in.Coil), "Ω")),
		Value:       float64(heat), Unit: "W", Source: source,
	}}
	per := in.PerKelvin
	if per == 0 {
		per = transistorDerate
	}
	if may := Derated(t.Power, per, in.Ambient); heat > may {
		return quantity.Ohm(fit), ws, &BlockedError{
			Limit: LimitDissipation, Subject: "the heat of the transistor at dusk", Value: float64(heat), Bound: float64(may), Unit: "W",
			Frees: fmt.Sprintf("take a coil of at least %v, or a comparator that switches at once", quantity.Ohm(float64(in.High)*float64(in.High)/(4*float64(may)))),
		}
	}
	return quantity.Ohm(fit), ws, nil
}
