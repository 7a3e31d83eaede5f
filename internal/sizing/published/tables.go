package published

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// ampacities are the currents of three loaded conductors that a machine handbook
// prints for five ambient temperatures: IEC 60364-5-52 tables B.52.4 and B.52.14
// multiplied out and rounded.
func ampacities() []Check {
	areas := []quantity.SquareMM{1.5, 2.5, 4, 6, 10, 16, 25, 35}
	printed := []struct {
		table *catalogue.AmpacityTable
		at    quantity.Celsius
		amps  [8]int
	}{
		{catalogue.AmpacityB2Three, 40, [8]int{13, 17, 23, 30, 40, 54, 70, 86}},
		{catalogue.AmpacityB2Three, 45, [8]int{12, 16, 21, 27, 36, 49, 63, 78}},
		{catalogue.AmpacityB2Three, 50, [8]int{11, 14, 19, 24, 33, 44, 57, 70}},
		{catalogue.AmpacityB2Three, 55, [8]int{9, 12, 16, 21, 28, 38, 49, 60}},
		{catalogue.AmpacityCThree, 40, [8]int{15, 21, 28, 36, 50, 66, 84, 104}},
		{catalogue.AmpacityCThree, 45, [8]int{14, 19, 25, 32, 45, 60, 76, 94}},
		{catalogue.AmpacityCThree, 50, [8]int{12, 17, 23, 29, 40, 54, 68, 84}},
		{catalogue.AmpacityCThree, 55, [8]int{11, 15, 20, 25, 35, 46, 59, 73}},
	}
	f := figures{"B.52.4", "Ampacity", "IEC 60364-5-52 tables B.52.4 and B.52.14, as printed in a machine handbook", Read}
	var out []Check
	for _, p := range printed {
		for i, a := range areas {
			out = append(out, f.is(fmt.Sprintf("%s, %v, %v", p.table.Name, a, p.at), "A", fmt.Sprint(p.amps[i]), func() float64 {
				iz, _, err := sizing.Ampacity(sizing.AmpacityInput{Table: p.table, Size: quantity.WireSize{Area: a}, Ambient: p.at})
				if err != nil {
					return math.NaN()
				}
				return float64(iz)
			}))
		}
	}
	return out
}

// gauges are the diameters that an open textbook prints for AWG sizes, in inches.
func gauges() []Check {
	const inch = 25.4 // mm
	f := figures{"B258", "Conductors", "ASTM B258 sizes as printed in Lessons in Electric Circuits vol. I (open textbook), ch. 12", Read}
	printed := []struct {
		n  int
		in string
	}{
		{20, "0.03196"}, {18, "0.0403"}, {16, "0.05082"}, {14, "0.06408"}, {12, "0.08081"}, {10, "0.1019"}, {8, "0.1285"}, {6, "0.1620"},
		{4, "0.2043"}, {2, "0.2576"}, {1, "0.2893"}, {0, "0.3249"}, {-1, "0.3648"}, {-2, "0.4096"}, {-3, "0.4600"},
	}
	var out []Check
	for _, p := range printed {
		out = append(out, f.is(fmt.Sprintf("diameter of gauge number %d", p.n), "in", p.in, func() float64 { return catalogue.GaugeDiameter(p.n) / inch }))
	}
	return out
}

func preferred() []Check {
	const topic = "Resistor colour code"
	const source = "IEC 60062 examples in Lessons in Electric Circuits vol. V (open textbook), ch. 2"
	read := func(bands ...string) (ohm, tol float64) {
		ohm, tol, err := catalogue.ReadResistor(bands...)
		if err != nil {
			return math.NaN(), math.NaN()
		}
		return ohm, tol
	}
	both := func(id, ohm, percent string, bands ...string) []Check {
		f := figures{id, topic, source, Read}
		name := fmt.Sprint(bands)
		return []Check{
			f.is("value of "+name, "Ω", ohm, func() float64 { r, _ := read(bands...); return r }),
			f.is("tolerance of "+name, "%", percent, func() float64 { _, t := read(bands...); return 100 * t }),
		}
	}
	var out []Check
	out = append(out, both("W146", "47000", "5", "yellow", "violet", "orange", "gold")...)
	out = append(out, both("W147", "5.2", "10", "green", "red", "gold", "silver")...)
	out = append(out, both("W149", "3300", "0.1", "orange", "orange", "black", "brown", "violet")...)
	return append(out, both("W150", "1.58", "2", "brown", "green", "grey", "silver", "red")...)
}
