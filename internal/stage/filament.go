package stage

import (
	"math"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// filamentLaw is the exponent by which an incandescent lamp's current follows its
// voltage, and filamentBand the part of its rated voltage down to which it counts as
// lit and up to which it lasts (lamp engineering practice: light goes with about the
// 3.4th power of the voltage, life with about the inverse 13th; from memory).
const (
	filamentLaw  = 0.55
	filamentLow  = 0.75
	filamentHigh = 1.15
)

// filament returns the kind: an incandescent lamp.
func filament() *LuminaireKind {
	return &LuminaireKind{
		Kind: describe.Kind{
			Name: "filament",
			Doc:  "Incandescent lamp. Its current follows about the 0.55th power of its voltage.",
			Fields: []describe.Field{
				{Name: "rated", Type: describe.Voltage, Required: true, Min: "1 V", Max: "60 V", Doc: "Rated voltage."},
				{Name: "power", Type: describe.Power, Required: true, Min: "0.1 W", Max: "200 W", Doc: "Power at rated voltage."},
				{Name: "flux", Type: describe.Flux, Min: "0.1 lm", Max: "50000 lm", Doc: "Luminous flux at rated voltage."},
			},
		},
		Symbol: "lamp",
		Load: func(p *Plan, t *describe.Luminaire) Load {
			v, w := lampField[quantity.Volt](t, "rated"), lampField[quantity.Watt](t, "power")
			rated := float64(w) / float64(v)
			at := func(u quantity.Volt) quantity.Ampere {
				if u <= 0 {
					return 0
				}
				return quantity.Ampere(rated * math.Pow(float64(u/v), filamentLaw))
			}
			// The tangent lies above the law everywhere: cables sized with it are safe.
			touch := p.Site.Duty.Nominal.Val * touchShare
			slope := filamentLaw * float64(at(touch)) / float64(touch)
			return Load{
				Works: quantity.Range[quantity.Volt]{Low: v * filamentLow, High: v * filamentHigh}, Rated: w, Kind: "filament", At: at,
				Lit:  func(u quantity.Volt) bool { return u >= v*filamentLow },
				Tree: sizing.Load{Current: at(touch) - quantity.Ampere(slope*float64(touch)), Ohm: quantity.Ohm(1 / slope)},
				Params: []circuit.Param{
					{Name: "rated_volt", Value: float64(v)},
					{Name: "rated_watt", Value: float64(w), Tol: powerTol},
					{Name: "exponent", Value: filamentLaw},
				},
				Values: []circuit.Value{
					{Name: "voltage", Text: v.String(), Num: float64(v), Unit: "V"},
					{Name: "power", Text: w.String(), Num: float64(w), Unit: "W"},
				},
				Pinned: []string{"voltage", "power"},
			}
		},
		Build: func(b *Build, p *circuit.Part) { b.Element(p, "", "filament", "+", "+", "-", "-") },
	}
}

// touchShare is where the tangent of a bent law touches it, as a part of the nominal
// voltage: in the middle of a discharge.
const touchShare = 0.95
