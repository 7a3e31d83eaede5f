package published

import checks "gloamwright/internal/sizing/published"

// diodes are diodes behind a resistor.
var diodes = []Example{
	{"Lessons in Electric Circuits vol. III ch. 3, 1N4004 at 0.925 V", checks.Read,
		"V1 source a 0 volt=0.925\nD1 diode a 0 is=18.8178e-9 n=2 vt=0.026 rs=0",
		[]Printed{{"current", amps("D1"), 1, 1e-3}}},
	{"Lessons in Electric Circuits vol. III ch. 3, 1N4004 at 1.4 V with 28.6 milliohm, as simulated there at 27 °C", checks.Read,
		"V1 source a 0 volt=1.4\nD1 diode a 0 is=18.8e-9 n=2 vt=0.025865 rs=0.0286",
		[]Printed{{"current", amps("D1"), 12.2447, 0.02}}},
	{"Sedra and Smith, Microelectronic Circuits, ex. 3.3: 1 mA at 0.7 V, n = 1, 25 mV", checks.Archive,
		"V1 source a 0 volt=0.7\nD1 diode a 0 is=6.9144e-16 n=1 vt=0.025 rs=0",
		[]Printed{{"current", amps("D1"), 1e-3, 1e-7}}},
	{"Sedra and Smith, Microelectronic Circuits, ex. 3.3: 1 mA at 0.7 V, n = 2, 25 mV", checks.Archive,
		"V1 source a 0 volt=0.7\nD1 diode a 0 is=8.31529e-10 n=2 vt=0.025 rs=0",
		[]Printed{{"current", amps("D1"), 1e-3, 1e-7}}},
	{"Mehta, Principles of Electronics, ex. 6.5: 24 V against 4 V, 2 kohm, silicon diode of 0.7 V", checks.Archive,
		"V1 source a 0 volt=24\nR1 resistor a b ohm=2000\nD1 diode b c forward_volt=0.7 ampere=9.65e-3 rs=0\nV2 source c 0 volt=4",
		[]Printed{{"current", amps("R1"), 9.65e-3, 1e-7}}},
	{"Malvino and Bates, ex. 5-12: 50 V, 2.2 kohm, LED of 2 V", checks.Archive,
		"V1 source a 0 volt=50\nR1 resistor a b ohm=2200\nD1 led b 0 forward_volt=2 ampere=21.82e-3",
		[]Printed{{"current", amps("R1"), 21.82e-3, 5e-6}}},
	{"Malvino and Bates, ex. 5-13: 9 V, 470 ohm, LED of 2 V", checks.Archive,
		"V1 source a 0 volt=9\nR1 resistor a b ohm=470\nD1 led b 0 forward_volt=2 ampere=14.89e-3",
		[]Printed{{"current", amps("R1"), 14.89e-3, 5e-6}}},
}

