package catalogue

import (
	"math"

	"gloamwright/internal/quantity"
)

// EndPoint is one line of the table of end voltages: the part of the table capacity
// that is left when a discharge of about Time stops at a cell voltage of End.
type EndPoint struct {
	Time  quantity.Second
	Parts []EndPart // by rising voltage
}

// EndPart is one entry of an EndPoint.
type EndPart struct {
	End  quantity.Volt
	Part quantity.Ratio
}

// Fraction returns the part of the rated capacity that a full cell gives when it is
// discharged evenly in time t to the end voltage of the table: linear in the
// logarithm of time between the listed points (common practice). Beyond the longest
// time it gives no credit; below the shortest the cell is held to the current of the
// shortest, so that nothing is read off the table's end. listed is false there.
func (c *BatteryClass) Fraction(t quantity.Second) (fraction quantity.Ratio, listed bool) {
	return FractionAt(c.Rates, t)
}

// FractionAt is Fraction for a table of one's own.
func FractionAt(rates []RatePoint, t quantity.Second) (fraction quantity.Ratio, listed bool) {
	first, last := rates[0], rates[len(rates)-1]
	switch {
	case t < first.Time:
		return first.Fraction * quantity.Ratio(t/first.Time), false
	case t > last.Time:
		return last.Fraction, false
	}
	for i := 1; i < len(rates); i++ {
		if t <= rates[i].Time {
			a, b := rates[i-1], rates[i]
			f := math.Log(float64(t/a.Time)) / math.Log(float64(b.Time/a.Time))
			return a.Fraction + quantity.Ratio(f)*(b.Fraction-a.Fraction), true
		}
	}
	return last.Fraction, true
}

// EndPart returns the part of the table capacity that is left when a discharge of
// time t stops at a cell voltage of end: linear in voltage and in the logarithm of
// time, never above 1. A class without such a table gives 1 up to its default end
// voltage and reports false above it.
func (c *BatteryClass) EndPart(t quantity.Second, end quantity.Volt) (part quantity.Ratio, known bool) {
	if len(c.Ends) == 0 {
		return 1, end <= c.EndVolt
	}
	e := c.Ends
	if t <= e[0].Time {
		return e[0].at(end)
	}
	for i := 1; i < len(e); i++ {
		if t <= e[i].Time {
			a, ka := e[i-1].at(end)
			b, kb := e[i].at(end)
			f := math.Log(float64(t/e[i-1].Time)) / math.Log(float64(e[i].Time/e[i-1].Time))
			return a + quantity.Ratio(f)*(b-a), ka && kb
		}
	}
	return e[len(e)-1].at(end)
}

func (p EndPoint) at(end quantity.Volt) (quantity.Ratio, bool) {
	q := p.Parts
	if end <= q[0].End {
		return min(1, q[0].Part), true
	}
	for i := 1; i < len(q); i++ {
		if end <= q[i].End {
			f := float64(end-q[i-1].End) / float64(q[i].End-q[i-1].End)
			return min(1, q[i-1].Part+quantity.Ratio(f)*(q[i].Part-q[i-1].Part)), true
		}
	}
	return 0, false
}

// SizeFactor returns the factor by which a required size is multiplied when the
// coldest electrolyte is at t: linear between the lines of the table. Warmer than
// the table it gives the last line; colder it reports false, for then no figure is
// held.
func (c *BatteryClass) SizeFactor(t quantity.Celsius) (factor quantity.Ratio, listed bool) {
	p := c.Size
	if t < p[0].At {
		return p[0].Factor, false
	}
	for i := 1; i < len(p); i++ {
		if t <= p[i].At {
			f := float64(t-p[i-1].At) / float64(p[i].At-p[i-1].At)
			return p[i-1].Factor + quantity.Ratio(f)*(p[i].Factor-p[i-1].Factor), true
		}
	}
	return p[len(p)-1].Factor, true
}
