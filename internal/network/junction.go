package network

import "math"

// VT25 is the thermal voltage kT/q at 25 °C in volts
// (k/q = 8.617333262e-5 V/K, CODATA 2018; T = 298.15 K).
const VT25 = 8.617333262e-5 * 298.15

// maxExponent bounds the argument of the exponential; beyond it the law goes on
// along its tangent. A converged junction never gets there.
const maxExponent = 80

// expm1Slope returns e^u − 1 and its slope e^u, along the tangent beyond maxExponent.
func expm1Slope(u float64) (y, slope float64) {
	if u > maxExponent {
		e := math.Exp(maxExponent)
		return e*(1+u-maxExponent) - 1, e
	}
	return math.Expm1(u), math.Exp(u)
}

// lambert returns W(e^y), the solution of w + ln w = y, by Newton's method. Written
// with the logarithm of the argument it never overflows.
// See R. M. Corless et al., "On the Lambert W function", Adv. Comput. Math. 5, 1996.
func lambert(y float64) float64 {
	const steps = 20
	var w float64
	switch {
	case y < -36: // w = e^y to the last digit
		return math.Exp(y)
	case y > 2:
		w = y - math.Log(y)
	default:
		w = math.Exp(y) / (1 + math.Exp(y))
	}
	for range steps {
		d := (w + math.Log(w) - y) * w / (1 + w)
		if d > w/2 { // keep w positive
			d = w / 2
		}
		w -= d
		if math.Abs(d) <= 2e-16*w {
			break
		}
	}
	return w
}

// junction is Shockley's law with a series resistance:
// i = is·(exp((v − i·rs)/vn) − 1), vn being emission coefficient times thermal voltage.
type junction struct{ is, vn, rs float64 }

// current returns i(v) and its slope. With a series resistance it is explicit by
// Lambert's function (T. C. Banwell, A. Jayakumar, "Exact analytical solution for
// current flow through diode with series resistance", Electronics Letters 36, 2000).
func (d junction) current(v float64) (i, slope float64) {
	if d.rs == 0 {
		y, s := expm1Slope(v / d.vn)
		return d.is * y, d.is * s / d.vn
	}
	// i + is = (vn/rs)·W((is·rs/vn)·exp((v + is·rs)/vn))
	w := lambert(math.Log(d.is*d.rs/d.vn) + (v+d.is*d.rs)/d.vn)
	sum := w * d.vn / d.rs
	return sum - d.is, sum / (d.vn + d.rs*sum)
}

// limited returns the voltage at which to take the tangent after a step from old to
// v: an exponential without series resistance is entered logarithmically.
// L. W. Nagel, memorandum ERL-M520, University of California, Berkeley 1975,
// appendix 2.
func (d junction) limited(v, old float64) (float64, bool) {
	if d.rs > 0 {
		return v, false
	}
	critical := d.vn * math.Log(d.vn/(math.Sqrt2*d.is))
	if v <= critical || math.Abs(v-old) <= 2*d.vn {
		return v, false
	}
	if old > 0 {
		if a := 1 + (v-old)/d.vn; a > 0 {
			return old + d.vn*math.Log(a), true
		}
		return critical, true
	}
	return d.vn * math.Log(v/d.vn), true
}

// saturation returns the saturation current for which a junction of slope vn
// passes ampere at volt, rs included.
func saturation(volt, ampere, vn, rs float64) float64 {
	return ampere / math.Expm1((volt-ampere*rs)/vn)
}
