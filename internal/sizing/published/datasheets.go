package published

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// resistances are the limits of IEC 60228 as two cable makers' pages print them, at
// 20 °C, through the loop that the program computes with.
func resistances() []Check {
	areas := []quantity.SquareMM{0.5, 0.75, 1, 1.5, 2.5, 4, 6, 10, 16, 25, 35, 50, 70, 95, 120}
	two := []string{"36.0", "24.5", "18.1", "12.1", "7.41", "4.61", "3.08", "1.83", "1.15", "0.727", "0.524", "0.387", "0.268", "0.193", "0.153"}
	five := []string{"39.0", "26.0", "19.5", "13.3", "7.98", "4.95", "3.30", "1.91", "1.21", "0.780", "0.554", "0.386", "0.272", "0.206", "0.161"}
	list := func(class, table string, conductors []catalogue.Conductor, printed []string) []Check {
		f := figures{"IEC 60228", "Conductors", "IEC 60228 " + table + ", as two cable makers' pages print it", Read}
		var out []Check
		for i, p := range printed {
			out = append(out, f.is(fmt.Sprintf("%s, %v, at 20 °C", class, areas[i]), "Ω/km", p, func() float64 {
				for _, c := range conductors {
					if c.Size.Area == areas[i] { // a loop of 500 m is one kilometre of conductor
						r, _ := sizing.Loop(sizing.RunInput{Conductor: c, Length: 500, At: catalogue.ReferenceTemperature})
						return float64(r)
					}
				}
				return math.NaN()
			}))
		}
		return out
	}
	return append(list("class 2", "table 2", catalogue.ConductorsClass2, two), list("class 5", "table 3", catalogue.ConductorsClass5, five)...)
}

// cells are figures of battery sheets and notes.
func cells() []Check {
	const topic = "Battery data"
	sheet := figures{"AGM 40", topic, "datasheet of a 12 V 40 Ah glass-mat battery", Read}
	note := figures{"3 mV", topic, "charging note, 3 mV per cell and kelvin", Read}
	rest := figures{"rest", topic, "rest voltages of flooded 12 V batteries (common practice, read in a list)", Read}
	size := figures{"IEEE 485", topic, "IEEE 485 table 1, lines repeated in a sizing article", Read}
	var out []Check
	for _, p := range []struct {
		hours   float64
		end     quantity.Volt
		printed string
	}{{20, 1.80, "40"}, {10, 1.75, "37.2"}, {5, 1.70, "34"}, {1, 1.60, "24"}} {
		out = append(out, sheet.is(fmt.Sprintf("capacity at %g h to %v a cell", p.hours, p.end), "Ah", p.printed, func() float64 {
			k, err := sizing.CapacityFactor(catalogue.VRLAAGM, nil, quantity.Hours(p.hours), p.end)
			if err != nil {
				return math.NaN()
			}
			return 40 / k * p.hours
		}))
	}
	for _, p := range []struct {
		at      quantity.Celsius
		printed string
	}{{15, "2.33"}, {25, "2.30"}, {35, "2.27"}} {
		out = append(out, note.is(fmt.Sprintf("charge voltage at %v for 2.30 V at 25 °C", p.at), "V", p.printed, func() float64 {
			return float64(catalogue.VRLAAGM.ChargeVolt(2.30, p.at))
		}))
	}
	for _, p := range []struct {
		charge  quantity.Ratio
		printed string
	}{{1, "12.6"}, {0.75, "12.4"}, {0.5, "12.2"}, {0.25, "12.0"}, {0, "11.6"}} {
		out = append(out, rest.is(fmt.Sprintf("rest voltage at %v charge", p.charge), "V", p.printed, func() float64 {
			return 6 * float64(catalogue.Flooded.RestVolt(p.charge))
		}))
	}
	for _, p := range []struct {
		at      quantity.Celsius
		printed string
	}{{4.4, "1.30"}, {10, "1.19"}, {15.6, "1.11"}, {21.1, "1.04"}} {
		out = append(out, size.is(fmt.Sprintf("size factor at %v", p.at), "", p.printed, func() float64 {
			k, ok := catalogue.Flooded.SizeFactor(p.at)
			if !ok {
				return math.NaN()
			}
			return float64(k)
		}))
	}
	return out
}

// gates are the operating times that a datasheet prints for time-lag links.
func gates() []Check {
	f := figures{"IEC 60127", "Fuses", "IEC 60127-2 sheet 3, as a datasheet prints it", Read}
	at := func(multiple quantity.Ampere, slow bool) func() float64 {
		return func() float64 {
			o, _, err := sizing.OpeningTime(sizing.OpeningInput{Class: catalogue.FuseCartridgeT, Rating: 1, Current: multiple})
			switch {
			case err != nil:
				return math.NaN()
			case slow:
				return float64(o.Latest)
			}
			return float64(o.Earliest)
		}
	}
	breaks := func(rating quantity.Ampere) func() float64 {
		return func() float64 { return float64(catalogue.FuseCartridgeT.BreakingCapacity(rating)) }
	}
	return []Check{
		f.is("holds at 1.5 times its rating", "s", "3600", at(1.5, false)),
		f.is("opens within, at 2.1 times", "s", "120", at(2.1, true)),
		f.is("opens after, at 2.75 times", "s", "0.6", at(2.75, false)),
		f.is("opens within, at 2.75 times", "s", "10", at(2.75, true)),
		f.is("opens after, at 4 times", "s", "0.15", at(4, false)),
		f.is("opens within, at 4 times", "s", "3", at(4, true)),
		f.is("opens after, at 10 times", "s", "0.02", at(10, false)),
		f.is("opens within, at 10 times", "s", "0.3", at(10, true)),
		f.is("breaking capacity of 3.15 A", "A", "35", breaks(3.15)),
		f.is("breaking capacity of 4 A", "A", "40", breaks(4)),
		f.is("breaking capacity of 5 A", "A", "50", breaks(5)),
		f.is("breaking capacity of 6.3 A", "A", "63", breaks(6.3)),
	}
}
