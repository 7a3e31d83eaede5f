package symbols

// bladeOpen is a make contact.
var bladeOpen = []shape{
	line(0, -2, 0, -1),
	line(0, 1, 0, 2),
	line(0, 1, -1.1, -0.9),
}

// bladeClosed is a break contact.
var bladeClosed = []shape{
	line(0, -2, 0, -1, 0.9, -1),
	line(0, 1, 0, 2),
	line(0, 1, 1.01, -1.25),
}

// Protection and switching.
var (
	// Fuse is an oblong with the conductor drawn through.
	Fuse = Symbol{
		ID: "fuse", Name: "fuse", Letter: "F", IEC: "S00362", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: []shape{
			box(-0.5, -1.5, 1, 3),
			line(0, -2, 0, 2),
		},
	}

	// FuseSwitchDisconnector bears its fuse link on the blade.
	FuseSwitchDisconnector = Symbol{
		ID: "fuse_switch_disc", Name: "fuse switch-disconnector", Letter: "Q", Turns: Contact,
		Pins: through("1", "2"),
		shapes: with(bladeOpen,
			line(-0.5, -1, 0.5, -1),
			circle(0, -0.75, 0.25),
			polygon(-0.659, -0.638, -1.092, -0.387, -0.441, 0.738, -0.008, 0.487),
		),
	}

	// CircuitBreaker has a cross on the fixed contact. A small one that protects a cable bears F.
	CircuitBreaker = Symbol{
		ID: "breaker", Name: "circuit breaker", Letter: "Q", IEC: "S00287", Turns: Contact,
		Pins: through("1", "2"),
		shapes: with(bladeOpen,
			line(-0.35, -1.35, 0.35, -0.65),
			line(-0.35, -0.65, 0.35, -1.35),
		),
	}

	// Disconnector has a bar on the fixed contact.
	Disconnector = Symbol{
		ID: "disconnector", Name: "disconnector", Letter: "Q", IEC: "S00288", Turns: Contact,
		Pins: through("1", "2"),
		shapes: with(bladeOpen,
			line(-0.5, -1, 0.5, -1),
		),
	}

	// SwitchDisconnector has a bar and a ring: it breaks load current and isolates.
	SwitchDisconnector = Symbol{
		ID: "switch_disc", Name: "switch-disconnector", Letter: "Q", IEC: "S00290", Turns: Contact,
		Pins: through("1", "2"),
		shapes: with(bladeOpen,
			line(-0.5, -1, 0.5, -1),
			circle(0, -0.75, 0.25),
		),
	}

	// MakeContact closes when actuated; the hinge is below.
	MakeContact = Symbol{
		ID: "make", Name: "make contact", IEC: "S00227", Turns: Contact,
		Pins:   through("1", "2"),
		shapes: bladeOpen,
	}

	// BreakContact opens when actuated; the blade leans over the end of the fixed stroke.
	BreakContact = Symbol{
		ID: "break", Name: "break contact", IEC: "S00229", Turns: Contact,
		Pins:   through("1", "2"),
		shapes: bladeClosed,
	}

	// ChangeoverContact rests on NC and opens before it closes on NO.
	ChangeoverContact = Symbol{
		ID: "changeover", Name: "change-over contact", Turns: Contact,
		Pins: []Pin{{"COM", 0, 2, Down}, {"NC", -1, -2, Up}, {"NO", 1, -2, Up}},
		shapes: []shape{
			line(0, 2, 0, 1),
			line(0, 1, -0.71, -1.25),
			line(-1, -2, -1, -1, -0.63, -1),
			line(1, -2, 1, -1),
		},
	}

	// PushButtonMake springs back; the dashed link joins button and blade.
	PushButtonMake = Symbol{
		ID: "push_make", Name: "push-button, make", Letter: "S", IEC: "S00254", Turns: Contact,
		Pins: through("1", "2"),
		shapes: with(bladeOpen,
			line(-0.58, 0, -1.9, 0).dashed(),
			line(-1.5, -0.5, -1.9, -0.5, -1.9, 0.5, -1.5, 0.5),
		),
	}

	// PushButtonBreak springs back; its link passes the gap without a dot.
	PushButtonBreak = Symbol{
		ID: "push_break", Name: "push-button, break", Letter: "S", Turns: Contact,
		Pins: through("1", "2"),
		shapes: with(bladeClosed,
			line(0.45, 0, -1.9, 0).dashed(),
			line(-1.5, -0.5, -1.9, -0.5, -1.9, 0.5, -1.5, 0.5),
		),
	}

	// ManualSwitch stays where it is put.
	ManualSwitch = Symbol{
		ID: "switch_manual", Name: "manual switch", Letter: "S", IEC: "S00253", Turns: Contact,
		Pins: through("1", "2"),
		shapes: with(bladeOpen,
			line(-0.58, 0, -1.9, 0).dashed(),
			line(-1.9, -0.5, -1.9, 0.5),
		),
	}

	// LatchingSwitch is held by a detent on the link.
	LatchingSwitch = Symbol{
		ID: "switch_latch", Name: "latching switch", Letter: "S", Turns: Contact,
		Pins: through("1", "2"),
		shapes: with(bladeOpen,
			line(-0.58, 0, -2.5, 0).dashed(),
			line(-1.75, 0, -1.5, 0.4, -1.25, 0),
			line(-2.1, -0.5, -2.5, -0.5, -2.5, 0.5, -2.1, 0.5),
		),
	}
)
