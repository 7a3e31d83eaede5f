package network

import "math"

// fade rises smoothly from 0 at v ≤ 0 to 1 at v ≥ full (3t² − 2t³).
func fade(v, full float64) (y, slope float64) {
	t := v / full
	switch {
	case t <= 0:
		return 0, 0
	case t >= 1:
		return 1, 0
	}
	return t * t * (3 - 2*t), 6 * t * (1 - t) / full
}

// drain adds a constant current from pin a to pin b that fades out below full volts.
func drain(c *cell, a, b int, ampere, full float64) {
	y, s := fade(c.across(a, b), full)
	c.flow(a, b, ampere*y, ampere*s)
}

// Parameter positions of the constant-power load.
const (
	powerWatt = iota
	powerLow
	powerHigh
	powerCut
	powerLeak
)

// Shape of a constant-power load outside its working range (assumed, no source).
const (
	cutFraction = 0.8  // of low_volt: where it stops
	stopSpan    = 0.05 // of high_volt: over which it stops
	kneeSpan    = 0.01 // of low_volt: half of the rounding of a corner
	driverLeak  = 1e6  // input resistance while stopped, Ω
)

// powerCurrent returns the current of a constant-power load at v and its slope.
func powerCurrent(p []float64, watt, v float64) curve {
	low, high := p[powerLow], p[powerHigh]
	cut := p[powerCut] * low
	k := kneeSpan * low
	top := watt / low // current at the lower end of the range
	hyper := func(v float64) curve { return curve{watt / v, -watt / (v * v)} }
	ramp := func(v float64) curve { return curve{top * (v - cut) / (low - cut), top / (low - cut)} }
	stop := high * (1 + stopSpan)
	switch {
	case v <= cut-k:
		return curve{}
	case v < cut+k:
		return joint(v, cut-k, cut+k, curve{}, ramp(cut+k))
	case v <= low-2*k:
		return ramp(v)
	case v < low:
		return joint(v, low-2*k, low, ramp(low-2*k), hyper(low))
	case v <= high:
		return hyper(v)
	case v < stop:
		return joint(v, high, stop, hyper(high), curve{})
	}
	return curve{}
}

// powerModel is an electronic load that takes the same power over its working range.
var powerModel = &Model{
	Name: "constant-power", Doc: "LED driver or inverter ballast: takes the same power over its working range.", Pins: pins("+", "-"),
	Params: []ParamSpec{
		needed(param("watt", "W", 0, "power taken in the working range")),
		needed(positive(param("low_volt", "V", 0, "lower end of the working range"))),
		needed(positive(param("high_volt", "V", 0, "upper end of the working range"))),
		limits(param("cut_fraction", "", cutFraction, "part of low_volt at which the current has fallen to zero"), 0.1, 0.97),
		limits(param("leak_ohm", "Ω", driverLeak, "input resistance beside the driver"), 1, maxOhm),
	},
	Law: "low_volt ≤ v ≤ high_volt: i = watt/v; below, i = (watt/low_volt)·(v − cut)/(low_volt − cut), cut = cut_fraction·low_volt, zero below cut; " +
		"joint between 0.98·low_volt and low_volt, between cut ∓ 0.01·low_volt, and from high_volt down to zero at 1.05·high_volt; beside it v/leak_ohm",
	Source: "constant power: definition; what it does outside its range is assumed",
	joined: [][2]int{{0, 1}},
	works:  func(p []float64) float64 { return p[powerLow] },
	check: func(p []float64) string {
		if p[powerHigh] <= p[powerLow]*(1+2*kneeSpan) {
			return "high_volt must be above low_volt"
		}
		return ""
	},
	eval: func(c *cell) {
		g := 1 / c.p[powerLeak]
		v := c.across(0, 1)
		i := powerCurrent(c.p, c.p[powerWatt]*c.at.loadFactor(), v)
		c.flow(0, 1, i.y+v*g, i.slope+g)
	},
	limit: func(c *cell, old []float64) bool {
		from, to := old[0]-old[1], c.across(0, 1)
		if to >= from { // a load starts only when its voltage is up
			return false
		}
		v, cut := betweenKnees(from, to, c.p[powerCut]*c.p[powerLow], c.p[powerLow])
		c.v[0] = c.v[1] + v
		return cut
	},
}

