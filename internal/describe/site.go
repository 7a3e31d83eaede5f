// Package describe reads a description: the YAML file that states a job. It
// decodes YAML nodes by hand, so that every value keeps the place where it was
// written, and reports all mistakes of a file in one pass.
package describe

import (
	"maps"

	"gloamwright/internal/quantity"
)

// Span is a stretch of one line of a description. Line and Col count from 1, Col
// and Len count characters. The zero Span means "no place": the value is a default.
type Span struct {
	File           string
	Line, Col, Len int
}

// At is a value together with the place where it was written.
type At[T any] struct {
	Val   T
	Pos   Span
	Given bool // false: Val is the default
}

// Site is a whole description, decoded, its names resolved, its defaults filled in.
type Site struct {
	File       string
	Source     []byte
	Job        Job
	Practice   Practice
	Duty       Duty
	Stages     []*Stage // in file order
	Luminaires []*Luminaire
	Circuits   []*Circuit
	Parts      []*SinglePart
	TestPoints []*ExtraTestPoint
	Sources    Sources // the description and the shared files it reads, for printing lines
}

// Sources holds the texts that spans point into, by the file name of the span.
type Sources map[string][]byte

// Job identifies the work.
type Job struct {
	Number, Title, Client, Site, Prepared, Revision, Date At[string]
}

// Practice is the firm's limits and habits.
type Practice struct {
	Conductors  At[string] // "metric" or "awg"
	Paper       At[string] // "iso" or "ansi"
	Lengths     At[string] // "m" or "ft"; empty: by the system of the conductors
	LampDrop    At[quantity.Ratio]
	ClearWithin At[quantity.Second]
	LoadFactor  At[quantity.Ratio] // continuous load as a share of the fuse rating, at most
	Grouping    At[int]            // loaded circuits run together
	Taper       At[bool]           // legs of one circuit may get thinner
	Margin      At[quantity.Ratio] // battery design margin
	Ageing      At[quantity.Ratio] // capacity left at the end of life
	Positive    At[string]         // IEC 60757 colour code
	Negative    At[string]
	Sizes       At[[]quantity.WireSize]   // sizes in stock; empty: all standard sizes
	Fuses       At[[]quantity.Ampere]     // fuse ratings in stock; empty: all standard ratings
	FuseClass   At[string]                // class of all fuses but the battery's main fuse; empty: the first that fits
	Blocks      At[[]quantity.AmpereHour] // battery block capacities in stock; empty: the standard list
	Texts       At[string]                // folder of the firm's standing texts
	Prices      []Price
	Currency    At[string] // name of the currency of the prices, as it is printed; empty: none
}

// LengthUnit is the unit in which the job's lengths are printed: as `lengths` says, else
// feet where conductors are gauges and metres where they are metric.
func (p *Practice) LengthUnit() quantity.LengthUnit {
	feet := p.Conductors.Val == "awg"
	if p.Lengths.Val != "" {
		feet = p.Lengths.Val == "ft"
	}
	if feet {
		return quantity.InFeet
	}
	return quantity.InMetres
}

// Duty is what is asked of the system.
type Duty struct {
	Nominal      At[quantity.Volt]
	Outage       At[quantity.Second]
	Recharge     At[quantity.Second]
	BatteryRoom  At[quantity.Range[quantity.Celsius]]
	CableAmbient At[quantity.Celsius]
}

// Stage is one functional block of the circuit.
type Stage struct {
	Name, Kind At[string]
	Fields     Fields
}

// Luminaire is one type of lamp.
type Luminaire struct {
	Name, Kind At[string]
	Fields     Fields
}

// Circuit is one fused lighting way.
type Circuit struct {
	Name, Board, Lit At[string]
	Was              At[string] // the name before a renaming, so that labels follow
	Fuse             At[quantity.Ampere]
	Cable            At[quantity.WireSize]
	Way              At[int]
	Points           []*Leg
	Pos              Span
}

// Leg is one piece of cable and the luminaire at its end.
type Leg struct {
	Length    At[quantity.Metre]
	Luminaire At[string]
	Place     At[string]
	Cable     At[quantity.WireSize]
	Branches  [][]*Leg // side runs that hang on this point
	Pos       Span
}

// SinglePart is one entry of parts: a part on any nets, where no stage kind serves.
type SinglePart struct {
	Name, Kind At[string]
	Fields     Fields
	Pins       []PinNet
	Pos        Span
}

// PinNet joins a pin of a single part to a net named as stage.port or freely.
type PinNet struct{ Pin, Net At[string] }

// ExtraTestPoint is a test point besides those that every stage brings.
type ExtraTestPoint struct {
	Name, At_ At[string] // its text, and the terminal or net, as "store.plus"
	Pos       Span
}

