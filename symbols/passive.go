package symbols

import "gloamwright/layout/ink"

// oblong is the body of a resistor with its leads.
var oblong = []shape{
	box(-0.5, -1.5, 1, 3),
	line(0, -2, 0, -1.5),
	line(0, 1.5, 0, 2),
}

// bumps is a winding with its leads.
var bumps = []shape{
	line(0, -2, 0, -1.5),
	line(0, 1.5, 0, 2),
	cw(0, -1.5, 0, -0.75, 0.375),
	cw(0, -0.75, 0, 0, 0.375),
	cw(0, 0, 0, 0.75, 0.375),
	cw(0, 0.75, 0, 1.5, 0.375),
}

// Passive components.
var (
	// Resistor has an open body three times as long as wide.
	Resistor = Symbol{
		ID: "resistor", Name: "resistor", Letter: "R", Turns: Turnable,
		Pins:   through("1", "2"),
		shapes: oblong,
	}

	// ResistorAdjustable is set while in use: an arrow across the body.
	ResistorAdjustable = Symbol{
		ID: "resistor_adj", Name: "resistor, adjustable", Letter: "R", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: with(oblong,
			line(-1.25, 1.25, 1.25, -1.25).keep(),
			polygon(1.25, -1.25, 0.967, -0.684, 0.684, -0.967).filled().keep(),
		),
	}

	// ResistorPreset is set once with a tool: a bar instead of the arrowhead.
	ResistorPreset = Symbol{
		ID: "resistor_preset", Name: "resistor, preset", Letter: "R", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: with(oblong,
			line(-1.25, 1.25, 1.25, -1.25).keep(),
			line(0.95, -1.55, 1.55, -0.95).keep(),
		),
	}

	// Potentiometer has its wiper on pin 3.
	Potentiometer = Symbol{
		ID: "potentiometer", Name: "potentiometer", Letter: "R", Turns: Turnable,
		Pins: []Pin{{"1", 0, -2, Up}, {"2", 0, 2, Down}, {"3", 2, 0, Right}},
		shapes: with(oblong,
			line(2, 0, 0.5, 0),
			polygon(0.5, 0, 1.1, -0.2, 1.1, 0.2).filled(),
		),
	}

	// PotentiometerPreset has a bar instead of the wiper's arrowhead.
	PotentiometerPreset = Symbol{
		ID: "potentiometer_preset", Name: "potentiometer, preset", Letter: "R", Turns: Turnable,
		Pins: []Pin{{"1", 0, -2, Up}, {"2", 0, 2, Down}, {"3", 2, 0, Right}},
		shapes: with(oblong,
			line(2, 0, 0.5, 0),
			line(0.75, -0.45, 0.75, 0.45),
		),
	}

	// LDR is a resistor on which light falls; the letter B is for a sensor.
	LDR = Symbol{
		ID: "ldr", Name: "light-dependent resistor", Letter: "B", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: with(oblong,
			line(1.9, -1.5, 0.85, -0.45),
			polygon(0.85, -0.45, 1.083, -0.924, 1.324, -0.683).filled(),
			line(1.9, -0.6, 0.85, 0.45),
			polygon(0.85, 0.45, 1.083, -0.024, 1.324, 0.217).filled(),
		),
	}

	// NTC falls in resistance when warm; as an inrush limiter it bears R.
	NTC = Symbol{
		ID: "ntc", Name: "thermistor, negative coefficient", Letter: "B", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: with(oblong,
			line(-1.7, 1.25, -1.25, 1.25, 1.25, -1.25).keep(),
			text(0.85, 1.6, "−t°", normal, ink.Start).onlyV(),
			text(-1.6, 2.5, "−t°", normal, ink.Start).onlyH(),
		),
	}

	// Varistor depends on voltage.
	Varistor = Symbol{
		ID: "varistor", Name: "varistor", Letter: "F", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: with(oblong,
			line(-1.7, 1.25, -1.25, 1.25, 1.25, -1.25).keep(),
			text(0.85, 1.6, "U", normal, ink.Start).onlyV(),
			text(-1.6, 2.5, "U", normal, ink.Start).onlyH(),
		),
	}

	// Capacitor has a gap of about a quarter of its plates.
	Capacitor = Symbol{
		ID: "capacitor", Name: "capacitor", Letter: "C", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: []shape{
			line(0, -2, 0, -0.4),
			line(-1.5, -0.4, 1.5, -0.4),
			line(-1.5, 0.4, 1.5, 0.4),
			line(0, 0.4, 0, 2),
		},
	}

	// CapacitorPolarised has its plus on pin 1; the sign is drawn, not typed.
	CapacitorPolarised = Symbol{
		ID: "capacitor_pol", Name: "capacitor, polarised", Letter: "C", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: []shape{
			line(0, -2, 0, -0.4),
			line(-1.5, -0.4, 1.5, -0.4),
			line(-1.5, 0.4, 1.5, 0.4),
			line(0, 0.4, 0, 2),
			line(0.6, -1, 1.2, -1),
			line(0.9, -1.3, 0.9, -0.7),
		},
	}

	// Inductor has four bumps.
	Inductor = Symbol{
		ID: "inductor", Name: "inductor", Letter: "R", Turns: Turnable,
		Pins:   through("1", "2"),
		shapes: bumps,
	}

	// InductorCore has a core of iron or ferrite.
	InductorCore = Symbol{
		ID: "inductor_core", Name: "inductor with magnetic core", Letter: "R", Turns: Turnable,
		Pins: through("1", "2"),
		shapes: with(bumps,
			line(0.75, -1.5, 0.75, 1.5),
		),
	}

	// Transformer has its primary at the left.
	Transformer = Symbol{
		ID: "transformer", Name: "transformer with two windings", Letter: "T", Turns: Fixed,
		Pins: []Pin{{"1", -2, -2, Left}, {"2", -2, 2, Left}, {"3", 2, -2, Right}, {"4", 2, 2, Right}},
		shapes: []shape{
			line(-2, -2, -1, -2, -1, -1.5),
			line(-2, 2, -1, 2, -1, 1.5),
			line(2, -2, 1, -2, 1, -1.5),
			line(2, 2, 1, 2, 1, 1.5),
			cw(-1, -1.5, -1, -0.75, 0.375),
			cw(-1, -0.75, -1, 0, 0.375),
			cw(-1, 0, -1, 0.75, 0.375),
			cw(-1, 0.75, -1, 1.5, 0.375),
			ccw(1, -1.5, 1, -0.75, 0.375),
			ccw(1, -0.75, 1, 0, 0.375),
			ccw(1, 0, 1, 0.75, 0.375),
			ccw(1, 0.75, 1, 1.5, 0.375),
		},
	}
)
