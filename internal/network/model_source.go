package network

// sourceModel is an ideal source with a resistance.
var sourceModel = &Model{
	Name: "source", Doc: "Source of constant voltage behind a resistance; it takes current back.", Pins: pins("+", "-"),
	Params: []ParamSpec{
		{Name: "volt", Unit: "V", Doc: "open-circuit voltage", Required: true},
		ohms("internal resistance; 0 is ideal", 0),
	},
	Law:      "v(+) − v(−) = volt + ohm·i, i into +",
	Source:   "Thévenin's theorem",
	branches: 1, drives: []int{0}, joined: [][2]int{{0, 1}},
	straight: func(c *cell) line { return line{emf: c.p[0], ohm: c.p[1]} },
	direct:   func(p []float64, _ bool) bool { return p[1] == 0 },
}

// Parameter positions of the battery.
const (
	batteryEMF = iota
	batteryOhm
	batteryCharge
)

// chargeCorner is the current over which the two resistances of a battery pass into
// each other (assumed: far below any charging current).
const chargeCorner = 1e-3

// batteryModel is a battery at one state of charge.
var batteryModel = &Model{
	Name: "battery", Doc: "Battery at one state of charge; emf and the resistances come with the condition. Its current counts positive in charge.",
	Pins: pins("+", "-"),
	Params: []ParamSpec{
		{Name: "emf", Unit: "V", Doc: "electromotive force of the whole battery", Required: true},
		ohms("internal resistance of the whole battery", 0),
		{Name: "charge_ohm", Unit: "Ω", Doc: "resistance to the current that flows in, for a full battery that takes next to none; 0: as ohm", Max: maxOhm},
	},
	Law:      "v(+) − v(−) = emf + ohm·i, i into +; with charge_ohm above 0: + (charge_ohm − ohm)·round(i, 1 mA)",
	Source:   "Thévenin's theorem; IEC 61660-1 uses the same equivalent",
	branches: 1, drives: []int{batteryEMF}, joined: [][2]int{{0, 1}},
	eval: func(c *cell) {
		emf, ohm := c.p[batteryEMF], c.p[batteryOhm]
		if c.p[batteryCharge] == 0 {
			c.series(emf, ohm)
			return
		}
		i, more := c.v[2], c.p[batteryCharge]-ohm
		in, slope := rounded(i, chargeCorner)
		c.through(i)
		c.f[2] = c.v[0] - c.v[1] - emf - ohm*i - more*in
		c.j[2][0], c.j[2][1], c.j[2][2] = 1, -1, -ohm-more*slope
	},
	direct: func(p []float64, _ bool) bool { return p[batteryOhm] == 0 && p[batteryCharge] == 0 },
}