// Kind describes one stage or luminaire kind to the decoder: which keys it takes,
// which ports it has. Rooms above register their kinds; describe knows none itself.
//
// A stage kind with a Count field "ways" is a board: circuits may be put on it, and
// the field bounds how many circuits and further boards it feeds. Its Count field
// "way", if it has one, pins the way of the feeding board that it takes.
type Kind struct {
	Name   string
	Doc    string // one or two sentences, for the reference
	Ports  []Port
	Fields []Field
	// MustFeed: a stage of this kind that no other takes from is a mistake.
	MustFeed bool
	// Single: a job has at most one stage of this kind.
	Single bool
	// Nets are further names, besides ports, under which parts and test points may
	// name a net of this stage, as in "store.plus". Nil: such names are not checked here.
	Nets []string
}

// Port is a place where other stages connect.
type Port struct {
	Name string
	Doc  string
	// Sink ports take energy or a signal; Max bounds how many stages may feed one
	// (0: any number). Source ports give it.
	Sink bool
	Max  int
	// Signal ports carry a signal from pin to pin, others feed a rail; Auxiliary
	// rails feed control only, not the lights. What enters a Signal sink is a command:
	// it closes no loop of supply.
	Signal, Auxiliary bool
}

// Type is what a field holds.
type Type uint8

// The field types. The comment names the Go type of the value and an example.
const (
	Voltage          Type = iota + 1 // quantity.Volt, "24 V"
	Current                          // quantity.Ampere, "300 mA"
	Power                            // quantity.Watt, "6 W"
	Length                           // quantity.Metre, "9 m", "22 ft"
	Size                             // quantity.WireSize, "1.5 mm²", "16 AWG"
	Temperature                      // quantity.Celsius, "-5 °C"
	Duration                         // quantity.Second, "4 h", "5 s"
	Illuminance                      // quantity.Lux, "10 lx"
	Flux                             // quantity.Lumen, "600 lm"
	Resistance                       // quantity.Ohm, "4.7 kΩ"
	Capacitance                      // quantity.Farad, "47 µF"
	Capacity                         // quantity.AmpereHour, "55 Ah"
	Percent                          // quantity.Ratio, "5 %"
	ThermalRes                       // quantity.KelvinPerWatt, "3 K/W"
	Count                            // int, "8"
	Text                             // string
	Choice                           // string, one of Choices
	Bool                             // bool, "yes", "no", "true", "false"
	StageRef                         // Ref, "store" or "transfer.break"
	VoltageRange                     // quantity.Range[quantity.Volt], "18 V..32 V"
	TemperatureRange                 // quantity.Range[quantity.Celsius], "5 °C..30 °C"
	Mains                            // quantity.Toleranced[quantity.Volt], "230 V ± 10 %"
	VoltAmp                          // quantity.Rating, "24 V 0.5 A"
	Curve                            // []RatePoint, a list such as ["20 h 55 Ah", "5 h 47 Ah"]
)

// Ref names a stage, and a port of it when Port is not empty.
type Ref struct{ Stage, Port string }

// RatePoint is one point of a capacity table: the capacity when discharged in Time.
type RatePoint struct {
	Time     quantity.Second
	Capacity quantity.AmpereHour
}

// Field is one key of a stage or luminaire kind.
type Field struct {
	Name     string
	Doc      string // one sentence with the unit
	Type     Type
	Required bool
	Default  string // written as a user would; empty: no default, the value is sized or absent
	Min, Max string // written as a user would; empty: no bound
	Choices  []string
	Port     string // for a StageRef: the default port of the named stage that this field means
	// Stands marks a voltage that a part can stand, such as that of a capacitor. It may
	// be above extra-low voltage; others are voltages that the system holds.
	Stands bool
	// Feeds, for a StageRef: this stage feeds the named one; otherwise it is fed by
	// it, through its own sink port if one bears the field's name.
	Feeds bool
}

// Schema is all kinds known to the program.
type Schema struct {
	Stages, Luminaires, Parts []Kind
}

// Fields holds the decoded values of one stage or luminaire by field name.
type Fields struct {
	vals map[string]At[any]
}

// Get returns the value of a field of type T, its place and whether the user gave
// it. A field that was neither given nor has a default yields the zero T and ok
// false. It panics if the field's registered type has another Go type, which is a
// mistake in the calling kind.
func Get[T any](f Fields, name string) (v At[T], ok bool) {
	a, ok := f.vals[name]
	if !ok {
		return v, false
	}
	return At[T]{Val: a.Val.(T), Pos: a.Pos, Given: a.Given}, true
}

// Clone returns a copy that Set does not share.
func (f Fields) Clone() Fields { return Fields{vals: maps.Clone(f.vals)} }

// Set stores a value; the decoder and tests use it.
func (f *Fields) Set(name string, v At[any]) {
	if f.vals == nil {
		f.vals = map[string]At[any]{}
	}
	f.vals[name] = v
}
