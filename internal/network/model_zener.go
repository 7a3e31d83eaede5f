package network

import "math"

// Parameter positions of the Zener diode.
const (
	zenerVolt = iota
	zenerAmpere
	zenerR
	zenerKnee
	zenerLeak
	zenerIs
	zenerN
	zenerRs
)

// Class values (from memory): softness of a breakdown knee, leakage.
const (
	breakdownKnee = 25e-3 // V per e-fold of current
	leakOhm       = 10e6
)

func breakdownParams(volt string) []ParamSpec {
	return []ParamSpec{
		needed(positive(param("vz", "V", 0, volt+" at iz"))),
		positive(param("iz", "A", 5e-3, "test current")),
		param("rz", "Ω", 0, "dynamic resistance at iz"),
		positive(param("knee", "V", breakdownKnee, "rise of voltage for an e-fold rise of current at the knee")),
		limits(param("leak_ohm", "Ω", leakOhm, "leakage, as a resistance"), 1, maxOhm),
	}
}

// breakdown returns the reverse current at reverse voltage v: an exponential knee
// with a series resistance, together rz at iz, vz at iz.
func breakdown(p []float64, v float64) (i, slope float64) {
	knee, rs := p[zenerKnee], p[zenerR]-p[zenerKnee]/p[zenerAmpere]
	if rs < 0 && p[zenerR] > 0 {
		knee, rs = p[zenerR]*p[zenerAmpere], 0
	}
	rs = max(rs, 0)
	inner := p[zenerVolt] - p[zenerAmpere]*rs // junction voltage at iz
	if rs == 0 {
		u := (v - inner) / knee
		y, s := expm1Slope(u)
		return p[zenerAmpere] * (y + 1), p[zenerAmpere] * s / knee
	}
	w := lambert(math.Log(p[zenerAmpere]*rs/knee) + (v-inner)/knee)
	return w * knee / rs, w / (1 + w) / rs
}

// limitBreakdown keeps a step that runs far up the exponential near the knee.
func limitBreakdown(p []float64, v, old float64) (float64, bool) {
	if p[zenerR] > p[zenerKnee]/p[zenerAmpere] {
		return v, false // has a series resistance
	}
	knee := p[zenerKnee]
	if p[zenerR] > 0 {
		knee = p[zenerR] * p[zenerAmpere]
	}
	if v <= p[zenerVolt] || v-old <= 2*knee {
		return v, false
	}
	if old >= p[zenerVolt] {
		return old + knee*math.Log1p((v-old)/knee), true
	}
	return p[zenerVolt] + knee, true
}

// zenerModel is a Zener diode: forward a junction, reverse a breakdown.
var zenerModel = &Model{
	Name: "zener", Doc: "Zener diode.", Pins: pins("A", "K"),
	Params: append(breakdownParams("Zener voltage"),
		positive(param("is", "A", 1e-12, "forward saturation current")),
		positive(param("n", "", 1.1, "forward emission coefficient")),
		param("rs", "Ω", 0.1, "forward series resistance"),
	),
	Law: "reverse, u = v(K) − v(A): i(K→A) = iz·exp((u − i·rs' − v0)/knee) + u/leak_ohm, rs' = rz − knee/iz, v0 = vz − iz·rs' " +
		"(a knee softer than rz is taken as knee = rz·iz, rs' = 0); forward: Shockley's law with is, n, rs at 25 °C",
	Source: "exponential breakdown with series resistance; test point as in JEDEC registrations (vz, iz, Zzt)",
	joined: [][2]int{{0, 1}},
	eval: func(c *cell) {
		v := c.across(0, 1)
		i, g := junction{c.p[zenerIs], c.p[zenerN] * VT25, c.p[zenerRs]}.current(v)
		b, h := breakdown(c.p, -v)
		c.flow(0, 1, i-b+v/c.p[zenerLeak], g+h+1/c.p[zenerLeak])
	},
	limit: func(c *cell, old []float64) bool {
		v, cut := limitBreakdown(c.p, c.across(1, 0), old[1]-old[0])
		if !cut {
			v, cut = junction{c.p[zenerIs], c.p[zenerN] * VT25, c.p[zenerRs]}.limited(c.across(0, 1), old[0]-old[1])
			v = -v
		}
		c.v[0] = c.v[1] - v
		return cut
	},
}

// suppressorModel is a transient suppressor, alike both ways.
var suppressorModel = &Model{
	Name: "suppressor", Doc: "Transient suppressor, alike both ways.", Pins: pins("1", "2"),
	Params: breakdownParams("breakdown voltage"),
	Law:    "the reverse law of model zener, both ways",
	Source: "as model zener",
	joined: [][2]int{{0, 1}},
	eval: func(c *cell) {
		v := c.across(0, 1)
		a, g := breakdown(c.p, v)
		b, h := breakdown(c.p, -v)
		c.flow(0, 1, a-b+v/c.p[zenerLeak], g+h+1/c.p[zenerLeak])
	},
	limit: func(c *cell, old []float64) bool {
		v, cut := limitBreakdown(c.p, c.across(0, 1), old[0]-old[1])
		if !cut {
			v, cut = limitBreakdown(c.p, c.across(1, 0), old[1]-old[0])
			v = -v
		}
		c.v[0] = c.v[1] + v
		return cut
	},
}
