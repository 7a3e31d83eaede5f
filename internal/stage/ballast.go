package stage

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
)

// ballast returns the kind: a tube on an inverter ballast, which draws constant power
// like an LED driver.
func ballast() *LuminaireKind {
	k := ledDriver()
	load := k.Load
	return &LuminaireKind{
		Kind: describe.Kind{
			Name:   "ballast",
			Doc:    "Fluorescent tube on an inverter ballast: draws constant power within its working range.",
			Fields: k.Fields,
		},
		Symbol: "luminaire_tube",
		Load: func(p *Plan, t *describe.Luminaire) Load {
			l := load(p, t)
			l.Kind = "ballast"
			return l
		},
		Build: func(b *Build, p *circuit.Part) { b.Element(p, "", "constant-power", "+", "+", "-", "-") },
	}
}
