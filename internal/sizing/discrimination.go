package sizing

import (
	"fmt"
	"math"
	"slices"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// Link is a fuse-link.
type Link struct {
	Class  *catalogue.FuseClass
	Rating quantity.Ampere
}

// DiscriminationInput states two fuses in series and the greatest fault current
// behind the lower one.
type DiscriminationInput struct {
	Upper, Lower Link
	Fault        quantity.Ampere
}

// Discrimination says in which currents only the lower fuse opens.
type Discrimination struct {
	From, To quantity.Ampere // the range in which it holds; both 0: nowhere
	Full     bool            // up to the fault current
}

// Discriminate finds the currents at which the lower fuse has surely opened before
// the upper one may: its latest opening time is below the upper one's earliest
// (IEC 60364-5-53 clause 536; gates of the fuse standards). The range starts where the
// lower fuse surely opens at all and ends where the promise first fails, at most at
// the fault current. Above the gates of the upper fuse nothing is promised.
func Discriminate(in DiscriminationInput) (Discrimination, Working, error) {
	up, upEvi := in.Upper.Class.Gates(in.Upper.Rating)
	lo, loEvi := in.Lower.Class.Gates(in.Lower.Rating)
	if !up.Known() {
		return Discrimination{}, Working{}, noGates(in.Upper.Class)
	}
	if !lo.Known() {
		return Discrimination{}, Working{}, noGates(in.Lower.Class)
	}
	d := Discrimination{}
	w := Working{
		Name: "discriminates up to", Formula: "t_max(lower) < t_min(upper)", Unit: "A",
		Source: loEvi.String() + "; " + upEvi.String(),
	}
	start := lo.Slowest[0].Multiple * float64(in.Lower.Rating)
	if start > float64(in.Fault) {
		start = float64(in.Fault)
	}
	margin := func(i float64) float64 { // > 0: holds
		t := latest(lo, i/float64(in.Lower.Rating))
		e := earliest(up, i/float64(in.Upper.Rating))
		if math.IsInf(float64(t), 1) || e <= 0 {
			return -1
		}
		m := math.Log(float64(e / t))
		if m == 0 && i <= up.Fastest[0].Multiple*float64(in.Upper.Rating) {
			m = slack // the lower one opens within the conventional time, the upper one not within it
		}
		return m
	}
	if margin(start) > 0 {
		d.From = quantity.Ampere(start)
		d.To = quantity.Ampere(firstFail(margin, breaks(up, lo, in, start)))
		d.Full = d.To >= in.Fault*(1-slack)
	}
	w.Value = float64(d.To)
	w.Substituted = fmt.Sprintf("%s of %s below %s of %s, faults to %s → %s", in.Lower.Class.Title, num(float64(in.Lower.Rating), "A"),
		in.Upper.Class.Title, num(float64(in.Upper.Rating), "A"), num(float64(in.Fault), "A"), num(float64(d.To), "A"))
	return d, w, nil
}

// breaks lists the currents at which either limit bends, from start to the fault.
func breaks(up, lo catalogue.Gates, in DiscriminationInput, start float64) []float64 {
	at := []float64{start, float64(in.Fault)}
	for _, p := range up.Fastest {
		at = append(at, p.Multiple*float64(in.Upper.Rating))
	}
	for _, p := range lo.Slowest {
		at = append(at, p.Multiple*float64(in.Lower.Rating))
	}
	at = slices.DeleteFunc(at, func(i float64) bool { return i < start || i > float64(in.Fault) })
	slices.Sort(at)
	return at
}

// firstFail walks the stretches between breaks, on each of which the margin is
// straight on logarithmic axes, and returns the current where it first reaches zero.
// Just above a break the margin may jump down: there the break itself is the end.
func firstFail(margin func(float64) float64, at []float64) float64 {
	const justAbove = 1 + 1e-7
	for i := 1; i < len(at); i++ {
		a, b := at[i-1], at[i]
		if b <= a*justAbove {
			continue
		}
		ma, mb := margin(a*justAbove), margin(b)
		if ma <= 0 {
			return a
		}
		if mb <= 0 {
			f := ma / (ma - mb)
			return math.Exp(math.Log(a) + f*math.Log(b/a))
		}
	}
	return at[len(at)-1]
}
