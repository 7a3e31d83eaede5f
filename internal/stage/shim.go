package stage

import (
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

func shimString(supply, vf quantity.Volt, n int, i quantity.Ampere) (quantity.Ohm, sizing.Working) {
	r := float64(supply-vf*quantity.Volt(n)) / float64(i)
	v := quantity.Ohm(catalogue.E24.AtLeast(r))
	return v, sizing.Working{Value: float64(v), Unit: "Ω"}
}

func shimBattery(p *Plan, amps quantity.Ampere, hours float64) (quantity.AmpereHour, quantity.AmpereHour) {
	need := float64(amps) * hours / 0.8 * 1.19 * 1.1 / 0.8
	c := math.Inf(1)
	for _, b := range p.Class.Blocks {
		if float64(b.Capacity) >= need {
			c = math.Min(c, float64(b.Capacity))
		}
	}
	return quantity.AmpereHour(need), quantity.AmpereHour(c)
}

func shimPick(v quantity.Volt, c catalogue.RelayClass, t quantity.Celsius) quantity.Volt {
	return quantity.Volt(float64(v) * float64(c.PickUp) * (234.5 + float64(t)) / (234.5 + 20))
}
