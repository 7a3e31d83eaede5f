package sizing

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// EmitterFollowerInput states the simplest photocell: the light resistor stands
// between plus and a node, Load between it and minus, and an NPN transistor as
// emitter follower carries the node's voltage to a relay coil. Only the relay itself,
// which holds far below the voltage that it picks up at, gives a hysteresis.
type EmitterFollowerInput struct {
	Cell       catalogue.LightResistor
	Transistor catalogue.Transistor
	Dark       quantity.Lux    // the relay lets go below
	Supply     quantity.Volt   // typical, by day
	High       quantity.Volt   // highest
	Coil       quantity.Ohm    // at 20 °C
	PickUp     quantity.Volt   // at the coil
	DropOut    quantity.Volt   // at the coil
	Low        quantity.Volt   // lowest supply by day, on which it must still pick up; 0: not asked
	Warm       quantity.Volt   // pick-up voltage at the coil in the hottest ambient
	Feed       catalogue.Diode // in the coil feed; zero: none
	Ambient    quantity.Celsius
}

// EmitterFollower is a sized photocell of that form.
type EmitterFollower struct {
	Load, Base quantity.Ohm
	Dark       quantity.Lux // at which the relay lets go, with Load fitted
	Bright     quantity.Lux // at which it picks up again; +Inf: never
	Least      quantity.Lux // at which it picks up on the lowest supply; +Inf: never
	Heat       quantity.Watt
	Slow       quantity.Farad
}

// FollowerPhotocell chooses the load resistor so that the relay lets go at the dark
// threshold, and tells where it picks up again. The node stands above the coil by the
// drops of feed diode, base-emitter junction and base resistor, and gives the coil's
// current over the gain (emitter follower, electronics textbooks). At half voltage
// the transistor gives off most, U² ÷ (4 R_coil).
func FollowerPhotocell(in EmitterFollowerInput) (EmitterFollower, []Working, error) {
	f, ws, err := in.size()
	if err == nil {
		err = in.verdict(f)
	}
	return f, ws, err
}

// size chooses the resistors.
func (in *EmitterFollowerInput) size() (EmitterFollower, []Working, error) {
	q := in.Transistor
	var f EmitterFollower
	most := float64(in.High) / float64(in.Coil)
	f.Base = quantity.Ohm(catalogue.E24.AtMost(float64(baseDrop) * q.GainLow / most))
	node := func(coil quantity.Volt) (v quantity.Volt, base quantity.Ampere) {
		i := quantity.Ampere(float64(coil) / float64(in.Coil))
		base = i / quantity.Ampere(q.Gain+1)
		v = coil + junctionVolt(i) + quantity.Volt(float64(base)*float64(f.Base))
		if in.Feed.Saturation > 0 {
			v += in.Feed.Drop(i)
		}
		return v, base
	}
	vd, id := node(in.DropOut)
	rd := float64(in.Cell.At10) * math.Pow(float64(in.Dark)/cellReference, -in.Cell.Gamma)
	load := float64(vd) / (float64(in.Supply-vd)/rd - float64(id))
	ws := []Working{{
		Name: "base resistor", Formula: "R ≤ 0.5 V × β ÷ (U ÷ R_coil), E24 value not above",
		Substituted: fmt.Sprintf("%s × %s ÷ (%s ÷ %s) → %s", num(float64(baseDrop), "V"), num(q.GainLow, ""), num(float64(in.High), "V"), num(float64(in.Coil), "Ω"), num(float64(f.Base), "Ω")),
		Value:       float64(f.Base), Unit: "Ω", Source: q.Evidence.String(),
	}, {
		Name: "cell at the dark threshold", Formula: "R = R_10 × (E ÷ 10 lx)^(−γ)",
		Substituted: fmt.Sprintf("%s × (%s ÷ 10 lx)^(−%s)", num(float64(in.Cell.At10), "Ω"), num(float64(in.Dark), "lx"), num(in.Cell.Gamma, "")),
		Value:       rd, Unit: "Ω", Source: in.Cell.Evidence.String(),
	}}
	if load <= 0 || vd >= in.Supply {
		return f, ws, &BlockedError{
			Limit: LimitRange, Subject: "the illuminance at which this coil can let go", Value: float64(in.Dark), Bound: 0, Unit: "lx",
			Frees: "set a higher illuminance, take a coil of higher resistance, or a comparator (built: comparator)",
		}
	}
	f.Load = quantity.Ohm(catalogue.E24.Nearest(load))
	f.Slow = quantity.Farad(catalogue.E6.AtLeast(slowTime / float64(f.Load)))
	light := func(supply, v quantity.Volt, base quantity.Ampere) quantity.Lux {
		if v >= supply {
			return quantity.Lux(math.Inf(1))
		}
		r := float64(supply-v) / (float64(v)/float64(f.Load) + float64(base))
		return quantity.Lux(cellReference * math.Pow(r/float64(in.Cell.At10), -1/in.Cell.Gamma))
	}
	f.Dark = light(in.Supply, vd, id)
	vp, ip := node(in.PickUp)
	f.Bright = light(in.Supply, vp, ip)
	vw, iw := node(in.Warm)
	if in.Low > 0 {
		f.Least = light(in.Low, vw, iw)
	}
	f.Heat = quantity.Watt(float64(in.High) * float64(in.High) / (4 * float64(in.Coil)))
	ws = append(ws, Working{
		Name: "resistor of the light divider", Formula: "R = U_node ÷ ((U − U_node) ÷ R_cell − I_base), nearest E24 value",
		Substituted: fmt.Sprintf("%s ÷ ((%s − %s) ÷ %s − %s) → %s", num(float64(vd), "V"), num(float64(in.Supply), "V"), num(float64(vd), "V"), num(rd, "Ω"), num(float64(id), "A"), num(float64(f.Load), "Ω")),
		Value:       float64(f.Load), Unit: "Ω", Source: "emitter follower (electronics textbooks)", Uses: []string{"cell at the dark threshold"},
	}, Working{
		Name: "heat of the transistor at dusk", Formula: "P = U^2 ÷ (4 × R_coil)",
		Substituted: fmt.Sprintf("%s ^2 ÷ (4 × %s)", num(float64(in.High), "V"), num(float64(in.Coil), "Ω")),
		Value:       float64(f.Heat), Unit: "W", Source: "greatest power at half voltage (electronics textbooks)",
	})
	again := func(name string, e quantity.Lux, supply, v quantity.Volt, base quantity.Ampere) {
		if math.IsInf(float64(e), 1) || e == 0 {
			return
		}
		ws = append(ws, Working{
			Name: name, Formula: "E = 10 lx × ((U − U_node) ÷ (U_node ÷ R_load + I_base) ÷ R_10)^(−1 ÷ γ)",
			Substituted: fmt.Sprintf("10 lx × ((%s − %s) ÷ (%s ÷ %s + %s) ÷ %s)^(−1 ÷ %s)", num(float64(supply), "V"), num(float64(v), "V"), num(float64(v), "V"),
				num(float64(f.Load), "Ω"), num(float64(base), "A"), num(float64(in.Cell.At10), "Ω"), num(in.Cell.Gamma, "")),
			Value: float64(e), Unit: "lx", Source: in.Cell.Evidence.String(), Uses: []string{"resistor of the light divider"},
		})
	}
	again("light again above", f.Bright, in.Supply, vp, ip)
	again("picks up on the empty battery above", f.Least, in.Low, vw, iw)
	return f, ws, nil
}

