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

// Roundings of the regulator's corners, in amperes, and the input voltage above ADJ
// from which its adjustment current is there in full (assumed).
const (
	minimumRound  = 1e-6 // beside half of min_ampere
	headroomRound = 1e-3
	adjustVolt    = 0.5
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
	Law: "i(IN→OUT) = min(a, h, w), a = clamp((vref − v(OUT) + v(ADJ))/ohm, min_ampere, limit_ampere, the smaller of w and min_ampere/2 + 1 µA), " +
		"h = round((v(IN) − v(OUT) − dropout)/dropout_ohm, the smaller of w and 1 mA), w = limit_ampere/100; i(IN→ADJ) = iadj·fade(v(IN) − v(ADJ), 0.5 V)",
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
		a, da := clamped((p[regulatorVref]-c.across(out, adj))/p[regulatorOhm], p[regulatorMinimum], p[regulatorLimit], min(w, p[regulatorMinimum]/2+minimumRound))
		h, dh := rounded((c.across(in, out)-p[regulatorDropout])/p[regulatorDropoutOhm], min(w, headroomRound))
		i, di, dj := lesser(a, h, w)
		da *= di / p[regulatorOhm]
		dh *= dj / p[regulatorDropoutOhm]
		c.f[in] += i
		c.f[out] -= i
		c.flowBy(in, out, out, -da-dh)
		c.flowBy(in, out, adj, da)
		c.flowBy(in, out, in, dh)
		drain(c, in, adj, p[regulatorAdj], adjustVolt)
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
