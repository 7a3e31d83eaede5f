package sizing

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// CoilDriverInput states a PNP transistor that a comparator's output turns on for a
// relay coil: Base from the output to its base, Off from base to plus.
type CoilDriverInput struct {
	Transistor catalogue.Transistor
	Comparator catalogue.OpenCollector
	Low, High  quantity.Volt  // of the supply
	Coil       quantity.Ohm   // at 20 °C
	CoilTol    quantity.Ratio // both ways
	Feedback   quantity.Ohm   // from the output through the hysteresis resistor to the reference
}

// CoilDriver is a sized driver.
type CoilDriver struct {
	Base, Off quantity.Ohm
	Drive     quantity.Ampere // through Base at the highest supply
	Coil      quantity.Ampere // at the highest supply
	Heat      quantity.Watt   // of Base
}

// The resistor from base to emitter: what keeps the transistor shut, and the voltage
// across it that surely does (common practice, no source).
const (
	offMost quantity.Ohm  = 10e3
	offVolt quantity.Volt = 0.3
	// leastDrive makes the output stiff against the hysteresis resistor, however little
	// the coil takes.
	leastDrive = 1e-3
)

// CoilDriverResistors chooses base and off resistor: the base gets the coil's current
// over the forced gain, the output does not have to take more than it surely can, and
// the current of the hysteresis leaves the transistor shut (transistor switch,
// electronics textbooks).
func CoilDriverResistors(in CoilDriverInput) (CoilDriver, []Working, error) {
	q, k := in.Transistor, in.Comparator
	least := float64(in.Coil) * (1 - float64(in.CoilTol))
	ube, sat := float64(q.Base), float64(k.Saturation)
	d := CoilDriver{Coil: quantity.Ampere(float64(in.High) / least)}
	off := float64(offVolt) * float64(in.Feedback) / float64(in.High)
	d.Off = min(offMost, quantity.Ohm(catalogue.E24.AtMost(off)))
	ib := max(leastDrive, float64(in.Low)/least/q.Forced+ube/float64(d.Off))
	r := (float64(in.Low)-ube-sat)/ib - float64(k.Series)
	if r <= 0 {
		return d, nil, &BlockedError{
			Limit: LimitVoltage, Subject: "the supply of the coil's driver", Value: float64(in.Low), Bound: ube + sat, Unit: "V",
			Frees: "take a packaged module (built: module)",
		}
	}
	d.Base = quantity.Ohm(catalogue.E24.AtMost(r))
	d.Drive = quantity.Ampere((float64(in.High) - ube - sat) / (float64(d.Base) + float64(k.Series)))
	if d.Drive > k.Sink { // drive it with less, as long as it still saturates
		d.Base = quantity.Ohm(catalogue.E24.AtLeast((float64(in.High) - ube - sat) / float64(k.Sink)))
		d.Drive = quantity.Ampere((float64(in.High) - ube - sat) / (float64(d.Base) + float64(k.Series)))
	}
	d.Heat = quantity.Watt(float64(d.Drive) * float64(d.Drive) * float64(d.Base))
	source := "transistor switch (electronics textbooks); " + q.Evidence.String()
	forced := float64(d.Coil) / (float64(d.Drive) - ube/float64(d.Off))
	ws := []Working{{
		Name: "off resistor", Formula: "R_off ≤ min(10 kΩ ; 0.3 V × (R_s + R_hysteresis) ÷ U), E24 value not above",
		Substituted: fmt.Sprintf("min(10000 Ω ; 0.3 V × %s ÷ %s) → %s", num(float64(in.Feedback), "Ω"), num(float64(in.High), "V"), num(float64(d.Off), "Ω")),
		Value:       float64(d.Off), Unit: "Ω", Source: "common practice, no source",
	}, {
		Name: "base resistor", Formula: "R ≤ (U − U_BE − U_sat) ÷ max(1 mA ; U ÷ R_coil ÷ β + U_BE ÷ R_off) − R_out, E24 value",
		Substituted: fmt.Sprintf("(%s − %s − %s) ÷ max(0.001 A ; %s ÷ %s ÷ %s + %s ÷ %s) − %s → %s", num(float64(in.Low), "V"), num(ube, "V"), num(sat, "V"),
			num(float64(in.Low), "V"), num(least, "Ω"), num(q.Forced, ""), num(ube, "V"), num(float64(d.Off), "Ω"), num(float64(k.Series), "Ω"), num(float64(d.Base), "Ω")),
		Value: float64(d.Base), Unit: "Ω", Source: source, Uses: []string{"off resistor"},
	}, {
		Name: "forced gain at the highest supply", Formula: "β = I_coil ÷ (I_base − U_BE ÷ R_off)",
		Substituted: fmt.Sprintf("%s ÷ (%s − %s ÷ %s)", num(float64(d.Coil), "A"), num(float64(d.Drive), "A"), num(ube, "V"), num(float64(d.Off), "Ω")),
		Value:       forced, Source: source, Uses: []string{"base resistor"},
	}}
	switch {
	case in.High > k.Volt:
		return d, ws, &BlockedError{
			Limit: LimitVoltage, Subject: "the supply of the comparator", Value: float64(in.High), Bound: float64(k.Volt), Unit: "V",
			Frees: "take a packaged module (built: module)",
		}
	case in.High > q.Volt || d.Coil > q.Current || forced > q.GainLow/gainReserve:
		return d, ws, &BlockedError{
			Limit: LimitLoad, Subject: "the coil's current that the transistor drives", Value: float64(d.Coil), Bound: float64(k.Sink) * q.GainLow / gainReserve, Unit: "A",
			Frees: "take a coil of higher resistance, or a packaged module (built: module)",
		}
	}
	return d, ws, nil
}

// gainReserve is how far the forced gain stays below the least gain of the class so
// that the transistor saturates (common practice, no source).
const gainReserve = 3
