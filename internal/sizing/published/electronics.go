package published

import (
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

func regulators() []Check {
	const topic = "Adjustable regulator"
	const iadj = 100e-6 // A, in the examples that count it
	out := func(r1, r2 quantity.Ohm, i quantity.Ampere) func() float64 {
		return func() float64 { v, _ := sizing.RegulatorOutput(1.25, r1, r2, i); return float64(v) }
	}
	kilo := func(u quantity.Volt) func() float64 {
		return func() float64 { r, _ := sizing.RegulatorSet(1.25, u, 240, iadj); return float64(r) / 1000 }
	}
	w59 := figures{"W059", topic, "Analog and Digital Electronics, ex. 10.8", Archive}
	w60 := figures{"W060", topic, "Analog Integrated Circuits, ex. 9.4", Archive}
	w62 := figures{"W062", topic, "Op-Amps and Linear Integrated Circuits, ex. 9.11", Archive}
	w63 := figures{"W063", topic, "Principles of Electronics, ex. 23.1", Archive}
	return []Check{
		w59.is("highest output, R1 820 Ω, R2 10 kΩ", "V", "17.49", out(820, 10e3, iadj)),
		w59.is("lowest output", "V", "1.25", out(820, 0, iadj)),
		w60.is("R2 for 2 V", "kΩ", "0.141", kilo(2)),
		w60.is("R2 for 12 V", "kΩ", "2.03", kilo(12)),
		w62.is("R2 for 5 V", "kΩ", "0.71", kilo(5)),
		w62.is("R2 for 12 V", "kΩ", "2.03", kilo(12)),
		w63.is("output, R1 240 Ω, R2 2.4 kΩ", "V", "13.75", out(240, 2400, 0)),
	}
}

func zeners() []Check {
	const topic = "Zener regulator"
	const text = "Lessons in Electric Circuits vol. III (open textbook), ch. 3"
	const book = "Principles of Electronics, ex. "
	state := func(u, z quantity.Volt, r, load quantity.Ohm) sizing.Shunt { return sizing.ShuntState(u, z, r, load) }
	dropper := func(in sizing.ShuntInput) func() float64 {
		return func() float64 { r, _ := sizing.ShuntDropper(in); return float64(r) }
	}
	milli := func(v float64) float64 { return 1000 * v }
	w66, w68, w69 := figures{"W066", topic, text, Read}, figures{"W068", topic, text, Read}, figures{"W069", topic, text, Read}
	w71, w72, w74 := figures{"W071", topic, book + "6.26", Archive}, figures{"W072", topic, book + "6.27", Archive}, figures{"W074", topic, book + "6.29", Archive}
	w75, w77, w78 := figures{"W075", topic, book + "6.30", Archive}, figures{"W077", topic, book + "6.33", Archive}, figures{"W078", topic, book + "6.34", Archive}
	w83 := figures{"W083", topic, "Electronic Devices and Circuit Theory, ex. 2.26(a)", Archive}
	w86 := figures{"W086", topic, "Basic Electronics, ex. 27-13", Archive}
	const open = 1000 // V: a Zener that never conducts
	return []Check{
		w66.is("current, 45 V, 12.6 V, 1 kΩ", "mA", "32.4", func() float64 { return milli(float64(state(45, 12.6, 1e3, 0).Supply)) }),
		w66.is("power of the resistor", "W", "1.0498", func() float64 { return float64(state(45, 12.6, 1e3, 0).Dropper) }),
		w66.is("power of the Zener", "mW", "408.24", func() float64 { return milli(float64(state(45, 12.6, 1e3, 0).Heat)) }),
		w68.is("current with 100 kΩ", "µA", "324", func() float64 { return milli(milli(float64(state(45, 12.6, 100e3, 0).Supply))) }),
		w68.is("power of the resistor", "mW", "10.498", func() float64 { return milli(float64(state(45, 12.6, 100e3, 0).Dropper)) }),
		w68.is("power of the Zener", "mW", "4.0824", func() float64 { return milli(float64(state(45, 12.6, 100e3, 0).Heat)) }),
		w69.is("current, starved by 500 Ω", "µA", "447.76", func() float64 { return milli(milli(float64(state(45, 12.6, 100e3, 500).Supply))) }),
		w69.is("load voltage, starved", "mV", "224", func() float64 { return milli(float64(state(45, 12.6, 100e3, 500).Out)) }),
		w71.is("greatest Zener current", "mA", "9", func() float64 { return milli(float64(state(120, 50, 5e3, 10e3).Zener)) }),
		w71.is("least Zener current", "mA", "1", func() float64 { return milli(float64(state(80, 50, 5e3, 10e3).Zener)) }),
		w72.is("series resistor", "Ω", "43.6", dropper(sizing.ShuntInput{Low: 12, Zener: 7.2, Least: 0.010, LoadHigh: 0.100})),
		w74.is("series resistor", "Ω", "30", dropper(sizing.ShuntInput{Low: 13, Zener: 10, Least: 0.015, LoadHigh: 0.085})),
		w75.is("series resistor, two 15 V Zeners", "Ω", "75", dropper(sizing.ShuntInput{Low: 45, Zener: 30, LoadHigh: 0.200})),
		w77.is("series resistor", "Ω", "20", dropper(sizing.ShuntInput{Low: 16, Zener: 12, LoadHigh: 0.200})),
		w77.is("power of the Zener without load", "W", "2.4", func() float64 { return float64(state(16, 12, 20, 0).Heat) }),
		w78.is("output", "V", "6", func() float64 { return float64(state(12, 6, 1e3, 5e3).Out) }),
		w78.is("output with the Zener open", "V", "10", func() float64 { return float64(state(12, open, 1e3, 5e3).Out) }),
		w83.is("load voltage, Zener off", "V", "8.73", func() float64 { return float64(state(16, 10, 1e3, 1.2e3).Out) }),
		w83.is("voltage of the resistor", "V", "7.27", func() float64 { return 16 - float64(state(16, 10, 1e3, 1.2e3).Out) }),
		w86.is("supply current", "mA", "60", func() float64 { return milli(float64(state(16, 10, 100, 200).Supply)) }),
		w86.is("Zener current at 200 Ω", "mA", "10", func() float64 { return milli(float64(state(16, 10, 100, 200).Zener)) }),
		w86.is("Zener current at 500 Ω", "mA", "40", func() float64 { return milli(float64(state(16, 10, 100, 500).Zener)) }),
	}
}

func diodes() []Check {
	const topic = "Series resistor of a light-emitting diode"
	w92 := figures{"W092", topic, "Lessons in Electric Circuits vol. III (open textbook), ch. 3", Read}
	w93 := figures{"W093", topic, "Electronic Principles, ex. 5-12 and 5-13", Archive}
	series := func(u quantity.Volt) (ohm, watt float64) {
		r, p, _ := sizing.SeriesResistor(sizing.SeriesResistorInput{Supply: u, Forward: 1.6, Diodes: 1, Current: 0.02})
		return float64(r), float64(p)
	}
	fitted := func(u quantity.Volt, r quantity.Ohm, rated quantity.Ampere) func() float64 {
		return func() float64 {
			s, _, err := sizing.StringResistor(sizing.StringInput{High: u, Low: u, Forward: 2, Series: 1, Current: rated, Pinned: r})
			if err != nil {
				return math.NaN()
			}
			return 1000 * float64(s.Most)
		}
	}
	return []Check{
		w92.is("resistor at 6 V", "Ω", "220", func() float64 { r, _ := series(6); return r }),
		w92.is("its power", "mW", "88", func() float64 { _, p := series(6); return 1000 * p }),
		w92.is("resistor at 24 V", "kΩ", "1.12", func() float64 { r, _ := series(24); return r / 1000 }),
		w92.is("its power", "mW", "448", func() float64 { _, p := series(24); return 1000 * p }),
		w93.is("current, 50 V, 2.2 kΩ", "mA", "21.82", fitted(50, 2200, 0.025)),
		w93.is("current, 9 V, 470 Ω", "mA", "14.89", fitted(9, 470, 0.020)),
	}
}

func rectifiers() []Check {
	const topic = "Transformer and rectifier"
	const book = "Electronic Principles, ex. "
	peak := func(b sizing.Bridge, u, d quantity.Volt) func() float64 {
		return func() float64 { v, _ := sizing.Peak(b, u, d); return float64(v) }
	}
	w96, w98 := figures{"W096", topic, book + "4-1", Archive}, figures{"W098", topic, book + "4-3", Archive}
	w99, w102 := figures{"W099", topic, book + "4-5", Archive}, figures{"W102", topic, book + "4-9", Archive}
	return []Check{
		w96.is("peak, 10 V half-wave, ideal", "V", "14.14", peak(sizing.HalfWave, 10, 0)),
		w96.is("peak with 0.7 V", "V", "13.44", peak(sizing.HalfWave, 10, 0.7)),
		w98.is("peak of the 12 V secondary", "V", "16.97", peak(sizing.HalfWave, 12, 0)),
		w98.is("peak, centre-tapped, ideal", "V", "8.49", peak(sizing.CentreTapped, 12, 0)),
		w98.is("peak, centre-tapped, 0.7 V", "V", "7.79", peak(sizing.CentreTapped, 12, 0.7)),
		w99.is("peak, bridge, ideal", "V", "16.97", peak(sizing.FullBridge, 12, 0)),
		w102.is("ripple, 19.83 mA, 4700 µF, 60 Hz", "mV", "35.16", func() float64 {
			v, _ := sizing.Ripple(sizing.RippleInput{Rectifier: sizing.FullBridge, Frequency: 60, Capacitor: 4700e-6, Current: 19.83e-3})
			return 1000 * float64(v)
		}),
	}
}

func heat() []Check {
	const topic = "Heat"
	watt := func(tj, ta quantity.Celsius, k quantity.KelvinPerWatt) func() float64 {
		return func() float64 { return float64(sizing.MostPower(tj, ta, k)) }
	}
	sink := func(in sizing.HeatInput) sizing.Sink {
		s, _, err := sizing.HeatSink(in)
		if err != nil {
			return sizing.Sink{Most: quantity.KelvinPerWatt(math.NaN()), Case: quantity.Celsius(math.NaN())}
		}
		return s
	}
	w125 := figures{"W125", topic, "Design with Operational Amplifiers and Analog Integrated Circuits, ex. 11.14", Archive}
	w126 := figures{"W126", topic, "Design with Operational Amplifiers and Analog Integrated Circuits, ex. 11.15", Archive}
	w128 := figures{"W128", topic, "Microelectronic Circuits, ex. 14.5", Archive}
	w129 := figures{"W129", topic, "Electronic Circuit Analysis and Design, ex. 8.1", Archive}
	w131 := figures{"W131", topic, "Principles of Electronics, ex. 12.15 to 12.17", Archive}
	w132 := figures{"W132", topic, "Electronic Principles, ex. 6-12", Archive}
	return []Check{
		w125.is("greatest power, 60 K/W", "W", "1.67", watt(150, 50, 60)),
		w125.is("case temperature then", "°C", "145", func() float64 {
			return float64(sink(sizing.HeatInput{Power: quantity.Watt(watt(150, 50, 60)()), Junction: 150, Ambient: 50, JunctionCase: 3}).Case)
		}),
		w126.is("heat sink", "K/W", "6", func() float64 {
			return float64(sink(sizing.HeatInput{Power: 0.8 * (12 - 5), Junction: 125, Ambient: 60, JunctionCase: 5, CaseSink: 0.6}).Most)
		}),
		w128.is("power in free air", "W", "1.6", watt(150, 50, 62.5)),
		w128.is("power with a sink of 4 K/W", "W", "13.1", watt(150, 50, 3.12+0.5+4)),
		w128.is("power with an infinite sink", "W", "32", watt(150, 50, 3.12)),
		w129.is("power without sink", "W", "2.32", watt(150, 30, 1.75+50)),
		w129.is("power with sink", "W", "15.48", watt(150, 30, 1.75+1+5)),
		w131.is("power without fin", "W", "0.200", watt(90, 30, 300)),
		w131.is("power with fin", "W", "1.000", watt(90, 30, 60)),
		w132.is("transistor of 625 mW at 100 °C", "mW", "250", func() float64 { return 1000 * float64(sizing.Derated(0.625, 0.005, 100)) }),
	}
}

func relays() []Check {
	w143 := figures{"W143", "Relay contacts", "relay application note, 10 A at 28 V DC used at 55 V", Read}
	coil := figures{"coil", "Relay coils", "automotive-style relay data, 12 V coil of 300 Ω", Read}
	return []Check{
		w143.is("contact current", "A", "3.4", func() float64 {
			i, _ := sizing.Derate(sizing.DerateInput{Current: 10, Volt: 28, To: 55})
			return float64(i)
		}),
		coil.is("coil resistance", "Ω", "300", func() float64 { return float64(catalogue.RelayAutomotive.CoilResistance(12)) }),
	}
}