// zeners are Zener regulators. The books' Zener holds its voltage exactly; a knee of
// 1 mV at the printed current stands for that.
var zeners = []Example{
	{"Lessons in Electric Circuits vol. III ch. 3: 45 V, 12.6 V Zener, 1 kohm", checks.Read,
		"V1 source a 0 volt=45\nR1 resistor a b ohm=1000\nZ1 zener 0 b vz=12.6 iz=0.0324 knee=1e-3",
		[]Printed{{"current", amps("R1"), 32.4e-3, 1e-5}, {"resistor", watts("R1"), 1.0498, 1e-3}, {"Zener", watts("Z1"), 0.40824, 1e-4}}},
	{"Lessons in Electric Circuits vol. III ch. 3: the same with 100 kohm", checks.Read,
		"V1 source a 0 volt=45\nR1 resistor a b ohm=100e3\nZ1 zener 0 b vz=12.6 iz=324e-6 knee=1e-3",
		[]Printed{{"current", amps("R1"), 324e-6, 1e-7}, {"Zener", watts("Z1"), 4.0824e-3, 2e-6}}},
	{"Lessons in Electric Circuits vol. III ch. 3: 100 kohm and a load of 500 ohm, Zener starved", checks.Read,
		"V1 source a 0 volt=45\nR1 resistor a b ohm=100e3\nZ1 zener 0 b vz=12.6 iz=324e-6 knee=1e-3\nRL resistor b 0 ohm=500",
		[]Printed{{"current", amps("R1"), 447.76e-6, 1e-8}, {"resistor", volts("a", "b"), 44.776, 5e-4}, {"load", volts("b", "0"), 0.224, 5e-4}}},
	{"Mehta, Principles of Electronics, ex. 6.26 at 120 V", checks.Archive,
		"V1 source a 0 volt=120\nR1 resistor a b ohm=5000\nZ1 zener 0 b vz=50 iz=9e-3 knee=1e-3\nRL resistor b 0 ohm=10e3",
		[]Printed{{"Zener current", amps("Z1"), -9e-3, 1e-5}}},
	{"Mehta, Principles of Electronics, ex. 6.26 at 80 V", checks.Archive,
		"V1 source a 0 volt=80\nR1 resistor a b ohm=5000\nZ1 zener 0 b vz=50 iz=1e-3 knee=1e-3\nRL resistor b 0 ohm=10e3",
		[]Printed{{"Zener current", amps("Z1"), -1e-3, 1e-5}}},
	{"Mehta, Principles of Electronics, ex. 6.30: two 15 V Zeners in series, 45 V, 75 ohm", checks.Archive,
		"V1 source a 0 volt=45\nR1 resistor a b ohm=75\nZ1 zener m b vz=15 iz=0.2 knee=1e-3\nZ2 zener 0 m vz=15 iz=0.2 knee=1e-3",
		[]Printed{{"voltage", volts("b", "0"), 30, 1e-3}, {"current", amps("R1"), 0.2, 1e-4}}},
	{"Mehta, Principles of Electronics, ex. 6.33: 16 V, 20 ohm, 12 V Zener without load", checks.Archive,
		"V1 source a 0 volt=16\nR1 resistor a b ohm=20\nZ1 zener 0 b vz=12 iz=0.2 knee=1e-3",
		[]Printed{{"Zener power", watts("Z1"), 2.4, 1e-3}}},
	{"Mehta, Principles of Electronics, ex. 6.34: 12 V, 1 kohm, 5 kohm load, 6 V Zener", checks.Archive,
		"V1 source a 0 volt=12\nR1 resistor a b ohm=1000\nZ1 zener 0 b vz=6 iz=4.8e-3 knee=1e-3\nRL resistor b 0 ohm=5000",
		[]Printed{{"voltage", volts("b", "0"), 6, 1e-3}}},
	{"Malvino and Bates, ex. 5-7: 10 V Zener of 8.5 ohm at 20 mA", checks.Archive,
		// The book's straight line is 10 V + 8.5 ohm·i: at 20 mA its voltage is 10.17 V.
		"V1 source a 0 volt=30.17\nR1 resistor a b ohm=1000\nZ1 zener 0 b vz=10.17 iz=0.02 rz=8.5 knee=1e-3",
		[]Printed{{"voltage", volts("b", "0"), 10.17, 1e-3}, {"current", amps("R1"), 0.02, 1e-6}}},
	{"Boylestad and Nashelsky, ex. 2.26(a): 16 V, 1 kohm, 1.2 kohm, 10 V Zener that is off", checks.Archive,
		"V1 source a 0 volt=16\nR1 resistor a b ohm=1000\nZ1 zener 0 b vz=10 iz=0.02\nRL resistor b 0 ohm=1200",
		[]Printed{{"VL", volts("b", "0"), 8.73, 0.005}, {"VR", volts("a", "b"), 7.27, 0.005}}},
	{"Schultz, Grob's Basic Electronics, ex. 27-13: 16 V, 100 ohm, 10 V Zener, 200 ohm", checks.Archive,
		"V1 source a 0 volt=16\nR1 resistor a b ohm=100\nZ1 zener 0 b vz=10 iz=0.02 knee=1e-3\nRL resistor b 0 ohm=200",
		[]Printed{{"Is", amps("R1"), 60e-3, 5e-5}, {"Iz", amps("Z1"), -10e-3, 5e-5}}},
	{"Schultz, Grob's Basic Electronics, ex. 27-13: 16 V, 100 ohm, 10 V Zener, 500 ohm", checks.Archive,
		"V1 source a 0 volt=16\nR1 resistor a b ohm=100\nZ1 zener 0 b vz=10 iz=0.02 knee=1e-3\nRL resistor b 0 ohm=500",
		[]Printed{{"Iz", amps("Z1"), -40e-3, 5e-5}}},
}

