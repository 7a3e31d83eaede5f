package catalogue

import (
	"math"

	"gloamwright/internal/quantity"
)

// Diode is a junction or Schottky rectifier by its model
// I = Saturation × (exp((V − I·Series) ÷ (Ideality·V_T)) − 1).
type Diode struct {
	Type       string // JEDEC registration or class
	Saturation quantity.Ampere
	Ideality   float64
	Series     quantity.Ohm
	Reverse    quantity.Volt   // repetitive peak
	Current    quantity.Ampere // average, at most
	Forward    quantity.Volt   // at Current and 25 °C, at most
	Evidence
}

// ThermalVolt is kT/q at 25 °C.
const ThermalVolt quantity.Volt = 0.025693

// Drop returns the forward voltage of the typical diode at a current: the model of
// Diode turned round.
func (d Diode) Drop(i quantity.Ampere) quantity.Volt {
	return quantity.Volt(d.Ideality)*ThermalVolt*quantity.Volt(math.Log1p(float64(i/d.Saturation))) + quantity.Volt(float64(i)*float64(d.Series))
}

// Rectifiers. 1N4004: saturation current and series resistance fitted in an open
// textbook to points of a datasheet graph with N = 2 and 26 mV (0.925 V at 1 A). The
// Schottky parameters are typical and keep below the registered limits of forward
// voltage (0.60 V at 1 A, 0.525 V at 3 A); both are from memory.
var (
	Diode1N4004 = Diode{
		Type: "1N4004", Saturation: 18.8e-9, Ideality: 2, Series: 0.0286, Reverse: 400, Current: 1, Forward: 1.1,
		Evidence: Evidence{Source: "open textbook on semiconductors, diode model from datasheet graph", Seen: true},
	}
	Diode1N5819 = Diode{
		Type: "1N5819", Saturation: 10e-6, Ideality: 1.05, Series: 0.12, Reverse: 40, Current: 1, Forward: 0.60,
		Evidence: Evidence{Source: "JEDEC registration 1N5819; typical model"},
	}
	Diode1N5822 = Diode{
		Type: "1N5822", Saturation: 40e-6, Ideality: 1.05, Series: 0.035, Reverse: 40, Current: 3, Forward: 0.525,
		Evidence: Evidence{Source: "JEDEC registration 1N5822; typical model"},
	}
)

// Zener is a regulator diode of one registration.
type Zener struct {
	Type      string
	Volt      quantity.Volt   // at Test
	Test      quantity.Ampere // test current
	Impedance quantity.Ohm    // at Test
	Knee      quantity.Ampere // current at which it still regulates
	Power     quantity.Watt
	Tol       quantity.Ratio
	Evidence
}

// zenerKnee is the test current of the knee impedance of the 1 W series.
const zenerKnee quantity.Ampere = 0.00025

// Zeners1W are the 1 W series 1N4728A to 1N4764A in part: JEDEC registration, from
// memory; 5 % tolerance, derated by 6.67 mW/K above 50 °C.
var Zeners1W = []Zener{
	zener1W("1N4733A", 5.1, 0.049, 7), zener1W("1N4735A", 6.2, 0.041, 2), zener1W("1N4740A", 10, 0.025, 7),
	zener1W("1N4742A", 12, 0.021, 9), zener1W("1N4744A", 15, 0.017, 14), zener1W("1N4749A", 24, 0.0105, 25),
	zener1W("1N4750A", 27, 0.0095, 35),
}

func zener1W(name string, v quantity.Volt, test quantity.Ampere, z quantity.Ohm) Zener {
	return Zener{Type: name, Volt: v, Test: test, Impedance: z, Knee: zenerKnee, Power: 1, Tol: 0.05,
		Evidence: Evidence{Source: "JEDEC registration " + name}}
}

// Zeners5W are the 5 W series 1N5338B to 1N5361B in part: JEDEC registration, from
// memory; 5 % tolerance.
var Zeners5W = []Zener{
	zener5W("1N5338B", 5.1, 0.240, 1.5), zener5W("1N5341B", 6.2, 0.200, 1), zener5W("1N5347B", 10, 0.125, 2),
	zener5W("1N5349B", 12, 0.100, 2.5), zener5W("1N5352B", 15, 0.075, 2.5), zener5W("1N5359B", 24, 0.050, 3.5),
	zener5W("1N5361B", 27, 0.050, 5),
}

func zener5W(name string, v quantity.Volt, test quantity.Ampere, z quantity.Ohm) Zener {
	x := zener1W(name, v, test, z)
	x.Knee, x.Power = zenerKnee5W, 5
	return x
}

// zenerKnee5W is the test current of the knee impedance of the 5 W series.
const zenerKnee5W quantity.Ampere = 0.001

// ZenerOf returns the 1 W type of a voltage.
func ZenerOf(v quantity.Volt) (Zener, bool) { return zenerIn(Zeners1W, v) }

// Zener5WOf returns the 5 W type of a voltage.
func Zener5WOf(v quantity.Volt) (Zener, bool) { return zenerIn(Zeners5W, v) }

func zenerIn(list []Zener, v quantity.Volt) (Zener, bool) {
	for _, z := range list {
		if z.Volt == v {
			return z, true
		}
	}
	return Zener{}, false
}

// Transistor is a bipolar transistor by its limits and gains.
type Transistor struct {
	Type       string
	PNP        bool
	Volt       quantity.Volt   // collector to emitter, at most
	Current    quantity.Ampere // collector, at most
	Power      quantity.Watt   // free air, 25 °C
	GainLow    float64         // least current gain at 10 mA
	Gain       float64         // typical
	GainHigh   float64
	Saturation quantity.Volt // at most, at 150 mA and 15 mA base
	Base       quantity.Volt // base to emitter in conduction
	Forced     float64       // collector current ÷ base current for a closed switch
	Evidence
}

// Small transistors. 2N2222A read in datasheets (the lower of the limits printed for
// TO-18 and TO-92); 2N2907A, its complement, and 2N3019, for more voltage and heat, from
// memory.
var (
	NPNSmall = Transistor{
		Type: "2N2222A", Volt: 40, Current: 0.6, Power: 0.4, GainLow: 75, Gain: 150, GainHigh: 300, Saturation: 0.3, Base: 0.7, Forced: 10,
		Evidence: Evidence{Source: "2N2222A datasheets", Seen: true},
	}
	NPNMedium = Transistor{
		Type: "2N3019", Volt: 80, Current: 1, Power: 0.8, GainLow: 90, Gain: 150, GainHigh: 300, Saturation: 0.2, Base: 0.7, Forced: 10,
		Evidence: Evidence{Source: "JEDEC registration 2N3019"},
	}
	PNPSmall = Transistor{
		Type: "2N2907A", PNP: true, Volt: 60, Current: 0.6, Power: 0.4, GainLow: 100, Gain: 180, GainHigh: 300, Saturation: 0.4, Base: 0.7, Forced: 10,
		Evidence: Evidence{Source: "JEDEC registration 2N2907A"},
	}
)
