package endurance

import (
	"fmt"
	"math"
	"sort"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// rateTable is the table of capacity against time, for 1 Ah of rated capacity. Times
// are in hours.
type rateTable struct {
	logT []float64 // natural logarithm of the time
	frac []float64 // part of the rated capacity
	end  []float64 // end voltage of a cell
	rate []float64 // current: frac ÷ time, falling
	most float64   // greatest part
}

// newRateTable reads a table whose times rise and whose currents fall. A point that
// states no end voltage takes end.
func newRateTable(points []catalogue.RatePoint, end quantity.Volt) (rateTable, error) {
	t := rateTable{}
	for i, p := range points {
		h := p.Time.Hours()
		r := float64(p.Fraction) / h
		if !(h > 0) || !(p.Fraction > 0) || i > 0 && (math.Log(h) <= t.logT[i-1] || r >= t.rate[i-1]) {
			return t, &UnknownError{fmt.Sprintf("the capacity table does not go on from %v: times must rise and currents fall", p.Time)}
		}
		if p.End > 0 {
			t.end = append(t.end, float64(p.End))
		} else {
			t.end = append(t.end, float64(end))
		}
		t.logT = append(t.logT, math.Log(h))
		t.frac = append(t.frac, float64(p.Fraction))
		t.rate = append(t.rate, r)
		t.most = max(t.most, float64(p.Fraction))
	}
	if len(points) < 2 {
		return t, &UnknownError{"a capacity table needs at least two times"}
	}
	return t, nil
}

// newton bounds the search for a time; the function is so nearly straight that four
// rounds reach the last digit.
const newton = 8

// timeAt returns in how many hours a current, for each Ah of capacity, empties a full
// cell. The table's capacity runs straight over the logarithm of time, as in
// catalogue.FractionAt. Beyond the longest time the capacity stays; below the shortest
// the time follows Peukert's law through the two shortest points, and beyond is true.
func (t *rateTable) timeAt(rate float64) (hours float64, beyond bool) {
	last := len(t.rate) - 1
	switch {
	case rate <= t.rate[last]:
		return t.frac[last] / rate, false
	case rate > t.rate[0]*(1+tiny):
		k := (t.logT[1] - t.logT[0]) / math.Log(t.rate[0]/t.rate[1])
		return math.Exp(t.logT[0]) * math.Pow(t.rate[0]/rate, k), true
	}
	// The first point whose current is at most the wanted one closes the segment.
	i := max(1, sort.Search(len(t.rate), func(i int) bool { return t.rate[i] <= rate }))
	a, b := t.logT[i-1], t.logT[i]
	slope := (t.frac[i] - t.frac[i-1]) / (b - a)
	y := a + (b-a)*math.Log(t.rate[i-1]/rate)/math.Log(t.rate[i-1]/t.rate[i])
	for range newton {
		g := t.frac[i-1] + slope*(y-a) - rate*math.Exp(y)
		step := g / (slope - rate*math.Exp(y))
		y -= step
		if math.Abs(step) < tiny {
			break
		}
	}
	return math.Exp(y), false
}

// tiny is the rounding that the search for a time may leave.
const tiny = 1e-12

// endAt returns the end voltage of a cell that is emptied in so many hours, straight
// over the logarithm of time.
func (t *rateTable) endAt(hours float64) float64 {
	y, n := math.Log(hours), len(t.logT)
	switch {
	case y <= t.logT[0]:
		return t.end[0]
	case y >= t.logT[n-1]:
		return t.end[n-1]
	}
	i := max(1, sort.SearchFloat64s(t.logT, y))
	f := (y - t.logT[i-1]) / (t.logT[i] - t.logT[i-1])
	return t.end[i-1] + f*(t.end[i]-t.end[i-1])
}
