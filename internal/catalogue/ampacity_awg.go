package catalogue

import "gloamwright/internal/quantity"

func gaugeRows(e Evidence, rows ...gaugeAmps) []Ampacity {
	var out []Ampacity
	for _, r := range rows {
		n, err := GaugeNumber(r.gauge)
		if err != nil {
			panic(err)
		}
		out = append(out, Ampacity{Size: quantity.WireSize{Area: GaugeArea(n), Gauge: r.gauge}, Current: r.amps, Evidence: e})
	}
	return out
}

type gaugeAmps struct {
	gauge string
	amps  quantity.Ampere
}

// AmpacityNFPA60 is the default table of gauges: up to three loaded copper
// conductors in a cable or raceway, terminations and insulation for 60 °C, ambient
// 30 °C. NFPA 70 table 310.16, recent editions, from memory, which are lower at 14
// and 12 AWG than the older edition that was read; 18 and 16 AWG take the limits of
// 240.4(D) (from memory), lower than any conductor table gives.
var AmpacityNFPA60 = &AmpacityTable{
	Name: "60 °C column, up to three loaded conductors",
	Rows: append(
		gaugeRows(Evidence{Source: "NFPA 70 240.4(D)"}, gaugeAmps{"18", 7}, gaugeAmps{"16", 10}),
		gaugeRows(Evidence{Source: "NFPA 70 table 310.16, 60 °C column"},
			gaugeAmps{"14", 15}, gaugeAmps{"12", 20}, gaugeAmps{"10", 30}, gaugeAmps{"8", 40}, gaugeAmps{"6", 55},
			gaugeAmps{"4", 70}, gaugeAmps{"3", 85}, gaugeAmps{"2", 95}, gaugeAmps{"1", 110}, gaugeAmps{"1/0", 125},
			gaugeAmps{"2/0", 145}, gaugeAmps{"3/0", 165}, gaugeAmps{"4/0", 195})...),
	Conductor: 60, Base: 30,
	Ambient: []AmbientFactor{ // NFPA 70 310.15(B)(1), read as residential code table E3705.2
		{10, 1.29}, {15, 1.22}, {20, 1.15}, {25, 1.08}, {30, 1}, {35, 0.91}, {40, 0.82}, {45, 0.71}, {50, 0.58}, {55, 0.41},
	},
	Group: []GroupFactor{ // NFPA 70 310.15(C)(1), by conductors, from memory
		{3, 1}, {6, 0.80}, {9, 0.70}, {20, 0.50}, {30, 0.45}, {40, 0.40},
	},
	GroupOf:    2,
	AmbientEvi: Evidence{Source: "NFPA 70 310.15(B)(1)", Seen: true},
	GroupEvi:   Evidence{Source: "NFPA 70 310.15(C)(1)"},
}

// AmpacityBoat60 is for conductors of 60 °C outside engine spaces in systems under
// 50 V: 33 CFR 183.425 table 5, an open table that was read. The grouping factors
// are those of its note, from memory, and count conductors.
var AmpacityBoat60 = &AmpacityTable{
	Name: "60 °C, systems under 50 V in boats, outside engine spaces",
	Rows: gaugeRows(Evidence{Source: "33 CFR 183.425 table 5", Seen: true},
		gaugeAmps{"18", 10}, gaugeAmps{"16", 15}, gaugeAmps{"14", 20}, gaugeAmps{"12", 25}, gaugeAmps{"10", 40},
		gaugeAmps{"8", 55}, gaugeAmps{"6", 80}, gaugeAmps{"4", 105}, gaugeAmps{"3", 120}, gaugeAmps{"2", 140},
		gaugeAmps{"1", 165}, gaugeAmps{"1/0", 195}, gaugeAmps{"2/0", 225}, gaugeAmps{"3/0", 260}, gaugeAmps{"4/0", 300}),
	Conductor: 60, Base: 30,
	Ambient:    []AmbientFactor{{30, 1}, {50, 0.58}},
	Group:      []GroupFactor{{2, 1}, {3, 0.70}, {6, 0.60}, {24, 0.50}, {48, 0.40}},
	GroupOf:    2,
	AmbientEvi: Evidence{Source: "33 CFR 183.425 table 5 note 1"},
	GroupEvi:   Evidence{Source: "33 CFR 183.425 table 5 note 2"},
}
