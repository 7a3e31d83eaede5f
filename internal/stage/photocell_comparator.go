package stage

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
)

func sizeComparator(p *Plan, s *describe.Stage, dark, light quantity.Lux) {
	for local, v := range map[string]quantity.Ohm{"light": 22e3, "upper": 10e3, "lower": 10e3, "input": 10e3, "hysteresis": 470e3, "base": 4.7e3, "off": 10e3} {
		p.resistor(p.part(s, local), "", v, resistorTol)
	}
	pot := p.part(s, "set")
	set(pot, "resistance", "5 kΩ", 5e3, "Ω", true, false)
	params(pot, "upper", circuit.Param{Name: "ohm", Value: 2500, Tol: resistorTol})
	params(pot, "lower", circuit.Param{Name: "ohm", Value: 2500, Tol: resistorTol})
}
