package symbols

import "gloamwright/layout/ink"

// Cables and references.
var (
	// CableOval marks conductors that run in one cable; the slot takes its designation.
	CableOval = Symbol{
		ID: "cable_oval", Name: "cores of one cable", Letter: "W", Turns: Fixed,
		Pins: []Pin{{"1", 0, -2, Up}, {"2", 2, -2, Up}, {"3", 4, -2, Up}, {"1'", 0, 2, Down}, {"2'", 2, 2, Down}, {"3'", 4, 2, Down}},
		shapes: []shape{
			line(0, -2, 0, 2),
			line(2, -2, 2, 2),
			line(4, -2, 4, 2),
			ellipse(2, 0, 2.7, 0.45),
			slot(5, 0.5, ink.Start),
		},
	}

	// ScreenedCable is a cable with a screen that has a pin of its own.
	ScreenedCable = Symbol{
		ID: "screen", Name: "screened cable", Letter: "W", Turns: Fixed,
		Pins: []Pin{{"1", 0, -2, Up}, {"2", 2, -2, Up}, {"1'", 0, 2, Down}, {"2'", 2, 2, Down}, {"SH", 4, 0, Right}},
		shapes: []shape{
			line(0, -2, 0, 2),
			line(2, -2, 2, 2),
			ellipse(1, 0, 1.7, 0.45).dashed(),
			line(2.7, 0, 4, 0),
		},
	}

	// ReferenceLeaving leads to another sheet. In turn HU it points down, for the cores of a feeder within a board.
	ReferenceLeaving = Symbol{
		ID: "ref_out", Name: "reference, leaving", Turns: Node,
		Pins: []Pin{{"1", 0, 0, Left}},
		shapes: []shape{
			line(0, 0, 1.2, 0),
			line(0.7, -0.4, 1.2, 0, 0.7, 0.4),
		},
	}

	// ReferenceArriving comes from another sheet and points along the flow.
	ReferenceArriving = Symbol{
		ID: "ref_in", Name: "reference, arriving", Turns: Node,
		Pins: []Pin{{"1", 0, 0, Right}},
		shapes: []shape{
			line(0, 0, -1.2, 0),
			line(-0.7, -0.4, -0.2, 0, -0.7, 0.4),
		},
	}
)
