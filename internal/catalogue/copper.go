package catalogue

import "gloamwright/internal/quantity"

// Copper of IEC 60028 (annealed, 100 % conductivity), from memory.
const (
	// CopperResistivity is in Ω·mm²/m at 20 °C.
	CopperResistivity = 0.017241
	// CopperZero is the inferred temperature of zero resistance, in °C below zero:
	// R is proportional to CopperZero + t.
	CopperZero = 234.5
	// CopperAlpha is the temperature coefficient at 20 °C at constant mass, in 1/K.
	CopperAlpha = 0.00393
	// CopperDensity is in kg/m³ at 20 °C.
	CopperDensity = 8890
)

// CopperEvidence is the source of the copper constants.
var CopperEvidence = Evidence{Source: "IEC 60028"}

// ReferenceTemperature is the temperature of conductor tables (IEC 60228, ASTM B258).
const ReferenceTemperature quantity.Celsius = 20

// WireOhm returns the resistance of a wire of length l and area a of a metal with
// resistivity rho in Ω·mm²/m (definition of resistivity).
func WireOhm(rho float64, l quantity.Metre, a quantity.SquareMM) quantity.Ohm {
	return quantity.Ohm(rho * float64(l) / float64(a))
}

// Adiabatic factors k of IEC 60364-4-43 table 43A for copper, in A·s^½/mm².
const (
	AdiabaticPVC  = 115 // insulation PVC 70 °C, cores up to 300 mm²
	AdiabaticXLPE = 143 // insulation XLPE or EPR 90 °C; from memory
)

// AdiabaticEvidence is the source of AdiabaticPVC, read in a textbook.
var AdiabaticEvidence = Evidence{Source: "IEC 60364-4-43 table 43A", Seen: true}

// AdiabaticLimit is the longest time for which k²S² holds (IEC 60364-4-43
// clause 434.5.2, from memory).
const AdiabaticLimit quantity.Second = 5
