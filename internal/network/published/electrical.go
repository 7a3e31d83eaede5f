package published

import (
	"fmt"
	"math"

	checks "gloamwright/internal/sizing/published"
)

// sources are cells, sources and resistances.
var sources = []Example{
	{"College Physics 2e, Terminal Voltage, 12 V and 0.1 ohm into 10 ohm", checks.Read,
		"G1 battery a 0 emf=12 ohm=0.1\nR1 resistor a 0 ohm=10",
		[]Printed{{"current", amps("R1"), 1.188, 5e-4}, {"voltage", volts("a", "0"), 11.9, 0.05}}},
	{"College Physics 2e, Terminal Voltage, 12 V and 0.5 ohm into 0.5 ohm", checks.Read,
		"G1 battery a 0 emf=12 ohm=0.5\nR1 resistor a 0 ohm=0.5",
		[]Printed{{"current", amps("R1"), 12, 1e-6}, {"voltage", volts("a", "0"), 6, 1e-6}, {"power", watts("R1"), 72, 1e-5}}},
	{"Lessons in Electric Circuits vol. I ch. 11, 10 V and 0.2 ohm into 1 ohm", checks.Read,
		"G1 battery a 0 emf=10 ohm=0.2\nR1 resistor a 0 ohm=1",
		[]Printed{{"current", amps("R1"), 8.333, 5e-4}}},
	{"Bird, Electrical Circuit Theory and Technology, ch. 4 ex. 4", checks.Archive,
		cells(10, 1.5, 0.2) + "R1 resistor c10 0 ohm=58",
		[]Printed{{"current", amps("R1"), 0.25, 1e-6}, {"voltage", volts("c10", "0"), 14.5, 1e-5}}},
	{"Bird, Electrical Circuit Theory and Technology, ch. 4 ex. 1, eight cells in parallel", checks.Archive,
		parallelCells(8, 2.2, 0.2) + "R1 resistor p 0 ohm=0.975",
		[]Printed{{"resistance and load together take 2.2 A", amps("R1"), 2.2, 1e-6}}},
	{"Lessons in Electric Circuits vol. I ch. 12, Temperature coefficient, at 20 °C", checks.Read,
		"V1 source a 0 volt=14\nW1 conductor a b ohm=15\nR1 resistor b c ohm=250\nW2 conductor c 0 ohm=15",
		[]Printed{{"current", amps("R1"), 0.05, 1e-9}, {"load", volts("b", "c"), 12.5, 1e-9}, {"wire", volts("a", "b"), 0.75, 1e-9}}},
	{"Lessons in Electric Circuits vol. I ch. 12, Temperature coefficient, at 35 °C", checks.Read,
		"V1 source a 0 volt=14\nW1 conductor a b ohm=15.909\nR1 resistor b c ohm=250\nW2 conductor c 0 ohm=15.909",
		[]Printed{{"current", amps("R1"), 49.677e-3, 5e-7}, {"load", volts("b", "c"), 12.42, 0.005}, {"wire", volts("a", "b"), 0.79, 0.005}}},
}

// distributors are cables with loads along them.
var distributors = []Example{
	{"Mehta, Principles of Power System, ex. 13.4", checks.Archive, `
V1 source a 0 volt=250
W1 conductor a b ohm=0.099
E1 constant-current b 0 ampere=12
W2 conductor b c ohm=0.132
E2 constant-current c 0 ampere=15
W3 conductor c d ohm=0.066
E3 constant-current d 0 ampere=20`,
		[]Printed{{"V at B", volts("b", "0"), 245.35, 0.005}, {"V at C", volts("c", "0"), 240.73, 0.005}, {"V at D", volts("d", "0"), 239.41, 0.005}}},
	{"Mehta, Principles of Power System, ex. 13.5, uniform loading, in 200 sections", checks.Archive,
		uniform(200, 250, 0.6e-3, 2),
		[]Printed{{"drop at 150 m", volts("n0", "n150"), 22.5, 0.01}, {"maximum drop", volts("n0", "n200"), 24, 0.01}}},
	{"Theraja, A Textbook of Electrical Technology vol. III, ex. 40.12, fed at both ends", checks.Archive, `
V1 source p 0 volt=248
V2 source q 0 volt=245
W1 conductor p a ohm=0.0125
E1 constant-current a 0 ampere=20
W2 conductor a b ohm=0.01875
E2 constant-current b 0 ampere=80
W3 conductor b c ohm=0.03125
E3 constant-current c 0 ampere=50
W4 conductor c d ohm=0.0125
E4 constant-current d 0 ampere=70
W5 conductor d e ohm=0.0125
E5 constant-current e 0 ampere=40
W6 conductor e q ohm=0.0125`,
		[]Printed{{"I at P", amps("W1"), 143.75, 1e-4}, {"I at Q", reader{"A", func(r Result) float64 { return -r.Current("W6") }}, 116.25, 1e-4},
			{"power lost", reader{"W", func(r Result) float64 {
				p := 0.0
				for k := range 6 {
					p += r.Power(fmt.Sprintf("W%d", k+1))
				}
				return p
			}}, 847.34, 0.01}}},
	{"Theraja, A Textbook of Electrical Technology vol. III, ex. 40.9, concentrated loads alone", checks.Archive, `
V1 source p 0 volt=250
W1 conductor p a ohm=0.05
E1 constant-current a 0 ampere=40
W2 conductor a b ohm=0.025
E2 constant-current b 0 ampere=20
W3 conductor b c ohm=0.075
E3 constant-current c 0 ampere=60
W4 conductor c d ohm=0.05
E4 constant-current d 0 ampere=30
W5 conductor d q ohm=0.05`,
		// Of the printed 225.25 V at Q the uniform load takes i·r·l²/2 = 6.25 V.
		[]Printed{{"V at Q", volts("q", "0"), 225.25 + 6.25, 0.005}}},
}

// filaments are filaments and coils.
var filaments = []Example{
	{"College Physics 2e, Resistance and Resistivity: filament 4.8 ohm hot, 0.350 ohm cold", checks.Read,
		"V1 source a 0 volt=12\nE1 filament a 0 rated_volt=12 rated_watt=30\nV2 source b 0 volt=1e-6\nE2 filament b 0 rated_volt=12 rated_watt=30",
		[]Printed{
			{"hot", reader{"Ω", func(r Result) float64 { return 12 / r.Current("E1") }}, 4.8, 0.01},
			{"cold", reader{"Ω", func(r Result) float64 { return 1e-6 / r.Current("E2") }}, 0.350, 0.001}}},
	{"Standard Handbook for Electrical Engineers, lamp rerating: power with the 1.6th power of voltage, as an encyclopaedia reproduces it", checks.Read,
		"V1 source a 0 volt=11\nE1 filament a 0 rated_volt=12 rated_watt=30",
		[]Printed{{"power", watts("E1"), 30 * math.Pow(11./12, 1.6), 0.2}}},
	{"Sedha, A Textbook of Applied Electronics, ex. 3.21: coil of 1.5 kohm at 16 mA", checks.Archive,
		"V1 source a 0 volt=24\nK1 coil a 0 ohm=1500 pickup_volt=18 dropout_volt=2.4",
		[]Printed{{"current", amps("K1"), 16e-3, 1e-9}}},
}
