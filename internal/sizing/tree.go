package sizing

import (
	"gloamwright/internal/quantity"
)

// Option is one conductor size that a leg may take, with its figures as laid.
type Option struct {
	Size     quantity.WireSize
	PerMetre quantity.Ohm    // of one conductor at working temperature
	Fault    quantity.Ohm    // the same during a fault, at least PerMetre; 0: PerMetre
	Ampacity quantity.Ampere // with its factors
	Price    float64         // per metre of cable; all 0: copper is minimised
}

func (o *Option) fault() float64 {
	if o.Fault > 0 {
		return float64(o.Fault)
	}
	return float64(o.PerMetre)
}

// Load is what hangs on the end of a leg. It draws Power ÷ V + Current + V ÷ Ohm, so
// that a driver, a current source, a resistor and a string of diodes with its
// resistor (Ohm = R, Current = −V_F ÷ R) are all exact.
type Load struct {
	Power   quantity.Watt
	Current quantity.Ampere
	Ohm     quantity.Ohm // 0: none
}

// Draws returns the current at voltage v.
func (l Load) Draws(v quantity.Volt) quantity.Ampere {
	i := l.Current
	if l.Power != 0 {
		i += quantity.Ampere(float64(l.Power) / float64(v))
	}
	if l.Ohm != 0 {
		i += quantity.Ampere(float64(v) / float64(l.Ohm))
	}
	return i
}

// Leg is one stretch of two-core cable in a tree.
type Leg struct {
	Name    string
	Parent  int    // index of the leg on whose end it hangs; −1: on the root
	Circuit string // legs of one circuit are sized together; "": a feeder, sized by itself
	Length  quantity.Metre
	Extra   quantity.Ohm // in series at its start: fuse, contact, terminals

	Load    Load          // at its end
	MinVolt quantity.Volt // at its end, in the worst condition; 0: no limit
	Carry   quantity.Ampere
	Loop    quantity.Ohm // greatest loop from the source to its end for far-end clearing; 0: no limit
	Least   quantity.SquareMM
	Pinned  *Option // given by the user: checked, not chosen

	// Ends is the price of what follows the leg's size besides its cable: terminals,
	// wires of its way. It counts where the options have prices; nil: nothing follows.
	Ends func(*Option) float64
}

// Condition is another state of a tree in which the same sizes must keep the voltages.
type Condition struct {
	Volts   quantity.Volt
	MinVolt []quantity.Volt // by leg; 0: no limit
}

// Tree is a source with everything that hangs on it. A leg's index is above its
// parent's.
type Tree struct {
	Volts   quantity.Volt // at the root in the worst condition
	Ahead   quantity.Ohm  // resistance of the source; counts in fault loops only
	Legs    []Leg
	Options []Option            // standard or stocked sizes, by rising area
	Taper   bool                // legs of one circuit may get thinner down the run
	Also    []Condition         // in which the sizes must keep the voltages too
	Lengths quantity.LengthUnit // in which remedies are worded
}

// in returns the tree as it stands in another condition.
func (t *Tree) in(c Condition) *Tree {
	o := *t
	o.Volts, o.Also, o.Legs = c.Volts, nil, append([]Leg(nil), t.Legs...)
	for i := range o.Legs {
		o.Legs[i].MinVolt = c.MinVolt[i]
	}
	return &o
}

// TreeResult is a chosen set of sizes with its electrical state.
type TreeResult struct {
	Sizes  []*Option
	Volts  []quantity.Volt   // at the end of each leg
	Amps   []quantity.Ampere // in each leg
	Cost   float64           // price if prices are set, else conductor volume in cm³
	Bound  float64           // no choice that meets all limits costs less
	Proven bool              // Cost is the least possible
}

// Copper returns the conductor volume in cm³: metres times mm², both conductors.
func (t *Tree) Copper(sizes []*Option) float64 {
	v := 0.0
	for i := range t.Legs {
		v += 2 * float64(t.Legs[i].Length) * float64(sizes[i].Size.Area)
	}
	return v
}

// Priced reports whether the options have prices, so that cost is minimised and not copper.
func (t *Tree) Priced() bool {
	for i := range t.Options {
		if t.Options[i].Price > 0 {
			return true
		}
	}
	return false
}

