package network

// Parameter positions of the comparator.
const (
	comparatorVos = iota
	comparatorSat
	comparatorOhm
	comparatorLeak
	comparatorOwn
	comparatorBias
)

// saturationRound rounds the corner at which the output begins to conduct, in amperes.
const saturationRound = 1e-4

// inputHeadroom is the voltage below V+ within which an input's bias current fades
// out (assumed, after the input stage of two junctions).
const inputHeadroom = 1.5

// comparatorModel is a comparator with an open-collector output. Its hysteresis is
// that of the network around it: the output stays until its inputs, as they are with
// the output where it is, call for the other position.
var comparatorModel = &Model{
	Name: "comparator", Doc: "Comparator with an open-collector output.",
	Pins: pins("+", "-", "OUT", "V+", "V-"),
	Params: []ParamSpec{
		{Name: "vos", Unit: "V", Doc: "offset: + must exceed − by this much"},
		param("sat_volt", "V", 0.1, "output voltage of the conducting output without current"),
		positive(param("sat_ohm", "Ω", 40, "rise of the output voltage with current")),
		limits(param("leak_ohm", "Ω", 100e6, "output resistance while it does not conduct"), 1, maxOhm),
		param("own_ampere", "A", 0.8e-3, "supply current, from V+ to V−"),
		param("bias_ampere", "A", 25e-9, "current out of each input"),
	},
	Law: "output conducting when v(+) − v(−) < vos: i(OUT→V−) = round((v(OUT) − v(V−) − sat_volt)/sat_ohm, 0.1 mA); always (v(OUT) − v(V−))/leak_ohm beside it; " +
		"i(V+→V−) = own_ampere·fade(v(V+) − v(V−), 3 V); from V+ out of each input bias_ampere·fade(v(V+) − v(input), 1.5 V)",
	Source: "dual comparator of the open-collector kind, datasheet values from memory: 0.25 V at 4 mA, 25 nA bias, 0.8 mA supply",
	Memory: "conducting/blocking",
	joined: [][2]int{{2, 4}, {3, 4}, {3, 0}, {3, 1}},
	eval: func(c *cell) {
		const plus, minus, out, vp, vm = 0, 1, 2, 3, 4
		g := 1 / c.p[comparatorLeak]
		c.flow(out, vm, c.across(out, vm)*g, g)
		if c.on {
			u := (c.across(out, vm) - c.p[comparatorSat]) / c.p[comparatorOhm]
			i, s := rounded(u, saturationRound)
			c.flow(out, vm, i, s/c.p[comparatorOhm])
		}
		drain(c, vp, vm, c.p[comparatorOwn], ownVolt)
		drain(c, vp, plus, c.p[comparatorBias], inputHeadroom)
		drain(c, vp, minus, c.p[comparatorBias], inputHeadroom)
	},
	next: func(c *cell) bool { return c.across(0, 1) < c.p[comparatorVos] },
}
