package sizing

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// AdiabaticInput states a fault and how long it lasts.
type AdiabaticInput struct {
	Fault quantity.Ampere
	For   quantity.Second
	K     float64 // A·s^½/mm²: catalogue.AdiabaticPVC for PVC 70 °C
}

// Adiabatic returns the least cross-section that a fault current does not overheat:
// S = I √t ÷ k (IEC 60364-4-43 clause 434.5.2). It holds up to 5 s; beyond that it
// returns an *UnknownError, for the cable then gives off heat.
func Adiabatic(in AdiabaticInput) (quantity.SquareMM, Working, error) {
	s := float64(in.Fault) * math.Sqrt(float64(in.For)) / in.K
	w := Working{
		Name: "least area for the fault", Formula: "S = I × √t ÷ k",
		Substituted: fmt.Sprintf("%s × √(%s) ÷ %s", num(float64(in.Fault), "A"), num(float64(in.For), "s"), num(in.K, "")),
		Value:       s, Unit: "mm²", Source: catalogue.AdiabaticEvidence.String() + ", clause 434.5.2",
	}
	if in.For > catalogue.AdiabaticLimit {
		return quantity.SquareMM(s), w, &UnknownError{
			What:   fmt.Sprintf("whether a cable bears %v for %v", in.Fault, in.For),
			Source: "k²S² holds for at most 5 s",
			Ask:    "let the fuse open sooner",
		}
	}
	return quantity.SquareMM(s), w, nil
}

// Withstand returns how long a conductor bears a current by k²S² ÷ I²: the cable's
// line in a time-current picture (IEC 60364-4-43 clause 434.5.2).
func Withstand(area quantity.SquareMM, current quantity.Ampere, k float64) quantity.Second {
	r := k * float64(area) / float64(current)
	return quantity.Second(r * r)
}
