package sizing

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// ShuntInput states a Zener that holds a voltage behind a dropper.
type ShuntInput struct {
	Low, High quantity.Volt // of the supply
	Zener     quantity.Volt
	Least     quantity.Ampere // through the Zener so that it regulates
	LoadLow   quantity.Ampere
	LoadHigh  quantity.Ampere
}

// ShuntDropper returns the greatest dropper that still leaves the Zener its least
// current at lowest supply and highest load: R = (U_low − U_Z) ÷ (I_Z,min + I_L,max)
// (Zener regulator, electronics textbooks).
func ShuntDropper(in ShuntInput) (quantity.Ohm, Working) {
	v := float64(in.Low-in.Zener) / float64(in.Least+in.LoadHigh)
	return quantity.Ohm(v), Working{
		Name: "dropper, at most", Formula: "R = (U_low − U_Z) ÷ (I_Z + I_L)",
		Substituted: fmt.Sprintf("(%s − %s) ÷ (%s + %s)", num(float64(in.Low), "V"), num(float64(in.Zener), "V"), num(float64(in.Least), "A"), num(float64(in.LoadHigh), "A")),
		Value:       v, Unit: "Ω", Source: "Zener regulator (electronics textbooks)",
	}
}

// Shunt is the state of a Zener regulator with an ideal Zener.
type Shunt struct {
	Out     quantity.Volt
	Supply  quantity.Ampere // through the dropper
	Zener   quantity.Ampere // 0: starved
	Dropper quantity.Watt
	Heat    quantity.Watt // of the Zener
}

// ShuntState returns the state of a Zener with dropper and a resistive load; load 0
// is none. A Zener that would have to carry a negative current conducts nothing, and
// the load is fed through the dropper alone (electronics textbooks).
func ShuntState(supply, zener quantity.Volt, dropper, load quantity.Ohm) Shunt {
	out := float64(supply)
	if load > 0 {
		out *= float64(load) / float64(load+dropper)
	}
	out = min(out, float64(zener))
	s := Shunt{Out: quantity.Volt(out), Supply: quantity.Ampere((float64(supply) - out) / float64(dropper))}
	s.Zener = s.Supply
	if load > 0 {
		s.Zener -= quantity.Ampere(out / float64(load))
	}
	if out < float64(zener) {
		s.Zener = 0
	}
	s.Dropper = quantity.Watt((float64(supply) - out) * float64(s.Supply))
	s.Heat = quantity.Watt(out * float64(s.Zener))
	return s
}

// CoilFeedInput states a Zener-stabilised feed of a relay coil.
type CoilFeedInput struct {
	Low, High quantity.Volt // of the unregulated supply
	Zener     catalogue.Zener
	Coil      quantity.Ohm   // at 20 °C
	CoilTol   quantity.Ratio // both ways
	Ambient   quantity.Celsius
	Pinned    quantity.Ohm // dropper given by the user; 0: choose
}

// CoilFeed is a chosen dropper.
type CoilFeed struct {
	Dropper  quantity.Ohm
	Most     quantity.Ohm  // the Zener still regulates at lowest supply
	Least    quantity.Ohm  // the Zener is not overheated with the coil unplugged
	Heat     quantity.Watt // of the Zener, coil unplugged, highest supply
	Rating   quantity.Watt // of the dropper, next standard, at twice its heat
	Derated  quantity.Watt // what the Zener may give off at that ambient
	SupplyAt quantity.Ampere
}

// Figures of 1 W regulator diodes. Derating: full power to 50 °C, less by 6.67 mW/K above
// (JEDEC registration, from memory).
const (
	zenerDerateFrom = 50
	zenerDerate     = 0.00667
	zenerKeep       = 10 // a tenth of the test current is well past the knee (common practice)
)

// CoilDropper chooses the dropper of a coil fed from a Zener between its two bounds:
// at lowest supply, with the coil that draws most, the Zener keeps its knee current;
// at highest supply with the coil unplugged it stays within its power. The largest
// E24 value between the bounds is taken, which heats least.
func CoilDropper(in CoilFeedInput) (CoilFeed, []Working, error) {
	z := in.Zener
	vLow, vHigh := z.Volt*quantity.Volt(1-z.Tol), z.Volt*quantity.Volt(1+z.Tol)
	coil := quantity.Ampere(float64(vHigh) / (float64(in.Coil) * (1 - float64(in.CoilTol))))
	keep := max(z.Knee, z.Test/zenerKeep)
	most, wm := ShuntDropper(ShuntInput{Low: in.Low, Zener: vHigh, Least: keep, LoadHigh: coil})
	f := CoilFeed{Most: most, Derated: z.Power - quantity.Watt(zenerDerate*max(0, float64(in.Ambient)-zenerDerateFrom))}
	iz := float64(f.Derated) / float64(vLow)
	f.Least = quantity.Ohm((float64(in.High - vLow)) / iz)
	wl := Working{
		Name: "dropper, at least", Formula: "R = (U_high − U_Z) × U_Z ÷ P_Z",
		Substituted: fmt.Sprintf("(%s − %s) × %s ÷ %s", num(float64(in.High), "V"), num(float64(vLow), "V"), num(float64(vLow), "V"), num(float64(f.Derated), "W")),
		Value:       float64(f.Least), Unit: "Ω", Source: z.Evidence.String(),
	}
	ws := []Working{wm, wl}
	if most <= 0 {
		return f, ws, &BlockedError{
			Limit: LimitVoltage, Subject: "the supply of the Zener when it is lowest", Value: float64(in.Low), Bound: float64(vHigh), Unit: "V",
			Frees: "take a higher supply voltage or a lower Zener voltage",
		}
	}
	if most <= f.Least {
		return f, ws, &BlockedError{
			Limit: LimitDissipation, Subject: "the dropper that spares the Zener with the coil unplugged", Value: float64(f.Least), Bound: float64(most), Unit: "Ω",
			Frees: "take a Zener of more power, a coil of higher resistance, or a regulated supply",
		}
	}
	r := quantity.Ohm(catalogue.E24.AtMost(float64(most)))
	if in.Pinned > 0 {
		r = in.Pinned
	}
	f.Dropper = r
	s := ShuntState(in.High, vLow, r, 0)
	f.Heat, f.SupplyAt = s.Heat, s.Supply
	f.Rating, _ = catalogue.NextRating(catalogue.ResistorWatts, powerReserve*s.Dropper)
	ws = append(ws, Working{
		Name: "dropper fitted", Formula: "largest E24 value not above the greater bound",
		Substituted: fmt.Sprintf("%s to %s → %s", num(float64(f.Least), "Ω"), num(float64(most), "Ω"), num(float64(r), "Ω")),
		Value:       float64(r), Unit: "Ω", Source: catalogue.PreferredEvidence.String(), Pinned: in.Pinned > 0, Uses: []string{wm.Name, wl.Name},
	})
	if r < f.Least || r > most {
		return f, ws, &BlockedError{
			Limit: LimitDissipation, Subject: "the dropper", Value: float64(r), Bound: float64(most), Unit: "Ω",
			Frees: fmt.Sprintf("fit between %v and %v", f.Least, most),
		}
	}
	return f, ws, nil
}