// transistors are bias circuits. is is set for 0.7 V at the printed collector current.
// The books divide the base resistance by beta, the law by beta + 1: 1 %, and they
// round.
var transistors = []Example{
	{"Boylestad and Nashelsky, ex. 4.1: fixed bias, 12 V, 240 kohm, beta 50, 2.2 kohm", checks.Archive,
		bias(2.35417e-3, 50, "V1 source v 0 volt=12\nRB resistor v b ohm=240e3\nRC resistor v c ohm=2200\nQ1 npn b c 0"),
		[]Printed{{"IB", amps("Q1"), 47.08e-6, 5e-9}, {"IC", amps("RC"), 2.35e-3, 5e-6}, {"VCE", volts("c", "0"), 6.82, 0.005}}},
	{"Malvino and Bates, ex. 6-8: fixed bias, 15 V, 470 kohm, beta 100, 3.6 kohm", checks.Archive,
		bias(3.04255e-3, 100, "V1 source v 0 volt=15\nRB resistor v b ohm=470e3\nRC resistor v c ohm=3600\nQ1 npn b c 0"),
		[]Printed{{"IB", amps("Q1"), 30.43e-6, 5e-9}, {"IC", amps("RC"), 3.04e-3, 5e-6}, {"VCE", volts("c", "0"), 4.05, 0.005}}},
	{"Malvino and Bates, ex. 7-9: emitter bias, 5 V base, 1 kohm", checks.Archive,
		bias(4.3e-3, 100, "V1 source v 0 volt=15\nV2 source b 0 volt=5\nRC resistor v c ohm=1000\nRE resistor e 0 ohm=1000\nQ1 npn b c e"),
		[]Printed{{"IE", amps("RE"), 4.3e-3, 2e-6}}},
	{"Lessons in Electric Circuits vol. III ch. 4, collector feedback, beta 100", checks.Read,
		bias(0.989e-3, 100, "V1 source v 0 volt=10\nRC resistor v c ohm=4700\nRB resistor c b ohm=470e3\nQ1 npn b c 0"),
		[]Printed{{"IE", reader{"A", func(r Result) float64 { return -r.PinCurrent("Q1", "E") }}, 0.989e-3, 0.0099e-3}}},
	{"Lessons in Electric Circuits vol. III ch. 4, collector feedback, beta 300", checks.Read,
		bias(1.48e-3, 300, "V1 source v 0 volt=10\nRC resistor v c ohm=4700\nRB resistor c b ohm=470e3\nQ1 npn b c 0"),
		[]Printed{{"IE", reader{"A", func(r Result) float64 { return -r.PinCurrent("Q1", "E") }}, 1.48e-3, 0.0148e-3}}},
	{"Lessons in Electric Circuits vol. III ch. 4, emitter bias from 10 V, 470 ohm, 870 kohm, beta 100", checks.Read,
		bias(1.01e-3, 100, "V1 source v 0 volt=10\nRB resistor v b ohm=870e3\nRE resistor e 0 ohm=470\nQ1 npn b v e"),
		[]Printed{{"IE", amps("RE"), 1.01e-3, 0.015e-3}}},
	{"Lessons in Electric Circuits vol. III ch. 4, emitter bias from 10 V, 470 ohm, 870 kohm, beta 300", checks.Read,
		bias(2.76e-3, 300, "V1 source v 0 volt=10\nRB resistor v b ohm=870e3\nRE resistor e 0 ohm=470\nQ1 npn b v e"),
		[]Printed{{"IE", amps("RE"), 2.76e-3, 0.0276e-3}}},
	{"Malvino and Bates, ex. 11-9: series-pass regulator, 20 V, 10 V Zener, 680 ohm, 15 ohm, beta 100", checks.Archive,
		bias(0.62, 100, "V1 source v 0 volt=20\nR1 resistor v b ohm=680\nZ1 zener 0 b vz=10 iz=8.51e-3 knee=1e-3\nRL resistor e 0 ohm=15\nQ1 npn b v e"),
		[]Printed{{"Vo", volts("e", "0"), 9.3, 0.005}, {"Iz", amps("Z1"), -8.51e-3, 0.0851e-3}}},
}

// regulators are adjustable regulators, with a load that keeps them above their least
// current.
var regulators = []Example{
	{"Mehta, Principles of Electronics, ex. 23.1: 240 and 2400 ohm, IADJ neglected", checks.Archive,
		adjustable(240, 2400, 0),
		[]Printed{{"Vo", volts("out", "0"), 13.75, 0.005}}},
	{"Bakshi and Godse, ex. 10.8: 820 ohm, 10 kohm, 100 uA", checks.Archive,
		adjustable(820, 10000, 100e-6),
		[]Printed{{"Vo max", volts("out", "0"), 17.49, 0.01}}},
	{"Bakshi and Godse, ex. 10.8: 820 ohm, preset at zero", checks.Archive,
		adjustable(820, 0, 100e-6),
		[]Printed{{"Vo min", volts("out", "0"), 1.25, 0.005}}},
	{"Sharma, Analog Integrated Circuits, ex. 9.4: 240 ohm, 2.03 kohm, 100 uA", checks.Archive,
		adjustable(240, 2025.12, 100e-6),
		[]Printed{{"Vo", volts("out", "0"), 12, 0.005}}},
	{"Sharma, Analog Integrated Circuits, ex. 9.4: 240 ohm, 141 ohm, 100 uA", checks.Archive,
		adjustable(240, 141.287, 100e-6),
		[]Printed{{"Vo", volts("out", "0"), 2, 0.005}}},
	{"Gayakwad, Op-Amps and Linear Integrated Circuits, ex. 9.11: 5 V", checks.Archive,
		adjustable(240, 706.436, 100e-6),
		[]Printed{{"Vo", volts("out", "0"), 5, 0.005}}},
}
