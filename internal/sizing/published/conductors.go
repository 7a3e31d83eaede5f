package published

import (
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

const drop = "Voltage drop and conductors"

// tap is a load on a two-wire distributor.
type tap struct {
	at   quantity.Metre
	amps quantity.Ampere
}

// distributor solves a two-wire distributor fed at one end and returns the voltages
// at its taps; perMetre is the resistance of one wire.
func distributor(volts quantity.Volt, perMetre quantity.Ohm, taps []tap) []quantity.Volt {
	wire := &sizing.Option{Size: quantity.WireSize{Area: 1}, PerMetre: perMetre}
	t := sizing.Tree{Volts: volts, Options: []sizing.Option{*wire}}
	var at quantity.Metre
	sizes := make([]*sizing.Option, 0, len(taps))
	for i, p := range taps {
		t.Legs = append(t.Legs, sizing.Leg{Parent: i - 1, Length: p.at - at, Load: sizing.Load{Current: p.amps}})
		sizes = append(sizes, wire)
		at = p.at
	}
	v, _, ok := t.Solve(sizes)
	if !ok {
		return []quantity.Volt{quantity.Volt(math.NaN())}
	}
	return v
}

// uniform spreads amps per metre over a distributor as one tap in the middle of each
// metre, which gives the exact voltage at every whole metre, and adds the taps given.
func uniform(length int, perMetre quantity.Ampere, extra ...tap) []tap {
	var out []tap
	for m := range length {
		out = append(out, tap{quantity.Metre(m) + 0.5, perMetre})
		for _, e := range extra {
			if int(e.at) == m+1 {
				out = append(out, e)
			}
		}
	}
	return out
}

// voltsAt returns the voltage at a distance of a distributor.
func voltsAt(volts quantity.Volt, perMetre quantity.Ohm, taps []tap, at quantity.Metre) float64 {
	v := distributor(volts, perMetre, taps)
	for i, p := range taps {
		if p.at == at {
			return float64(v[i])
		}
	}
	return math.NaN()
}

func conductors() []Check {
	const (
		openText = "Lessons in Electric Circuits vol. I (open textbook), ch. 12"
		rhoCmil  = 10.09 // Ω·cmil/ft, the textbook's copper
		awg14    = 4107  // cmil, printed
	)
	w1 := figures{"W001", drop, openText + ", specific resistance", Read}
	w2 := figures{"W002", drop, openText, Read}
	w4 := figures{"W004", drop, "University Physics (open textbook), resistivity and resistance", Read}
	w5 := figures{"W005", drop, "A Textbook of Electrical Technology vol. III, ex. 40.3; Principles of Power System, ex. 13.2", Archive}
	w7 := figures{"W007", drop, "Principles of Power System, ex. 13.4", Archive}
	w8 := figures{"W008", drop, "Principles of Power System, ex. 13.5", Archive}
	w10 := figures{"W010", drop, "A Textbook of Electrical Technology vol. III, ex. 40.9", Archive}
	loop14 := func() float64 {
		perKM := catalogue.WireOhm(rhoCmil, 1000, awg14)
		r, _ := sizing.Loop(sizing.RunInput{Conductor: catalogue.Conductor{PerKM: perKM}, Length: 2300, At: catalogue.ReferenceTemperature})
		return float64(r)
	}
	three := []tap{{75, 12}, {175, 15}, {225, 20}}
	const rounded100 = 0.066 // Ω per 100 m, as the example rounds it
	at7 := func(m quantity.Metre) func() float64 {
		return func() float64 { return voltsAt(250, rounded100/100, three, m) }
	}
	even := func() []tap { return uniform(200, 2, tap{150, 0}, tap{200, 0}) }
	mixed := func() []tap {
		return uniform(500, 0.1, tap{100, 40}, tap{150, 20}, tap{300, 60}, tap{400, 30}, tap{500, 0})
	}
	return []Check{
		w1.is("area for a 10 V drop at 25 A over 2300 ft", "cmil", "116035", func() float64 {
			a, _ := sizing.LeastArea(sizing.LeastAreaInput{Resistivity: rhoCmil, Moment: 25 * 2300, Drop: 10})
			return float64(a)
		}),
		w2.is("one conductor of 14 AWG, 2300 ft", "Ω", "5.651", func() float64 { return float64(catalogue.WireOhm(rhoCmil, 2300, awg14)) }),
		w2.is("both conductors", "Ω", "11.301", loop14),
		w2.is("current into a short at the end, 230 V", "A", "20.352", func() float64 {
			i, _ := sizing.Prospective(sizing.FaultInput{Source: 230, Loop: []sizing.Series{{Name: "run", Ohm: quantity.Ohm(loop14())}}})
			return float64(i)
		}),
		w4.is("area of 12 AWG", "mm²", "3.31", func() float64 { return float64(catalogue.GaugeArea(12)) }),
		w4.is("5 m of 12 AWG copper", "Ω", "0.025", func() float64 { return float64(catalogue.WireOhm(0.0168, 5, catalogue.GaugeArea(12))) }),
		w5.is("area for a 10 V drop, four taps", "mm²", "116.412", func() float64 {
			a, _ := sizing.LeastArea(sizing.LeastAreaInput{Resistivity: 0.0178, Moment: 30*40 + 40*100 + 100*150 + 50*250, Drop: 10})
			return float64(a)
		}),
		w7.is("100 m of one conductor, 27 mm²", "Ω", "0.066", func() float64 { return float64(catalogue.WireOhm(0.0178, 100, 27)) }),
		w7.is("voltage at B", "V", "245.35", at7(75)),
		w7.is("voltage at C", "V", "240.73", at7(175)),
		w7.is("voltage at D", "V", "239.41", at7(225)),
		w8.is("drop at 150 m, uniform 2 A/m", "V", "22.5", func() float64 { return 1000 - voltsAt(1000, 0.3e-3, even(), 150) }),
		w8.is("greatest drop", "V", "24.0", func() float64 { return 1000 - voltsAt(1000, 0.3e-3, even(), 200) }),
		w10.is("voltage at the end, taps and 0.1 A/m", "V", "225.25", func() float64 { return voltsAt(250, 0.00025, mixed(), 500) }),
		w10.is("voltage at B", "V", "236.56", func() float64 { return voltsAt(250, 0.00025, mixed(), 150) }),
	}
}

func temperatures() []Check {
	const topic = "Conductor temperature"
	w14 := figures{"W014", topic, "Lessons in Electric Circuits vol. I (open textbook), ch. 12, temperature coefficient", Read}
	w16 := figures{"W016", topic, "Fundamental Electrical and Electronic Principles, ex. 1.18", Archive}
	w140 := figures{"W140", topic, "College Physics 2e (open textbook), resistance and resistivity", Read}
	const alpha = 0.004041 // 1/K, the textbook's copper at 20 °C
	warm := func(t quantity.Celsius) quantity.Ohm {
		r, _ := sizing.ResistanceAt(15, 20, t, 1/alpha-20)
		return r
	}
	feed := func(t quantity.Celsius) (volt, amp float64) {
		return oneLoad(14, 2*warm(t), 250)
	}
	return []Check{
		w14.is("current at 20 °C", "mA", "50", func() float64 { _, i := feed(20); return 1000 * i }),
		w14.is("load voltage at 20 °C", "V", "12.5", func() float64 { v, _ := feed(20); return v }),
		w14.is("drop of each wire at 20 °C", "V", "0.75", func() float64 { v, _ := feed(20); return (14 - v) / 2 }),
		w14.is("one wire at 35 °C", "Ω", "15.909", func() float64 { return float64(warm(35)) }),
		w14.is("current at 35 °C", "mA", "49.677", func() float64 { _, i := feed(35); return 1000 * i }),
		w14.is("load voltage at 35 °C", "V", "12.42", func() float64 { v, _ := feed(35); return v }),
		w14.is("drop of each wire at 35 °C", "V", "0.79", func() float64 { v, _ := feed(35); return (14 - v) / 2 }),
		w16.is("field coil of 250 Ω at 15 °C, warmed to 45 °C", "Ω", "280.2", func() float64 {
			r, _ := sizing.ResistanceAt(250, 15, 45, 1/4.28e-3)
			return float64(r)
		}),
		w140.is("headlight filament at 2850 °C", "Ω", "4.8", func() float64 {
			r, _ := sizing.ResistanceAt(0.350, 20, 2850, catalogue.TungstenZero)
			return float64(r)
		}),
	}
}

// oneLoad returns voltage and current of a resistor behind a source resistance.
func oneLoad(source quantity.Volt, internal, load quantity.Ohm) (volt, amp float64) {
	none := &sizing.Option{Size: quantity.WireSize{Area: 1}}
	t := sizing.Tree{Volts: source, Options: []sizing.Option{*none}, Legs: []sizing.Leg{{Parent: -1, Extra: internal, Load: sizing.Load{Ohm: load}}}}
	v, i, ok := t.Solve([]*sizing.Option{none})
	if !ok {
		return math.NaN(), math.NaN()
	}
	return float64(v[0]), float64(i[0])
}

func faults() []Check {
	w17 := figures{"W017", "Short-circuit withstand", "Basic Electrical Installation Work, p. 251, example 1", Read}
	w50 := figures{"W050", "Prospective short circuit", "DC distribution chapter of a power-quality guide", Read}
	w20 := figures{"W020", "Prospective short circuit", "Lessons in Electric Circuits vol. I (open textbook), ch. 11", Read}
	fault := func(u quantity.Volt, r quantity.Ohm) float64 {
		i, _ := sizing.Prospective(sizing.FaultInput{Source: u, Loop: []sizing.Series{{Name: "loop", Ohm: r}}})
		return float64(i)
	}
	bank := func(parallel quantity.AmpereHour) quantity.Ohm {
		r, _ := sizing.Internal(0.0005, 110, parallel)
		return r
	}
	return []Check{
		w17.is("fault current, 230 V and 1.15 Ω", "A", "200", func() float64 { return fault(230, 1.15) }),
		w17.is("least area, 0.4 s, k 115", "mm²", "1.10", func() float64 {
			s, _, err := sizing.Adiabatic(sizing.AdiabaticInput{Fault: 200, For: 0.4, K: catalogue.AdiabaticPVC})
			if err != nil {
				return math.NaN()
			}
			return float64(s)
		}),
		w20.is("short circuit of a 10 V source with 0.2 Ω", "A", "50", func() float64 { return fault(10, 0.2) }),
		w50.is("110 cells of 0.5 mΩ", "mΩ", "55", func() float64 { return 1000 * float64(bank(1)) }),
		w50.is("four such batteries in parallel at 240 V", "kA", "17.5", func() float64 { return fault(240, bank(4)) / 1000 }),
	}
}
