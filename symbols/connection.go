package symbols

import "gloamwright/layout/ink"

// earthBars is three earth bars, shorter than those of Earth.
var earthBars = []shape{
	line(0, 0, 0, 1),
	line(-0.75, 1, 0.75, 1),
	line(-0.5, 1.4, 0.5, 1.4),
	line(-0.25, 1.8, 0.25, 1.8),
}

// Connections and earths.
var (
	// Terminal is a ring that the wire stops at.
	Terminal = Symbol{
		ID: "terminal", Name: "terminal", Letter: "X", Turns: Node,
		Pins: []Pin{{"1", 0, -1, Up}, {"2", 0, 1, Down}},
		shapes: []shape{
			line(0, -1, 0, -0.3),
			circle(0, 0, 0.3),
			line(0, 0.3, 0, 1),
		},
	}

	// TerminalStrip is a piece of four ways, two modules each.
	TerminalStrip = Symbol{
		ID: "terminal_strip", Name: "terminal strip", Letter: "X", Turns: Fixed,
		Pins: []Pin{{"1", 0, -2, Up}, {"2", 2, -2, Up}, {"3", 4, -2, Up}, {"4", 6, -2, Up}, {"1'", 0, 2, Down}, {"2'", 2, 2, Down}, {"3'", 4, 2, Down}, {"4'", 6, 2, Down}},
		shapes: []shape{
			box(-1, -1, 8, 2),
			line(1, -1, 1, 1),
			line(3, -1, 3, 1),
			line(5, -1, 5, 1),
			line(0, -2, 0, -1),
			line(2, -2, 2, -1),
			line(4, -2, 4, -1),
			line(6, -2, 6, -1),
			line(0, 1, 0, 2),
			line(2, 1, 2, 2),
			line(4, 1, 4, 2),
			line(6, 1, 6, 2),
			text(0, 0.35, "1", normal, ink.Middle),
			text(2, 0.35, "2", normal, ink.Middle),
			text(4, 0.35, "3", normal, ink.Middle),
			text(6, 0.35, "4", normal, ink.Middle),
		},
	}

	// Plug is the male half.
	Plug = Symbol{
		ID: "plug", Name: "plug contact", Letter: "X", Turns: Node,
		Pins: []Pin{{"1", 0, -2, Up}},
		shapes: []shape{
			line(0, -2, 0, -1),
			box(-0.2, -1, 0.4, 1).filled(),
		},
	}

	// Socket is the female half, open toward the plug.
	Socket = Symbol{
		ID: "socket", Name: "socket contact", Letter: "X", Turns: Node,
		Pins: []Pin{{"1", 0, 2, Down}},
		shapes: []shape{
			line(0, 2, 0, 0.5),
			ccw(-0.5, 0, 0.5, 0, 0.5),
		},
	}

	// ConnectorPair is a plug in its socket.
	ConnectorPair = Symbol{
		ID: "connector_pair", Name: "plug and socket, mated", Letter: "X", Turns: Node,
		Pins: through("1", "2"),
		shapes: []shape{
			line(0, -2, 0, -1),
			box(-0.2, -1, 0.4, 1.15).filled(),
			ccw(-0.5, 0, 0.5, 0, 0.5),
			line(0, 0.5, 0, 2),
		},
	}

	// Junction joins three ways. The dot is four line widths wide, so it survives copying.
	Junction = Symbol{
		ID: "junction", Name: "joint", IEC: "S00020", Turns: Node,
		Pins: []Pin{{"1", -1, 0, Left}, {"2", 1, 0, Right}, {"3", 0, 1, Down}},
		shapes: []shape{
			line(-1, 0, 1, 0),
			line(0, 0, 0, 1),
			circle(0, 0, 0.2).filled(),
		},
	}

	// DoubleJunction joins four ways as two joints, two modules apart.
	DoubleJunction = Symbol{
		ID: "double_junction", Name: "double joint", Turns: Node,
		Pins: []Pin{{"1", -2, 0, Left}, {"2", 2, 0, Right}, {"3", -1, -1, Up}, {"4", 1, 1, Down}},
		shapes: []shape{
			line(-2, 0, 2, 0),
			line(-1, 0, -1, -1),
			line(1, 0, 1, 1),
			circle(-1, 0, 0.2).filled(),
			circle(1, 0, 0.2).filled(),
		},
	}

	// Crossing does not connect.
	Crossing = Symbol{
		ID: "crossing", Name: "crossing, not connected", Turns: Node,
		Pins: []Pin{{"1", -1, 0, Left}, {"2", 1, 0, Right}, {"3", 0, -1, Up}, {"4", 0, 1, Down}},
		shapes: []shape{
			line(-1, 0, 1, 0),
			line(0, -1, 0, 1),
		},
	}

	// Earth is any earth.
	Earth = Symbol{
		ID: "earth", Name: "earth", Letter: "X", IEC: "S00200", Turns: Node,
		Pins: []Pin{{"1", 0, 0, Up}},
		shapes: []shape{
			line(0, 0, 0, 1),
			line(-1, 1, 1, 1),
			line(-0.65, 1.4, 0.65, 1.4),
			line(-0.3, 1.8, 0.3, 1.8),
		},
	}

	// EarthFunctional serves the working of the plant, not protection: earth under an arch.
	EarthFunctional = Symbol{
		ID: "earth_functional", Name: "functional earth", Letter: "X", Turns: Node,
		Pins: []Pin{{"1", 0, 0, Up}},
		shapes: with(earthBars,
			cwLarge(-1.15, 1.75, 1.15, 1.75, 1.22),
		),
	}

	// EarthProtective is earth within a ring.
	EarthProtective = Symbol{
		ID: "earth_protective", Name: "protective earth", Letter: "X", IEC: "S00202", Turns: Node,
		Pins: []Pin{{"1", 0, 0, Up}},
		shapes: with(earthBars,
			circle(0, 1.35, 1.1),
		),
	}

	// Frame is the metal frame of the equipment.
	Frame = Symbol{
		ID: "frame", Name: "frame, chassis", Letter: "X", Turns: Node,
		Pins: []Pin{{"1", 0, 0, Up}},
		shapes: []shape{
			line(0, 0, 0, 1),
			line(-1, 1, 1, 1),
			line(-1, 1, -1.4, 1.7),
			line(0, 1, -0.4, 1.7),
			line(1, 1, 0.6, 1.7),
		},
	}

	// TestPoint is the project's own mark: a dot on the wire, a stub and the ring to touch. Tag writes its label.
	TestPoint = Symbol{
		ID: "testpoint", Name: "test point", Letter: "X", Turns: Node,
		Pins: []Pin{{"1", 0, 0, Left}},
		shapes: []shape{
			circle(0, 0, 0.2).filled(),
			line(0, 0, 0.7, 0),
			circle(1, 0, 0.3),
		},
	}
)
