package sizing

import (
	"fmt"

	"gloamwright/internal/catalogue"
	"gloamwright/internal/quantity"
)

// SeriesResistorInput states diodes in series and what drives them.
type SeriesResistorInput struct {
	Supply  quantity.Volt // highest: at float, or while boosting
	Forward quantity.Volt // of one diode
	Diodes  int
	Current quantity.Ampere
}

// SeriesResistor returns the resistor that lets exactly Current flow, and its power
// (series resistor of a light-emitting diode, electronics textbooks).
func SeriesResistor(in SeriesResistorInput) (quantity.Ohm, quantity.Watt, []Working) {
	head := float64(in.Supply) - float64(in.Diodes)*float64(in.Forward)
	r := head / float64(in.Current)
	p := head * float64(in.Current)
	return quantity.Ohm(r), quantity.Watt(p), []Working{{
		Name: "series resistor", Formula: "R = (U − n × U_F) ÷ I",
		Substituted: fmt.Sprintf("(%s − %d × %s) ÷ %s", num(float64(in.Supply), "V"), in.Diodes, num(float64(in.Forward), "V"), num(float64(in.Current), "A")),
		Value:       r, Unit: "Ω", Source: "series resistor of a diode (electronics textbooks)",
	}, {
		Name: "power of the series resistor", Formula: "P = (U − n × U_F) × I",
		Substituted: fmt.Sprintf("(%s − %d × %s) × %s", num(float64(in.Supply), "V"), in.Diodes, num(float64(in.Forward), "V"), num(float64(in.Current), "A")),
		Value:       p, Unit: "W", Source: "series resistor of a diode (electronics textbooks)",
	}}
}

// StringInput states a lamp of diode strings across the voltages it will see.
type StringInput struct {
	High, Low quantity.Volt   // at the lamp: at its highest, and at the end of discharge
	Forward   quantity.Volt   // of one diode at its rated current
	Series    int             // diodes in a string
	Current   quantity.Ampere // rated current of a string
	Least     quantity.Ratio  // light that must be left at Low, as a part of rated current; 0 means 0.3
	Pinned    quantity.Ohm    // resistor given by the user; 0: choose
}

// String is a chosen series resistor and what it does.
type String struct {
	Resistor  quantity.Ohm
	Rating    quantity.Watt // next standard power, at twice the heat
	Most      quantity.Ampere
	AtLow     quantity.Ampere
	Dissipate quantity.Watt // in the resistor at High
}

// Figures of practice for strings: light left at the end of discharge, and the
// resistor's rating as a multiple of its heat.
const (
	stringLeast  = 0.3
	powerReserve = 2
)

// StringResistor chooses the series resistor of a diode string: the smallest E24
// value at which the rated current is not exceeded at the highest voltage, a standard
// power rating of at least twice the heat, and a check that at the end of discharge
// enough current is left (common practice).
func StringResistor(in StringInput) (String, []Working, error) {
	least := in.Least
	if least == 0 {
		least = stringLeast
	}
	exact, _, ws := SeriesResistor(SeriesResistorInput{Supply: in.High, Forward: in.Forward, Diodes: in.Series, Current: in.Current})
	vf := in.Forward * quantity.Volt(in.Series)
	if exact <= 0 {
		return String{}, ws[:1], &BlockedError{
			Limit: LimitVoltage, Subject: "the forward voltage of the string", Value: float64(vf), Bound: float64(in.High), Unit: "V",
			Frees: fmt.Sprintf("put at most %d diodes in series", max(1, int(float64(in.Low)/float64(in.Forward)))),
		}
	}
	r := quantity.Ohm(catalogue.E24.AtLeast(float64(exact)))
	if in.Pinned > 0 {
		r = in.Pinned
	}
	s := String{Resistor: r, Most: quantity.Ampere(float64(in.High-vf) / float64(r)), AtLow: quantity.Ampere(max(0, float64(in.Low-vf)/float64(r)))}
	s.Dissipate = quantity.Watt(float64(s.Most) * float64(s.Most) * float64(r))
	s.Rating, _ = catalogue.NextRating(catalogue.ResistorWatts, powerReserve*s.Dissipate)
	ws = append(ws[:1], Working{
		Name: "series resistor fitted", Formula: "next E24 value",
		Substituted: fmt.Sprintf("%s → %s", num(float64(exact), "Ω"), num(float64(r), "Ω")),
		Value:       float64(r), Unit: "Ω", Source: catalogue.PreferredEvidence.String(), Pinned: in.Pinned > 0, Uses: []string{"series resistor"},
	}, Working{
		Name: "string current at the end of discharge", Formula: "I = (U_low − n × U_F) ÷ R",
		Substituted: fmt.Sprintf("max(0 ; (%s − %d × %s) ÷ %s)", num(float64(in.Low), "V"), in.Series, num(float64(in.Forward), "V"), num(float64(r), "Ω")),
		Value:       float64(s.AtLow), Unit: "A", Source: "series resistor of a diode (electronics textbooks)", Uses: []string{"series resistor fitted"},
	})
	switch {
	case s.Rating == 0:
		return s, ws, &BlockedError{
			Limit: LimitDissipation, Subject: "the heat of the series resistor", Value: float64(s.Dissipate),
			Bound: float64(catalogue.ResistorWatts[len(catalogue.ResistorWatts)-1]) / powerReserve, Unit: "W",
			Frees: "put more diodes in series, or use more strings of less current",
		}
	case s.Most > in.Current*(1+slack):
		return s, ws, &BlockedError{
			Limit: LimitLoad, Subject: "the string current at the highest voltage", Value: float64(s.Most), Bound: float64(in.Current), Unit: "A",
			Frees: fmt.Sprintf("fit %v", quantity.Ohm(catalogue.E24.AtLeast(float64(exact)))),
		}
	case s.AtLow < in.Current*quantity.Ampere(least):
		return s, ws, &BlockedError{
			Limit: LimitLoad, Subject: "the string current at the end of discharge", Value: float64(s.AtLow), Bound: float64(in.Current) * float64(least), Unit: "A",
			Frees: fewer(in, least),
		}
	}
	return s, ws, nil
}

// fewer says with how many diodes in series the string keeps its light.
func fewer(in StringInput, least quantity.Ratio) string {
	for n := in.Series - 1; n > 0; n-- {
		vf := in.Forward * quantity.Volt(n)
		if float64(in.Low-vf)/float64(in.High-vf) >= float64(least) {
			return fmt.Sprintf("put %d diodes in series instead of %d", n, in.Series)
		}
	}
	return "stop the discharge at a higher voltage"
}
