package network

// Parameter positions of the cut-off.
const (
	cutOffOpens = iota
	cutOffRecloses
	cutOffOwn
	cutOffOhm
)

// ownVolt is the voltage from which a module takes its full own current (assumed).
const ownVolt = 3

// cutOffModel is a low-voltage disconnect, sensed at its input.
var cutOffModel = &Model{
	Name: "cut-off", Doc: "Low-voltage disconnect: opens when the voltage at its input has fallen, closes when it has risen again.",
	Pins: pins("in", "out", "-"),
	Params: []ParamSpec{
		needed(positive(param("opens_volt", "V", 0, "input voltage below which it opens"))),
		needed(positive(param("recloses_volt", "V", 0, "input voltage from which it closes again"))),
		param("own_ampere", "A", 0, "current it takes itself, from in to −"),
		ohms("resistance when closed", contactOhm),
	},
	Law: "closed: i(in→out) = (v(in) − v(out))/ohm; open: i = 0; i(in→−) = own_ampere·fade(v(in) − v(−), 3 V); " +
		"opens at v(in) − v(−) < opens_volt, closes at v(in) − v(−) ≥ recloses_volt",
	Source: "definition",
	Memory: "closed/open", rest: true,
	joined: [][2]int{{0, 1}, {0, 2}}, branches: 1,
	check: func(p []float64) string {
		if p[cutOffRecloses] <= p[cutOffOpens] {
			return "recloses_volt must be above opens_volt"
		}
		return ""
	},
	eval: func(c *cell) {
		const own = 3 // the current in → out
		i := c.v[own]
		c.f[0], c.f[1] = i, -i
		c.j[0][own], c.j[1][own] = 1, -1
		if c.on {
			c.f[own] = c.across(0, 1) - c.p[cutOffOhm]*i
			c.j[own][0], c.j[own][1], c.j[own][own] = 1, -1, -c.p[cutOffOhm]
		} else {
			c.f[own] = -i
			c.j[own][own] = -1
		}
		drain(c, 0, 2, c.p[cutOffOwn], ownVolt)
	},
	direct: func(p []float64, on bool) bool { return on && p[cutOffOhm] == 0 },
	next: func(c *cell) bool {
		v := c.across(0, 2)
		if c.on {
			return v >= c.p[cutOffOpens]
		}
		return v >= c.p[cutOffRecloses]
	},
}
