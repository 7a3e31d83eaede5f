package stage

import (
	"fmt"
	"math"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/facts"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// transformerSupply returns the kind: an unregulated supply: safety transformer, bridge, reservoir.
// The solver sees it as a source with the resistance that its rated and open-circuit
// voltages state.
func transformerSupply() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "transformer-supply",
			Doc:  "Unregulated supply: safety transformer, bridge and reservoir capacitor. Its voltage falls from the open-circuit to the rated figure as the current rises, and follows the mains.",
			Ports: []describe.Port{
				{Name: "raw", Doc: "unregulated plus", Signal: true},
			},
			Fields: fields(
				describe.Field{Name: "rated", Type: describe.VoltAmp, Required: true, Min: "1 V 1 mA", Max: "50 V 50 A", Doc: "Direct voltage at the rated current, and that current, at nominal mains."},
				describe.Field{Name: "open", Type: describe.Voltage, Required: true, Min: "1 V", Max: "60 V", Doc: "Direct voltage without load, at nominal mains."},
				describe.Field{Name: "mains", Type: describe.Mains, Required: true, Doc: "Mains voltage and its tolerance."},
				describe.Field{Name: "fuse", Type: describe.Current, Min: "0.1 A", Max: "100 A", Doc: "Output fuse; without it sized."},
			),
		},
		Class: SupplyClass, Rank: 0, Heading: "Raw supply",
		Expand: func(b *Build, s *describe.Stage) {
			t := b.Part("transformer", circuit.Transformer, "Safety transformer", "L", "N", "3", "4")
			r := b.Part("bridge", circuit.Bridge, "Bridge rectifier", "~1", "~2", "+", "-")
			b.Element(r, "", "transformer-supply", "+", "+", "-", "-")
			c := b.Part("reservoir", circuit.Electrolytic, "Reservoir capacitor", "1", "2")
			b.Element(c, "", "capacitor", "1", "1", "2", "2")
			bl := b.Part("bleeder", circuit.Resistor, "Discharge resistor", "1", "2")
			b.Element(bl, "", "resistor", "1", "1", "2", "2")
			f := b.Part("fuse", circuit.Fuse, "Fuse and holder", "1", "2")
			b.Element(f, "", "fuse", "1", "1", "2", "2")
			b.Join(t.Pin("3"), r.Pin("~1"))
			b.Join(t.Pin("4"), r.Pin("~2"))
			b.Join(r.Pin("+"), c.Pin("1"), bl.Pin("1"), f.Pin("1"))
			b.Join(r.Pin("-"), c.Pin("2"), bl.Pin("2"))

			b.sketch(48, "makes raw direct", "voltage from mains")
			b.mains(t, []string{"L", "N"}, 7, 27, 31)
			b.symbol("transformer", t, 9, 29, "B", "A", "1", "L", "2", "N")
			b.converter(r, 19, 29, 3, []string{"~1", "~2"}, []string{"+", "-"}, []int{-2, 2}, []int{-2, 2}, false)
			b.line(nil, 11, 27, 15, 27)
			b.line(nil, 11, 31, 15, 31)
			b.symbol("capacitor_pol", c, 28, 35, "V", "R")
			b.line(nil, 28, 27, 28, 33)
			b.line(nil, 28, 37, 28, 43)
			b.symbol("resistor", bl, 36, 35, "V", "R")
			b.line(nil, 36, 27, 36, 33)
			b.line(nil, 36, 37, 36, 43, 24, 43)
			b.line(nil, 23, 31, 24, 31)
			down := b.lead(circuit.OpDown, "minus", r.Pin("-"), Minus, 24, 31, 24, downEnd)
			if key := s.Name.Val + ".raw"; b.rails[key] != nil { // several things take from it
				b.line(nil, 23, 27, 36, 27, 36, 17)
				b.symbol("fuse", f, 36, 15, "U", "R")
				up := b.lead(circuit.OpUp, "raw", f.Pin("2"), key, 36, 13, 36, upEnd)
				b.number(up, 36, 9)
			} else {
				b.line(nil, 23, 27, 36, 27, 36, rawLevel, 38, rawLevel)
				b.symbol("fuse", f, 40, rawLevel, "H", "A")
				b.output(s, "raw", f.Pin("2"), rawLevel, 42, 45)
			}
			b.point(b.TestPoint("raw", "Raw voltage", r.Pin("+")), 30, 27, "N")
			b.number(down, 24, 48.5)
		},
		Steps: []Step{{Supplying, sizeTransformer}},
	}
}

// Figures of a reservoir supply (common practice, no source): the ripple peak to peak
// at rated current as a part of the open-circuit voltage, the time in which the
// discharge resistor takes the reservoir to a tenth, the drop of a bridge diode, and
// what is held back of the rating in voltage and current of its bridge.
const (
	rippleShare                  = 0.1
	bleedTime    quantity.Second = 60
	bleedTo                      = 10
	bridgeDrop   quantity.Volt   = 0.9
	bridgeSpare                  = 2
	mainsHertz                   = 50 // the ripple is smaller at 60 Hz
	openTol                      = 0.05
	reservoirTop                 = 0.1 // F, the largest of the common sizes
)

