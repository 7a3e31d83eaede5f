package catalogue

import (
	"math"

	"gloamwright/internal/quantity"
)

// Conductor is one standard conductor size.
type Conductor struct {
	Size  quantity.WireSize
	PerKM quantity.Ohm // greatest resistance of one kilometre at 20 °C
	Evidence
}

// System is a family of conductor sizes, as practice: conductors names it.
type System string

// The conductor systems.
const (
	Metric System = "metric" // IEC 60228
	AWG    System = "awg"    // ASTM B258
)

// Conductors returns the standard sizes of a system, thinnest first; nil for an
// unknown system. Metric sizes are those of class 5, whose limits are the higher
// ones up to 35 mm² and above 50 mm², so that a run sized with them holds with
// solid and stranded cores too; 50 mm² takes the class 2 figure for the same reason.
func Conductors(s System) []Conductor {
	switch s {
	case Metric:
		return metricWorst
	case AWG:
		return ConductorsAWG
	}
	return nil
}

// ConductorOf returns the standard conductor of that size: of the gauge if the
// size bears one, of the area otherwise.
func ConductorOf(size quantity.WireSize) (Conductor, bool) {
	table := metricWorst
	if size.Gauge != "" {
		table = ConductorsAWG
	}
	for _, c := range table {
		if size.Gauge != "" && c.Size.Gauge == size.Gauge ||
			size.Gauge == "" && math.Abs(float64(c.Size.Area-size.Area)) < areaMatch {
			return c, true
		}
	}
	return Conductor{}, false
}

// areaMatch is half the least distance between two standard areas, in mm², with
// room for the rounding of a written size.
const areaMatch = 0.01

var metricWorst = func() []Conductor {
	out := make([]Conductor, len(ConductorsClass5))
	for i, c := range ConductorsClass5 {
		out[i] = c
		if two := ConductorsClass2[i]; two.PerKM > c.PerKM {
			out[i] = two
		}
	}
	return out
}()
