package sizing

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// OpeningInput states a fuse and the current through it.
type OpeningInput struct {
	Class   *catalogue.FuseClass
	Rating  quantity.Ampere
	Current quantity.Ampere
}

// Opening is the band in which a fuse opens. Latest is catalogue.Never if the
// standard does not promise that it opens at all; Earliest is 0 above the last gate,
// where no standard says how fast a fuse may be.
type Opening struct {
	Earliest, Latest quantity.Second
	// Beyond: the current is above the last gate, so that Latest is the last gate's
	// time, which a higher current can only shorten.
	Beyond bool
}

// OpeningTime returns when a fuse opens at a current, from the gates of its standard
// (ISO 8820-3, IEC 60127-2, IEC 60269-1). Between two gates the limits run straight
// on logarithmic axes, as such curves are drawn; outside the gates nothing is
// continued: below the first upper gate a fuse need not open, above the last one it
// opens within that gate's time. A class without published gates gives an
// *UnknownError.
func OpeningTime(in OpeningInput) (Opening, Working, error) {
	gates, evi := in.Class.Gates(in.Rating)
	if !gates.Known() {
		return Opening{Latest: catalogue.Never}, Working{}, noGates(in.Class)
	}
	x := float64(in.Current / in.Rating)
	o := Opening{Earliest: earliest(gates, x), Latest: latest(gates, x)}
	o.Beyond = x > gates.Slowest[len(gates.Slowest)-1].Multiple
	w := Working{
		Name: "opening time at most", Formula: "t from the gates at I ÷ I_n",
		Substituted: fmt.Sprintf("%s ÷ %s = %s → %s", num(float64(in.Current), "A"), num(float64(in.Rating), "A"), num(x, ""), num(float64(o.Latest), "s")),
		Value:       float64(o.Latest), Unit: "s", Source: evi.String(),
	}
	return o, w, nil
}

func noGates(c *catalogue.FuseClass) error {
	return &UnknownError{
		What:   "when a " + c.Title + " opens",
		Source: "no operating times of that class are held here",
		Ask:    "take a class with published times, or the maker's curve by hand",
	}
}

// earliest is the time before which the fuse must not open at multiple x.
func earliest(g catalogue.Gates, x float64) quantity.Second {
	p := g.Fastest
	switch {
	case x <= p[0].Multiple: // it holds at least as long as at the first gate
		return p[0].Time
	case x > p[len(p)-1].Multiple:
		return 0
	}
	return between(p, x)
}

// latest is the time by which the fuse must have opened at multiple x.
func latest(g catalogue.Gates, x float64) quantity.Second {
	p := g.Slowest
	switch {
	case x < p[0].Multiple*(1-slack):
		return catalogue.Never
	case x <= p[0].Multiple:
		return p[0].Time
	case x > p[len(p)-1].Multiple:
		return p[len(p)-1].Time
	}
	return between(p, x)
}

// between interpolates on logarithmic axes; x lies within the points.
func between(p []catalogue.GatePoint, x float64) quantity.Second {
	for i := 1; i < len(p); i++ {
		if x <= p[i].Multiple {
			a, b := p[i-1], p[i]
			f := math.Log(x/a.Multiple) / math.Log(b.Multiple/a.Multiple)
			return quantity.Second(math.Exp(math.Log(float64(a.Time)) + f*math.Log(float64(b.Time/a.Time))))
		}
	}
	return p[len(p)-1].Time
}

// CurrentToOpen returns the least current at which a fuse surely opens within t:
// OpeningTime turned round. It reports an *UnknownError if no gate promises that.
func CurrentToOpen(class *catalogue.FuseClass, rating quantity.Ampere, t quantity.Second) (quantity.Ampere, Working, error) {
	gates, evi := class.Gates(rating)
	if !gates.Known() {
		return 0, Working{}, noGates(class)
	}
	p := gates.Slowest
	w := Working{Name: "current that opens the fuse in time", Formula: "I = k(t) × I_n", Unit: "A", Source: evi.String()}
	k := 0.0
	switch last := p[len(p)-1]; {
	case t >= p[0].Time:
		k = p[0].Multiple
	case t < last.Time*(1-slack):
		return 0, w, &UnknownError{
			What:   fmt.Sprintf("the current that opens a %s of %v within %v", class.Title, rating, t),
			Source: fmt.Sprintf("the shortest time that %s bounds is %v", evi.Source, last.Time),
			Ask:    "allow a longer time",
		}
	default:
		for i := 1; i < len(p); i++ {
			if t >= p[i].Time*(1-slack) {
				a, b := p[i-1], p[i]
				f := math.Log(float64(t/a.Time)) / math.Log(float64(b.Time/a.Time))
				k = math.Exp(math.Log(a.Multiple) + f*math.Log(b.Multiple/a.Multiple))
				break
			}
		}
	}
	v := k * float64(rating)
	w.Substituted = fmt.Sprintf("%s × %s", num(k, ""), num(float64(rating), "A"))
	w.Value = v
	return quantity.Ampere(v), w, nil
}
