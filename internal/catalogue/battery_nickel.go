package catalogue

import "gloamwright/internal/quantity"

// NiCd are vented pocket-plate nickel-cadmium cells of medium rate, rated at 5 h to
// 1.00 V. Voltages of IEC 62485-2 table 1 and the rest typical of the class, from
// memory. IEEE 1115 asks that capacity after long float be taken from the maker;
// FloatLoss holds a cautious figure.
var NiCd = &BatteryClass{
	Name: "nicd", Title: "Vented nickel-cadmium, pocket plate", Family: NickelCd,
	Cell: 1.2, RatedTime: 5 * hours,
	Rates: []RatePoint{
		{hours / 4, 0.50, 1.00}, {hours / 2, 0.70, 1.00}, {1 * hours, 0.84, 1.00}, {2 * hours, 0.92, 1.00},
		{3 * hours, 0.96, 1.00}, {5 * hours, 1, 1.00}, {10 * hours, 1, 1.00},
	},
	Ends: []EndPoint{
		{1 * hours, []EndPart{{1.00, 1}, {1.05, 0.95}, {1.10, 0.84}, {1.14, 0.70}}},
		{5 * hours, []EndPart{{1.00, 1}, {1.05, 0.98}, {1.10, 0.94}, {1.14, 0.86}}},
	},
	EndVolt: 1.05, LowestEnd: 1.00,
	Size: nickelSize, SizeEvi: nickelSizeEvi,
	Float: 1.42, Boost: 1.55, ChargeAt: 20, Slope: -0.003,
	FloatBand: quantity.Range[quantity.Volt]{Low: 1.40, High: 1.47},
	MaxCharge: 0.20, ChargeFactor: 1.4, ChargeLowest: -20, ChargeHighest: 45,
	ChargeEvi: Evidence{Source: "IEC 62485-2 table 1 basis (1.40 V float, 1.55 V boost)"},
	Rest:      []RestPoint{{0, 1.16}, {0.25, 1.22}, {0.5, 1.25}, {0.75, 1.28}, {1, 1.32}},
	RestEvi:   Evidence{Source: "typical of the class; rest voltage tells little of the charge"},
	OhmAh:     Spread{0.07, 0.095, 0.12}, ResistanceEvi: Evidence{Source: "typical datasheets, 100 Ah cell"},
	GasFloat: 5, GasBoost: 50, GasEvi: Evidence{Source: "IEC 62485-2 table 1"},
	SelfDischarge: 0.05, Opens: 1.05, Recloses: 1.28,
	Blocks:   blocks(1, 10, 16, 20, 30, 40, 50, 60, 80, 100, 125, 150, 200, 250, 300, 400, 500),
	Evidence: Evidence{Source: "typical datasheets of the class"},
}

// FloatLoss is the part of the capacity that a nickel-cadmium cell keeps after long
// float charging (IEEE 1115 asks for the maker's figure; this one is common practice).
const FloatLoss quantity.Ratio = 0.90

// NiMH are sealed nickel-metal-hydride packs. Typical of the class, from memory.
// They are charged at constant current; Float is the voltage that a pack shows under
// trickle charge, not a setting to hold.
var NiMH = &BatteryClass{
	Name: "nimh", Title: "Nickel-metal hydride", Family: NickelMH,
	Cell: 1.2, RatedTime: 5 * hours,
	Rates: []RatePoint{
		{hours / 2, 0.80, 1.00}, {1 * hours, 0.90, 1.00}, {2 * hours, 0.95, 1.00}, {5 * hours, 1, 1.00}, {10 * hours, 1, 1.00},
	},
	Ends: []EndPoint{
		{1 * hours, []EndPart{{1.00, 1}, {1.05, 0.95}, {1.10, 0.86}, {1.14, 0.74}}},
		{5 * hours, []EndPart{{1.00, 1}, {1.05, 0.98}, {1.10, 0.94}, {1.14, 0.87}}},
	},
	EndVolt: 1.05, LowestEnd: 1.00,
	Size: nickelSize, SizeEvi: nickelSizeEvi,
	Float: 1.40, Boost: 1.45, ChargeAt: 20, Slope: -0.003,
	FloatBand: quantity.Range[quantity.Volt]{Low: 1.38, High: 1.42},
	MaxCharge: 0.10, ChargeFactor: 1.5, ChargeLowest: 0, ChargeHighest: 40,
	ChargeEvi: Evidence{Source: "typical datasheets; 0.1 C without end-of-charge detection is common practice"},
	Rest:      []RestPoint{{0, 1.15}, {0.25, 1.23}, {0.5, 1.26}, {0.75, 1.29}, {1, 1.35}},
	RestEvi:   Evidence{Source: "typical of the class; rest voltage tells little of the charge"},
	OhmAh:     Spread{0.04, 0.06, 0.08}, ResistanceEvi: Evidence{Source: "typical datasheets, 2 Ah cell"},
	SelfDischarge: 0.25, Opens: 1.05, Recloses: 1.28,
	Blocks:   blocks(10, 1.6, 2, 4, 7, 10),
	Evidence: Evidence{Source: "typical datasheets of the class"},
}
