package symbols

import "gloamwright/layout/ink"

// converterBox is a box with a diagonal, DC below it, and four leads.
var converterBox = []shape{
	box(-2, -2, 4, 4),
	line(-2, 2, 2, -2),
	line(0.45, 0.95, 1.65, 0.95),
	line(0.45, 1.3, 0.75, 1.3),
	line(0.9, 1.3, 1.2, 1.3),
	line(1.35, 1.3, 1.65, 1.3),
	line(-3, -1, -2, -1),
	line(-3, 1, -2, 1),
	line(2, -1, 3, -1),
	line(2, 1, 3, 1),
}

// Functional blocks.
var (
	// Regulator3 keeps the voltage between OUT and COM.
	Regulator3 = Symbol{
		ID: "regulator3", Name: "voltage regulator", Letter: "T", Turns: Fixed,
		Pins: []Pin{{"IN", -3, -1, Left}, {"OUT", 3, -1, Right}, {"COM", 0, 3, Down}},
		shapes: []shape{
			box(-2, -2, 4, 4),
			line(-3, -1, -2, -1),
			line(2, -1, 3, -1),
			line(0, 2, 0, 3),
			text(0, 0.1, "U", normal, ink.Middle),
			text(0, 1.2, "const", small, ink.Middle),
			text(-1.8, -0.72, "I", small, ink.Start),
			text(1.8, -0.72, "O", small, ink.End),
		},
	}

	// Comparator has an open-circuit output that pulls low: the barred diamond.
	Comparator = Symbol{
		ID: "comparator", Name: "comparator", Letter: "K", Turns: Fixed,
		Pins: []Pin{{"+", -3, -1, Left}, {"-", -3, 1, Left}, {"OUT", 3, 0, Right}, {"V+", 0, -3, Up}, {"V-", 0, 3, Down}},
		shapes: []shape{
			box(-2, -2, 4, 4),
			line(-3, -1, -2, -1),
			line(-3, 1, -2, 1),
			line(2, 0, 3, 0),
			line(0, -3, 0, -2),
			line(0, 2, 0, 3),
			text(0.35, -1.05, "COMP", small, ink.Middle),
			text(-1.4, -0.5, "+", normal, ink.Middle),
			text(-1.4, 1.5, "−", normal, ink.Middle),
			polygon(1.15, 0, 1.5, -0.35, 1.85, 0, 1.5, 0.35),
			line(1.15, 0.5, 1.85, 0.5),
		},
	}

	// OpAmp is a very high gain.
	OpAmp = Symbol{
		ID: "opamp", Name: "operational amplifier", Letter: "K", Turns: Fixed,
		Pins: []Pin{{"+", -3, -1, Left}, {"-", -3, 1, Left}, {"OUT", 3, 0, Right}, {"V+", 0, -3, Up}, {"V-", 0, 3, Down}},
		shapes: []shape{
			box(-2, -2, 4, 4),
			line(-3, -1, -2, -1),
			line(-3, 1, -2, 1),
			line(2, 0, 3, 0),
			line(0, -3, 0, -2),
			line(0, 2, 0, 3),
			polygon(-0.7, -1.5, -0.7, -0.7, 0, -1.1),
			text(0.75, -0.75, "∞", normal, ink.Middle),
			text(-1.4, -0.5, "+", normal, ink.Middle),
			text(-1.4, 1.5, "−", normal, ink.Middle),
		},
	}

	// ACDC has the kind of input over its diagonal, that of the output under it. PE is for class I only.
	ACDC = Symbol{
		ID: "acdc", Name: "AC/DC converter", Letter: "T", Turns: Fixed,
		Pins: []Pin{{"L", -3, -1, Left}, {"N", -3, 1, Left}, {"PE", 0, 3, Down}, {"+", 3, -1, Right}, {"-", 3, 1, Right}},
		shapes: with(converterBox,
			cw(-1.6, -1, -1, -1, 0.3),
			ccw(-1, -1, -0.4, -1, 0.3),
			line(0, 2, 0, 3),
		),
	}

	// DCDC says nothing about separation; write the rated insulation beside it.
	DCDC = Symbol{
		ID: "dcdc", Name: "DC/DC converter", Letter: "T", Turns: Fixed,
		Pins: []Pin{{"+IN", -3, -1, Left}, {"-IN", -3, 1, Left}, {"+OUT", 3, -1, Right}, {"-OUT", 3, 1, Right}},
		shapes: with(converterBox,
			line(-1.65, -1.25, -0.45, -1.25),
			line(-1.65, -0.9, -1.35, -0.9),
			line(-1.2, -0.9, -0.9, -0.9),
			line(-0.75, -0.9, -0.45, -0.9),
		),
	}

	// Bridge stands on its corner, the diode within pointing to plus.
	Bridge = Symbol{
		ID: "bridge", Name: "rectifier bridge", Letter: "T", Turns: Fixed,
		Pins: []Pin{{"~1", 0, -3, Up}, {"~2", 0, 3, Down}, {"-", -3, 0, Left}, {"+", 3, 0, Right}},
		shapes: []shape{
			polygon(0, -2, 2, 0, 0, 2, -2, 0),
			line(0, -3, 0, -2),
			line(0, 2, 0, 3),
			line(-3, 0, -2, 0),
			line(2, 0, 3, 0),
			line(-1.3, 0, 1.3, 0),
			polygon(-0.65, -0.65, -0.65, 0.65, 0.48, 0),
			line(0.48, -0.65, 0.48, 0.65),
			text(0.5, -2.3, "~", normal, ink.Middle),
			text(0.5, 2.9, "~", normal, ink.Middle),
			text(2.5, -0.3, "+", normal, ink.Middle),
			text(-2.5, -0.3, "−", normal, ink.Middle),
		},
	}

	// Photoswitch closes 13-14 when it gets dark; the contact is free of potential.
	Photoswitch = Symbol{
		ID: "photoswitch", Name: "photo-switch", Letter: "B", Turns: Fixed,
		Pins: []Pin{{"+", -3, -1, Left}, {"-", -3, 1, Left}, {"13", 3, -1, Right}, {"14", 3, 1, Right}},
		shapes: []shape{
			box(-2, -2, 4, 4),
			line(-3, -1, -2, -1),
			line(-3, 1, -2, 1),
			line(2, -1, 3, -1),
			line(2, 1, 3, 1),
			line(-1.6, -1.7, -0.9, -1),
			polygon(-0.9, -1, -1.289, -1.177, -1.077, -1.389).filled(),
			line(-1, -1.7, -0.3, -1),
			polygon(-0.3, -1, -0.689, -1.177, -0.477, -1.389).filled(),
			text(-0.85, 1.55, "lx<", small, ink.Middle),
			line(2, -1, 1.2, -1, 1.2, -0.6),
			line(2, 1, 1.2, 1, 1.2, 0.6),
			line(1.2, 0.6, 0.6, -0.5),
		},
	}
)
