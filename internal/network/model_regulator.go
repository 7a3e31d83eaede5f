package network

// Parameter positions of the adjustable regulator.
const (
	regulatorVref = iota
	regulatorAdj
	regulatorDropout
	regulatorDropoutOhm
	regulatorLimit
	regulatorMinimum
	regulatorOhm
)

// regulatorModel is the adjustable three-terminal regulator with a 1.25 V reference.
var regulatorModel = &Model{
	Name: "regulator", Doc: "Adjustable three-terminal positive regulator.", Pins: pins("IN", "OUT", "ADJ"),
	Params: []ParamSpec{
		positive(param("vref", "V", 1.25, "reference voltage, OUT against ADJ")),
		param("iadj", "A", 50e-6, "current out of ADJ"),
		param("dropout", "V", 1.5, "IN to OUT at which it stops conducting"),
		positive(param("dropout_ohm", "Ω", 0.5, "rise of the dropout with current")),
		positive(param("limit_ampere", "A", 2.2, "current limit")),
		param("min_ampere", "A", 3.5e-3, "least current out of OUT while there is headroom"),
		limits(param("ohm", "Ω", 1e-3, "output resistance of the reference loop"), 1e-5, 1e3),
	},
	Law: "i(IN→OUT) = min(clamp((vref − v(OUT) + v(ADJ))/ohm, min_ampere, limit_ampere), max((v(IN) − v(OUT) − dropout)/dropout_ohm, 0)); " +
		"i(IN→ADJ) = iadj, fading out with the headroom; corners rounded over 1 % of the limit",
	Source: "three-terminal regulator datasheet values (seen): vref 1.2 to 1.3 V, iadj 50 µA typical, minimum load 3.5 mA typical, peak 2.2 A; dropout 1.7 V at 0.5 A, 2.0 to 2.3 V at 1.5 A (from memory)",
	joined: [][2]int{{0, 1}, {0, 2}},
	check: func(p []float64) string {
		if p[regulatorMinimum] >= p[regulatorLimit]*(1-2*cornerPortion) {
			return "min_ampere must be below limit_ampere"
		}
		return ""
	},
	eval: func(c *cell) {
		const in, out, adj = 0, 1, 2
		p := c.p
		w := cornerPortion * p[regulatorLimit]
		a, da := clamped((p[regulatorVref]-c.across(out, adj))/p[regulatorOhm], p[regulatorMinimum], p[regulatorLimit], min(w, p[regulatorMinimum]/2+1e-6))
		h, dh := rounded((c.across(in, out)-p[regulatorDropout])/p[regulatorDropoutOhm], min(w, 1e-3))
		i, di, dj := lesser(a, h, w)
		da *= di / p[regulatorOhm]
		dh *= dj / p[regulatorDropoutOhm]
		c.f[in] += i
		c.f[out] -= i
		c.flowBy(in, out, out, -da-dh)
		c.flowBy(in, out, adj, da)
		c.flowBy(in, out, in, dh)
		// The adjustment current fades out over the first half volt of input.
		s, ds := fade(c.across(in, adj), 0.5)
		c.f[in] += p[regulatorAdj] * s
		c.f[adj] -= p[regulatorAdj] * s
		c.flowBy(in, adj, in, p[regulatorAdj]*ds)
		c.flowBy(in, adj, adj, -p[regulatorAdj]*ds)
	},
	limit: func(c *cell, old []float64) bool {
		const in, out, adj = 0, 1, 2
		p := c.p
		set := p[regulatorVref]
		v, cut := betweenKnees(old[out]-old[adj], c.across(out, adj), set-p[regulatorLimit]*p[regulatorOhm], set)
		if cut {
			c.v[out] = c.v[adj] + v
		}
		return cut
	},
}
