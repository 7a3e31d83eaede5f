package catalogue

import "gloamwright/internal/quantity"

// LeastSize is the smallest conductor that one use allows for its strength.
type LeastSize struct {
	Use    string
	Metric quantity.SquareMM
	Gauge  string
	Evidence
}

// The smallest conductors. IEC 60364-5-52 table 52.2 asks for 1.5 mm² in cables of
// power and lighting circuits and lets signal and control circuits go to 0.5 mm²
// (from memory); it lets extra-low-voltage lighting of special use go to 0.75 mm²
// in flexible cables.
var (
	LeastFixed   = LeastSize{"fixed cable of a lighting circuit", 1.0, "18", Evidence{Source: "IEC 60364-5-52 table 52.2", Note: "the table asks 1.5 mm² for power and lighting circuits and 0.75 mm² for flexible cables of extra-low-voltage circuits; 1.0 mm² is between"}}
	LeastControl = LeastSize{"control and signal wire", 0.5, "18", Evidence{Source: "IEC 60364-5-52 table 52.2"}}
)

// Least returns the smallest area of that use in a conductor system.
func (l LeastSize) Least(s System) quantity.SquareMM {
	if s == AWG {
		n, err := GaugeNumber(l.Gauge)
		if err != nil {
			panic(err)
		}
		return GaugeArea(n)
	}
	return l.Metric
}
