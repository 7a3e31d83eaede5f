package network

import (
	"fmt"
	"math"
	"strings"
	"testing"
)

// Worked examples of the literature, solved through this room with the published
// constants. "companion" says that data and answer were read in an open archive of
// the book's solved examples, not on the printed page.
func TestPublishedExamples(t *testing.T) {
	for _, e := range published {
		t.Run(e.source, func(t *testing.T) {
			c := compile(t, e.text)
			s := c.solve(Environment{}, nil)
			for _, r := range e.reads {
				near(t, r.what, r.of(c, s), r.printed, r.tol)
			}
		})
	}
}

type example struct {
	source, text string
	reads        []printed
}

type printed struct {
	what         string
	of           func(c circuitUnderTest, s *Solution) float64
	printed, tol float64
}

func volts(red, black string) func(circuitUnderTest, *Solution) float64 {
	return func(c circuitUnderTest, s *Solution) float64 { return c.volt(s, red) - c.volt(s, black) }
}

func amps(element string) func(circuitUnderTest, *Solution) float64 {
	return func(_ circuitUnderTest, s *Solution) float64 { return s.Current(element) }
}

func watts(element string) func(circuitUnderTest, *Solution) float64 {
	return func(_ circuitUnderTest, s *Solution) float64 { return s.Power(element) }
}

