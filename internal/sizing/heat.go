package sizing

import (
	"fmt"

	"gloamwright/internal/quantity"
)

// HeatInput states a device that gives off heat.
type HeatInput struct {
	Power        quantity.Watt
	Junction     quantity.Celsius       // at most
	Ambient      quantity.Celsius       // hottest
	JunctionCase quantity.KelvinPerWatt // of the device
	CaseSink     quantity.KelvinPerWatt // of the mounting
	Free         quantity.KelvinPerWatt // junction to ambient without a heat sink; 0: unknown
}

// Sink is what a device needs to stay cool.
type Sink struct {
	Needed bool
	Most   quantity.KelvinPerWatt // sink to ambient, at most
	Case   quantity.Celsius       // of the case then
}

// HeatSink returns the greatest thermal resistance of a heat sink:
// R_SA = (T_J − T_A) ÷ P − R_JC − R_CS (thermal Ohm's law, electronics textbooks).
// Without need of one, Needed is false. No sink helps if R_SA is not positive.
func HeatSink(in HeatInput) (Sink, Working, error) {
	rise := float64(in.Junction - in.Ambient)
	total := rise / float64(in.Power)
	s := Sink{
		Needed: in.Free == 0 || float64(in.Free) > total,
		Most:   quantity.KelvinPerWatt(total) - in.JunctionCase - in.CaseSink,
		Case:   in.Junction - quantity.Celsius(float64(in.Power)*float64(in.JunctionCase)),
	}
	w := Working{
		Name: "heat sink", Formula: "R_SA = (T_J − T_A) ÷ P − R_JC − R_CS",
		Substituted: fmt.Sprintf("(%s − %s) ÷ %s − %s − %s", num(float64(in.Junction), "°C"), bracketed(float64(in.Ambient), "°C"), num(float64(in.Power), "W"),
			num(float64(in.JunctionCase), "K/W"), num(float64(in.CaseSink), "K/W")),
		Value: float64(s.Most), Unit: "K/W", Source: "thermal Ohm's law (electronics textbooks)",
	}
	if s.Most <= 0 {
		most := MostPower(in.Junction, in.Ambient, in.JunctionCase+in.CaseSink)
		return s, w, &BlockedError{
			Limit: LimitDissipation, Subject: "the heat of the device", Value: float64(in.Power), Bound: float64(most), Unit: "W",
			Frees: "lower the voltage across the device or its current, or share the heat over two devices",
		}
	}
	return s, w, nil
}

// MostPower returns the heat that a device may give off through a thermal resistance:
// P = (T_J − T_A) ÷ R_JA (thermal Ohm's law).
func MostPower(junction, ambient quantity.Celsius, total quantity.KelvinPerWatt) quantity.Watt {
	return quantity.Watt(float64(junction-ambient) / float64(total))
}

// Derated returns the heat that a device may give off at an ambient temperature when
// it is rated for power at 25 °C and loses perKelvin above (datasheet derating).
func Derated(power quantity.Watt, perKelvin float64, ambient quantity.Celsius) quantity.Watt {
	return power - quantity.Watt(perKelvin*max(0, float64(ambient)-deratingFrom))
}

// deratingFrom is the temperature up to which datasheets of small transistors give
// full power, in °C.
const deratingFrom = 25
