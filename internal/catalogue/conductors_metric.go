package catalogue

import "gloamwright/internal/quantity"

func class2(mm2 quantity.SquareMM, perKM quantity.Ohm) Conductor {
	return Conductor{Size: quantity.WireSize{Area: mm2}, PerKM: perKM,
		Evidence: Evidence{Source: "IEC 60228 table 2", Seen: true}}
}

func class5(mm2 quantity.SquareMM, perKM quantity.Ohm) Conductor {
	return Conductor{Size: quantity.WireSize{Area: mm2}, PerKM: perKM,
		Evidence: Evidence{Source: "IEC 60228 table 3", Seen: true}}
}

// ConductorsClass2 are stranded conductors of plain copper: IEC 60228 table 2,
// greatest resistance at 20 °C in Ω/km, read on two pages that reproduce it. Class 1
// (solid) has the same limits at every size listed.
var ConductorsClass2 = []Conductor{
	class2(0.5, 36.0), class2(0.75, 24.5), class2(1, 18.1), class2(1.5, 12.1),
	class2(2.5, 7.41), class2(4, 4.61), class2(6, 3.08), class2(10, 1.83),
	class2(16, 1.15), class2(25, 0.727), class2(35, 0.524), class2(50, 0.387),
	class2(70, 0.268), class2(95, 0.193), class2(120, 0.153),
}

// ConductorsClass5 are flexible conductors of plain copper: IEC 60228 table 3,
// greatest resistance at 20 °C in Ω/km, read on two pages that reproduce it.
var ConductorsClass5 = []Conductor{
	class5(0.5, 39.0), class5(0.75, 26.0), class5(1, 19.5), class5(1.5, 13.3),
	class5(2.5, 7.98), class5(4, 4.95), class5(6, 3.30), class5(10, 1.91),
	class5(16, 1.21), class5(25, 0.780), class5(35, 0.554), class5(50, 0.386),
	class5(70, 0.272), class5(95, 0.206), class5(120, 0.161),
}
