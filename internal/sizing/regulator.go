package sizing

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// RegulatorOutput returns the output of a regulator with reference ref between output
// and adjust pin, r1 across it, r2 from adjust pin to minus, and iadj out of the
// adjust pin: U = U_ref × (1 + R2 ÷ R1) + I_adj × R2 (datasheet application).
func RegulatorOutput(ref quantity.Volt, r1, r2 quantity.Ohm, iadj quantity.Ampere) (quantity.Volt, Working) {
	v := float64(ref)*(1+float64(r2)/float64(r1)) + float64(iadj)*float64(r2)
	return quantity.Volt(v), Working{
		Name: "regulator output", Formula: "U = U_ref × (1 + R2 ÷ R1) + I_adj × R2",
		Substituted: fmt.Sprintf("%s × (1 + %s ÷ %s) + %s × %s", num(float64(ref), "V"), num(float64(r2), "Ω"), num(float64(r1), "Ω"), num(float64(iadj), "A"), num(float64(r2), "Ω")),
		Value:       v, Unit: "V", Source: "adjustable three-terminal regulator datasheet",
	}
}

// RegulatorSet returns the R2 that gives an output: RegulatorOutput turned round.
func RegulatorSet(ref, out quantity.Volt, r1 quantity.Ohm, iadj quantity.Ampere) (quantity.Ohm, Working) {
	v := float64(out-ref) / (float64(ref)/float64(r1) + float64(iadj))
	return quantity.Ohm(v), Working{
		Name: "set resistance", Formula: "R2 = (U − U_ref) ÷ (U_ref ÷ R1 + I_adj)",
		Substituted: fmt.Sprintf("(%s − %s) ÷ (%s ÷ %s + %s)", num(float64(out), "V"), num(float64(ref), "V"), num(float64(ref), "V"), num(float64(r1), "Ω"), num(float64(iadj), "A")),
		Value:       v, Unit: "Ω", Source: "adjustable three-terminal regulator datasheet",
	}
}

// SetInput states what an adjustable regulator's trimmer must reach.
type SetInput struct {
	Device   catalogue.AdjustableRegulator
	Lowest   quantity.Volt    // settings that the trimmer must reach with any parts: the float
	Highest  quantity.Volt    // voltage at the hottest and at the coldest battery
	Most     quantity.Volt    // that no position of the trimmer may exceed; 0: no limit
	R1       quantity.Ohm     // 0: the largest usual value that draws the least load
	Tol      quantity.Ratio   // of fixed resistors, both ways; 0 means 1 %
	TrimTol  quantity.Ratio   // of the trimmer, both ways; 0 means catalogue.PresetTol
	Series   catalogue.Series // of the fixed resistor; 0: E24
	Trimmers []quantity.Ohm   // values to choose from; empty: catalogue.PresetValues
}

// Set is a chosen set of resistors.
type Set struct {
	R1, Fixed, Trimmer quantity.Ohm
	Low, High          quantity.Volt // what the trimmer reaches with the parts that help least
	Extreme            quantity.Volt // highest output with the worst parts, trimmer at its end
}

// setTolerance is the tolerance of set resistors (common practice).
const setTolerance = 0.01