// currentModel is a load of constant current.
var currentModel = &Model{
	Name: "constant-current", Doc: "Load that takes the same current above a least voltage.", Pins: pins("+", "-"),
	Params: []ParamSpec{
		needed(param("ampere", "A", 0, "current")),
		positive(param("min_volt", "V", 1, "voltage from which it takes its full current")),
	},
	Law:    "i = ampere·fade(v, min_volt)",
	Source: "definition",
	joined: [][2]int{{0, 1}},
	eval:   func(c *cell) { drain(c, 0, 1, c.p[0], c.p[1]) },
}

// Parameter positions of the LED string.
const (
	stringForward = iota
	stringSeries
	stringStrings
	stringOhm
	stringAmpere
	stringN
)

// ledStringModel is a luminaire of LED strings with series resistors.
var ledStringModel = &Model{
	Name: "led-string", Doc: "Luminaire of LED strings, each with its series resistor.", Pins: pins("+", "-"),
	Params: []ParamSpec{
		needed(positive(param("forward_volt", "V", 0, "forward voltage of one LED at ampere"))),
		needed(limits(param("series", "", 1, "LEDs in a string"), 1, 1000)),
		limits(param("strings", "", 1, "strings in parallel"), 1, 10000),
		needed(ohms("series resistor of each string", 0)),
		needed(positive(param("ampere", "A", 0, "rated current of a string"))),
		positive(param("n", "", 2, "emission coefficient of one LED")),
	},
	Law:    "i = strings·i1, i1 = is·(exp((v − i1·ohm)/(series·n·vt)) − 1), is from forward_volt at ampere, vt for 25 °C",
	Source: "W. Shockley's diode law; emission coefficient 2 from memory",
	joined: [][2]int{{0, 1}},
	eval: func(c *cell) {
		i, g := stringJunction(c.p).current(c.across(0, 1))
		c.flow(0, 1, i*c.p[stringStrings], g*c.p[stringStrings])
	},
	limit: func(c *cell, old []float64) bool {
		v, cut := stringJunction(c.p).limited(c.across(0, 1), old[0]-old[1])
		c.v[0] = c.v[1] + v
		return cut
	},
}

func stringJunction(p []float64) junction {
	vn := p[stringN] * VT25
	return junction{is: saturation(p[stringForward], p[stringAmpere], vn, 0), vn: vn * p[stringSeries], rs: p[stringOhm]}
}

// Filament law: current goes with the 0.55th power of voltage near rated voltage
// (lamp rerating, Standard Handbook for Electrical Engineers, 11th ed.; seen), and a
// cold filament has 1/13.7 of its hot resistance (College Physics 2e; seen).
const (
	filamentExponent = 0.55
	hotToCold        = 13.7
)

// filamentModel is an incandescent lamp, at its temperature of balance.
var filamentModel = &Model{
	Name: "filament", Doc: "Incandescent lamp, warm for the voltage it has.", Pins: pins("+", "-"),
	Params: []ParamSpec{
		needed(positive(param("rated_volt", "V", 0, "rated voltage"))),
		needed(positive(param("rated_watt", "W", 0, "rated power"))),
		limits(param("exponent", "", filamentExponent, "exponent of current over voltage"), 0.3, 0.999),
	},
	Law:    "i = (rated_watt/rated_volt)·u·(u² + u0²)^((exponent − 1)/2), u = v/rated_volt; u0 from the cold resistance, 1/13.7 of the hot",
	Source: "lamp rerating exponent 0.55, Standard Handbook for Electrical Engineers; hot to cold resistance 13.7, College Physics 2e",
	joined: [][2]int{{0, 1}},
	eval: func(c *cell) {
		u := c.across(0, 1) / c.p[0]
		e := (c.p[2] - 1) / 2
		u0 := math.Pow(hotToCold, -1/(1-c.p[2]))
		s := u*u + u0*u0
		k := c.p[1] / c.p[0]
		q := math.Pow(s, e)
		c.flow(0, 1, k*u*q, k/c.p[0]*(q+2*e*u*u*q/s))
	},
}
