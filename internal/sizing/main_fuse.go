package sizing

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// CableOption is a size that the cable behind a fuse may take.
type CableOption struct {
	Size     quantity.WireSize
	Ampacity quantity.Ampere
	Loop     quantity.Ohm // of the whole way to its far end, fuse and battery left out
}

// MainFuseInput states what a battery's main fuse carries and what it must open on.
type MainFuseInput struct {
	Classes     []*catalogue.FuseClass // to choose from, in the order in which they are tried
	Stock       func(*catalogue.FuseClass) []quantity.Ampere
	Pinned      quantity.Ampere // rating given by the user; 0: choose
	Load        quantity.Ampere
	LoadFactor  quantity.Ratio
	Above       quantity.Ampere // least rating that stands above the largest fuse behind it; 0: none
	System      quantity.Volt   // highest of the circuit
	Prospective quantity.Ampere
	Empty       quantity.Volt // rest voltage of the discharged battery
	Internal    quantity.Ohm  // of the used battery
	Within      quantity.Second
	Cables      []CableOption // thinnest first
	Cold        func(rating quantity.Ampere) quantity.Ohm
	Withstand   float64 // k of the cables, A·√s/mm²
}

// MainFuse is a chosen main fuse and the thinnest cable that it protects.
type MainFuse struct {
	Class       *catalogue.FuseClass
	Rating      quantity.Ampere
	Cable       CableOption
	OverSmaller bool // it stands above the largest fuse behind it by the ratio asked
}

// mostCopper is how much thicker than with a later class the cable may be for the sake of
// an earlier one (common practice, no source).
const mostCopper = 4

// ChooseMainFuse tries class after class and size after size for the battery's main
// fuse until all of this holds: I_B ÷ k ≤ I_n ≤ I_z and I_2 ≤ 1.45 I_z (IEC 60364-4-43
// clause 433.1), rated voltage and breaking capacity (clause 434.5.1), a short at the far
// end opens it in time and before k²S² is spent (clause 434.5.2). A fuse above the
// largest one behind it is preferred; where none fits that, one that only carries the
// load is taken. When nothing fits, the error names the limit that the best candidate
// breaks and what would free it; the candidate is returned with it.
func ChooseMainFuse(in MainFuseInput) (MainFuse, error) {
	for _, above := range []bool{true, false} {
		var best MainFuse
		for _, c := range in.Classes {
			rating, ok := in.rating(c, above)
			if !ok || c.Volt < in.System || c.BreakingCapacity(rating) < in.Prospective {
				continue
			}
			if g, _ := c.Gates(rating); !g.Known() {
				continue
			}
			for _, o := range in.Cables {
				if !in.protects(c, rating, o) {
					continue
				}
				if best.Class == nil || best.Cable.Size.Area > mostCopper*o.Size.Area {
					best = MainFuse{c, rating, o, above}
				}
				break
			}
		}
		if best.Class != nil {
			return best, nil
		}
		if in.Above == 0 || in.Pinned > 0 {
			break
		}
	}
	return in.blocked()
}

// rating is the least rating of a class that carries the load and, if asked, stands
// above the fuses behind it.
func (in *MainFuseInput) rating(c *catalogue.FuseClass, above bool) (quantity.Ampere, bool) {
	if in.Pinned > 0 {
		return in.Pinned, c.Makes(in.Pinned)
	}
	need := in.Load / quantity.Ampere(in.LoadFactor)
	if above {
		need = max(need, in.Above)
	}
	return catalogue.NextRating(in.Stock(c), need)
}

// farEnd is the least current of a short at the far end.
func (in *MainFuseInput) farEnd(rating quantity.Ampere, o CableOption) quantity.Ampere {
	i, _ := LeastFault(FaultInput{Source: in.Empty, Internal: in.Internal, Loop: []Series{{"loop", o.Loop + in.Cold(rating)}}})
	return i
}

// protects reports whether a fuse protects a cable against overload and short circuit.
func (in *MainFuseInput) protects(c *catalogue.FuseClass, rating quantity.Ampere, o CableOption) bool {
	if o.Ampacity < CableFor(c, rating)*(1-slack) {
		return false
	}
	i := in.farEnd(rating, o)
	t, _, err := OpeningTime(OpeningInput{Class: c, Rating: rating, Current: i})
	return err == nil && t.Latest <= in.Within*(1+slack) && t.Latest <= Withstand(o.Size.Area, i, in.Withstand)
}

// blocked returns the candidate that comes nearest and what it breaks.
func (in *MainFuseInput) blocked() (MainFuse, error) {
	var most, voltage, breaking float64
	var nearest MainFuse
	least := quantity.Ohm(0) // of the loop with battery, that nearest would open on
	for _, c := range in.Classes {
		rating, ok := in.rating(c, false)
		if g, _ := c.Gates(rating); !ok || !g.Known() {
			continue
		}
		voltage = max(voltage, float64(c.Volt))
		if c.Volt < in.System {
			continue
		}
		breaking = max(breaking, float64(c.BreakingCapacity(rating)))
		if c.BreakingCapacity(rating) < in.Prospective {
			continue
		}
		need, _, err := CurrentToOpen(c, rating, in.Within)
		if err != nil {
			continue
		}
		for _, o := range in.Cables {
			if o.Ampacity < CableFor(c, rating)*(1-slack) {
				continue
			}
			if share := float64(in.farEnd(rating, o) / need); share > most*(1+slack) {
				most, nearest = share, MainFuse{c, rating, o, false}
				least = MostLoop(in.Empty, need) - o.Loop - in.Cold(rating)
			}
		}
	}
	switch {
	case nearest.Class != nil:
		need, _, _ := CurrentToOpen(nearest.Class, nearest.Rating, in.Within)
		free := "shorten the battery cable: the battery itself would do"
		if least <= 0 {
			free = "shorten the battery cable, or lay a thicker one than the list holds"
		} else if least < in.Internal {
			const tenths = 10
			free = fmt.Sprintf("take a battery of at least %s times the capacity, whose resistance is lower, or shorten its cable",
				num(math.Ceil(float64(in.Internal/least)*tenths)/tenths, ""))
		}
		return nearest, &BlockedError{
			Limit: LimitClearing, Subject: fmt.Sprintf("a short at the boards on a %v main fuse", nearest.Rating),
			Value: float64(in.farEnd(nearest.Rating, nearest.Cable)), Bound: float64(need), Unit: "A", Frees: free,
		}
	case breaking > 0:
		return MainFuse{}, &BlockedError{
			Limit: LimitBreaking, Subject: "the prospective current at the battery", Value: float64(in.Prospective), Bound: breaking, Unit: "A",
			Frees: "use smaller battery blocks, each with its own fuse",
		}
	case voltage > 0:
		return MainFuse{}, &BlockedError{
			Limit: LimitVoltage, Subject: "the voltage across the open fuse", Value: float64(in.System), Bound: voltage, Unit: "V",
			Frees: "fit a class of fuse that is rated for this DC voltage",
		}
	}
	need := in.Load / quantity.Ampere(in.LoadFactor)
	top := 0.0
	for _, c := range in.Classes {
		if list := in.Stock(c); len(list) > 0 {
			top = max(top, float64(list[len(list)-1]))
		}
	}
	return MainFuse{}, &BlockedError{
		Limit: LimitLoad, Subject: "the rating needed", Value: float64(max(need, in.Pinned)), Bound: top, Unit: "A",
		Frees: "share the load over two batteries, each with its own fuse",
	}
}
