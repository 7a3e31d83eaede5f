package sizing

import (
	"fmt"
	"strings"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// Series is one named resistance of a fault loop.
type Series struct {
	Name string
	Ohm  quantity.Ohm
}

func sumOf(parts []Series) (quantity.Ohm, string) {
	var total quantity.Ohm
	var text []string
	for _, p := range parts {
		total += p.Ohm
		text = append(text, num(float64(p.Ohm), "Ω"))
	}
	if len(text) == 1 {
		return total, text[0]
	}
	return total, "(" + strings.Join(text, " + ") + ")"
}

// FaultInput states a battery and the loop to a short circuit.
type FaultInput struct {
	Source   quantity.Volt // electromotive force of the battery
	Internal quantity.Ohm  // of the battery
	Loop     []Series      // everything between its poles and the fault
}

// Constants of IEC 61660-1 clause 2.4 for a battery, from memory.
const (
	faultInternal = 0.9  // of the internal resistance counts for the peak
	faultQuasi    = 0.95 // of the peak flows on
	// FaultVoltage is the electromotive force when the open-circuit voltage is not
	// known, as a multiple of the nominal voltage.
	FaultVoltage = 1.05
)

const faultSource = "IEC 61660-1 clause 2.4 (from memory)"

// Prospective returns the greatest current of a short circuit: the peak
// i_p = E_B ÷ (0.9 R_B + R_loop) of IEC 61660-1. Breaking capacity is held against it.
func Prospective(in FaultInput) (quantity.Ampere, Working) {
	loop, text := sumOf(in.Loop)
	v := float64(in.Source) / (faultInternal*float64(in.Internal) + float64(loop))
	sub := num(float64(in.Source), "V") + " ÷ (0.9 × " + num(float64(in.Internal), "Ω")
	if len(in.Loop) > 0 {
		sub += " + " + text
	}
	return quantity.Ampere(v), Working{
		Name: "prospective short-circuit current", Formula: "i_p = E_B ÷ (0.9 × R_B + ΣR)",
		Substituted: sub + ")", Value: v, Unit: "A", Source: faultSource,
	}
}

// LeastFault returns the smallest current of a short circuit, which must still open
// the fuse: I_k = 0.95 E_B ÷ (R_B + R_loop). IEC 61660-1 gives the quasi-steady factor;
// the whole internal resistance is put in instead of nine tenths of it, which is the
// more cautious. Source is the open-circuit voltage of a discharged battery, Internal
// that of a used one, and the loop is as warm as it runs.
func LeastFault(in FaultInput) (quantity.Ampere, Working) {
	loop, text := sumOf(in.Loop)
	v := faultQuasi * float64(in.Source) / (float64(in.Internal) + float64(loop))
	sub := "0.95 × " + num(float64(in.Source), "V") + " ÷ (" + num(float64(in.Internal), "Ω")
	if len(in.Loop) > 0 {
		sub += " + " + text
	}
	return quantity.Ampere(v), Working{
		Name: "least short-circuit current", Formula: "I_k = 0.95 × E_B ÷ (R_B + ΣR)",
		Substituted: sub + ")", Value: v, Unit: "A", Source: faultSource,
	}
}

// MostLoop returns the greatest resistance of a fault loop, battery included, at
// which the least fault current still reaches need: LeastFault turned round.
func MostLoop(source quantity.Volt, need quantity.Ampere) quantity.Ohm {
	return quantity.Ohm(faultQuasi * float64(source) / float64(need))
}

// BreakingInput holds a fuse against a prospective current.
type BreakingInput struct {
	Class       *catalogue.FuseClass
	Rating      quantity.Ampere
	System      quantity.Volt // highest voltage of the circuit
	Prospective quantity.Ampere
}

// Breaking checks that a fuse can break the prospective current at the system's
// highest voltage (IEC 60364-4-43 clause 434.5.1). The working is its breaking capacity.
func Breaking(in BreakingInput) (Working, error) {
	cap := in.Class.BreakingCapacity(in.Rating)
	w := Working{
		Name: "breaking capacity", Formula: "I_cn ≥ i_p",
		Substituted: fmt.Sprintf("%s of %s, %s at up to %s DC, for %s at %s → %s", in.Class.Title, num(float64(in.Rating), "A"),
			num(float64(cap), "A"), num(float64(in.Class.Volt), "V"), num(float64(in.Prospective), "A"), num(float64(in.System), "V"), num(float64(cap), "A")),
		Value: float64(cap), Unit: "A", Source: in.Class.Capacity.String(),
	}
	switch {
	case in.System > in.Class.Volt:
		return w, &BlockedError{
			Limit: LimitVoltage, Subject: "the voltage across the open fuse", Value: float64(in.System), Bound: float64(in.Class.Volt), Unit: "V",
			Frees: "fit a class of fuse that is rated for this DC voltage",
		}
	case in.Prospective > cap:
		return w, &BlockedError{
			Limit: LimitBreaking, Subject: "the prospective current", Value: float64(in.Prospective), Bound: float64(cap), Unit: "A",
			Frees: "fit a class of fuse with a higher DC breaking capacity",
		}
	}
	return w, nil
}
