// Package circuit is the model of an expanded site: parts with pins, the
// conductors and ideal joins between them, cables, places, boards, test points.
//
// Three ways of being connected matter and are kept apart:
//
//   - a net joins pins with no resistance between them (joins, and the two sides
//     of a terminal); it is what the solver sees as one node;
//   - a piece joins pins along conductors and joins but stops at terminals; it is
//     what a drawing shows as one connected line;
//   - a potential joins pieces through terminals; it is what a rail's name means.
package circuit

import (
	"gloamwright/internal/describe"
	"gloamwright/internal/quantity"
)

// Circuit is the expanded site. All slices are in their one printing order.
type Circuit struct {
	Places     []*Place
	Stages     []*Stage
	Parts      []*Part
	Conductors []*Conductor
	Cables     []*Cable
	Joins      []Join
	TestPoints []*TestPoint
	Boards     []*Board
	Rails      []*Rail
	Black      *Pin // where the black probe rests: TP0, on L−
}

// Place is an enclosure or a spot where parts stand: +A1 Main cabinet.
type Place struct {
	Key         string // stable identity
	Designation string // "+A1"
	Name        string // "Main cabinet"
}

// Stage is a functional block as it was expanded.
type Stage struct {
	Name    string // as in the description
	Kind    string
	Heading string // "Charger"
	Place   *Place
	Parts   []*Part
	Sketch  *Sketch // nil for a distribution board
	At      describe.Span
}

// Kind says what sort of part it is; it picks the symbol and the words.
type Kind string

// The part kinds.
const (
	Fuse            Kind = "fuse"
	Battery         Kind = "battery"
	Supply          Kind = "supply" // packaged AC to DC supply
	ChargerUnit     Kind = "charger"
	Transformer     Kind = "transformer"
	Bridge          Kind = "bridge"
	Regulator       Kind = "regulator"
	Resistor        Kind = "resistor"
	Preset          Kind = "preset"        // trimmer as rheostat
	Potentiometer   Kind = "potentiometer" // preset, three pins
	Capacitor       Kind = "capacitor"
	Electrolytic    Kind = "electrolytic"
	Diode           Kind = "diode"
	Schottky        Kind = "schottky"
	Zener           Kind = "zener"
	LED             Kind = "led"
	Suppressor      Kind = "suppressor"
	NPN             Kind = "npn"
	PNP             Kind = "pnp"
	Comparator      Kind = "comparator"
	LDR             Kind = "ldr"
	NTC             Kind = "ntc"
	PhotoSwitch     Kind = "photoswitch"
	CutOff          Kind = "cut-off" // low-voltage disconnect module
	Relay           Kind = "relay"
	SwitchIsolator  Kind = "isolator"
	PushButton      Kind = "push-button"
	SignalLamp      Kind = "signal-lamp"
	Voltmeter       Kind = "voltmeter"
	Ammeter         Kind = "ammeter"
	Shunt           Kind = "shunt"
	Terminal        Kind = "terminal" // one terminal of a strip
	BusBar          Kind = "busbar"
	LuminaireLamp   Kind = "luminaire"
	MainsConnection Kind = "mains"
)

// Part is one thing that is bought and fitted.
type Part struct {
	Key         string // stable identity, such as "store/battery"
	Designation string // "-F1"; a terminal "-X1:3"
	Kind        Kind
	Stage       string // stage name; "" for luminaires and field parts
	Circuit     string // lighting circuit name, if it belongs to one
	Place       *Place
	Description string // "Blade fuse", in words, no values
	Values      []Value
	Pins        []*Pin
	Pinned      []string // names of values that the user gave
	Elements    []*Element
	Strip       string // for a terminal: key of its strip
	Order       int    // for a terminal: wanted number on its strip, 0 for the next free
	Lower       bool   // for a terminal of the cabinet's strip: in the lower row
	Note        string // extra requirement for the parts list: "DC rated"
	At          describe.Span
}

// Pin returns the pin of that name; nil if there is none.
func (p *Part) Pin(name string) *Pin {
	for _, n := range p.Pins {
		if n.Name == name {
			return n
		}
	}
	return nil
}

// Value is one rating of a part, ready to print.
type Value struct {
	Name string  // "rating", "capacity", "voltage", …
	Text string  // "15 A"
	Num  float64 // in Unit
	Unit string  // "A"
	Show bool    // printed at the symbol
}

// Pin is a place where a part connects.
type Pin struct {
	Part *Part
	Name string // "1", "A1", "+", "11"
	Net  int    // index into Netlist.Nets, set by Resolve
}

