package published

import (
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// sources are batteries with internal resistance that feed a load.
func sources() []Check {
	const topic = "Battery terminal voltage"
	w19 := figures{"W019", topic, "College Physics 2e (open textbook), electromotive force: terminal voltage", Read}
	text := "Lessons in Electric Circuits vol. I (open textbook), ch. 11"
	w20 := figures{"W020", topic, text, Read}
	w22 := figures{"W022", topic, text + ", battery test, slightly discharged", Read}
	w23 := figures{"W023", topic, text + ", battery test, moderately discharged", Read}
	w25 := figures{"W025", topic, "Electrical Circuit Theory and Technology, ch. 4, ex. 1", Archive}
	w26 := figures{"W026", topic, "Electrical Circuit Theory and Technology, ch. 4, ex. 4", Archive}
	cells := func(r float64, n int, rows quantity.AmpereHour) quantity.Ohm {
		ohm, _ := sizing.Internal(r, n, rows)
		return ohm
	}
	volt := func(e quantity.Volt, r, load quantity.Ohm) func() float64 {
		return func() float64 { v, _ := oneLoad(e, r, load); return v }
	}
	amp := func(e quantity.Volt, r, load quantity.Ohm) func() float64 {
		return func() float64 { _, i := oneLoad(e, r, load); return i }
	}
	return []Check{
		w19.is("current into 10 Ω", "A", "1.188", amp(12, 0.1, 10)),
		w19.is("terminal voltage at 10 Ω", "V", "11.9", volt(12, 0.1, 10)),
		w19.is("current into 0.5 Ω", "A", "20.0", amp(12, 0.1, 0.5)),
		w19.is("terminal voltage at 0.5 Ω", "V", "10.0", volt(12, 0.1, 0.5)),
		w19.is("current into 0.5 Ω, internal 0.5 Ω", "A", "12.0", amp(12, 0.5, 0.5)),
		w19.is("terminal voltage, internal 0.5 Ω", "V", "6.00", volt(12, 0.5, 0.5)),
		w20.is("current into 1 Ω", "A", "8.333", amp(10, 0.2, 1)),
		w20.is("voltage at 1 Ω", "V", "8.333", volt(10, 0.2, 1)),
		w22.is("voltage at a 100 Ω test load", "V", "12.381", volt(13, 5, 100)),
		w23.is("voltage at a 100 Ω test load", "V", "9.583", volt(11.5, 20, 100)),
		w25.is("eight cells in series", "Ω", "1.6", func() float64 { return float64(cells(0.2, 8, 1)) }),
		w25.is("eight cells in parallel", "Ω", "0.025", func() float64 { return float64(cells(0.2, 1, 8)) }),
		w26.is("current into 58 Ω", "A", "0.25", func() float64 { return amp(15, cells(0.2, 10, 1), 58)() }),
		w26.is("terminal voltage", "V", "14.5", func() float64 { return volt(15, cells(0.2, 10, 1), 58)() }),
	}
}

// plainCell gives its rated capacity at any rate, loses nothing in store, and takes
// the temperature factors of lead-acid: what the simple examples assume.
func plainCell() *catalogue.BatteryClass {
	c := *catalogue.Flooded
	c.Rates = []catalogue.RatePoint{{Time: 1, Fraction: 1}, {Time: quantity.Hours(1000), Fraction: 1}}
	c.Ends, c.EndVolt, c.LowestEnd, c.SelfDischarge = nil, 1, 1, 0
	return &c
}

// capacity runs the sectional method with one period.
func capacity(amps quantity.Ampere, hours float64, usable quantity.Ratio, at quantity.Celsius) float64 {
	c, _, err := sizing.Sectional(sizing.SectionalInput{
		Class: plainCell(), Periods: []sizing.Period{{Current: amps, Time: quantity.Hours(hours)}}, Ageing: usable, Coldest: at,
	})
	if err != nil {
		return math.NaN()
	}
	return float64(c)
}

func batteries() []Check {
	const topic = "Battery capacity"
	w29 := figures{"W029", topic, "Lessons in Electric Circuits vol. I (open textbook), ch. 11", Read}
	w32 := figures{"W032", topic, "A Textbook of Applied Electronics, ex. 3.36", Archive}
	w34 := figures{"W034", topic, "solar sizing article after IEEE steps, 1000 Wh a day, 2.5 days, 12 V", Read}
	w35 := figures{"W035", topic, "solar article, 380 W for 4 h, usable 0.648, 12 V", Read}
	w37 := figures{"W037", topic, "US Navy training manual, capacity test of a storage battery", Read}
	w54 := figures{"W054", "Ventilation", "article on hydrogen after IEEE 484, 25 A and 24 cells", Read}
	const (
		volts      = 12.0
		cubicFoot  = 0.0283168466 // m³
		fullDay    = 24.0
		twoAndHalf = 2.5
	)
	stands := func(c quantity.AmpereHour, i quantity.Ampere) func() float64 {
		return func() float64 {
			t, _ := sizing.StandingTime(sizing.StandingInput{Class: plainCell(), Capacity: c, Drains: []sizing.Drain{{Name: "load", Current: i}}})
			return t.Hours()
		}
	}
	solar := func(usable quantity.Ratio, at quantity.Celsius) func() float64 {
		return func() float64 {
			return volts * capacity(1000/volts/fullDay, twoAndHalf*fullDay, usable, at)
		}
	}
	return []Check{
		w29.is("70 Ah at 3.5 A", "h", "20", stands(70, 3.5)),
		w32.is("2 Ah at 6 V into 1.2 W", "h", "10.0", stands(2, 1.2/6)),
		w34.is("energy for the days", "Wh", "2500", solar(1, 25)),
		w34.is("with 50 % depth", "Wh", "5000", solar(0.5, 25)),
		w34.is("with the factor for 40 °F", "Wh", "6500", solar(0.5, 4.4)),
		w35.is("battery energy", "Wh", "2345.7", func() float64 { return volts * capacity(380/volts, 4, 0.648, 25) }),
		w35.is("battery capacity", "Ah", "195.5", func() float64 { return capacity(380/volts, 4, 0.648, 25) }),
		w37.is("current of the 10 h test, 100 Ah", "A", "10", func() float64 {
			k, err := sizing.CapacityFactor(catalogue.Flooded, nil, quantity.Hours(10), 1.75)
			if err != nil {
				return math.NaN()
			}
			return 100 / k
		}),
		w37.is("end of the test, three cells", "V", "5.25", func() float64 {
			v, _ := sizing.EndOfDischarge(sizing.EndInput{Class: catalogue.Flooded, Cells: 3})
			return float64(v)
		}),
		w54.is("hydrogen", "ft³/min", "0.161", func() float64 {
			q, _ := sizing.Hydrogen(24, 25)
			return q / cubicFoot / 60
		}),
	}
}

func peukert() []Check {
	const topic = "Peukert's law"
	const handbook = "battery-monitor handbook, exponents from the 20 h rating and the minutes at 25 A"
	exponent := func(id string, ah quantity.AmpereHour, minutes float64, printed, what string) Check {
		return figures{id, topic, handbook + ", " + what, Read}.is("exponent", "", printed, func() float64 {
			return sizing.PeukertExponent(ah, quantity.Hours(20), 25, quantity.Hours(minutes/60))
		})
	}
	return []Check{
		figures{"W041", topic, "article on the law for lead-acid, 100 Ah in the one-ampere form, k 1.2", Read}.is("time at 5 A", "h", "14.5", func() float64 {
			return sizing.PeukertTime(100, quantity.Hours(100), 5, 1.2).Hours()
		}),
		exponent("W043", 86, 167, "1.12", "gel 12 V 86 Ah"),
		exponent("W044", 95, 188, "1.12", "gel 12 V 95 Ah"),
		exponent("W046", 225, 447, "1.24", "flooded 6 V 225 Ah"),
		exponent("W047", 350, 760, "1.28", "flooded 6 V 350 Ah"),
		exponent("W049", 130, 225, "1.24", "flooded 12 V 130 Ah"),
	}
}
