package network

// Laws with corners are rounded so that their slope is continuous: Newton's
// method then settles on a corner instead of hopping from side to side.

// rounded returns max(u, 0) and its slope, rounded by a parabola for |u| < w.
// Outside that stretch it is exact; at u = 0 it is w/4.
func rounded(u, w float64) (y, slope float64) {
	switch {
	case u <= -w:
		return 0, 0
	case u >= w:
		return u, 1
	}
	return (u + w) * (u + w) / (4 * w), (u + w) / (2 * w)
}

// clamped returns u kept between low and high and its slope, both corners rounded
// over ±w. It needs high − low > 2w.
func clamped(u, low, high, w float64) (y, slope float64) {
	a, da := rounded(u-low, w)
	b, db := rounded(u-high, w)
	return low + a - b, da - db
}

// lesser returns the smaller of a and b, rounded over ±w of their difference, and
// its slopes to both.
func lesser(a, b, w float64) (y, da, db float64) {
	r, s := rounded(a-b, w)
	return a - r, 1 - s, s
}

// curve is a value and its slope at some place.
type curve struct{ y, slope float64 }

// joint returns the cubic that leaves a at x0 and meets b at x1 with the same
// values and slopes (Hermite interpolation), at x.
func joint(x, x0, x1 float64, a, b curve) curve {
	h := x1 - x0
	t := (x - x0) / h
	t2, t3 := t*t, t*t*t
	return curve{
		y: (2*t3-3*t2+1)*a.y + (t3-2*t2+t)*h*a.slope + (3*t2-2*t3)*b.y + (t3-t2)*h*b.slope,
		slope: ((6*t2-6*t)*a.y+(6*t-6*t2)*b.y)/h +
			(3*t2-4*t+1)*a.slope + (3*t2-2*t)*b.slope,
	}
}

// betweenKnees keeps a Newton step from jumping across a whole stretch of a law
// with corners at knees (ascending): it then stops in the middle of the stretch
// next to the one it left. It reports whether it did.
func betweenKnees(from, to float64, knees ...float64) (float64, bool) {
	stretch := func(v float64) int {
		k := 0
		for k < len(knees) && v > knees[k] {
			k++
		}
		return k
	}
	a, b := stretch(from), stretch(to)
	switch {
	case b > a+1:
		return (knees[a] + knees[a+1]) / 2, true
	case b < a-1:
		return (knees[a-1] + knees[a-2]) / 2, true
	}
	return to, false
}
