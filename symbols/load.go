package symbols

import "gloamwright/layout/ink"

// lampRing is a lamp with its leads.
var lampRing = []shape{
	circle(0, 0, 1.5),
	line(-1.061, -1.061, 1.061, 1.061),
	line(-1.061, 1.061, 1.061, -1.061),
	line(0, -2, 0, -1.5),
	line(0, 1.5, 0, 2),
}

// meterRing is a meter without its letter.
var meterRing = []shape{
	circle(0, 0, 1.5),
	line(0, -2, 0, -1.5),
	line(0, 1.5, 0, 2),
}

// Loads, signalling, measuring.
var (
	// Lamp is any source of light.
	Lamp = Symbol{
		ID: "lamp", Name: "lamp, luminaire", Letter: "E", Turns: Turnable,
		Pins:   through("1", "2"),
		shapes: lampRing,
	}

	// SignalLamp is a lamp that tells something; the slot takes its colour by IEC 60757.
	SignalLamp = Symbol{
		ID: "signal_lamp", Name: "signal lamp", Letter: "P", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: with(lampRing,
			slot(1.8, -0.7, ink.Start).onlyV(),
			slot(1.4, -1.3, ink.Start).onlyH(),
		),
	}

	// LuminaireTube is a long lamp; the slot takes its kind, FL or LED.
	LuminaireTube = Symbol{
		ID: "luminaire_tube", Name: "linear luminaire", Letter: "E", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: []shape{
			line(0, -2, 0, -1.5),
			line(0, 1.5, 0, 2),
			line(-0.7, -1.5, 0.7, -1.5),
			line(-0.7, 1.5, 0.7, 1.5),
			line(0, -1.5, 0, 1.5).heavy(),
			slot(0.9, 0.5, ink.Start).onlyV(),
			slot(0, -1, ink.Middle).onlyH(),
		},
	}

	// Buzzer has its leads on the curved side.
	Buzzer = Symbol{
		ID: "buzzer", Name: "buzzer", Letter: "P", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: []shape{
			line(1, -1.25, 1, 1.25),
			ccw(1, -1.25, 1, 1.25, 1.25),
			line(0, -2, 0, -0.75),
			line(0, 0.75, 0, 2),
		},
	}

	// Voltmeter has an upright letter in every turn.
	Voltmeter = Symbol{
		ID: "voltmeter", Name: "voltmeter", Letter: "P", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: with(meterRing,
			text(0, 0.7, "V", large, ink.Middle),
		),
	}

	// Ammeter has an upright letter in every turn.
	Ammeter = Symbol{
		ID: "ammeter", Name: "ammeter", Letter: "P", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: with(meterRing,
			text(0, 0.7, "A", large, ink.Middle),
		),
	}

	// Shunt has its sense leads, 3 and 4, on the long side.
	Shunt = Symbol{
		ID: "shunt", Name: "shunt", Letter: "B", Turns: Turnable,
		Pins: []Pin{{"1", 0, -2, Up}, {"2", 0, 2, Down}, {"3", 2, -1, Right}, {"4", 2, 1, Right}},
		shapes: with(oblong,
			line(0.5, -1, 2, -1),
			line(0.5, 1, 2, 1),
		),
	}
)
