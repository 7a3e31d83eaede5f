package stage

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// Load is what one lamp draws.
type Load struct {
	Works quantity.Range[quantity.Volt] // range that it works in
	Rated quantity.Watt                 // at nominal voltage
	Kind  string                        // kind name
	// Full is the current that a lamp may take, Dimmest the share of it below which it
	// counts as too dim; both 0 where the kind states none.
	Full    quantity.Ampere
	Dimmest quantity.Ratio
	// Lit reports whether the lamp counts as lit at a voltage.
	Lit func(v quantity.Volt) bool
	// Tree is the same law as the tree of cables takes it, exact between LampEnd and
	// float.
	Tree sizing.Load
	// Params are the parameters of the lamp's element, Values and Pinned what the
	// parts list prints.
	Params []circuit.Param
	Values []circuit.Value
	Pinned []string
	// At returns the current at a voltage inside or near the working range.
	At func(v quantity.Volt) quantity.Ampere
}

// ledDriver returns the kind: a lamp with a driver of its own: constant power within its range.
func ledDriver() *LuminaireKind {
	return &LuminaireKind{
		Kind: describe.Kind{
			Name: "led-driver",
			Doc:  "LED lamp with a driver: draws constant power within its working range.",
			Fields: []describe.Field{
				{Name: "power", Type: describe.Power, Required: true, Min: "0.1 W", Max: "200 W", Doc: "Power drawn from the line."},
				{Name: "works", Type: describe.VoltageRange, Required: true, Doc: "Voltage range that it works in."},
				{Name: "flux", Type: describe.Flux, Min: "1 lm", Max: "50000 lm", Doc: "Luminous flux."},
				{Name: "accuracy", Type: describe.Percent, Default: "5 %", Min: "0 %", Max: "30 %", Doc: "Tolerance of the power, both ways."},
			},
		},
		Symbol: "lamp",
		Load: func(_ *Plan, t *describe.Luminaire) Load {
			p := lampField[quantity.Watt](t, "power")
			works := lampField[quantity.Range[quantity.Volt]](t, "works")
			return Load{
				Works: works, Rated: p, Kind: "led-driver", Tree: sizing.Load{Power: p},
				Lit: func(v quantity.Volt) bool { return v >= works.Low },
				At:  func(v quantity.Volt) quantity.Ampere { return quantity.Ampere(float64(p) / float64(v)) },
				Params: []circuit.Param{
					{Name: "watt", Value: float64(p), Tol: float64(lampField[quantity.Ratio](t, "accuracy"))},
					{Name: "low_volt", Value: float64(works.Low)},
					{Name: "high_volt", Value: float64(works.High)},
				},
				Values: []circuit.Value{
					{Name: "power", Text: p.String(), Num: float64(p), Unit: "W"},
					{Name: "works", Text: works.String()},
				},
				Pinned: []string{"power"},
			}
		},
		Build: func(b *Build, p *circuit.Part) { b.Element(p, "", "constant-power", "+", "+", "-", "-") },
	}
}

// lampField returns a field of a luminaire type that is required or has a default.
func lampField[T any](t *describe.Luminaire, name string) T {
	v, ok := describe.Get[T](t.Fields, name)
	if !ok {
		panic("stage: " + t.Kind.Val + " has no " + name + "; the decoder must supply it")
	}
	return v.Val
}