// String returns the full terminal identity, such as "-K1:A1".
func (p *Pin) String() string {
	if p.Part.Kind == Terminal || p.Part.Kind == BusBar {
		return p.Part.Designation
	}
	return p.Part.Designation + ":" + p.Name
}

// Conductor is one core or wire between two terminals.
type Conductor struct {
	Key      string // stable identity
	Number   string // "31", "W3+"
	Cable    *Cable // nil for a single wire
	Circuit  string // lighting circuit, if any
	From, To *Pin
	Size     quantity.WireSize
	Colour   string // IEC 60757
	Length   quantity.Metre
	Positive bool         // on the positive side
	Ohm      quantity.Ohm // at its working temperature
	Rail     string       // rail name when it is a segment of one, such as "1L+"
	At       describe.Span
}

// Cable is a run of one or more conductors between two places.
type Cable struct {
	Key         string
	Designation string // "-W3"
	Cores       []*Conductor
	Size        quantity.WireSize
	Length      quantity.Metre
	From, To    *Place // nil: at a luminaire
	Circuit     string
	Pinned      bool
	At          describe.Span
}

// Join is an ideal connection between two pins: a track on a card, a busbar.
type Join struct{ A, B *Pin }

// Rail names a potential that is drawn as one line: 1L+, L−, P+.
type Rail struct {
	Key      string // stable identity: what feeds it; "" for L−
	Name     string
	Pins     []*Pin // every pin on it, in the energy's order
	Size     quantity.WireSize
	Colour   string
	Positive bool
}

// TestPoint is a labelled terminal where a technician reads a voltage.
type TestPoint struct {
	Key   string
	Label string // "TP3"
	Shows string // "Battery terminals"
	Red   *Pin
	Black *Pin
	Stage string // stage whose sketch draws it, "" on a board
}

// Board is a distribution board.
type Board struct {
	Name      string // stage name
	Title     string // "Main board"
	Number    int    // 1 for the first
	Place     *Place
	Strip     string // "-X3"
	Plus      *Part  // bar L+
	Minus     *Part  // bar L−
	Rail      string // "3L+"
	Feeder    *Cable // nil: fed inside the same cabinet
	InPlus    *Part  // incoming terminals of a fed board, nil otherwise
	InMinus   *Part
	Parent    *Way // way of the board that feeds it, nil otherwise
	Ways      []*Way
	TestPoint *TestPoint // on its plus bar
	At        describe.Span
}

// Way is one fused way of a board.
type Way struct {
	Board               *Board
	Number              int
	Fuse                *Part      // pins 1 (bar side) and 2
	TermPlus, TermMinus *Part      // pins in (inside), out (field)
	WirePlus, WireMinus *Conductor // fuse to terminal, bar to terminal
	Lighting            *Lighting  // one of Lighting, Feeds is set, or neither: a spare
	Feeds               *Board
}

// Spare reports whether nothing hangs on the way.
func (w *Way) Spare() bool { return w.Lighting == nil && w.Feeds == nil }

// Lighting is one lighting circuit with its luminaires.
type Lighting struct {
	Name      string
	Lit       string // outage-night, outage, night, always
	Way       *Way
	Points    []*Point   // the main run, from the board
	TestPoint *TestPoint // at the luminaire with the lowest voltage in the worst condition
	At        describe.Span
}

// Point is one luminaire and the leg that feeds it.
type Point struct {
	Luminaire *Part
	Type      string // luminaire type name of the description
	Place     string
	Leg       *Cable
	Branches  [][]*Point
}

// Walk calls f for every point of the circuit, the main run first at each level,
// with the point before it (nil at the board).
func (l *Lighting) Walk(f func(p, before *Point)) { walk(l.Points, nil, f) }

func walk(run []*Point, before *Point, f func(p, before *Point)) {
	for _, p := range run {
		f(p, before)
		for _, b := range p.Branches {
			walk(b, p, f)
		}
		before = p
	}
}

// Element is one device model of the network. A part may bring several.
type Element struct {
	ID     string // unique: designation, or designation and a suffix
	Part   string // part key
	Model  string // a model name of the network room
	Pins   []ElementPin
	Params []Param
	// Control names the element whose state moves this one: the coil of a contact.
	Control string
}

// ElementPin joins a pin of a model to a pin of the part; the model's own pin
// names are listed in docs/.
type ElementPin struct {
	Name string
	Pin  *Pin
	Net  int // set by Resolve
}

// Param is one number of a model.
type Param struct {
	Name  string
	Value float64 // in SI base units (V, A, Ω, W, s, lx) unless the name says otherwise
	Tol   float64 // half-width relative to Value; 0: exact
}

// Netlist is the circuit as the solver sees it.
type Netlist struct {
	Nets     []string // name of each node; index 0 is the reference, L−
	Elements []*Element
}
