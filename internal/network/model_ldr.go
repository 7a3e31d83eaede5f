package network

import "math"

// Parameter positions of the light-dependent resistor.
const (
	ldrR10 = iota
	ldrGamma
	ldrBright
	ldrDark
	ldrLux
)

// ldrModel is a cadmium-sulphide cell.
var ldrModel = &Model{
	Name: "ldr", Doc: "Light-dependent resistor, cadmium sulphide, 5 mm class.", Pins: pins("1", "2"),
	Params: []ParamSpec{
		positive(param("r10", "Ω", 14e3, "resistance at 10 lx")),
		positive(param("gamma", "", 0.7, "exponent")),
		positive(param("rmin", "Ω", 300, "resistance in bright light")),
		positive(param("rdark", "Ω", 2e6, "resistance in the dark")),
		{Name: "lux", Unit: "lx", Doc: "illuminance on the cell; below zero that of the condition", Default: -1},
	},
	Law:      "i(1→2) = (v1 − v2)/R, R = r10·(lux/10)^−gamma kept between rmin and rdark",
	Source:   "law of cadmium-sulphide cells; 8 to 20 kΩ at 10 lx, gamma 0.5 to 1, over 1 MΩ dark (seen); 0.7, 300 Ω and 2 MΩ from memory",
	joined:   [][2]int{{0, 1}},
	branches: 1,
	check: func(p []float64) string {
		if p[ldrDark] < p[ldrBright] {
			return "rdark must not be below rmin"
		}
		return ""
	},
	straight: func(c *cell) line {
		lux := c.p[ldrLux]
		if lux < 0 {
			lux = c.at.Lux
		}
		return line{ohm: ldrOhm(c.p, lux)}
	},
}

func ldrOhm(p []float64, lux float64) float64 {
	const reference = 10 // lx, at which r10 holds
	if lux <= 0 {
		return p[ldrDark]
	}
	return min(max(p[ldrR10]*math.Pow(lux/reference, -p[ldrGamma]), p[ldrBright]), p[ldrDark])
}
