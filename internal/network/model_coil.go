package network

import "math"

// Parameter positions of the coil.
const (
	coilOhm = iota
	coilPickup
	coilDropout
	coilCelsius
)

// Copper: resistance rises by 0.00393/K from its value at 20 °C (IEC 60028).
const (
	copperAlpha   = 0.00393
	copperCelsius = 20
)

// warmth is the ratio of a coil's resistance at its temperature to that at 20 °C. A
// coil pulls by its current, so pick-up and drop-out voltages rise in the same ratio.
func warmth(p []float64) float64 { return 1 + copperAlpha*(p[coilCelsius]-copperCelsius) }

// coilModel is a relay coil.
var coilModel = &Model{
	Name: "coil", Doc: "Relay coil; it moves the contacts that name it as their Control.", Pins: pins("A1", "A2"),
	Params: []ParamSpec{
		needed(positive(param("ohm", "Ω", 0, "resistance at 20 °C"))),
		needed(positive(param("pickup_volt", "V", 0, "voltage at which it picks up at 20 °C"))),
		needed(param("dropout_volt", "V", 0, "voltage at which it drops out at 20 °C")),
		limits(param("celsius", "°C", copperCelsius, "temperature of the winding"), -60, 200),
	},
	Law:    "i(A1→A2) = v/(ohm·k), k = 1 + 0.00393/K·(celsius − 20 °C); picks up at |v| ≥ k·pickup_volt, drops out at |v| < k·dropout_volt",
	Source: "Ohm's law; copper coefficient IEC 60028",
	Memory: "picked up/released",
	joined: [][2]int{{0, 1}}, branches: 1,
	check: func(p []float64) string {
		if p[coilDropout] >= p[coilPickup] {
			return "dropout_volt must be below pickup_volt"
		}
		return ""
	},
	straight: func(c *cell) line { return line{ohm: c.p[coilOhm] * warmth(c.p)} },
	next: func(c *cell) bool {
		v, k := math.Abs(c.across(0, 1)), warmth(c.p)
		if c.on {
			return v >= k*c.p[coilDropout]
		}
		return v >= k*c.p[coilPickup]
	},
}
