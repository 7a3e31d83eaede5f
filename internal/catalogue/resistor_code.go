package catalogue

import "fmt"

// resistorColours are the digits of IEC 60062, read in an open textbook; the index
// is the digit.
var resistorColours = []string{"black", "brown", "red", "orange", "yellow", "green", "blue", "violet", "grey", "white"}

// Multipliers below one of IEC 60062.
var fractionColours = []struct {
	name string
	mult float64
}{{"gold", 0.1}, {"silver", 0.01}}

// Tolerances of IEC 60062, relative.
var toleranceColours = []struct {
	name string
	tol  float64
}{
	{"brown", 0.01}, {"red", 0.02}, {"green", 0.005}, {"blue", 0.0025},
	{"violet", 0.001}, {"gold", 0.05}, {"silver", 0.10},
}

// ResistorCodeEvidence is the source of the colour code.
var ResistorCodeEvidence = Evidence{Source: "IEC 60062", Seen: true}

// ReadResistor returns the resistance in Ω and the relative tolerance of a resistor
// with three, four or five colour bands (IEC 60062). Three bands mean 20 %.
func ReadResistor(bands ...string) (ohm, tolerance float64, err error) {
	digits := 2
	if len(bands) == 5 {
		digits = 3
	}
	if len(bands) < 3 || len(bands) > 5 {
		return 0, 0, fmt.Errorf("catalogue: a resistor has three to five colour bands, not %d", len(bands))
	}
	for _, b := range bands[:digits] {
		d, ok := digitOf(b)
		if !ok {
			return 0, 0, fmt.Errorf("catalogue: %q is no digit of the colour code", b)
		}
		ohm = 10*ohm + float64(d)
	}
	m, ok := multiplierOf(bands[digits])
	if !ok {
		return 0, 0, fmt.Errorf("catalogue: %q is no multiplier of the colour code", bands[digits])
	}
	ohm *= m
	if len(bands) == 3 {
		return ohm, 0.20, nil
	}
	for _, t := range toleranceColours {
		if t.name == bands[digits+1] {
			return ohm, t.tol, nil
		}
	}
	return 0, 0, fmt.Errorf("catalogue: %q is no tolerance of the colour code", bands[digits+1])
}

func digitOf(colour string) (int, bool) {
	for i, c := range resistorColours {
		if c == colour {
			return i, true
		}
	}
	return 0, false
}

func multiplierOf(colour string) (float64, bool) {
	if d, ok := digitOf(colour); ok {
		m := 1.0
		for range d {
			m *= 10
		}
		return m, true
	}
	for _, f := range fractionColours {
		if f.name == colour {
			return f.mult, true
		}
	}
	return 0, false
}