// raw is the direct-current side of a transformer supply: Thévenin's source on the
// straight line between its open-circuit and its rated point.
type raw struct {
	open  quantity.Volt // at nominal mains
	ohm   quantity.Ohm
	rated quantity.Rating
	mains quantity.Toleranced[quantity.Volt]
}

// rawOf returns the transformer supply of that name; ok is false if the stage is of
// another kind.
func (p *Plan) rawOf(name string) (r raw, ok bool) {
	s := p.stageOf(name)
	if s.Kind.Val != "transformer-supply" {
		return r, false
	}
	r.rated, r.open = must[quantity.Rating](s, "rated"), must[quantity.Volt](s, "open")
	r.mains = must[quantity.Toleranced[quantity.Volt]](s, "mains")
	r.ohm = quantity.Ohm(float64(r.open-r.rated.Volt) / float64(r.rated.Ampere))
	return r, true
}

// low and high are the voltages at a load with lowest and highest mains.
func (r raw) low(i quantity.Ampere) quantity.Volt  { return r.at(1-r.mains.Plus, i) }
func (r raw) high(i quantity.Ampere) quantity.Volt { return r.at(1+r.mains.Plus, i) }

func (r raw) at(mains quantity.Ratio, i quantity.Ampere) quantity.Volt {
	return r.open*quantity.Volt(mains) - quantity.Volt(float64(i)*float64(r.ohm))
}

// drawn is what hangs on a stage's port: coils, chargers and what they pass through,
// such as test switches.
func (p *Plan) drawn(name string) quantity.Ampere {
	i := p.aux[name]
	for _, s := range p.Site.Stages {
		if r, ok := describe.Get[describe.Ref](s.Fields, "from"); ok && r.Val.Stage == name && s.Kind.Val == "test-switch" {
			i += p.drawn(s.Name.Val)
		}
	}
	return i
}

// sizeTransformer finds what transformer, bridge, reservoir and fuse must be rated for.
func sizeTransformer(p *Plan, s *describe.Stage) {
	t, bridge := p.part(s, "transformer"), p.part(s, "bridge")
	c, bleeder := p.part(s, "reservoir"), p.part(s, "bleeder")
	r, _ := p.rawOf(s.Name.Val)
	if r.open <= r.rated.Volt {
		p.block(t.Designation, t.At, "", &sizing.BlockedError{
			Limit: sizing.LimitRange, Subject: "the open-circuit voltage", Value: float64(r.open), Bound: float64(r.rated.Volt), Unit: "V",
			Frees: "state the voltage that stands at the reservoir without load; it is above the rated one",
		})
		r.open = r.rated.Volt * leastOpen
		r.ohm = quantity.Ohm(float64(r.open-r.rated.Volt) / float64(r.rated.Ampere))
	}
	load := p.drawn(s.Name.Val)
	p.work(t.Designation, "source resistance", sizing.Working{
		Formula: "R = (U_open − U_rated) ÷ I_rated", Value: float64(r.ohm), Unit: "Ω", Source: "Thévenin's theorem on the stated points",
		Substituted: fmt.Sprintf("(%v − %v) ÷ %v", r.open, r.rated.Volt, r.rated.Ampere),
	})
	p.work(t.Designation, "load", sizing.Working{
		Formula: "I = Σ of what hangs on it", Substituted: sizing.Digits(float64(load)) + " A", Value: float64(load), Unit: "A", Source: "charger and coil feed, each at its greatest",
	})
	va, w, err := sizing.TransformerRating(sizing.TransformerInput{DC: r.rated.Volt, Load: r.rated.Ampere})
	if err != nil {
		p.block(t.Designation, t.At, w.Source, err)
	}
	p.work(t.Designation, "", w)
	second := (float64(r.open) + 2*float64(bridgeDrop)) / math.Sqrt2
	p.work(t.Designation, "secondary voltage", sizing.Working{
		Formula: "U = (U_open + 2 × U_D) ÷ √2", Substituted: fmt.Sprintf("(%v + 2 × %v) ÷ √(2)", r.open, bridgeDrop),
		Value: second, Unit: "V", Source: "peak rectifier (electronics textbooks)",
	})
	set(t, "secondary", quantity.Format(quantity.Volt(second), 2)+" AC", second, "V", true, false)
	set(t, "rating", sizing.Digits(va)+" VA", va, "VA", true, false)
	set(t, "mains", r.mains.String(), float64(r.mains.Nominal), "V", false, true)
	t.Note = "safety transformer, IEC 61558-2-6, " + quantity.Format(r.open, 3) + " at the reservoir without load"

	top := r.high(0)
	volt, okVolt := catalogue.NextRating(catalogue.BridgeVolts, top*bridgeSpare)
	amp, okAmp := catalogue.NextRating(catalogue.BridgeCurrents, r.rated.Ampere*bridgeSpare)
	if !okVolt || !okAmp {
		volt, amp = catalogue.BridgeVolts[len(catalogue.BridgeVolts)-1], catalogue.BridgeCurrents[len(catalogue.BridgeCurrents)-1]
		p.block(bridge.Designation, bridge.At, catalogue.CommonPractice.String(), &sizing.BlockedError{
			Limit: sizing.LimitLoad, Subject: "the rated current of the bridge", Value: float64(r.rated.Ampere * bridgeSpare), Bound: float64(amp), Unit: "A",
			Frees: "take a regulated supply",
		})
	}
	set(bridge, "voltage", volt.String(), float64(volt), "V", true, false)
	set(bridge, "current", amp.String(), float64(amp), "A", true, false)
	set(bridge, "rating", r.rated.String(), float64(r.rated.Ampere), "A", false, true)
	params(bridge, "",
		circuit.Param{Name: "rated_volt", Value: float64(r.rated.Volt), Tol: openTol},
		circuit.Param{Name: "rated_ampere", Value: float64(r.rated.Ampere)},
		circuit.Param{Name: "open_volt", Value: float64(r.open), Tol: openTol},
		circuit.Param{Name: "leak_ohm", Value: bridgeLeak},
	)
	p.sizeReservoir(c, bleeder, r, top)

	given, _ := describe.Get[quantity.Ampere](s.Fields, "fuse")
	f := p.systemFuse(p.part(s, "fuse"), "raw supply", load, given)
	f.CableSize = p.controlSize()
	f.CableAmpacity = p.ampacity(f.CableSize, 1)
	p.sources[f.Part] = r
	p.F.Supplies = append(p.F.Supplies, &facts.Supply{Part: t, Volt: r.rated.Volt, Rated: r.rated.Ampere, Current: load, Mains: r.mains, Pinned: true})
}

