package symbols

// triangle is a diode without its bar.
var triangle = []shape{
	line(0, -2, 0, 2),
	polygon(-1, -0.87, 1, -0.87, 0, 0.87),
}

// Semiconductors.
var (
	// Diode conducts from A to K; the lead runs through the open triangle.
	Diode = Symbol{
		ID: "diode", Name: "diode", Letter: "R", Turns: Turnable,
		Pins: through("A", "K"),
		shapes: with(triangle,
			line(-1, 0.87, 1, 0.87),
		),
	}

	// Zener is used in the reverse direction: turn it so that K faces the plus rail.
	Zener = Symbol{
		ID: "zener", Name: "breakdown (Zener) diode", Letter: "R", Turns: Turnable,
		Pins: through("A", "K"),
		shapes: with(triangle,
			line(-1, 0.87, 1, 0.87, 1, 0.42),
		),
	}

	// Schottky has both ends of its bar bent to a square S.
	Schottky = Symbol{
		ID: "schottky", Name: "Schottky diode", Letter: "R", Turns: Turnable,
		Pins: through("A", "K"),
		shapes: with(triangle,
			line(-0.65, 1.27, -1, 1.27, -1, 0.87, 1, 0.87, 1, 0.47, 0.65, 0.47),
		),
	}

	// LED sends light out. As a source of lighting it bears E.
	LED = Symbol{
		ID: "led", Name: "light-emitting diode", Letter: "P", Turns: Turnable,
		Pins: through("A", "K"),
		shapes: with(triangle,
			line(-1, 0.87, 1, 0.87),
			line(0.95, -0.25, 1.85, -1.15).onlyV(),
			polygon(1.85, -1.15, 1.617, -0.676, 1.376, -0.917).filled().onlyV(),
			line(0.95, 0.65, 1.85, -0.25).onlyV(),
			polygon(1.85, -0.25, 1.617, 0.224, 1.376, -0.017).filled().onlyV(),
			line(-0.35, -1.1, 0.45, -1.9).onlyH(),
			polygon(0.45, -1.9, 0.217, -1.426, -0.024, -1.667).filled().onlyH(),
			line(0.55, -1.1, 1.35, -1.9).onlyH(),
			polygon(1.35, -1.9, 1.117, -1.426, 0.876, -1.667).filled().onlyH(),
		),
	}

	// SuppressorDiode limits voltage of either sign. A part for one sign is drawn as Zener.
	SuppressorDiode = Symbol{
		ID: "tvs_bi", Name: "suppressor diode, bidirectional", Letter: "F", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: []shape{
			line(0, -2, 0, 2),
			polygon(-0.8, -1.4, 0.8, -1.4, 0, 0),
			polygon(-0.8, 1.4, 0.8, 1.4, 0, 0),
			line(0.9, -0.45, 0.9, 0, -0.9, 0, -0.9, 0.45),
		},
	}

	// NPN has its arrow on the emitter, away from the base. As a signal switch it bears K.
	NPN = Symbol{
		ID: "npn", Name: "NPN transistor", Letter: "Q", Turns: Fixed,
		Pins: []Pin{{"B", -2, 0, Left}, {"C", 1, -2, Up}, {"E", 1, 2, Down}},
		shapes: []shape{
			line(-2, 0, 0, 0),
			line(0, -1.1, 0, 1.1).heavy(),
			line(0, -0.4, 1, -1.1, 1, -2),
			line(0, 0.4, 1, 1.1, 1, 2),
			polygon(0.9, 1.03, 0.335, 0.878, 0.564, 0.551).filled(),
		},
	}

	// PNP stands with its emitter above, toward the plus rail.
	PNP = Symbol{
		ID: "pnp", Name: "PNP transistor", Letter: "Q", Turns: Fixed,
		Pins: []Pin{{"B", -2, 0, Left}, {"E", 1, -2, Up}, {"C", 1, 2, Down}},
		shapes: []shape{
			line(-2, 0, 0, 0),
			line(0, -1.1, 0, 1.1).heavy(),
			line(0, -0.4, 1, -1.1, 1, -2),
			line(0, 0.4, 1, 1.1, 1, 2),
			polygon(0.15, -0.505, 0.486, -0.984, 0.715, -0.657).filled(),
		},
	}

	// NMOS has a channel in three pieces, being off at rest; the arrow points into it.
	NMOS = Symbol{
		ID: "nmos", Name: "N-channel MOSFET", Letter: "Q", Turns: Fixed,
		Pins: []Pin{{"G", -2, 1, Left}, {"D", 1, -2, Up}, {"S", 1, 2, Down}},
		shapes: []shape{
			line(-2, 1, -0.4, 1),
			line(-0.4, -1, -0.4, 1),
			line(0, -1.3, 0, -0.7),
			line(0, -0.3, 0, 0.3),
			line(0, 0.7, 0, 1.3),
			line(0, -1, 1, -1, 1, -2),
			line(0, 1, 1, 1, 1, 2),
			line(0, 0, 1, 0, 1, 1),
			polygon(0.05, 0, 0.55, -0.2, 0.55, 0.2).filled(),
		},
	}

	// PMOS stands with its source above; the arrow points out of the channel.
	PMOS = Symbol{
		ID: "pmos", Name: "P-channel MOSFET", Letter: "Q", Turns: Fixed,
		Pins: []Pin{{"G", -2, -1, Left}, {"S", 1, -2, Up}, {"D", 1, 2, Down}},
		shapes: []shape{
			line(-2, -1, -0.4, -1),
			line(-0.4, 1, -0.4, -1),
			line(0, 1.3, 0, 0.7),
			line(0, 0.3, 0, -0.3),
			line(0, -0.7, 0, -1.3),
			line(0, 1, 1, 1, 1, 2),
			line(0, -1, 1, -1, 1, -2),
			line(0, 0, 1, 0, 1, -1),
			polygon(0.75, 0, 0.25, 0.2, 0.25, -0.2).filled(),
		},
	}
)
