package catalogue

import "gloamwright/internal/quantity"

// RelayClass is a class of general-purpose DC relays.
type RelayClass struct {
	Name        string
	CoilPower   quantity.Watt  // at rated voltage and 20 °C
	PickUp      quantity.Ratio // must-operate voltage at 20 °C, of rated, at most
	DropOut     quantity.Ratio // must-release voltage at 20 °C, of rated, at least
	CoilTol     quantity.Ratio // tolerance of the coil resistance, both ways
	CoilMost    quantity.Ratio // highest continuous coil voltage, of rated
	CoilRise    float64        // K, of the coil at rated power
	Contact     quantity.Ohm   // contact resistance, at most
	ContactTyp  quantity.Ohm
	SwitchTime  quantity.Second
	ContactRows []ContactRating
	Evidence
}

// ContactRating is the current that a contact breaks at a DC voltage, resistive.
type ContactRating struct {
	Volt    quantity.Volt
	Current quantity.Ampere
	Lamp    quantity.Ampere // with filament lamps; 0: not stated
	Evidence
}

// CoilVolts are rated coil voltages. Common practice, no source.
var CoilVolts = []quantity.Volt{5, 6, 9, 12, 24, 48}

// contactRows are the currents of a general-purpose single-gap contact: up to 30 V
// DC from a relay note, above from load-limit curves of the class (memory), and the
// lower of the two at 60 V.
var contactRows = []ContactRating{
	{Volt: 30, Current: 10, Lamp: 3, Evidence: Evidence{Source: "relay ratings, 30 V DC resistive", Seen: true}},
	{Volt: 48, Current: 1.5, Evidence: Evidence{Source: "typical load-limit curves"}},
	{Volt: 60, Current: 0.9, Evidence: Evidence{Source: "typical load-limit curves"}},
	{Volt: 110, Current: 0.4, Evidence: Evidence{Source: "typical load-limit curves"}},
}

// RelayGeneral is a general-purpose power relay. Coil limits read in a catalogue
// glossary (operate at most 80 %, release at least 10 % of rated voltage, coil ± 15 %
// at 23 °C); coil power, rise and contact resistance are typical of the class.
var RelayGeneral = RelayClass{
	Name: "general", CoilPower: 0.9, PickUp: 0.80, DropOut: 0.10, CoilTol: 0.15, CoilMost: 1.10, CoilRise: 35,
	Contact: 0.05, ContactTyp: 0.01, SwitchTime: 0.015, ContactRows: contactRows,
	Evidence: Evidence{Source: "relay catalogue glossary", Seen: true, Note: "coil power, rise and contact resistance are common practice"},
}

// RelayAutomotive is a plug-in relay of the automotive style: 300 Ω at 12 V, operate
// at 7.0 V, release at 0.5 V, read in a datasheet summary; contact 30 A at 12 V.
var RelayAutomotive = RelayClass{
	Name: "automotive", CoilPower: 0.48, PickUp: 7.0 / 12, DropOut: 0.5 / 12, CoilTol: 0.10, CoilMost: 16.0 / 12, CoilRise: 30,
	Contact: 0.05, ContactTyp: 0.003, SwitchTime: 0.010,
	ContactRows: []ContactRating{{Volt: 16, Current: 30, Lamp: 30, Evidence: Evidence{Source: "datasheet, lamp contact", Seen: true}}},
	Evidence:    Evidence{Source: "automotive-style relay data", Seen: true, Note: "coil tolerance and rise from memory"},
}

// RelayClassOf returns the class of that name.
func RelayClassOf(name string) (RelayClass, bool) {
	for _, c := range []RelayClass{RelayGeneral, RelayAutomotive} {
		if c.Name == name {
			return c, true
		}
	}
	return RelayClass{}, false
}

// CoilResistance returns the coil resistance at 20 °C of a relay of that class with
// a rated voltage of v.
func (c RelayClass) CoilResistance(v quantity.Volt) quantity.Ohm {
	return quantity.Ohm(float64(v) * float64(v) / float64(c.CoilPower))
}

// LampInrush is the inrush of filament lamps as a multiple of their steady current,
// read in a switch catalogue.
const LampInrush = 10
