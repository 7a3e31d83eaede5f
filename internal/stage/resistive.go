package stage

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// Voltages, as parts of the rated one, between which a resistive load serves (common
// practice, no source).
const (
	resistiveLow  = 0.8
	resistiveHigh = 1.15
)

// resistive returns the kind: a load that follows Ohm's law, such as a heater mat or a
// sounder with a resistor.
func resistive() *LuminaireKind {
	return &LuminaireKind{
		Kind: describe.Kind{
			Name: "resistive",
			Doc:  "Load that follows Ohm's law.",
			Fields: []describe.Field{
				{Name: "rated", Type: describe.Voltage, Required: true, Min: "1 V", Max: "60 V", Doc: "Rated voltage."},
				{Name: "power", Type: describe.Power, Required: true, Min: "0.1 W", Max: "500 W", Doc: "Power at rated voltage."},
			},
		},
		Symbol: "resistor",
		Load: func(_ *Plan, t *describe.Luminaire) Load {
			v, w := lampField[quantity.Volt](t, "rated"), lampField[quantity.Watt](t, "power")
			r := quantity.Ohm(float64(v) * float64(v) / float64(w))
			return Load{
				Works: quantity.Range[quantity.Volt]{Low: v * resistiveLow, High: v * resistiveHigh}, Rated: w, Kind: "resistive",
				At:     func(u quantity.Volt) quantity.Ampere { return quantity.Ampere(float64(u) / float64(r)) },
				Lit:    func(u quantity.Volt) bool { return u >= v*resistiveLow },
				Tree:   sizing.Load{Ohm: r},
				Params: []circuit.Param{{Name: "ohm", Value: float64(r), Tol: powerTol}},
				Values: []circuit.Value{{Name: "power", Text: w.String() + " at " + v.String(), Num: float64(w), Unit: "W"}},
				Pinned: []string{"power"},
			}
		},
		Build: func(b *Build, p *circuit.Part) { b.Element(p, "", "resistor", "1", "+", "2", "-") },
	}
}
