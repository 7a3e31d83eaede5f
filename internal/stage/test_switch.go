package stage

import (
	"gloamwright/internal/circuit"
	"gloamwright/internal/describe"
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
			b.add(circuit.SketchItem{Op: circuit.OpWire, Name: "out", Pts: points([]int{10, coilLevel1, 16, coilLevel1})})
			b.add(circuit.SketchItem{Op: circuit.OpRight, Name: "out", Y: coilLevel1})
			b.outs[s.Name.Val+".out"] = p.Pin("2")
		},
	}
}

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