var published = []example{
	// Sources and resistances.
	{"College Physics 2e, Terminal Voltage, 12 V and 0.1 ohm into 10 ohm",
		"G1 battery a 0 emf=12 ohm=0.1\nR1 resistor a 0 ohm=10",
		[]printed{{"current", amps("R1"), 1.188, 5e-4}, {"voltage", volts("a", "0"), 11.9, 0.05}}},
	{"College Physics 2e, Terminal Voltage, 12 V and 0.5 ohm into 0.5 ohm",
		"G1 battery a 0 emf=12 ohm=0.5\nR1 resistor a 0 ohm=0.5",
		[]printed{{"current", amps("R1"), 12, 1e-6}, {"voltage", volts("a", "0"), 6, 1e-6}, {"power", watts("R1"), 72, 1e-5}}},
	{"Lessons in Electric Circuits vol. I ch. 11, 10 V and 0.2 ohm into 1 ohm",
		"G1 battery a 0 emf=10 ohm=0.2\nR1 resistor a 0 ohm=1",
		[]printed{{"current", amps("R1"), 8.333, 5e-4}}},
	{"Bird, Electrical Circuit Theory and Technology, ch. 4 ex. 4 (companion)",
		cells(10, 1.5, 0.2) + "R1 resistor c10 0 ohm=58",
		[]printed{{"current", amps("R1"), 0.25, 1e-6}, {"voltage", volts("c10", "0"), 14.5, 1e-5}}},
	{"Bird, Electrical Circuit Theory and Technology, ch. 4 ex. 1, eight cells in parallel (companion)",
		parallelCells(8, 2.2, 0.2) + "R1 resistor p 0 ohm=0.975",
		[]printed{{"resistance and load together take 2.2 A", amps("R1"), 2.2, 1e-6}}},
	{"Lessons in Electric Circuits vol. I ch. 12, Temperature coefficient, at 20 °C",
		"V1 source a 0 volt=14\nW1 conductor a b ohm=15\nR1 resistor b c ohm=250\nW2 conductor c 0 ohm=15",
		[]printed{{"current", amps("R1"), 0.05, 1e-9}, {"load", volts("b", "c"), 12.5, 1e-9}, {"wire", volts("a", "b"), 0.75, 1e-9}}},
	{"Lessons in Electric Circuits vol. I ch. 12, Temperature coefficient, at 35 °C",
		"V1 source a 0 volt=14\nW1 conductor a b ohm=15.909\nR1 resistor b c ohm=250\nW2 conductor c 0 ohm=15.909",
		[]printed{{"current", amps("R1"), 49.677e-3, 5e-7}, {"load", volts("b", "c"), 12.42, 0.005}, {"wire", volts("a", "b"), 0.79, 0.005}}},

	// Distributors.
	{"Mehta, Principles of Power System, ex. 13.4 (companion)", `
V1 source a 0 volt=250
W1 conductor a b ohm=0.099
E1 constant-current b 0 ampere=12
W2 conductor b c ohm=0.132
E2 constant-current c 0 ampere=15
W3 conductor c d ohm=0.066
E3 constant-current d 0 ampere=20`,
		[]printed{{"V at B", volts("b", "0"), 245.35, 0.005}, {"V at C", volts("c", "0"), 240.73, 0.005}, {"V at D", volts("d", "0"), 239.41, 0.005}}},
	{"Mehta, Principles of Power System, ex. 13.5, uniform loading, in 200 sections (companion)",
		uniform(200, 250, 0.6e-3, 2),
		[]printed{{"drop at 150 m", volts("n0", "n150"), 22.5, 0.01}, {"maximum drop", volts("n0", "n200"), 24, 0.01}}},
	{"Theraja, A Textbook of Electrical Technology vol. III, ex. 40.12, fed at both ends (companion)", `
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
		[]printed{{"I at P", amps("W1"), 143.75, 1e-4}, {"I at Q", func(_ circuitUnderTest, s *Solution) float64 { return -s.Current("W6") }, 116.25, 1e-4},
			{"power lost", func(_ circuitUnderTest, s *Solution) float64 {
				p := 0.0
				for k := range 6 {
					p += s.Power(fmt.Sprintf("W%d", k+1))
				}
				return p
			}, 847.34, 0.01}}},
	{"Theraja, A Textbook of Electrical Technology vol. III, ex. 40.9, concentrated loads alone (companion)", `
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
		[]printed{{"V at Q", volts("q", "0"), 225.25 + 6.25, 0.005}}},

	// Diodes.
	{"Lessons in Electric Circuits vol. III ch. 3, 1N4004 at 0.925 V",
		"V1 source a 0 volt=0.925\nD1 diode a 0 is=18.8178e-9 n=2 vt=0.026 rs=0",
		[]printed{{"current", amps("D1"), 1, 1e-3}}},
	{"Lessons in Electric Circuits vol. III ch. 3, 1N4004 at 1.4 V with 28.6 milliohm, as simulated there at 27 °C",
		"V1 source a 0 volt=1.4\nD1 diode a 0 is=18.8e-9 n=2 vt=0.025865 rs=0.0286",
		[]printed{{"current", amps("D1"), 12.2447, 0.02}}},
	{"Sedra and Smith, Microelectronic Circuits, ex. 3.3: 1 mA at 0.7 V, n = 1, 25 mV (companion)",
		"V1 source a 0 volt=0.7\nD1 diode a 0 is=6.9144e-16 n=1 vt=0.025 rs=0",
		[]printed{{"current", amps("D1"), 1e-3, 1e-7}}},
	{"Sedra and Smith, Microelectronic Circuits, ex. 3.3: 1 mA at 0.7 V, n = 2, 25 mV (companion)",
		"V1 source a 0 volt=0.7\nD1 diode a 0 is=8.31529e-10 n=2 vt=0.025 rs=0",
		[]printed{{"current", amps("D1"), 1e-3, 1e-7}}},
	{"Mehta, Principles of Electronics, ex. 6.5: 24 V against 4 V, 2 kohm, silicon diode of 0.7 V (companion)",
		"V1 source a 0 volt=24\nR1 resistor a b ohm=2000\nD1 diode b c forward_volt=0.7 ampere=9.65e-3 rs=0\nV2 source c 0 volt=4",
		[]printed{{"current", amps("R1"), 9.65e-3, 1e-7}}},
	{"Malvino and Bates, ex. 5-12: 50 V, 2.2 kohm, LED of 2 V (companion)",
		"V1 source a 0 volt=50\nR1 resistor a b ohm=2200\nD1 led b 0 forward_volt=2 ampere=21.82e-3",
		[]printed{{"current", amps("R1"), 21.82e-3, 5e-6}}},
	{"Malvino and Bates, ex. 5-13: 9 V, 470 ohm, LED of 2 V (companion)",
		"V1 source a 0 volt=9\nR1 resistor a b ohm=470\nD1 led b 0 forward_volt=2 ampere=14.89e-3",
		[]printed{{"current", amps("R1"), 14.89e-3, 5e-6}}},

	// Zener regulators. The books' Zener holds its voltage exactly; a knee of 1 mV
	// at the printed current stands for that.
	{"Lessons in Electric Circuits vol. III ch. 3: 45 V, 12.6 V Zener, 1 kohm",
		"V1 source a 0 volt=45\nR1 resistor a b ohm=1000\nZ1 zener 0 b vz=12.6 iz=0.0324 knee=1e-3",
		[]printed{{"current", amps("R1"), 32.4e-3, 1e-5}, {"resistor", watts("R1"), 1.0498, 1e-3}, {"Zener", watts("Z1"), 0.40824, 1e-4}}},
	{"Lessons in Electric Circuits vol. III ch. 3: the same with 100 kohm",
		"V1 source a 0 volt=45\nR1 resistor a b ohm=100e3\nZ1 zener 0 b vz=12.6 iz=324e-6 knee=1e-3",
		[]printed{{"current", amps("R1"), 324e-6, 1e-7}, {"Zener", watts("Z1"), 4.0824e-3, 2e-6}}},
	{"Lessons in Electric Circuits vol. III ch. 3: 100 kohm and a load of 500 ohm, Zener starved",
		"V1 source a 0 volt=45\nR1 resistor a b ohm=100e3\nZ1 zener 0 b vz=12.6 iz=324e-6 knee=1e-3\nRL resistor b 0 ohm=500",
		[]printed{{"current", amps("R1"), 447.76e-6, 1e-8}, {"resistor", volts("a", "b"), 44.776, 5e-4}, {"load", volts("b", "0"), 0.224, 5e-4}}},
	{"Mehta, Principles of Electronics, ex. 6.26 at 120 V (companion)",
		"V1 source a 0 volt=120\nR1 resistor a b ohm=5000\nZ1 zener 0 b vz=50 iz=9e-3 knee=1e-3\nRL resistor b 0 ohm=10e3",
		[]printed{{"Zener current", amps("Z1"), -9e-3, 1e-5}}},
	{"Mehta, Principles of Electronics, ex. 6.26 at 80 V (companion)",
		"V1 source a 0 volt=80\nR1 resistor a b ohm=5000\nZ1 zener 0 b vz=50 iz=1e-3 knee=1e-3\nRL resistor b 0 ohm=10e3",
		[]printed{{"Zener current", amps("Z1"), -1e-3, 1e-5}}},
	{"Mehta, Principles of Electronics, ex. 6.30: two 15 V Zeners in series, 45 V, 75 ohm (companion)",
		"V1 source a 0 volt=45\nR1 resistor a b ohm=75\nZ1 zener m b vz=15 iz=0.2 knee=1e-3\nZ2 zener 0 m vz=15 iz=0.2 knee=1e-3",
		[]printed{{"voltage", volts("b", "0"), 30, 1e-3}, {"current", amps("R1"), 0.2, 1e-4}}},
	{"Mehta, Principles of Electronics, ex. 6.33: 16 V, 20 ohm, 12 V Zener without load (companion)",
		"V1 source a 0 volt=16\nR1 resistor a b ohm=20\nZ1 zener 0 b vz=12 iz=0.2 knee=1e-3",
		[]printed{{"Zener power", watts("Z1"), 2.4, 1e-3}}},
	{"Mehta, Principles of Electronics, ex. 6.34: 12 V, 1 kohm, 5 kohm load, 6 V Zener (companion)",
		"V1 source a 0 volt=12\nR1 resistor a b ohm=1000\nZ1 zener 0 b vz=6 iz=4.8e-3 knee=1e-3\nRL resistor b 0 ohm=5000",
		[]printed{{"voltage", volts("b", "0"), 6, 1e-3}}},
	{"Malvino and Bates, ex. 5-7: 10 V Zener of 8.5 ohm at 20 mA (companion)",
		// The book's straight line is 10 V + 8.5 ohm·i: at 20 mA its voltage is 10.17 V.
		"V1 source a 0 volt=30.17\nR1 resistor a b ohm=1000\nZ1 zener 0 b vz=10.17 iz=0.02 rz=8.5 knee=1e-3",
		[]printed{{"voltage", volts("b", "0"), 10.17, 1e-3}, {"current", amps("R1"), 0.02, 1e-6}}},
	{"Boylestad and Nashelsky, ex. 2.26(a): 16 V, 1 kohm, 1.2 kohm, 10 V Zener that is off (companion)",
		"V1 source a 0 volt=16\nR1 resistor a b ohm=1000\nZ1 zener 0 b vz=10 iz=0.02\nRL resistor b 0 ohm=1200",
		[]printed{{"VL", volts("b", "0"), 8.73, 0.005}, {"VR", volts("a", "b"), 7.27, 0.005}}},
	{"Schultz, Grob's Basic Electronics, ex. 27-13: 16 V, 100 ohm, 10 V Zener, 200 ohm (companion)",
		"V1 source a 0 volt=16\nR1 resistor a b ohm=100\nZ1 zener 0 b vz=10 iz=0.02 knee=1e-3\nRL resistor b 0 ohm=200",
		[]printed{{"Is", amps("R1"), 60e-3, 5e-5}, {"Iz", amps("Z1"), -10e-3, 5e-5}}},
	{"Schultz, Grob's Basic Electronics, ex. 27-13: 16 V, 100 ohm, 10 V Zener, 500 ohm (companion)",
		"V1 source a 0 volt=16\nR1 resistor a b ohm=100\nZ1 zener 0 b vz=10 iz=0.02 knee=1e-3\nRL resistor b 0 ohm=500",
		[]printed{{"Iz", amps("Z1"), -40e-3, 5e-5}}},

	// Transistor bias. is is set for 0.7 V at the printed collector current. The
	// books divide the base resistance by beta, the law by beta + 1: 1 %, and they round.
	{"Boylestad and Nashelsky, ex. 4.1: fixed bias, 12 V, 240 kohm, beta 50, 2.2 kohm (companion)",
		bias(2.35417e-3, 50, "V1 source v 0 volt=12\nRB resistor v b ohm=240e3\nRC resistor v c ohm=2200\nQ1 npn b c 0"),
		[]printed{{"IB", amps("Q1"), 47.08e-6, 5e-9}, {"IC", amps("RC"), 2.35e-3, 5e-6}, {"VCE", volts("c", "0"), 6.82, 0.005}}},
	{"Malvino and Bates, ex. 6-8: fixed bias, 15 V, 470 kohm, beta 100, 3.6 kohm (companion)",
		bias(3.04255e-3, 100, "V1 source v 0 volt=15\nRB resistor v b ohm=470e3\nRC resistor v c ohm=3600\nQ1 npn b c 0"),
		[]printed{{"IB", amps("Q1"), 30.43e-6, 5e-9}, {"IC", amps("RC"), 3.04e-3, 5e-6}, {"VCE", volts("c", "0"), 4.05, 0.005}}},
	{"Malvino and Bates, ex. 7-9: emitter bias, 5 V base, 1 kohm (companion)",
		bias(4.3e-3, 100, "V1 source v 0 volt=15\nV2 source b 0 volt=5\nRC resistor v c ohm=1000\nRE resistor e 0 ohm=1000\nQ1 npn b c e"),
		[]printed{{"IE", amps("RE"), 4.3e-3, 2e-6}}},
	{"Lessons in Electric Circuits vol. III ch. 4, collector feedback, beta 100",
		bias(0.989e-3, 100, "V1 source v 0 volt=10\nRC resistor v c ohm=4700\nRB resistor c b ohm=470e3\nQ1 npn b c 0"),
		[]printed{{"IE", func(_ circuitUnderTest, s *Solution) float64 { return -s.PinCurrent("Q1", "E") }, 0.989e-3, 0.0099e-3}}},
	{"Lessons in Electric Circuits vol. III ch. 4, collector feedback, beta 300",
		bias(1.48e-3, 300, "V1 source v 0 volt=10\nRC resistor v c ohm=4700\nRB resistor c b ohm=470e3\nQ1 npn b c 0"),
		[]printed{{"IE", func(_ circuitUnderTest, s *Solution) float64 { return -s.PinCurrent("Q1", "E") }, 1.48e-3, 0.0148e-3}}},
	{"Lessons in Electric Circuits vol. III ch. 4, emitter bias from 10 V, 470 ohm, 870 kohm, beta 100",
		bias(1.01e-3, 100, "V1 source v 0 volt=10\nRB resistor v b ohm=870e3\nRE resistor e 0 ohm=470\nQ1 npn b v e"),
		[]printed{{"IE", amps("RE"), 1.01e-3, 0.015e-3}}},
	{"Lessons in Electric Circuits vol. III ch. 4, emitter bias from 10 V, 470 ohm, 870 kohm, beta 300",
		bias(2.76e-3, 300, "V1 source v 0 volt=10\nRB resistor v b ohm=870e3\nRE resistor e 0 ohm=470\nQ1 npn b v e"),
		[]printed{{"IE", amps("RE"), 2.76e-3, 0.0276e-3}}},
	{"Malvino and Bates, ex. 11-9: series-pass regulator, 20 V, 10 V Zener, 680 ohm, 15 ohm, beta 100 (companion)",
		bias(0.62, 100, "V1 source v 0 volt=20\nR1 resistor v b ohm=680\nZ1 zener 0 b vz=10 iz=8.51e-3 knee=1e-3\nRL resistor e 0 ohm=15\nQ1 npn b v e"),
		[]printed{{"Vo", volts("e", "0"), 9.3, 0.005}, {"Iz", amps("Z1"), -8.51e-3, 0.0851e-3}}},

	// Adjustable regulators, with a load that keeps them above their least current.
	{"Mehta, Principles of Electronics, ex. 23.1: 240 and 2400 ohm, IADJ neglected (companion)",
		adjustable(240, 2400, 0),
		[]printed{{"Vo", volts("out", "0"), 13.75, 0.005}}},
	{"Bakshi and Godse, ex. 10.8: 820 ohm, 10 kohm, 100 uA (companion)",
		adjustable(820, 10000, 100e-6),
		[]printed{{"Vo max", volts("out", "0"), 17.49, 0.01}}},
	{"Bakshi and Godse, ex. 10.8: 820 ohm, preset at zero (companion)",
		adjustable(820, 0, 100e-6),
		[]printed{{"Vo min", volts("out", "0"), 1.25, 0.005}}},
	{"Sharma, Analog Integrated Circuits, ex. 9.4: 240 ohm, 2.03 kohm, 100 uA (companion)",
		adjustable(240, 2025.12, 100e-6),
		[]printed{{"Vo", volts("out", "0"), 12, 0.005}}},
	{"Sharma, Analog Integrated Circuits, ex. 9.4: 240 ohm, 141 ohm, 100 uA (companion)",
		adjustable(240, 141.287, 100e-6),
		[]printed{{"Vo", volts("out", "0"), 2, 0.005}}},
	{"Gayakwad, Op-Amps and Linear Integrated Circuits, ex. 9.11: 5 V (companion)",
		adjustable(240, 706.436, 100e-6),
		[]printed{{"Vo", volts("out", "0"), 5, 0.005}}},

	// Filament and coil.
	{"College Physics 2e, Resistance and Resistivity: filament 4.8 ohm hot, 0.350 ohm cold",
		"V1 source a 0 volt=12\nE1 filament a 0 rated_volt=12 rated_watt=30\nV2 source b 0 volt=1e-6\nE2 filament b 0 rated_volt=12 rated_watt=30",
		[]printed{
			{"hot", func(_ circuitUnderTest, s *Solution) float64 { return 12 / s.Current("E1") }, 4.8, 0.01},
			{"cold", func(_ circuitUnderTest, s *Solution) float64 { return 1e-6 / s.Current("E2") }, 0.350, 0.001}}},
	{"Standard Handbook for Electrical Engineers, lamp rerating: power with the 1.6th power of voltage (encyclopaedia)",
		"V1 source a 0 volt=11\nE1 filament a 0 rated_volt=12 rated_watt=30",
		[]printed{{"power", watts("E1"), 30 * math.Pow(11./12, 1.6), 0.2}}},
	{"Sedha, A Textbook of Applied Electronics, ex. 3.21: coil of 1.5 kohm at 16 mA (companion)",
		"V1 source a 0 volt=24\nK1 coil a 0 ohm=1500 pickup_volt=18 dropout_volt=2.4",
		[]printed{{"current", amps("K1"), 16e-3, 1e-9}}},
}

