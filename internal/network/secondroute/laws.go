package secondroute

import (
	"fmt"
	"math"
	"slices"

	"gonum.org/v1/gonum/num/dual"

	"gloamwright/internal/circuit"
)

// The thermal voltage at 25 °C, in volts: 1.380649e-23 J/K · 298.15 K / 1.602176634e-19 C.
const thermalVolt = 1.380649e-23 * 298.15 / 1.602176634e-19

func number(v float64) dual.Number              { return dual.Number{Real: v} }
func minus(a, b dual.Number) dual.Number        { return dual.Sub(a, b) }
func over(a dual.Number, b float64) dual.Number { return dual.Scale(1/b, a) }
func plus(a dual.Number, b float64) dual.Number { return dual.Add(a, number(b)) }

// round is max(u, 0) with its corner rounded over ±w.
func round(u dual.Number, w float64) dual.Number {
	switch {
	case u.Real <= -w:
		return dual.Number{}
	case u.Real >= w:
		return u
	}
	s := plus(u, w)
	return over(dual.Mul(s, s), 4*w)
}

func clamp(u dual.Number, a, b, w float64) dual.Number {
	return plus(minus(round(plus(u, -a), w), round(plus(u, -b), w)), a)
}

func fade(v dual.Number, full float64) dual.Number {
	t := over(v, full)
	switch {
	case t.Real <= 0:
		return dual.Number{}
	case t.Real >= 1:
		return number(1)
	}
	t2 := dual.Mul(t, t)
	return minus(dual.Scale(3, t2), dual.Scale(2, dual.Mul(t2, t)))
}

// junction solves v = vn·ln(1 + i/is) + i·rs for i by bisection; one Newton step in
// dual numbers then carries the slope.
func junction(v dual.Number, is, vn, rs float64) dual.Number {
	low, high := -is, is
	law := func(i float64) float64 { return vn*math.Log1p(i/is) + i*rs - v.Real }
	for law(high) < 0 {
		high *= 2
	}
	for range 2000 {
		mid := (low + high) / 2
		if mid <= low || mid >= high {
			break
		}
		if law(mid) < 0 {
			low = mid
		} else {
			high = mid
		}
	}
	i := (low + high) / 2
	slope := 1 / (vn/(is+i) + rs)
	return dual.Number{Real: i, Emag: slope * v.Emag}
}

