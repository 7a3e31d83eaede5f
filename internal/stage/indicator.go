package stage

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// indicator returns the kind: a signal lamp between a plus rail and L−.
func indicator() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "indicator",
			Doc:  "Signal lamp (LED) across a rail: shows that the rail is live.",
			Fields: fields(
				describe.Field{Name: "from", Type: describe.StageRef, Required: true, Doc: "The stage whose plus it watches."},
				describe.Field{Name: "colour", Type: describe.Choice, Default: "GN", Choices: []string{"GN", "YE", "RD", "WH", "BU"}, Doc: "Colour of the lamp, an IEC 60757 code."},
				describe.Field{Name: "current", Type: describe.Current, Default: "5 mA", Min: "0.5 mA", Max: "50 mA", Doc: "Lamp current at nominal voltage."},
			),
		},
		Class: ControlClass, Rank: 1, Heading: "Indicator",
		Expand: func(b *Build, s *describe.Stage) {
			r := b.Part("resistor", circuit.Resistor, "Series resistor", "1", "2")
			b.Element(r, "", "resistor", "1", "1", "2", "2")
			p := b.Part("lamp", circuit.SignalLamp, "Signal lamp, LED", "1", "2")
			b.Element(p, "", "led", "A", "1", "K", "2")
			from, _ := b.ref(s, "from")
			b.sketch(16, "shows that", "it is live")
			b.hangTwo(from, "resistor", r, "signal_lamp", p)
		},
		Steps: []Step{{Control, sizeIndicator}},
	}
}

// ledForward is the forward voltage of an indicator LED (common practice, no source).
const ledForward quantity.Volt = 2

// sizeIndicator chooses the series resistor of the lamp.
func sizeIndicator(p *Plan, s *describe.Stage) {
	r, lamp := p.part(s, "resistor"), p.part(s, "lamp")
	i := must[quantity.Ampere](s, "current")
	nominal := p.Site.Duty.Nominal.Val
	v, ws, err := sizing.StringResistor(sizing.StringInput{High: nominal, Low: nominal, Forward: ledForward, Series: 1, Current: i})
	if err != nil {
		p.block(r.Designation, r.At, "", err)
	}
	for _, w := range ws[:min(2, len(ws))] {
		p.work(r.Designation, "", w)
	}
	p.resistor(r, "", v.Resistor, resistorTol)
	colour := must[string](s, "colour")
	set(lamp, "colour", colour, 0, "", true, false)
	params(lamp, "", circuit.Param{Name: "forward_volt", Value: float64(ledForward), Tol: forwardTol}, circuit.Param{Name: "ampere", Value: float64(i)})
	p.Standing += i
}

// resistor records a resistor's value and the power that it stands at the highest
// voltage of the system.
func (p *Plan) resistor(r *circuit.Part, suffix string, v quantity.Ohm, tol float64) {
	set(r, "resistance", v.String(), float64(v), "Ω", true, false)
	params(r, suffix, circuit.Param{Name: "ohm", Value: float64(v), Tol: tol})
}