// verdict holds the transistor and the cell against what they bear.
func (in *EmitterFollowerInput) verdict(f EmitterFollower) error {
	q := in.Transistor
	cell := quantity.Watt(float64(in.High) * float64(in.High) / (4 * float64(f.Load)))
	may := Derated(q.Power, followerDerate, in.Ambient)
	switch {
	case in.High > q.Volt:
		return &BlockedError{
			Limit: LimitVoltage, Subject: "the voltage across the transistor", Value: float64(in.High), Bound: float64(q.Volt), Unit: "V",
			Frees: "take a comparator (built: comparator) or a packaged module",
		}
	case f.Heat > may:
		return &BlockedError{
			Limit: LimitDissipation, Subject: "the heat of the transistor at dusk", Value: float64(f.Heat), Bound: float64(may), Unit: "W",
			Frees: "take a coil of higher resistance, or a comparator that switches at once (built: comparator)",
		}
	case cell > in.Cell.Power:
		return &BlockedError{
			Limit: LimitDissipation, Subject: "the heat of the light resistor", Value: float64(cell), Bound: float64(in.Cell.Power), Unit: "W",
			Frees: "set a lower illuminance, or take a comparator (built: comparator)",
		}
	case float64(f.Bright) > overcast:
		return &BlockedError{
			Limit: LimitRange, Subject: "the illuminance at which the relay picks up again", Value: math.Min(float64(f.Bright), daylight), Bound: overcast, Unit: "lx",
			Frees: "set a lower illuminance, take a relay that picks up at less, or a comparator (built: comparator)",
		}
	case float64(f.Least) > overcast:
		return &BlockedError{
			Limit: LimitPickUp, Subject: "the illuminance at which the relay picks up on the nearly empty battery", Value: math.Min(float64(f.Least), daylight), Bound: overcast, Unit: "lx",
			Frees: in.darker() + "take a comparator (built: comparator)",
		}
	}
	return nil
}

// darker says at which dark threshold the relay would pick up on the nearly empty battery
// under an overcast sky, if any does.
func (in EmitterFollowerInput) darker() string {
	const step, least = 0.9, 0.5
	for in.Dark *= step; in.Dark > least; in.Dark *= step {
		if f, _, err := in.size(); err == nil && float64(f.Least) <= overcast {
			const shown = 2
			return "set dark_below to at most " + quantity.Format(quantity.Lux(floor(float64(f.Dark), shown)), shown) + ", or "
		}
	}
	return ""
}

// floor rounds down to so many digits.
func floor(v float64, digits int) float64 {
	k := math.Pow(10, float64(digits)-1-math.Floor(math.Log10(v)))
	return math.Floor(v*k) / k
}

// Figures of the follower. The base resistor drops at most half a volt with the coil's
// whole current; the transistor's junction follows the class's law. An overcast day
// gives 1000 lx in the open, full daylight 10 000 lx and more (common practice).
const (
	baseDrop       quantity.Volt   = 0.5
	smallJunction  quantity.Ampere = 1e-14 // saturation current of a small transistor, from memory
	followerDerate                 = 0.005 // W/K above 25 °C, small transistors
	overcast                       = 1000
	daylight                       = 100e3
)

// junctionVolt is the base-emitter voltage of a small transistor at a current.
func junctionVolt(i quantity.Ampere) quantity.Volt {
	return catalogue.ThermalVolt * quantity.Volt(math.Log1p(float64(i/smallJunction)))
}
