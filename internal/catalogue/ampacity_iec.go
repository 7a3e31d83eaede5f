package catalogue

import "gloamwright/internal/quantity"

// flexNote remarks the small sizes, which IEC 60364-5-52 does not list.
const flexNote = "below the sizes of IEC 60364-5-52; figure of a two-core flexible cord"

func ampRow(mm2 quantity.SquareMM, a quantity.Ampere, e Evidence) Ampacity {
	return Ampacity{Size: quantity.WireSize{Area: mm2}, Current: a, Evidence: e}
}

func ampRows(e Evidence, pairs ...float64) []Ampacity {
	var out []Ampacity
	for i := 0; i+1 < len(pairs); i += 2 {
		out = append(out, ampRow(quantity.SquareMM(pairs[i]), quantity.Ampere(pairs[i+1]), e))
	}
	return out
}

// smallFlex are the sizes of 1 mm² and less, from BS 7671 table 4F3A (two-core flex,
// DC, 60 °C): lower than any installation method gives, and read on a page that
// reproduces the table.
var smallFlex = ampRows(Evidence{Source: "BS 7671 table 4F3A", Seen: true, Note: flexNote}, 0.5, 3, 0.75, 6, 1, 10)

// ambientPVC is IEC 60364-5-52 table B.52.14 for PVC 70 °C in air. 35 °C and above
// were read on a page with the same figures; the rest is from memory.
var ambientPVC = []AmbientFactor{
	{10, 1.22}, {15, 1.17}, {20, 1.12}, {25, 1.06}, {30, 1},
	{35, 0.94}, {40, 0.87}, {45, 0.79}, {50, 0.71}, {55, 0.61}, {60, 0.50},
}

// ambientXLPE is the same table for XLPE and EPR 90 °C.
var ambientXLPE = []AmbientFactor{
	{10, 1.15}, {15, 1.12}, {20, 1.08}, {25, 1.04}, {30, 1},
	{35, 0.96}, {40, 0.91}, {45, 0.87}, {50, 0.82}, {55, 0.76}, {60, 0.71},
	{65, 0.65}, {70, 0.58}, {75, 0.50}, {80, 0.41},
}

// groupBunched is IEC 60364-5-52 table B.52.17 line 1: circuits bunched in air, on a
// surface or enclosed. From memory.
var groupBunched = []GroupFactor{
	{1, 1}, {2, 0.80}, {3, 0.70}, {4, 0.65}, {5, 0.60}, {6, 0.57}, {7, 0.54},
	{8, 0.52}, {9, 0.50}, {12, 0.45}, {16, 0.41}, {20, 0.38},
}

// groupLayer is IEC 60364-5-52 table B.52.17 line 2: one layer on a wall, floor or
// unperforated tray. From memory.
var groupLayer = []GroupFactor{
	{1, 1}, {2, 0.85}, {3, 0.79}, {4, 0.75}, {5, 0.73}, {6, 0.72}, {7, 0.72}, {8, 0.71}, {20, 0.70},
}

var (
	ambientIEC = Evidence{Source: "IEC 60364-5-52 table B.52.14", Seen: true, Note: "below 35 °C from memory"}
	groupIEC   = Evidence{Source: "IEC 60364-5-52 table B.52.17"}
)

// AmpacityB2 is the default table of metric sizes: two loaded conductors in a
// multi-core cable in conduit or trunking on a wall (method B2), PVC 70 °C, ambient
// 30 °C. IEC 60364-5-52 table B.52.2, from memory; it is chosen because it lies
// below method C and below the seen two-conductor figures of method B for
// single-core cables (BS 7671 table 4D1A), so that a cable clipped to a wall or laid
// on a tray carries what it promises.
var AmpacityB2 = &AmpacityTable{
	Name: "PVC 70 °C, method B2, two loaded conductors",
	Rows: append(append([]Ampacity{}, smallFlex...), ampRows(Evidence{Source: "IEC 60364-5-52 table B.52.2 method B2"},
		1.5, 16.5, 2.5, 23, 4, 30, 6, 38, 10, 52, 16, 69, 25, 90, 35, 111, 50, 133, 70, 168, 95, 201, 120, 232)...),
	Conductor: 70, Base: 30,
	Ambient: ambientPVC, Group: groupBunched, GroupOf: 1,
	AmbientEvi: ambientIEC, GroupEvi: groupIEC,
}

// AmpacityC is for two loaded conductors in a multi-core cable clipped to a surface
// (method C), PVC 70 °C, ambient 30 °C. IEC 60364-5-52 table B.52.2, from memory.
var AmpacityC = &AmpacityTable{
	Name: "PVC 70 °C, method C, two loaded conductors",
	Rows: append(append([]Ampacity{}, smallFlex...), ampRows(Evidence{Source: "IEC 60364-5-52 table B.52.2 method C"},
		1.5, 19.5, 2.5, 27, 4, 36, 6, 46, 10, 63, 16, 85, 25, 112, 35, 138)...),
	Conductor: 70, Base: 30,
	Ambient: ambientPVC, Group: groupLayer, GroupOf: 1,
	AmbientEvi: ambientIEC, GroupEvi: groupIEC,
}

// AmpacityXLPE is for two loaded conductors in a multi-core cable by method B2, XLPE
// or EPR 90 °C, ambient 30 °C. IEC 60364-5-52 table B.52.3, from memory.
var AmpacityXLPE = &AmpacityTable{
	Name: "XLPE 90 °C, method B2, two loaded conductors",
	Rows: append(append([]Ampacity{}, smallFlex...), ampRows(Evidence{Source: "IEC 60364-5-52 table B.52.3 method B2"},
		1.5, 22, 2.5, 30, 4, 40, 6, 51, 10, 69, 16, 91, 25, 119, 35, 146)...),
	Conductor: 90, Base: 30,
	Ambient: ambientXLPE, Group: groupBunched, GroupOf: 1,
	AmbientEvi: ambientIEC, GroupEvi: groupIEC,
}

// AmpacityB2Three and AmpacityCThree are for three loaded conductors, PVC 70 °C:
// IEC 60364-5-52 table B.52.4, read in a machine handbook that prints it with the
// currents at five ambient temperatures. They serve as a check of the factors.
var (
	AmpacityB2Three = &AmpacityTable{
		Name: "PVC 70 °C, method B2, three loaded conductors",
		Rows: ampRows(Evidence{Source: "IEC 60364-5-52 table B.52.4 method B2", Seen: true},
			1.5, 15, 2.5, 20, 4, 27, 6, 34, 10, 46, 16, 62, 25, 80, 35, 99),
		Conductor: 70, Base: 30,
		Ambient: ambientPVC, Group: groupBunched, GroupOf: 1,
		AmbientEvi: ambientIEC, GroupEvi: groupIEC,
	}
	AmpacityCThree = &AmpacityTable{
		Name: "PVC 70 °C, method C, three loaded conductors",
		Rows: ampRows(Evidence{Source: "IEC 60364-5-52 table B.52.4 method C", Seen: true},
			1.5, 17.5, 2.5, 24, 4, 32, 6, 41, 10, 57, 16, 76, 25, 96, 35, 119),
		Conductor: 70, Base: 30,
		Ambient: ambientPVC, Group: groupLayer, GroupOf: 1,
		AmbientEvi: ambientIEC, GroupEvi: groupIEC,
	}
)