// Figures that stand for what a description leaves open: the open-circuit voltage of a
// supply whose given one cannot be, and the leakage of its bridge.
const (
	leastOpen  = 1.05
	bridgeLeak = 1e6
)

// sizeReservoir chooses reservoir and discharge resistor.
func (p *Plan) sizeReservoir(c, bleeder *circuit.Part, r raw, top quantity.Volt) {
	least := float64(r.rated.Ampere) / (2 * mainsHertz * rippleShare * float64(r.open))
	farad := quantity.Farad(catalogue.E6.AtLeast(least))
	if farad > reservoirTop {
		p.block(c.Designation, c.At, catalogue.CommonPractice.String(), &sizing.BlockedError{
			Limit: sizing.LimitRange, Subject: "the reservoir", Value: float64(farad), Bound: reservoirTop, Unit: "F", Frees: "take a regulated supply",
		})
	}
	ripple, w := sizing.Ripple(sizing.RippleInput{Rectifier: sizing.FullBridge, Frequency: mainsHertz, Capacitor: farad, Current: r.rated.Ampere})
	p.work(c.Designation, "reservoir", sizing.Working{
		Formula: "C ≥ I ÷ (2 × f × 0.1 × U_open), next E6 value", Unit: "F", Value: float64(farad),
		Substituted: fmt.Sprintf("%v ÷ (2 × %v Hz × %v × %v) → %s F", r.rated.Ampere, mainsHertz, rippleShare, r.open, sizing.Digits(float64(farad))),
		Source:      "reservoir capacitor (electronics textbooks); ripple of a tenth: common practice, no source",
	})
	p.work(c.Designation, "", w, c.Designation+": reservoir")
	volt, ok := catalogue.NextRating(catalogue.CapacitorVolts, top)
	if !ok {
		volt = top
	}
	set(c, "capacitance", farad.String(), float64(farad), "F", true, false)
	set(c, "voltage", volt.String(), float64(volt), "V", true, false)
	set(c, "ripple", quantity.Format(ripple, 2)+" ripple", float64(ripple), "V", false, false)
	ohm := quantity.Ohm(catalogue.E24.AtMost(float64(bleedTime) / (float64(farad) * math.Log(bleedTo))))
	p.work(bleeder.Designation, "discharge resistor", sizing.Working{
		Formula: "R ≤ t ÷ (C × ln 10), E24 value not above", Unit: "Ω", Value: float64(ohm),
		Substituted: fmt.Sprintf("%v s ÷ (%s F × %s) → %s Ω", float64(bleedTime), sizing.Digits(float64(farad)), sizing.Digits(math.Log(bleedTo)), sizing.Digits(float64(ohm))),
		Source:      "discharge of a capacitor; a tenth within a minute: common practice, no source",
	})
	p.resistor(bleeder, "", ohm, carbonTol)
	p.watts(bleeder, quantity.Watt(float64(top)*float64(top)/float64(ohm)))
}

// carbonTol is the tolerance of resistors whose value matters little.
const carbonTol = 0.05
