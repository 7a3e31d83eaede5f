package catalogue

import "gloamwright/internal/quantity"

// LiFePO4 are lithium-iron-phosphate batteries with their own protection circuit.
// Cell voltages, resistance and efficiency typical of the class, from memory. They
// must not be charged below 0 °C.
var LiFePO4 = &BatteryClass{
	Name: "lifepo4", Title: "Lithium iron phosphate", Family: LithiumIron,
	Cell: 3.2, RatedTime: 5 * hours,
	Rates: []RatePoint{
		{1 * hours, 0.95, 2.80}, {2 * hours, 0.97, 2.80}, {5 * hours, 1, 2.80}, {20 * hours, 1, 2.80},
	},
	Ends: []EndPoint{
		{1 * hours, []EndPart{{2.80, 1}, {3.00, 0.93}, {3.10, 0.80}}},
		{5 * hours, []EndPart{{2.80, 1}, {3.00, 0.97}, {3.10, 0.90}}},
	},
	EndVolt: 2.90, LowestEnd: 2.50,
	Size: lithiumSize, SizeEvi: lithiumSizeEvi,
	Float: 3.38, Boost: 3.55, ChargeAt: 25, Slope: 0,
	FloatBand: quantity.Range[quantity.Volt]{Low: 3.35, High: 3.40},
	MaxCharge: 0.50, ChargeFactor: 1.02, ChargeLowest: 0, ChargeHighest: 45,
	ChargeEvi: Evidence{Source: "common practice, 3.35 V to 3.40 V float, 3.60 V charge"},
	Rest:      []RestPoint{{0, 2.80}, {0.1, 3.18}, {0.25, 3.25}, {0.5, 3.29}, {0.75, 3.31}, {0.95, 3.33}, {1, 3.36}},
	RestEvi:   Evidence{Source: "typical of the class; rest voltage tells little of the charge"},
	OhmAh:     Spread{0.03, 0.05, 0.10}, ResistanceEvi: Evidence{Source: "typical datasheets, 100 Ah cell; the protection circuit is in the high figure"},
	SelfDischarge: 0.03, Opens: 2.90, Recloses: 3.25,
	Blocks: blocks(4, 6, 7, 10, 12, 18, 20, 30, 40, 50, 60, 80, 100, 120, 150, 200, 280),

	Evidence: Evidence{Source: "typical datasheets of the class"},
}