// SetResistors chooses R1, a fixed resistor and a trimmer in series with it from
// preferred values so that the trimmer covers the whole range of settings at all
// tolerances of resistors, trimmer, reference and adjust current (worst-case
// analysis). Of what covers, the smallest trimmer is taken, which sets finest, and
// with it the fixed resistor that centres the range best.
func SetResistors(in SetInput) (Set, []Working, error) {
	d := in.Device
	tol, trim := orElse(in.Tol, setTolerance), orElse(in.TrimTol, float64(catalogue.PresetTol))
	series := in.Series
	if series == 0 {
		series = catalogue.E24
	}
	r1 := in.R1
	if r1 == 0 { // the divider alone draws the least load
		r1 = quantity.Ohm(series.AtMost(min(float64(d.ProgrammingHigh), max(float64(d.ProgrammingLow), float64(d.ReferenceLow)/float64(d.LeastLoad)))))
	}
	trimmers := in.Trimmers
	if len(trimmers) == 0 {
		trimmers = catalogue.PresetValues
	}
	low := func(r2 quantity.Ohm) quantity.Volt { // highest output that low-set parts may give
		v, _ := RegulatorOutput(d.ReferenceHigh, r1*quantity.Ohm(1-tol), r2*quantity.Ohm(1+tol), d.AdjustHigh)
		return v
	}
	high := func(fixed, pot quantity.Ohm) quantity.Volt { // lowest output that high-set parts may give
		v, _ := RegulatorOutput(d.ReferenceLow, r1*quantity.Ohm(1+tol), fixed*quantity.Ohm(1-tol)+pot*quantity.Ohm(1-trim), 0)
		return v
	}
	var best Set
	for _, t := range trimmers {
		for _, f := range series.Between(float64(r1)/2, float64(r1)*50) {
			fixed := quantity.Ohm(f)
			s := Set{R1: r1, Fixed: fixed, Trimmer: t, Low: low(fixed), High: high(fixed, t)}
			s.Extreme, _ = RegulatorOutput(d.ReferenceHigh, r1*quantity.Ohm(1-tol), fixed*quantity.Ohm(1+tol)+t*quantity.Ohm(1+trim), d.AdjustHigh)
			if s.Low > in.Lowest || s.High < in.Highest || in.Most > 0 && s.Extreme > in.Most {
				continue
			}
			if best.R1 == 0 || centring(s, in) < centring(best, in) {
				best = s
			}
		}
		if best.R1 > 0 {
			break
		}
	}
	if best.R1 == 0 {
		return best, nil, setBlocked(in, tol)
	}
	_, wl := RegulatorOutput(d.ReferenceHigh, r1*quantity.Ohm(1-tol), best.Fixed*quantity.Ohm(1+tol), d.AdjustHigh)
	_, wh := RegulatorOutput(d.ReferenceLow, r1*quantity.Ohm(1+tol), best.Fixed*quantity.Ohm(1-tol)+best.Trimmer*quantity.Ohm(1-trim), 0)
	wl.Name, wh.Name = "lowest setting that is always reached", "highest setting that is always reached"
	return best, []Working{wl, wh}, nil
}

// setBlocked says why no set of resistors serves: the top limit, or the tolerances.
func setBlocked(in SetInput, tol float64) error {
	if in.Most > 0 {
		open := in
		open.Most = 0
		if s, _, err := SetResistors(open); err == nil {
			return &BlockedError{
				Limit: LimitRange, Subject: "the output with the trimmer at its end and the worst parts", Value: float64(s.Extreme), Bound: float64(in.Most), Unit: "V",
				Frees: fmt.Sprintf("allow %v at the end of the trimmer, or use fixed resistors of closer tolerance", s.Extreme),
			}
		}
	}
	return &BlockedError{
		Limit: LimitRange, Subject: "the tolerance of the set resistors", Value: 100 * tol, Bound: 100 * setTolerance, Unit: "%",
		Frees: "use resistors of 1 % or better and trimmers up to 10 kΩ",
	}
}

// centring is how far the middle of what a set reaches lies from the middle of what
// is wanted.
func centring(s Set, in SetInput) float64 {
	return abs(float64(s.Low + s.High - in.Lowest - in.Highest))
}

func orElse(v quantity.Ratio, def float64) float64 {
	if v == 0 {
		return def
	}
	return float64(v)
}

// OutputImpedance returns the output impedance that a resistor Rs between output and
// set divider gives an adjustable regulator: Z = Rs × (1 + R2 ÷ R1), which limits the
// charge current of a low battery (datasheet application).
func OutputImpedance(rs, r1, r2 quantity.Ohm) (quantity.Ohm, Working) {
	v := float64(rs) * (1 + float64(r2)/float64(r1))
	return quantity.Ohm(v), Working{
		Name: "output impedance", Formula: "Z = R_s × (1 + R2 ÷ R1)",
		Substituted: fmt.Sprintf("%s × (1 + %s ÷ %s)", num(float64(rs), "Ω"), num(float64(r2), "Ω"), num(float64(r1), "Ω")),
		Value:       v, Unit: "Ω", Source: "adjustable three-terminal regulator datasheet, charger application",
	}
}

