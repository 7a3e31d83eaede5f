package catalogue

import (
	"math"

	"gloamwright/internal/quantity"
)

// LightResistor is a class of light-dependent resistors:
// R = At10 × (E ÷ 10 lx)^(−Gamma), at most Dark.
type LightResistor struct {
	Name                  string
	At10Low, At10, At10Hi quantity.Ohm // at 10 lx
	Dark                  quantity.Ohm
	GammaLow, Gamma       float64
	GammaHigh             float64
	Power                 quantity.Watt // at most
	Evidence
}

// CadmiumSulphide5 is the 5 mm cadmium-sulphide class: 8 kΩ to 20 kΩ at 10 lx, at
// least 1 MΩ dark, law and exponents read; typical values in the middle.
var CadmiumSulphide5 = LightResistor{
	Name: "cadmium sulphide, 5 mm", At10Low: 8e3, At10: 12.65e3, At10Hi: 20e3, Dark: 1e6,
	GammaLow: 0.5, Gamma: 0.7, GammaHigh: 1.0, Power: 0.1,
	Evidence: Evidence{Source: "photoresistor summary and law R = a·E^−γ", Seen: true},
}

// CadmiumSulphideHigh is the class of high resistance and steeper law: 50 kΩ to 100 kΩ at
// 10 lx, at least 5 MΩ dark, exponent 0.8 (typical datasheets of 5 mm cells, from memory).
var CadmiumSulphideHigh = LightResistor{
	Name: "cadmium sulphide, 5 mm, high resistance", At10Low: 50e3, At10: 75e3, At10Hi: 100e3, Dark: 5e6,
	GammaLow: 0.7, Gamma: 0.8, GammaHigh: 0.9, Power: 0.1,
	Evidence: Evidence{Source: "typical datasheets, high-resistance cells"},
}

// tenLux is the illuminance at which light resistors are listed.
const tenLux = 10

// At returns the typical resistance at an illuminance.
func (l LightResistor) At(e quantity.Lux) quantity.Ohm { return LightLaw(l.At10, l.Gamma, l.Dark, e) }

// Bounds returns the least and greatest resistance of the class at an illuminance.
func (l LightResistor) Bounds(e quantity.Lux) (low, high quantity.Ohm) {
	a, b := LightLaw(l.At10Low, l.GammaLow, l.Dark, e), LightLaw(l.At10Low, l.GammaHigh, l.Dark, e)
	c, d := LightLaw(l.At10Hi, l.GammaLow, l.Dark, e), LightLaw(l.At10Hi, l.GammaHigh, l.Dark, e)
	return min(a, b), max(c, d)
}

// LightLaw is the law of a light resistor: at10 ohms at 10 lx, falling with the power
// gamma of the illuminance, in parallel with its dark resistance.
func LightLaw(at10 quantity.Ohm, gamma float64, dark quantity.Ohm, e quantity.Lux) quantity.Ohm {
	if e <= 0 {
		return dark
	}
	r := at10 * quantity.Ohm(math.Pow(float64(e)/tenLux, -gamma))
	return r * dark / (r + dark)
}

// Emitter is a class of light-emitting diodes.
type Emitter struct {
	Colour                           string
	ForwardLow, Forward, ForwardHigh quantity.Volt // at 20 mA
	PerKelvin                        quantity.Volt
	Evidence
}

// Emitters are modern light-emitting diodes at 20 mA: typical datasheets, from memory.
var Emitters = []Emitter{
	{"red", 1.8, 2.0, 2.2, -0.002, Evidence{Source: "typical datasheets"}},
	{"amber", 1.9, 2.1, 2.3, -0.002, Evidence{Source: "typical datasheets"}},
	{"green", 2.8, 3.2, 3.5, -0.003, Evidence{Source: "typical datasheets"}},
	{"blue", 2.8, 3.1, 3.5, -0.003, Evidence{Source: "typical datasheets"}},
	{"white", 2.8, 3.1, 3.5, -0.003, Evidence{Source: "typical datasheets"}},
}

// Exponents of a filament lamp near its rated voltage: each quantity goes as the
// voltage ratio to this power (lamp rerating, Standard Handbook for Electrical
// Engineers, read in an article that cites it).
const (
	FilamentCurrent = 0.55
	FilamentPower   = 1.6
	FilamentLight   = 3.4
	FilamentLife    = -12
)

// FilamentEvidence is the source of the exponents.
var FilamentEvidence = Evidence{Source: "lamp rerating, Standard Handbook for Electrical Engineers", Seen: true}

// TungstenZero is the zero-resistance temperature for a coefficient of 0.0045 1/K at
// 20 °C (College Physics 2e): 1/0.0045 − 20.
const TungstenZero = 1/0.0045 - 20
