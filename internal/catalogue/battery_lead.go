package catalogue

import "gloamwright/internal/quantity"

// hours is one hour in seconds, for tables by discharge time.
const hours quantity.Second = quantity.SecondsPerHour

// leadAcidEnds are the losses of capacity of lead-acid cells when the discharge
// stops above the end voltage of the rate table. Typical of the class's discharge
// tables, from memory; gains below the table's end voltage are not counted.
var leadAcidEnds = []EndPoint{
	{hours / 2, []EndPart{{1.60, 1}, {1.70, 0.92}, {1.75, 0.86}, {1.80, 0.78}, {1.85, 0.68}, {1.90, 0.55}}},
	{1 * hours, []EndPart{{1.60, 1}, {1.70, 0.95}, {1.75, 0.91}, {1.80, 0.86}, {1.85, 0.78}, {1.90, 0.66}}},
	{5 * hours, []EndPart{{1.70, 1}, {1.75, 0.985}, {1.80, 0.96}, {1.85, 0.92}, {1.90, 0.84}}},
	{10 * hours, []EndPart{{1.75, 1}, {1.80, 0.98}, {1.85, 0.94}, {1.90, 0.86}}},
	{20 * hours, []EndPart{{1.80, 1}, {1.85, 0.95}, {1.90, 0.87}}},
}

// Standard products of lead-acid batteries. Common practice, no source.
func blocks(cells int, ah ...quantity.AmpereHour) []Block {
	var out []Block
	for _, a := range ah {
		out = append(out, Block{Cells: cells, Capacity: a})
	}
	return out
}

// vrlaGas are the gas currents of IEC 62485-2 table 1 for valve-regulated cells, from
// memory.
const vrlaGasFloat, vrlaGasBoost = 1, 8

// VRLAAGM are valve-regulated lead-acid batteries with absorbed glass mat. Capacity
// by rate: a 12 V 40 Ah datasheet at 20, 10, 5 and 1 h (read), the other times
// typical of the class (memory). Float 13.7 V to 13.9 V and cyclic charge 14.7 V to
// 15.0 V for 12 V at 25 °C, charge at most 0.4 C, self-discharge 5 % a month, less than
// 8 mΩ: the same sheet.
var VRLAAGM = &BatteryClass{
	Name: "vrla-agm", Title: "Valve-regulated lead-acid, glass mat", Family: LeadAcid,
	Cell: 2, RatedTime: 20 * hours,
	Rates: []RatePoint{
		{hours / 4, 0.36, 1.60}, {hours / 2, 0.48, 1.60}, {1 * hours, 0.60, 1.60}, {2 * hours, 0.68, 1.67},
		{3 * hours, 0.76, 1.68}, {5 * hours, 0.85, 1.70}, {8 * hours, 0.91, 1.73}, {10 * hours, 0.93, 1.75}, {20 * hours, 1, 1.80},
	},
	Ends: leadAcidEnds, EndVolt: 1.75, LowestEnd: 1.60,
	Size: leadAcidSize, SizeEvi: leadAcidSizeEvi,
	Float: 2.29, Boost: 2.42, ChargeAt: 25, Slope: -0.003,
	FloatBand: quantity.Range[quantity.Volt]{Low: 2.25, High: 2.32},
	MaxCharge: 0.25, ChargeFactor: 1.18, ChargeLowest: -15, ChargeHighest: 40,
	ChargeEvi: Evidence{Source: "datasheet 12 V 40 Ah (13.7 V to 13.9 V float at 25 °C); common limit 0.25 C", Seen: true, Note: "charge factor from an ampere-hour efficiency of 85 %"},
	Rest:      []RestPoint{{0, 11.7 / 6}, {0.25, 12.0 / 6}, {0.5, 12.3 / 6}, {0.75, 12.55 / 6}, {1, 12.8 / 6}},
	RestEvi:   Evidence{Source: "common practice for 12 V glass-mat batteries"},
	OhmAh:     Spread{0.05, 0.07, 0.10}, ResistanceEvi: Evidence{Source: "datasheet 12 V 40 Ah (below 8 mΩ); range of typical datasheets from memory", Seen: true},
	GasFloat: vrlaGasFloat, GasBoost: vrlaGasBoost, GasEvi: Evidence{Source: "IEC 62485-2 table 1"},
	SelfDischarge: 0.05, Opens: 1.75, Recloses: 2.10,
	Blocks:   blocks(6, 1.2, 2.3, 3.2, 4, 5, 7, 9, 12, 17, 24, 26, 33, 40, 55, 65, 75, 80, 100, 120, 150, 200, 250),
	Evidence: Evidence{Source: "datasheet 12 V 40 Ah, capacity by rate", Seen: true, Note: "8, 3, 2, ½ and ¼ h from memory"},
}