// law returns the current into every pin of an element.
func law(el *circuit.Element, c *Condition, v map[string]dual.Number) (map[string]dual.Number, error) {
	p := map[string]float64{}
	for _, x := range c.Values(el.ID) {
		p[x.Name] = x.Value
	}
	out := map[string]dual.Number{}
	from := func(a, b string, i dual.Number) {
		out[a] = dual.Add(out[a], i)
		out[b] = minus(out[b], i)
	}
	d := func(a, b string) dual.Number { return minus(v[a], v[b]) }
	through := func(a, b string, ohm float64) { from(a, b, over(d(a, b), max(ohm, 1e-6))) }
	if slices.Contains(c.Open, el.ID) {
		return out, nil
	}
	position := c.Positions[el.ID]
	lux := c.Lux
	if l, ok := p["lux"]; ok && l >= 0 {
		lux = l
	}
	bjt := func(sign float64) {
		be := junction(dual.Scale(sign, d("B", "E")), p["is"], p["vt"], 0)
		bc := junction(dual.Scale(sign, d("B", "C")), p["is"], p["vt"], 0)
		from("B", "E", dual.Scale(sign/p["bf"], be))
		from("B", "C", dual.Scale(sign/p["br"], bc))
		from("C", "E", dual.Scale(sign, minus(be, bc)))
	}
	diode := func(a, k string) {
		from(a, k, junction(d(a, k), p["is"], p["series"]*p["n"]*p["vt"], p["series"]*p["rs"]))
	}
	zenerBack := func(a, k string) {
		knee, rs := p["knee"], p["rz"]-p["knee"]/p["iz"]
		if rs < 0 {
			rs = 0
			if p["rz"] > 0 {
				knee = p["rz"] * p["iz"]
			}
		}
		inner := p["vz"] - p["iz"]*rs
		// i = iz·exp((u − i·rs − inner)/knee): a junction without its −1.
		tiny := p["iz"] * math.Exp(-inner/knee)
		u := d(k, a)
		if tiny < 1e-300 {
			// Shift the zero of voltage so that the saturation current can be written.
			shift := inner - 300*knee
			tiny, u = p["iz"]*math.Exp(-300), plus(u, -shift)
		}
		from(k, a, plus(junction(u, tiny, knee, rs), tiny))
	}
	switch el.Model {
	case "resistor", "conductor", "fuse", "ntc", "meter":
		through("1", "2", p["ohm"])
	case "capacitor":
	case "switch":
		if p["closed"] >= 0.5 {
			through("1", "2", p["ohm"])
		}
	case "contact":
		if c.Positions[el.Control] != (p["rest_closed"] >= 0.5) {
			through("1", "2", p["ohm"])
		}
	case "ldr":
		r := p["rdark"]
		if lux > 0 {
			r = min(max(p["r10"]*math.Pow(lux/10, -p["gamma"]), p["rmin"]), p["rdark"])
		}
		through("1", "2", r)
	case "source":
		from("+", "-", over(plus(d("+", "-"), -p["volt"]), max(p["ohm"], 1e-6)))
	case "battery":
		from("+", "-", battery(plus(d("+", "-"), -p["emf"]), max(p["ohm"], 1e-6), p["charge_ohm"]))
	case "charger":
		for _, probe := range []string{"θ+", "θ-"} {
			if _, there := v[probe]; there {
				through(probe, "-", 1e6)
			}
		}
		set := map[string]float64{"float": p["float_volt"], "boost": p["boost_volt"]}[c.Charge]
		if c.Mains <= 0 || set == 0 {
			from("+", "-", dual.Scale(p["standby_ampere"], fade(d("+", "-"), 1)))
			break
		}
		set *= min(1, c.Mains/p["mains_holds"])
		l := p["limit_ampere"]
		from("-", "+", clamp(over(minus(number(set), d("+", "-")), p["ohm"]), 0, l, l/100))
	case "supply":
		through("+", "-", p["leak_ohm"])
		if c.Mains > 0 {
			set, l := p["volt"]*min(1, c.Mains/p["mains_holds"]), p["limit_ampere"]
			from("-", "+", clamp(over(minus(number(set), d("+", "-")), p["ohm"]), 0, l, l/100))
		}
	case "transformer-supply":
		through("+", "-", p["leak_ohm"])
		if c.Mains > 0 {
			r := (p["open_volt"] - p["rated_volt"]) / p["rated_ampere"]
			from("-", "+", round(over(minus(number(c.Mains*p["open_volt"]), d("+", "-")), r), p["rated_ampere"]/100))
		}
	case "regulator":
		w := p["limit_ampere"] / 100
		a := clamp(over(minus(number(p["vref"]), d("OUT", "ADJ")), p["ohm"]), p["min_ampere"], p["limit_ampere"], min(w, p["min_ampere"]/2+1e-6))
		h := round(over(plus(d("IN", "OUT"), -p["dropout"]), p["dropout_ohm"]), min(w, 1e-3))
		from("IN", "OUT", minus(a, round(minus(a, h), w)))
		from("IN", "ADJ", dual.Scale(p["iadj"], fade(d("IN", "ADJ"), 0.5)))
	case "diode", "schottky", "led":
		diode("A", "K")
	case "bridge":
		diode("~1", "+")
		diode("~2", "+")
		diode("-", "~1")
		diode("-", "~2")
	case "zener":
		from("A", "K", junction(d("A", "K"), p["is"], p["n"]*thermalVolt, p["rs"]))
		through("A", "K", p["leak_ohm"])
		zenerBack("A", "K")
	case "suppressor":
		through("1", "2", p["leak_ohm"])
		zenerBack("1", "2")
		zenerBack("2", "1")
	case "npn":
		bjt(1)
	case "pnp":
		bjt(-1)
	case "coil":
		through("A1", "A2", p["ohm"]*(1+0.00393*(p["celsius"]-20)))
	case "cut-off":
		if position {
			through("in", "out", p["ohm"])
		}
		from("in", "-", dual.Scale(p["own_ampere"], fade(d("in", "-"), 3)))
	case "photoswitch":
		if position {
			through("13", "14", p["ohm"])
		}
		from("+", "-", dual.Scale(p["own_ampere"], fade(d("+", "-"), 3)))
	case "comparator":
		through("OUT", "V-", p["leak_ohm"])
		if position {
			from("OUT", "V-", round(over(plus(d("OUT", "V-"), -p["sat_volt"]), p["sat_ohm"]), 1e-4))
		}
		from("V+", "V-", dual.Scale(p["own_ampere"], fade(d("V+", "V-"), 3)))
		for _, in := range []string{"+", "-"} {
			from("V+", in, dual.Scale(p["bias_ampere"], fade(d("V+", in), 1.5)))
		}
	case "constant-power":
		through("+", "-", p["leak_ohm"])
		factor := c.LoadFactor
		if factor == 0 {
			factor = 1
		}
		from("+", "-", power(p, factor*p["watt"], d("+", "-")))
	case "constant-current":
		from("+", "-", dual.Scale(p["ampere"], fade(d("+", "-"), p["min_volt"])))
	case "led-string":
		vn := p["n"] * thermalVolt
		is := p["ampere"] / math.Expm1(p["forward_volt"]/vn)
		from("+", "-", dual.Scale(p["strings"], junction(d("+", "-"), is, vn*p["series"], p["ohm"])))
	case "filament":
		u := over(d("+", "-"), p["rated_volt"])
		u0 := math.Pow(13.7, -1/(1-p["exponent"]))
		s := dual.PowReal(plus(dual.Mul(u, u), u0*u0), (p["exponent"]-1)/2)
		from("+", "-", dual.Scale(p["rated_watt"]/p["rated_volt"], dual.Mul(u, s)))
	default:
		return nil, fmt.Errorf("secondroute: model %q of %s is not written", el.Model, el.ID)
	}
	return out, nil
}

