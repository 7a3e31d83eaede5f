package catalogue

import (
	"fmt"
	"math"
	"strconv"

	"gloamwright/internal/quantity"
)

// Numbers of ASTM B258: the diameter of gauge n is 0.005 in × 92^((36 − n)/39).
const (
	gaugeBase   = 0.127 // mm, diameter of 36 AWG
	gaugeRatio  = 92
	gaugeSteps  = 39
	gaugeOrigin = 36
)

// strandingAllowance is how much longer the wires of a stranded conductor are than
// the conductor, and so its resistance higher. ASTM B8 allows 2 % (from memory);
// 1.025 keeps every size at or above the stranded column of NFPA 70 chapter 9
// table 8 (from memory too).
const strandingAllowance = 1.025

// GaugeDiameter returns the diameter in mm of gauge n by ASTM B258; 1/0 is n = 0,
// 2/0 is −1 and so on.
func GaugeDiameter(n int) float64 {
	return gaugeBase * math.Pow(gaugeRatio, float64(gaugeOrigin-n)/gaugeSteps)
}

// GaugeArea returns the area of gauge n by ASTM B258.
func GaugeArea(n int) quantity.SquareMM {
	d := GaugeDiameter(n)
	return quantity.SquareMM(math.Pi / 4 * d * d)
}

// GaugeNumber reads a gauge as it is written: "16" is 16, "1/0" is 0, "4/0" is −3.
func GaugeNumber(gauge string) (int, error) {
	if len(gauge) == 3 && gauge[1:] == "/0" && gauge[0] >= '1' && gauge[0] <= '4' {
		return 1 - int(gauge[0]-'0'), nil
	}
	n, err := strconv.Atoi(gauge)
	if err != nil || n < 1 || n > 40 {
		return 0, fmt.Errorf("catalogue: %q is no AWG gauge; write 1 to 40 or 1/0 to 4/0", gauge)
	}
	return n, nil
}

// CircularMil is the area of one circular mil in mm²: a circle of 0.001 in diameter.
const CircularMil = math.Pi / 4 * 0.0254 * 0.0254

// ConductorsAWG are stranded copper conductors by gauge, thinnest first: the area
// by ASTM B258, the resistance by IEC 60028 copper and the stranding allowance.
// The sizes are those sold for wiring; odd gauges thinner than 3 are not.
var ConductorsAWG = func() []Conductor {
	var out []Conductor
	for _, g := range []string{"18", "16", "14", "12", "10", "8", "6", "4", "3", "2", "1", "1/0", "2/0", "3/0", "4/0"} {
		n, err := GaugeNumber(g)
		if err != nil {
			panic(err)
		}
		a := GaugeArea(n)
		out = append(out, Conductor{
			Size:  quantity.WireSize{Area: a, Gauge: g},
			PerKM: WireOhm(CopperResistivity, 1000, a) * strandingAllowance,
			Evidence: Evidence{Source: "ASTM B258 area, IEC 60028 copper, stranding allowance 2.5 %", Seen: true,
				Note: "the formula agrees with a printed table of diameters within 0.1 %"},
		})
	}
	return out
}()
