package catalogue

import "gloamwright/internal/quantity"

// RelayClass is a class of DC relays and contactors with changeover poles.
type RelayClass struct {
	Name        string
	Title       string         // how the parts list calls it
	CoilPower   quantity.Watt  // at rated voltage and 20 °C
	PickUp      quantity.Ratio // must-operate voltage at 20 °C, of rated, at most
	DropOut     quantity.Ratio // must-release voltage at 20 °C, of rated, at least
	CoilTol     quantity.Ratio // tolerance of the coil resistance, both ways
	CoilMost    quantity.Ratio // highest continuous coil voltage, of rated
	CoilRise    float64        // K, of the coil at rated power
	Contact     quantity.Ohm   // contact resistance, at most
	ContactTyp  quantity.Ohm
	SwitchTime  quantity.Second
	ContactRows []ContactRating // one pole
	SeriesRows  []ContactRating // two poles in series: two gaps share the voltage; empty: not made with two poles
	CoilVolt    quantity.Volt   // greatest rated coil voltage; 0: any
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

// seriesRows are the currents of two such contacts in series. Doubling the voltage at the
// same current is trade practice; load-limit curves of the class with two poles stay below
// that, and the lower is held (from memory).
var seriesRows = []ContactRating{
	{Volt: 30, Current: 10, Lamp: 3, Evidence: Evidence{Source: "relay ratings, 30 V DC resistive", Seen: true}},
	{Volt: 48, Current: 5, Evidence: Evidence{Source: "typical load-limit curves, two poles in series"}},
	{Volt: 60, Current: 3, Evidence: Evidence{Source: "typical load-limit curves, two poles in series"}},
	{Volt: 110, Current: 0.8, Evidence: Evidence{Source: "typical load-limit curves, two poles in series"}},
}

// RelayGeneral is a general-purpose power relay. Coil limits read in a catalogue
// glossary (operate at most 80 %, release at least 10 % of rated voltage, coil ± 15 %
// at 23 °C); coil power, rise and contact resistance are typical of the class.
var RelayGeneral = RelayClass{
	Name: "general", Title: "Changeover relay", CoilPower: 0.9, PickUp: 0.80, DropOut: 0.10, CoilTol: 0.15, CoilMost: 1.10, CoilRise: 35,
	Contact: 0.05, ContactTyp: 0.01, SwitchTime: 0.015, ContactRows: contactRows, SeriesRows: seriesRows,
	Evidence: Evidence{Source: "relay catalogue glossary", Seen: true, Note: "coil power, rise and contact resistance are common practice"},
}

// RelayAutomotive is a plug-in relay of the automotive style: 300 Ω at 12 V, operate
// at 7.0 V, release at 0.5 V, read in a datasheet summary; contact 30 A at 12 V.
var RelayAutomotive = RelayClass{
	Name: "automotive", Title: "Changeover relay, vehicle style", CoilVolt: 12, CoilPower: 0.48, PickUp: 7.0 / 12, DropOut: 0.5 / 12, CoilTol: 0.10, CoilMost: 16.0 / 12, CoilRise: 30,
	Contact: 0.05, ContactTyp: 0.003, SwitchTime: 0.010,
	ContactRows: []ContactRating{{Volt: 16, Current: 30, Lamp: 30, Evidence: Evidence{Source: "datasheet, lamp contact", Seen: true}}},
	Evidence:    Evidence{Source: "automotive-style relay data", Seen: true, Note: "coil tolerance and rise from memory"},
}

// RelayVehicle is the common plug-in changeover relay of vehicles (ISO 7588): picks up at
// 60 % of its rated voltage, lets go at 10 % at the least, for 12 V and 24 V; the break
// contact carries 20 A at 12 V and 10 A at 24 V. From memory.
var RelayVehicle = RelayClass{
	Name: "vehicle", Title: "Changeover relay, vehicle style, strong coil", CoilPower: 1.6, PickUp: 0.60, DropOut: 0.10, CoilTol: 0.10, CoilMost: 1.30, CoilRise: 50,
	Contact: 0.05, ContactTyp: 0.005, SwitchTime: 0.010, CoilVolt: 24,
	ContactRows: []ContactRating{
		{Volt: 16, Current: 20, Lamp: 10, Evidence: Evidence{Source: "ISO 7588 relays, typical datasheets"}},
		{Volt: 30, Current: 10, Lamp: 5, Evidence: Evidence{Source: "ISO 7588 relays, typical datasheets"}},
	},
	Evidence: Evidence{Source: "ISO 7588 relays, typical datasheets"},
}

// contactor returns a class of contactors with break and make poles (IEC 60947-4-1,
// utilisation category DC-1). One pole breaks its current at a low voltage, two in series
// at 60 V; typical sheets of the class state more, so the lower is held. Filament lamps
// are held to the class's AC-3 current: a contactor makes ten times that (IEC 60947-4-1
// table 7), which is their inrush. A coil of extended range picks up at 70 % and bears
// 125 %. All from memory.
func contactor(name, title string, coil quantity.Watt, one, two, lamp quantity.Ampere) RelayClass {
	evi := Evidence{Source: "IEC 60947-4-1 category DC-1, typical datasheets"}
	return RelayClass{
		Name: name, Title: title, CoilPower: coil, PickUp: 0.70, DropOut: 0.10, CoilTol: 0.10, CoilMost: 1.25, CoilRise: 40,
		Contact: 0.02, ContactTyp: 0.002, SwitchTime: 0.05,
		ContactRows: []ContactRating{{Volt: 30, Current: one, Lamp: lamp, Evidence: evi}},
		SeriesRows:  []ContactRating{{Volt: 60, Current: two, Lamp: lamp, Evidence: evi}},
		Evidence:    evi,
	}
}

// Contactors of three frame sizes, by their AC-1 current.
var (
	Contactor25 = contactor("contactor-25", "Contactor with break poles, 25 A frame", 3, 20, 20, 9)
	Contactor40 = contactor("contactor-40", "Contactor with break poles, 40 A frame", 5, 32, 32, 18)
	Contactor63 = contactor("contactor-63", "Contactor with break poles, 63 A frame", 7, 50, 50, 32)
)

// RelayClasses lists the classes in the order in which they are tried.
func RelayClasses() []RelayClass {
	return []RelayClass{RelayAutomotive, RelayGeneral, RelayVehicle, Contactor25, Contactor40, Contactor63}
}

// RelayClassOf returns the class of that name.
func RelayClassOf(name string) (RelayClass, bool) {
	for _, c := range RelayClasses() {
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