// battery is the current into a battery that stands u above its electromotive force.
func battery(u dual.Number, ohm, charge float64) dual.Number {
	const corner = 1e-3
	if charge == 0 {
		return over(u, ohm)
	}
	// Below −corner the one resistance holds, above corner both; between, the square.
	k := (charge - ohm) / (4 * corner)
	switch {
	case u.Real <= -corner*ohm:
		return over(u, ohm)
	case u.Real >= corner*charge:
		return over(u, charge)
	}
	// k·i² + (ohm + 2·k·corner)·i + k·corner² − u = 0
	b := ohm + 2*k*corner
	root := dual.Sqrt(plus(dual.Scale(4*k, u), b*b-4*k*k*corner*corner))
	return over(plus(root, -b), 2*k)
}

// power is the current of a constant-power load.
func power(p map[string]float64, watt float64, v dual.Number) dual.Number {
	low, high := p["low_volt"], p["high_volt"]
	cut := p["cut_fraction"] * low
	hyper := func(v dual.Number) dual.Number { return dual.Scale(watt, dual.Inv(v)) }
	ramp := func(v dual.Number) dual.Number { return dual.Scale(watt/low/(low-cut), plus(v, -cut)) }
	zero := func(dual.Number) dual.Number { return dual.Number{} }
	cubic := func(x0, x1 float64, a, b func(dual.Number) dual.Number) dual.Number {
		// Newton's divided differences through both ends with their slopes.
		f0, f1 := a(dual.Number{Real: x0, Emag: 1}), b(dual.Number{Real: x1, Emag: 1})
		h := x1 - x0
		d1 := (f1.Real - f0.Real) / h
		c2, c3 := (d1-f0.Emag)/h, (f0.Emag+f1.Emag-2*d1)/(h*h)
		t := plus(v, -x0)
		t2 := dual.Mul(t, t)
		y := plus(dual.Scale(f0.Emag, t), f0.Real)
		y = dual.Add(y, dual.Scale(c2, t2))
		return dual.Add(y, dual.Scale(c3, dual.Mul(t2, plus(v, -x1))))
	}
	switch x := v.Real; {
	case x <= cut-0.01*low:
		return dual.Number{}
	case x < cut+0.01*low:
		return cubic(cut-0.01*low, cut+0.01*low, zero, ramp)
	case x <= 0.98*low:
		return ramp(v)
	case x < low:
		return cubic(0.98*low, low, ramp, hyper)
	case x <= high:
		return hyper(v)
	case x < 1.05*high:
		return cubic(high, 1.05*high, hyper, zero)
	}
	return dual.Number{}
}
