package stage

import (
	"fmt"

	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// ledString returns the kind: strings of LEDs in series, each with a resistor, in parallel.
func ledString() *LuminaireKind {
	return &LuminaireKind{
		Kind: describe.Kind{
			Name: "led-string",
			Doc:  "LEDs in series with a resistor, several strings in parallel. The resistor is sized so that the current stays within its limit at float voltage.",
			Fields: []describe.Field{
				{Name: "forward", Type: describe.Voltage, Required: true, Min: "1 V", Max: "40 V", Doc: "Forward voltage of one LED at its rated current."},
				{Name: "series", Type: describe.Count, Required: true, Min: "1", Max: "20", Doc: "LEDs in series in one string."},
				{Name: "strings", Type: describe.Count, Default: "1", Min: "1", Max: "100", Doc: "Strings in parallel."},
				{Name: "current", Type: describe.Current, Required: true, Min: "0.5 mA", Max: "5 A", Doc: "Greatest current of one string."},
				{Name: "resistor", Type: describe.Resistance, Min: "0.1 Ω", Max: "1 MΩ", Doc: "Series resistor of one string; without it sized."},
				{Name: "flux", Type: describe.Flux, Min: "0.1 lm", Max: "50000 lm", Doc: "Luminous flux at the rated current."},
				{Name: "dimmest", Type: describe.Percent, Default: "20 %", Min: "1 %", Max: "100 %", Doc: "Share of its greatest current below which the lamp counts as too dim."},
			},
		},
		Symbol: "lamp",
		Load:   ledStringLoad,
		Build:  func(b *Build, p *circuit.Part) { b.Element(p, "", "led-string", "+", "+", "-", "-") },
	}
}

// ledStringLoad sizes the series resistor so that a string takes at most its current
// at float voltage.
func ledStringLoad(p *Plan, t *describe.Luminaire) Load {
	vf := lampField[quantity.Volt](t, "forward")
	n, strings := lampField[int](t, "series"), lampField[int](t, "strings")
	most := lampField[quantity.Ampere](t, "current")
	dimmest := lampField[quantity.Ratio](t, "dimmest")
	r, given := describe.Get[quantity.Ohm](t.Fields, "resistor")
	if !given {
		// Whether enough light is left at the end of discharge is settled by raising
		// that end, and judged on the solved circuit.
		v, ws, err := sizing.StringResistor(sizing.StringInput{High: p.Float, Low: p.Float, Forward: vf, Series: n, Current: most, Least: dimmest})
		if err != nil {
			p.block("luminaire "+t.Name.Val, t.Name.Pos, "", err)
		}
		for _, w := range ws[:min(2, len(ws))] {
			p.work("luminaire "+t.Name.Val, "", w)
		}
		r.Val = max(v.Resistor, stringLeastOhm)
	}
	drop := quantity.Volt(n) * vf
	at := func(v quantity.Volt) quantity.Ampere {
		return quantity.Ampere(max(0, float64(v-drop)/float64(r.Val)*float64(strings)))
	}
	nominal := p.Site.Duty.Nominal.Val
	low := drop + quantity.Volt(float64(dimmest)*float64(most)*float64(r.Val))
	rated := quantity.Watt(float64(nominal) * float64(at(nominal)))
	return Load{
		Works: quantity.Range[quantity.Volt]{Low: low, High: drop + quantity.Volt(float64(most)*float64(r.Val))*stringMost},
		Rated: rated, Kind: "led-string", Full: most * quantity.Ampere(strings), Dimmest: dimmest,
		Lit: func(v quantity.Volt) bool { return v >= low },
		Tree: sizing.Load{
			Current: quantity.Ampere(-float64(drop) / float64(r.Val) * float64(strings)),
			Ohm:     r.Val / quantity.Ohm(strings),
		},
		At: at,
		Params: []circuit.Param{
			{Name: "forward_volt", Value: float64(vf), Tol: forwardTol},
			{Name: "series", Value: float64(n)},
			{Name: "strings", Value: float64(strings)},
			{Name: "ohm", Value: float64(r.Val), Tol: resistorTol},
			{Name: "ampere", Value: float64(most)},
		},
		Values: []circuit.Value{
			{Name: "strings", Text: fmt.Sprintf("%d × %d LED", strings, n), Num: float64(strings)},
			{Name: "resistor", Text: r.Val.String() + " a string", Num: float64(r.Val), Unit: "Ω"},
			{Name: "power", Text: quantity.Format(rated, 2) + " at " + nominal.String(), Num: float64(rated), Unit: "W"},
		},
	}
}

// Tolerances of LED strings: the forward voltage within one bin (common practice, no
// source), and the share over the rated current that a string stands for long.
const (
	forwardTol = 0.03
	stringMost = 1.1
	// stringLeastOhm stands in for a resistor that cannot be chosen; the job is blocked.
	stringLeastOhm quantity.Ohm = 1
)
