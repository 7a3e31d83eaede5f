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
	eval:   func(c *cell) { c.series(c.p[0], c.p[1]) },
	direct: func(p []float64, _ bool) bool { return p[1] == 0 },
}

// batteryModel is a battery at one state of charge.
var batteryModel = &Model{
	Name: "battery", Doc: "Battery at one state of charge; emf and ohm come with the condition. Its current counts positive in charge.",
	Pins: pins("+", "-"),
	Params: []ParamSpec{
		{Name: "emf", Unit: "V", Doc: "electromotive force of the whole battery", Required: true},
		ohms("internal resistance of the whole battery", 0),
	},
	Law:      "v(+) − v(−) = emf + ohm·i, i into +",
	Source:   "Thévenin's theorem; IEC 61660-1 uses the same equivalent",
	branches: 1, drives: []int{0}, joined: [][2]int{{0, 1}},
	eval:   func(c *cell) { c.series(c.p[0], c.p[1]) },
	direct: func(p []float64, _ bool) bool { return p[1] == 0 },
}
