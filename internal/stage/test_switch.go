package stage

import (
	"gloamwright/internal/catalogue"
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
	"gloamwright/internal/sizing"
)

// testSwitch returns the kind: a push-button in a coil feed: pressed, it simulates an outage.
func testSwitch() *Kind {
	return &Kind{
		Kind: describe.Kind{
			Name: "test-switch",
			Doc:  "Push-button in a coil feed: pressed, it takes the presence of mains away and so tests the lights.",
			Ports: []describe.Port{
				{Name: "out", Doc: "the coil feed behind the button", Signal: true},
			},
			Fields: fields(
				describe.Field{Name: "from", Type: describe.StageRef, Required: true, Doc: "The supply whose feed it opens."},
			),
		},
		Class: ControlClass, Rank: 5, Heading: "Test switch",
		Expand: func(b *Build, s *describe.Stage) {
			p := b.Part("button", circuit.PushButton, "Push-button, break contact, DC rated", "1", "2")
			b.Element(p, "", "switch", "1", "1", "2", "2")
			b.sketch(16, "simulates", "an outage")
			key, _ := b.ref(s, "from")
			b.coilFeed(b.feedOf(key), p.Pin("1"), "feed", coilLevel1, 0, coilLevel1, 6, coilLevel1)
			b.symbol("push_break", p, 8, coilLevel1, "H", "A")
			b.output(s, "out", p.Pin("2"), coilLevel1, 10, 13)
		},
		Steps: []Step{{Supplying, sizeTestSwitch}},
	}
}

// buttonCurrent is what the contact of a small push-button breaks at the voltages of
// this program, with an inductive load (common practice, no source).
const buttonCurrent quantity.Ampere = 1

// sizeTestSwitch holds the button against the coils that it opens.
func sizeTestSwitch(p *Plan, s *describe.Stage) {
	k := p.part(s, "button")
	set(k, "rating", buttonCurrent.String()+" DC", float64(buttonCurrent), "A", true, false)
	k.Note = "break contact, returns by itself"
	params(k, "", circuit.Param{Name: "ohm", Value: buttonOhm, Tol: contactTol}, circuit.Param{Name: "closed", Value: 1})
	if load := p.drawn(s.Name.Val); load > buttonCurrent {
		p.block(k.Designation, k.At, catalogue.CommonPractice.String(), &sizing.BlockedError{
			Limit: sizing.LimitContact, Subject: "the current of the button", Value: float64(load), Bound: float64(buttonCurrent), Unit: "A",
			Frees: "take a button with a contact for that direct current",
		})
	}
}

// buttonOhm is the resistance of a closed contact (common practice, no source).
const buttonOhm = 0.02

// coilFeed joins a feed to a pin of the current stage through the left edge at level
// y: a rail through a terminal of the cabinet, a signal by a wire of its own.
func (b *Build) coilFeed(f feed, pin *circuit.Pin, local string, y int, xy ...int) *circuit.Conductor {
	it := circuit.SketchItem{Op: circuit.OpLeft, Name: local, Y: float64(y)}
	if f.rail != "" {
		t := b.Terminal(cabinet, local)
		b.onRail(b.rails[f.rail], t.Pin("out"))
		it.Part, it.Rail = t, b.rails[f.rail].Name
		it.Wire = b.Wire(t.Pin("in"), pin, true, leadLength)
	} else {
		it.Wire = b.Wire(f.pin, pin, true, leadLength)
	}
	b.line(it.Wire, xy...)
	b.add(it)
	return it.Wire
}

// coilRail joins a rail to a pin of the current stage by a lead that comes straight
// down to level y at x.
func (b *Build) coilRail(f feed, pin *circuit.Pin, local string, x, y int) *circuit.Conductor {
	t := b.Terminal(cabinet, local)
	b.onRail(b.rails[f.rail], t.Pin("out"))
	w := b.Wire(t.Pin("in"), pin, true, leadLength)
	b.add(circuit.SketchItem{Op: circuit.OpUp, Part: t, Wire: w, Rail: b.rails[f.rail].Name, Pts: [][2]int{{x, y}, {x, upEnd}}})
	return w
}