// solveRounds and solveEnd bound Newton's method: it takes three to five rounds; a
// tree beyond voltage collapse never settles.
const (
	solveRounds = 60
	solveEnd    = 1e-13 // of the source voltage
	collapsed   = 0.05  // of the source voltage: below it no operating point is sought
)

// Solve returns the voltage at the end of each leg and the current in each, exactly:
// the backward and forward sweep for radial networks (distribution textbooks) on
// loads made straight at the last voltages, which is Newton's method with a direct
// solution of each step, repeated until the voltages stand. ok is false if there is no
// operating point.
func (t *Tree) Solve(sizes []*Option) (volts []quantity.Volt, amps []quantity.Ampere, ok bool) {
	r := make([]float64, len(t.Legs))
	for i := range t.Legs {
		r[i] = t.ohms(i, sizes[i])
	}
	v, a := make([]float64, len(r)), make([]float64, len(r))
	ok = t.sweep(r, v, a)
	volts, amps = make([]quantity.Volt, len(r)), make([]quantity.Ampere, len(r))
	for i := range r {
		volts[i], amps[i] = quantity.Volt(v[i]), quantity.Ampere(a[i])
	}
	return volts, amps, ok
}

// ohms is the loop resistance of leg i with an option, its extra included.
func (t *Tree) ohms(i int, o *Option) float64 {
	return 2*float64(t.Legs[i].Length)*float64(o.PerMetre) + float64(t.Legs[i].Extra)
}

// faultOhms is the same during a fault.
func (t *Tree) faultOhms(i int, o *Option) float64 {
	return 2*float64(t.Legs[i].Length)*o.fault() + float64(t.Legs[i].Extra)
}

// sweep solves for the leg resistances r. Backwards it folds what hangs on each leg
// into a current a + g·V at its start; forwards it lays out the voltages.
func (t *Tree) sweep(r, v, a []float64) bool {
	n := len(r)
	own, slope := make([]float64, n), make([]float64, n) // at a leg's end: own + slope × V
	for i := range v {
		v[i] = float64(t.Volts)
	}
	for range solveRounds {
		for i := range own {
			l := &t.Legs[i].Load
			own[i], slope[i] = float64(l.Current), 0
			if l.Power != 0 {
				own[i] += 2 * float64(l.Power) / v[i]
				slope[i] -= float64(l.Power) / (v[i] * v[i])
			}
			if l.Ohm != 0 {
				slope[i] += 1 / float64(l.Ohm)
			}
		}
		for i := n - 1; i >= 0; i-- {
			d := 1 + r[i]*slope[i]
			if d <= 0 {
				return false
			}
			if p := t.Legs[i].Parent; p >= 0 {
				own[p] += own[i] / d
				slope[p] += slope[i] / d
			}
		}
		change := 0.0
		for i := range v {
			up := float64(t.Volts)
			if p := t.Legs[i].Parent; p >= 0 {
				up = v[p]
			}
			next := (up - r[i]*own[i]) / (1 + r[i]*slope[i])
			if next < collapsed*float64(t.Volts) {
				return false
			}
			a[i] = own[i] + slope[i]*next
			change = max(change, abs(next-v[i]))
			v[i] = next
		}
		if change <= solveEnd*float64(t.Volts) {
			return true
		}
	}
	return false
}

func abs(x float64) float64 {
	if x < 0 {
		return -x
	}
	return x
}

// voltSlack is how far a voltage may stand below its limit by rounding.
const voltSlack = 1e-9

// loops returns the fault loop from the source to the end of each leg.
func (t *Tree) loops(sizes []*Option) []float64 {
	l := make([]float64, len(t.Legs))
	for i := range t.Legs {
		l[i] = float64(t.Ahead)
		if p := t.Legs[i].Parent; p >= 0 {
			l[i] = l[p]
		}
		l[i] += t.faultOhms(i, sizes[i])
	}
	return l
}

func (t *Tree) clears(sizes []*Option) bool {
	for i, l := range t.loops(sizes) {
		if most := float64(t.Legs[i].Loop); most > 0 && l > most*(1+slack) {
			return false
		}
	}
	return true
}