// LinearInput states a linear charger between its supply and its battery.
type LinearInput struct {
	Device    catalogue.AdjustableRegulator
	SupplyLow quantity.Volt // at the regulator's input, lowest mains, full current
	SupplyTop quantity.Volt // at highest mains and the charge current
	SupplyOff quantity.Volt // at highest mains, unloaded
	Set       quantity.Volt // output setting, float
	Battery   quantity.Volt // of an empty battery that begins to charge
	Diode     quantity.Volt // drop of the blocking diode
	Impedance quantity.Ohm  // of the output, with everything to the battery
	Ambient   quantity.Celsius
	CaseSink  quantity.KelvinPerWatt
}

// Linear is what a linear charger does at its limits.
type Linear struct {
	Start    quantity.Ampere // into the empty battery
	Headroom quantity.Volt   // at lowest mains
	Heat     quantity.Watt   // at highest mains, empty battery
	Sink     Sink
}

// LinearCharger returns the limits of a linear charger: current into an empty
// battery, I = (U_set − U_D − U_B) ÷ Z; headroom at lowest mains; heat at highest mains
// with an empty battery; the heat sink for it. It refuses too little headroom, too
// high an input and too much heat.
func LinearCharger(in LinearInput) (Linear, []Working, error) {
	i := max(0, float64(in.Set-in.Diode-in.Battery)/float64(in.Impedance))
	i = min(i, float64(in.Device.Current))
	out := float64(in.Battery + in.Diode) // behind the regulator, its own Rs included, at least
	l := Linear{Start: quantity.Ampere(i), Headroom: in.SupplyLow - in.Set, Heat: quantity.Watt((float64(in.SupplyTop) - out) * i)}
	ws := []Working{{
		Name: "current into an empty battery", Formula: "I = min(I_device ; (U_set − U_D − U_B) ÷ Z)",
		Substituted: fmt.Sprintf("min(%s ; (%s − %s − %s) ÷ %s)", num(float64(in.Device.Current), "A"), num(float64(in.Set), "V"), num(float64(in.Diode), "V"), num(float64(in.Battery), "V"), num(float64(in.Impedance), "Ω")),
		Value:       i, Unit: "A", Source: in.Device.Evidence.String(),
	}, {
		Name: "headroom at lowest mains", Formula: "U = U_in,low − U_set",
		Substituted: fmt.Sprintf("%s − %s", num(float64(in.SupplyLow), "V"), num(float64(in.Set), "V")),
		Value:       float64(l.Headroom), Unit: "V", Source: in.Device.Evidence.String(),
	}, {
		Name: "heat at highest mains, empty battery", Formula: "P = (U_in,high − U_B − U_D) × I",
		Substituted: fmt.Sprintf("(%s − %s − %s) × %s", num(float64(in.SupplyTop), "V"), num(float64(in.Battery), "V"), num(float64(in.Diode), "V"), num(i, "A")),
		Value:       float64(l.Heat), Unit: "W", Source: in.Device.Evidence.String(), Uses: []string{"current into an empty battery"},
	}}
	var err error
	if l.Heat > 0 {
		var w Working
		l.Sink, w, err = HeatSink(HeatInput{
			Power: l.Heat, Junction: in.Device.Junction, Ambient: in.Ambient, JunctionCase: in.Device.JunctionCase,
			CaseSink: in.CaseSink, Free: in.Device.JunctionAmbient,
		})
		ws = append(ws, w)
	}
	switch {
	case l.Headroom < in.Device.Headroom:
		return l, ws, &BlockedError{
			Limit: LimitHeadroom, Subject: "the headroom of the regulator at lowest mains", Value: float64(l.Headroom), Bound: float64(in.Device.Headroom), Unit: "V",
			Frees: fmt.Sprintf("raise the supply by %v at lowest mains", in.Device.Headroom-l.Headroom),
		}
	case in.SupplyOff-in.Battery > in.Device.Difference:
		return l, ws, &BlockedError{
			Limit: LimitVoltage, Subject: "the voltage across the regulator", Value: float64(in.SupplyOff - in.Battery), Bound: float64(in.Device.Difference), Unit: "V",
			Frees: "take a transformer of lower voltage",
		}
	}
	return l, ws, err
}
