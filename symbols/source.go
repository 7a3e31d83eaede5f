package symbols

// Sources.
var (
	// Cell has plus at its long plate.
	Cell = Symbol{
		ID: "cell", Name: "cell", Letter: "G", Turns: Turnable,
		Pins: through("+", "-"),
		shapes: []shape{
			line(0, -2, 0, -0.3),
			line(-1.5, -0.3, 1.5, -0.3),
			line(-0.75, 0.3, 0.75, 0.3).heavy(),
			line(0, 0.3, 0, 2),
			line(0.6, -0.9, 1.2, -0.9),
			line(0.9, -1.2, 0.9, -0.6),
		},
	}

	// Battery shows its two end cells; voltage, capacity and chemistry stand beside it.
	Battery = Symbol{
		ID: "battery", Name: "battery", Letter: "G", Turns: Turnable,
		Pins: through("+", "-"),
		shapes: []shape{
			line(0, -2, 0, -1.3),
			line(-1.5, -1.3, 1.5, -1.3),
			line(-0.75, -0.75, 0.75, -0.75).heavy(),
			line(0, -0.75, 0, 0.75).dashed(),
			line(-1.5, 0.75, 1.5, 0.75),
			line(-0.75, 1.3, 0.75, 1.3).heavy(),
			line(0, 1.3, 0, 2),
			line(0.75, -1.7, 1.25, -1.7),
			line(1, -1.95, 1, -1.45),
		},
	}
)
