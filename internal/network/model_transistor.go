package network

// Parameter positions of a transistor.
const (
	bjtIs = iota
	bjtBf
	bjtBr
	bjtVt
)

// transistorLike is the transport form of the Ebers-Moll law; sign is +1 for NPN.
func transistorLike(name, doc, law string, sign float64) *Model {
	junctions := func(p []float64) junction { return junction{is: p[bjtIs], vn: p[bjtVt]} }
	return &Model{
		Name: name, Doc: doc, Pins: pins("B", "C", "E"),
		Params: []ParamSpec{
			positive(param("is", "A", 1e-14, "saturation current")),
			positive(param("bf", "", 100, "forward current gain")),
			positive(param("br", "", 1, "reverse current gain")),
			positive(param("vt", "V", VT25, "thermal voltage kT/q; as it stands for 25 °C")),
		},
		Law:    law,
		Source: "J. J. Ebers, J. L. Moll, \"Large-signal behavior of junction transistors\", Proc. IRE 42, 1954, transport form; class values from memory, gain of a small transistor 100 to 300 (Lessons in Electric Circuits vol. III ch. 4, seen)",
		joined: [][2]int{{0, 1}, {0, 2}, {1, 2}},
		eval: func(c *cell) {
			const b, col, e = 0, 1, 2
			d := junctions(c.p)
			f, gf := d.current(sign * c.across(b, e))
			r, gr := d.current(sign * c.across(b, col))
			bf, br := c.p[bjtBf], c.p[bjtBr]
			// Base currents of the two junctions.
			c.flow(b, e, sign*f/bf, gf/bf)
			c.flow(b, col, sign*r/br, gr/br)
			// Transport current from collector to emitter.
			c.f[col] += sign * (f - r)
			c.f[e] -= sign * (f - r)
			c.flowBy(col, e, b, gf-gr)
			c.flowBy(col, e, e, -gf)
			c.flowBy(col, e, col, gr)
		},
		limit: func(c *cell, old []float64) bool {
			const b, col, e = 0, 1, 2
			d := junctions(c.p)
			be, cut := d.limited(sign*c.across(b, e), sign*(old[b]-old[e]))
			bc, cut2 := d.limited(sign*c.across(b, col), sign*(old[b]-old[col]))
			if cut || cut2 {
				c.v[e] = c.v[b] - sign*be
				c.v[col] = c.v[b] - sign*bc
			}
			return cut || cut2
		},
	}
}

var (
	npnModel = transistorLike("npn", "NPN transistor.",
		"iC = is·(exp(vBE/vt) − exp(vBC/vt)) − (is/br)·(exp(vBC/vt) − 1), iB = (is/bf)·(exp(vBE/vt) − 1) + (is/br)·(exp(vBC/vt) − 1)", 1)
	pnpModel = transistorLike("pnp", "PNP transistor.", "as model npn with all voltages and currents reversed", -1)
)
