package symbols

// coilBox is a coil with its leads.
var coilBox = []shape{
	box(-2, -1, 4, 2),
	line(0, -2, 0, -1),
	line(0, 1, 0, 2),
}

// Relays and timers.
var (
	// Coil is drawn across the current path.
	Coil = Symbol{
		ID: "coil", Name: "relay coil", Letter: "K", IEC: "S00305", Turns: Turnable,
		Pins:   through("A1", "A2"),
		shapes: coilBox,
	}

	// CoilAttached is for relays whose contact stands close by.
	CoilAttached = Symbol{
		ID: "coil_link", Name: "relay with its contact", Letter: "K", Turns: Contact,
		Pins: []Pin{{"A1", 0, -2, Up}, {"A2", 0, 2, Down}, {"13", 5, -2, Up}, {"14", 5, 2, Down}},
		shapes: with(coilBox,
			line(2, 0, 4.42, 0).dashed(),
			line(5, -2, 5, -1),
			line(5, 1, 5, 2),
			line(5, 1, 3.9, -0.9),
		),
	}

	// CoilOnDelay pulls in late.
	CoilOnDelay = Symbol{
		ID: "coil_on_delay", Name: "timer coil, slow to operate", Letter: "K", Turns: Turnable,
		Pins: through("A1", "A2"),
		shapes: with(coilBox,
			line(-1, -1, -1, 1),
			line(-2, -1, -1, 1),
			line(-2, 1, -1, -1),
		),
	}

	// CoilOffDelay lets go late.
	CoilOffDelay = Symbol{
		ID: "coil_off_delay", Name: "timer coil, slow to release", Letter: "K", Turns: Turnable,
		Pins: through("A1", "A2"),
		shapes: with(coilBox,
			box(-2, -1, 1, 2).filled(),
		),
	}

	// MakeContactOnDelay closes late: the arc catches the wind on the closing way, like a parachute.
	MakeContactOnDelay = Symbol{
		ID: "make_on_delay", Name: "make contact, delayed closing", Letter: "K", Turns: Contact,
		Pins: through("1", "2"),
		shapes: with(bladeOpen,
			line(-0.58, -0.12, -1.3, -0.12),
			line(-0.58, 0.12, -1.3, 0.12),
			ccw(-1.3, -0.6, -1.3, 0.6, 0.7),
		),
	}
)
