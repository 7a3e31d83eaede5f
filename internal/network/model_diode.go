package network

// Parameter positions of every junction; the first three are Shockley's.
const (
	diodeIs = iota
	diodeN
	diodeRs
	diodeVt
	diodeSeries
	diodeVolt
	diodeAmpere
)

// junctionParams are the parameters of a junction with the given class values.
func junctionParams(is, n, rs float64) []ParamSpec {
	return []ParamSpec{
		positive(param("is", "A", is, "saturation current")),
		positive(param("n", "", n, "emission coefficient")),
		param("rs", "Ω", rs, "series resistance of each"),
		positive(param("vt", "V", VT25, "thermal voltage kT/q; as it stands for 25 °C")),
		limits(param("series", "", 1, "number of like junctions in series"), 1, 1000),
		positive(param("forward_volt", "V", 0, "forward voltage of each at ampere, instead of is")),
		positive(param("ampere", "A", 0, "current at which forward_volt holds")),
	}
}

// fitted takes the saturation current from forward voltage and current where those
// were given instead.
func fitted(p []float64, given []bool) {
	if given[diodeVolt] && given[diodeAmpere] && !given[diodeIs] {
		p[diodeIs] = saturation(p[diodeVolt], p[diodeAmpere], p[diodeN]*p[diodeVt], p[diodeRs])
	}
}

func junctionCheck(p []float64) string {
	if p[diodeVolt] > 0 && p[diodeVolt] <= p[diodeAmpere]*p[diodeRs] {
		return "rs alone drops more than forward_volt at ampere"
	}
	return ""
}

func junctionOf(p []float64) junction {
	s := p[diodeSeries]
	return junction{is: p[diodeIs], vn: s * p[diodeN] * p[diodeVt], rs: s * p[diodeRs]}
}

func evalDiode(c *cell) {
	i, g := junctionOf(c.p).current(c.across(0, 1))
	c.flow(0, 1, i, g)
}

func limitDiode(c *cell, old []float64) bool {
	v, cut := junctionOf(c.p).limited(c.across(0, 1), old[0]-old[1])
	c.v[0] = c.v[1] + v
	return cut
}

func diodeLike(name, doc, source string, params []ParamSpec) *Model {
	return &Model{
		Name: name, Doc: doc, Pins: pins("A", "K"), Params: params,
		Law:    "i(A→K) = is·(exp((v/series − i·rs)/(n·vt)) − 1), v = v(A) − v(K)",
		Source: "W. Shockley's diode law; class values: " + source,
		eval:   evalDiode, limit: limitDiode, check: junctionCheck, derive: fitted, joined: [][2]int{{0, 1}},
	}
}

var (
	diodeModel = diodeLike("diode", "Silicon rectifier diode; class values of the 1N4001 family.",
		"1N4004 fit, Lessons in Electric Circuits vol. III ch. 3 (seen)", junctionParams(1.88e-8, 2, 0.0286))
	schottkyModel = diodeLike("schottky", "Schottky diode; class values of the 1N5817.",
		"fit to 0.18 V at 20 mA and 0.38 V at 1 A, typical of the registration 1N5817 (from memory)", junctionParams(3e-5, 1.05, 0.1))
	ledModel = diodeLike("led", "Light-emitting diode, or several in series.",
		"2 V at 20 mA (from memory, typical red)", ledParams())
)

func ledParams() []ParamSpec {
	p := junctionParams(saturation(2, 20e-3, 2*VT25, 0), 2, 0)
	return p
}

// bridgeModel is a bridge of four diodes.
var bridgeModel = &Model{
	Name: "bridge", Doc: "Rectifier bridge of four silicon diodes.", Pins: pins("~1", "~2", "+", "-"),
	Params: junctionParams(1.88e-8, 2, 0.0286),
	Law:    "four diodes as in model diode: ~1→+, ~2→+, −→~1, −→~2",
	Source: "as model diode",
	derive: fitted, check: junctionCheck,
	joined: [][2]int{{0, 2}, {1, 2}, {3, 0}, {3, 1}},
	eval: func(c *cell) {
		d := junctionOf(c.p)
		for _, k := range [4][2]int{{0, 2}, {1, 2}, {3, 0}, {3, 1}} {
			i, g := d.current(c.across(k[0], k[1]))
			c.flow(k[0], k[1], i, g)
		}
	},
}