func cells(n int, emf, ohm float64) string {
	var b strings.Builder
	below := "0"
	for k := range n {
		at := fmt.Sprintf("c%d", k+1)
		fmt.Fprintf(&b, "G%d battery %s %s emf=%g ohm=%g\n", k+1, at, below, emf, ohm)
		below = at
	}
	return b.String()
}

func parallelCells(n int, emf, ohm float64) string {
	var b strings.Builder
	for k := range n {
		fmt.Fprintf(&b, "G%d battery p 0 emf=%g ohm=%g\n", k+1, emf, ohm)
	}
	return b.String()
}

// uniform is a distributor of n metres with the load of each metre in its middle.
func uniform(n int, volt, ohmPerMetre, amperePerMetre float64) string {
	var b strings.Builder
	fmt.Fprintf(&b, "V1 source n0 0 volt=%g\n", volt)
	for k := range n {
		fmt.Fprintf(&b, "W%da conductor n%d m%d ohm=%g\nE%d constant-current m%d 0 ampere=%g\nW%db conductor m%d n%d ohm=%g\n",
			k, k, k, ohmPerMetre/2, k, k, amperePerMetre, k, k, k+1, ohmPerMetre/2)
	}
	return b.String()
}

// bias is a circuit that ends in transistor Q1, with 0.7 V at the given collector
// current, and the gain.
func bias(ampere, beta float64, text string) string {
	return text + fmt.Sprintf(" is=%g bf=%g\n", ampere/math.Expm1(0.7/VT25), beta)
}

func adjustable(upper, lower, iadj float64) string {
	return fmt.Sprintf(`V1 source in 0 volt=25
U1 regulator in out adj iadj=%g
R1 resistor out adj ohm=%g
R2 resistor adj 0 ohm=%g
RL resistor out 0 ohm=100`, iadj, upper, lower)
}