// VRLAGel are valve-regulated lead-acid batteries with gelled electrolyte. Typical of
// the class, from memory, taken a little below glass mat, as the higher Peukert
// exponents of the class (1.10 to 1.25, read) suggest.
var VRLAGel = &BatteryClass{
	Name: "vrla-gel", Title: "Valve-regulated lead-acid, gel", Family: LeadAcid,
	Cell: 2, RatedTime: 20 * hours,
	Rates: []RatePoint{
		{hours / 4, 0.30, 1.60}, {hours / 2, 0.42, 1.60}, {1 * hours, 0.55, 1.60}, {2 * hours, 0.65, 1.67},
		{3 * hours, 0.73, 1.68}, {5 * hours, 0.82, 1.70}, {8 * hours, 0.89, 1.73}, {10 * hours, 0.92, 1.75}, {20 * hours, 1, 1.80},
	},
	Ends: leadAcidEnds, EndVolt: 1.75, LowestEnd: 1.60,
	Size: leadAcidSize, SizeEvi: leadAcidSizeEvi,
	Float: 2.27, Boost: 2.37, ChargeAt: 20, Slope: -0.003,
	FloatBand: quantity.Range[quantity.Volt]{Low: 2.23, High: 2.30},
	MaxCharge: 0.20, ChargeFactor: 1.18, ChargeLowest: -15, ChargeHighest: 40,
	ChargeEvi: Evidence{Source: "IEC 62485-2 table 1 basis (2.27 V at 20 °C)", Note: "charge factor from an ampere-hour efficiency of 85 %"},
	Rest:      []RestPoint{{0, 11.7 / 6}, {0.25, 12.0 / 6}, {0.5, 12.3 / 6}, {0.75, 12.55 / 6}, {1, 12.8 / 6}},
	RestEvi:   Evidence{Source: "common practice for 12 V valve-regulated batteries"},
	OhmAh:     Spread{0.07, 0.10, 0.15}, ResistanceEvi: Evidence{Source: "typical datasheets"},
	GasFloat: vrlaGasFloat, GasBoost: vrlaGasBoost, GasEvi: Evidence{Source: "IEC 62485-2 table 1"},
	SelfDischarge: 0.04, Opens: 1.75, Recloses: 2.10,
	Blocks:   blocks(6, 7, 12, 17, 24, 33, 40, 50, 60, 70, 85, 100, 120, 150, 200),
	Evidence: Evidence{Source: "typical datasheets of the class"},
}

// Flooded are vented stationary lead-acid cells and blocks, rated at 10 h. Typical
// of the class, from memory; rest voltages of a 12 V battery and the rough
// short-circuit rule of 10 A per Ah, below 20, were read.
var Flooded = &BatteryClass{
	Name: "flooded", Title: "Vented lead-acid", Family: LeadAcid,
	Cell: 2, RatedTime: 10 * hours,
	Rates: []RatePoint{
		{hours / 4, 0.24, 1.60}, {hours / 2, 0.36, 1.60}, {1 * hours, 0.50, 1.65}, {2 * hours, 0.64, 1.70},
		{3 * hours, 0.74, 1.73}, {5 * hours, 0.86, 1.76}, {8 * hours, 0.96, 1.79}, {10 * hours, 1, 1.80}, {20 * hours, 1.08, 1.80},
	},
	Ends: leadAcidEnds, EndVolt: 1.75, LowestEnd: 1.60,
	Size: leadAcidSize, SizeEvi: leadAcidSizeEvi,
	Float: 2.23, Boost: 2.40, ChargeAt: 20, Slope: -0.003,
	FloatBand: quantity.Range[quantity.Volt]{Low: 2.17, High: 2.25},
	MaxCharge: 0.20, ChargeFactor: 1.18, ChargeLowest: -15, ChargeHighest: 45,
	ChargeEvi: Evidence{Source: "IEC 62485-2 table 1 basis (2.23 V at 20 °C)", Note: "charge factor from an ampere-hour efficiency of 85 %"},
	Rest:      []RestPoint{{0, 11.6 / 6}, {0.25, 12.0 / 6}, {0.5, 12.2 / 6}, {0.75, 12.4 / 6}, {1, 12.6 / 6}},
	RestEvi:   Evidence{Source: "rest voltages of flooded 12 V batteries, common practice", Seen: true},
	OhmAh:     Spread{0.10, 0.15, 0.25}, ResistanceEvi: Evidence{Source: "DC distribution handbook chapter (short circuit about 10 A per Ah, below 20)", Seen: true},
	GasFloat: 5, GasBoost: 20, GasEvi: Evidence{Source: "IEC 62485-2 table 1"},
	SelfDischarge: 0.04, Opens: 1.75, Recloses: 2.10,
	Blocks: append(blocks(6, 40, 50, 75, 100, 125, 150, 200),
		blocks(1, 250, 300, 350, 420, 490, 600, 800, 1000, 1200, 1500, 2000)...),
	Evidence: Evidence{Source: "typical datasheets of the class"},
}
